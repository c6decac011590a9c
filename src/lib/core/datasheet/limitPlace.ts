import type { Basis } from '../limits/basis';
import type { LimitRow } from '../limits/limit';
import { draftMessages } from '../messages/datasheet';
import type { BoundTexts, LimitBinding, StruckOut } from './binding';
import { boundTextsOf, computedBasis, guarantees, threeTexts, type Part } from './boundTexts';
import { limitState } from './limitState';
import type { Place } from './place';
import type { ResolveInput } from './resolveInput';

/** What the template and the draft say of a limit's place. */
type LimitPlaceSeed = Pick<
	Place,
	| 'id'
	| 'slot'
	| 'bias'
	| 'section'
	| 'label'
	| 'essential'
	| 'name'
	| 'symbol'
	| 'title'
	| 'conditions'
	| 'temperatureCelsius'
	| 'frequency'
	| 'reverseVoltage'
	| 'unit'
> & {
	readonly held: LimitBinding | StruckOut | null;
	readonly row: LimitRow | undefined;
	readonly required: readonly Part[];
};

/** A limit's place: its binding against what the measurements say now. */
export function limitPlace(
	{ policies }: ResolveInput,
	{ held, row, required, ...seed }: LimitPlaceSeed
): Place {
	const limit = held?.kind === 'limit' ? held : null;
	const policy = policies.get(limit?.policyVersion ?? row?.policyVersion ?? 0) ?? null;
	const basis = limit?.basis ?? (policy === null ? null : computedBasis(policy.rules));
	const current =
		row === undefined || basis === null ? null : boundTextsOf(row, { basis, rules: policy?.rules });
	const needed = neededParts(required, { bias: seed.bias, declaredBasis: limit?.basis });
	const state = limitState(held, hasNumbers(current) ? current : null, needed);
	const isCurrent = state === 'bound' && current !== null;
	const prints = isCurrent ? current : (limit?.printed ?? null);
	const stands = isCurrent ? current : limit?.printed;
	return {
		...seed,
		kind: 'limit',
		state,
		binding: held,
		basis,
		policy,
		prints,
		unitScale: stands?.unitScale ?? 1,
		current,
		required,
		problem: problemOf({ state, prints, current, row, needed, name: seed.name, basis, policy }),
		warnings: row?.warnings ?? [],
		trace: stands?.inputHash ?? null,
		sampleSize: stands?.sampleSize ?? 0,
		independentLots: stands?.independentLots ?? 0
	};
}

/**
 * Which parts have to be there. A row of a table may be declared *typical*, and then needs its
 * typical value alone; a characteristic needs what its template asks for on any basis.
 */
export function neededParts(
	required: readonly Part[],
	{
		bias,
		declaredBasis
	}: { readonly bias: number | null; readonly declaredBasis: Basis | undefined }
): readonly Part[] {
	return bias !== null && declaredBasis === 'typical' ? ['typical'] : required;
}

function hasNumbers(texts: BoundTexts | null): boolean {
	return texts !== null && (texts.minimum ?? texts.typical ?? texts.maximum) !== null;
}

function problemOf(of: {
	readonly state: Place['state'];
	readonly prints: BoundTexts | null;
	readonly current: BoundTexts | null;
	readonly row: LimitRow | undefined;
	readonly needed: readonly Part[];
	readonly name: string;
	readonly basis: Place['basis'];
	readonly policy: Place['policy'];
}): string | null {
	const { state, prints, current, row, needed, name, basis, policy } = of;
	const missing = needed.filter((part) => (current?.[part] ?? null) === null);
	const why = () => {
		if (row === undefined) return draftMessages.nothingComputed(name);
		if (policy !== null && basis !== null && !guarantees(basis, policy.rules))
			return draftMessages.sigmaNoGuarantee(policy.rules.name);
		return draftMessages.missingParts(missing, row.refusals);
	};
	switch (state) {
		case 'unbound':
			return missing.length === 0 ? draftMessages.bindingUnread() : why();
		case 'stale':
			return prints && current
				? draftMessages.stale(threeTexts(prints), threeTexts(current))
				: null;
		case 'unsupported':
			return row === undefined
				? draftMessages.measurementsGone()
				: draftMessages.unsupported(why());
		case 'bound':
		case 'overridden':
		case 'struck out':
			return null;
		default:
			return state satisfies never;
	}
}
