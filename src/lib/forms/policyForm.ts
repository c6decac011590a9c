import { z } from 'zod';
import { NO_ALLOWANCE, type Allowance, type Side } from '$lib/core/limits/allowance';
import { FEWEST_LOTS } from '$lib/core/limits/methods/lots';
import { DEFAULT_K } from '$lib/core/limits/methods/sigma';
import {
	limitMethod,
	limitPolicy,
	uncertaintyTreatment,
	type Drift,
	type LimitPolicy,
	type Resolution
} from '$lib/core/limits/policy';
import { policyMessages as say } from '$lib/core/messages/policies';
import { decimalField, typedNumber } from './decimalField';

const whole = (least: number, message: string) =>
	decimalField((value) => Number.isInteger(value) && value >= least && value <= 1e6, message);
const orEmpty = (field: z.ZodType<string, string>) => z.union([z.literal(''), field]);
const share = decimalField((value) => value > 0 && value < 1, say.shareFormat());

const policyFieldset = z.object({
	name: z.string().trim().min(1, say.nameNeeded()).max(80, say.tooLong(80)),
	method: limitMethod,
	content: share,
	confidence: share,
	tails: z.enum(['each', 'both']),
	span: z.enum(['each-bias', 'whole-curve']),
	/** Of `sigma` only. */
	k: orEmpty(decimalField((value) => value > 0 && value <= 20, say.factorFormat())),
	minimumLots: whole(1, say.lotsFormat()),
	minimumDevices: whole(2, say.devicesFormat()),
	/** `0.5 %` of the value, or an amount in SI. */
	driftMinimum: z.string().trim(),
	driftMaximum: z.string().trim(),
	uncertaintyTreatment,
	guardBand: orEmpty(decimalField((value) => value >= 0 && value <= 10, say.guardBandFormat())),
	/** `3` significant figures, or a step of `0.1` units. */
	resolutionKind: z.enum(['figures', 'step']),
	resolution: z.string().trim(),
	testResolutionKind: z.enum(['finer', 'figures', 'step']),
	testResolution: z.string().trim(),
	/** The version the person saw; 0 for a new policy. */
	seen: z.coerce.number().int().nonnegative().default(0)
});
export type PolicyForm = z.infer<typeof policyFieldset>;

export const policyForm = policyFieldset.superRefine((form, context) => {
	const refuse = (path: keyof PolicyForm, message: string) =>
		context.addIssue({ code: 'custom', path: [path], message });
	for (const field of ['driftMinimum', 'driftMaximum'] as const) {
		if (allowanceOf(form[field]) === undefined) refuse(field, say.driftFormat());
	}
	if (resolutionOf(form.resolutionKind, form.resolution) === undefined) {
		refuse('resolution', say.resolutionFormat(form.resolutionKind));
	}
	if (
		form.testResolutionKind !== 'finer' &&
		resolutionOf(form.testResolutionKind, form.testResolution) === undefined
	) {
		refuse('testResolution', say.resolutionFormat(form.testResolutionKind));
	}
	if (form.span === 'whole-curve' && form.method !== 'lots') {
		refuse('span', say.wholeCurveNeedsLots());
	}
	if (form.method === 'lots' && (typedNumber(form.minimumLots) ?? 0) < FEWEST_LOTS) {
		refuse('minimumLots', say.lotsMethodNeeds(FEWEST_LOTS));
	}
});

/** `0.5 %` or an amount in SI; nothing is no drift. `undefined` for anything else. */
function allowanceOf(text: string): Allowance | undefined {
	if (text === '') return NO_ALLOWANCE;
	const isShare = text.endsWith('%');
	const value = typedNumber(isShare ? text.slice(0, -1) : text);
	if (value === undefined || value < 0 || (isShare && value >= 100)) return undefined;
	if (value === 0) return NO_ALLOWANCE;
	return isShare ? { relative: Number((value / 100).toPrecision(12)) } : { absolute: value };
}

function resolutionOf(kind: 'figures' | 'step', text: string): Resolution | undefined {
	const value = typedNumber(text);
	if (value === undefined) return undefined;
	if (kind === 'step') return value > 0 ? { step: value } : undefined;
	return Number.isInteger(value) && value >= 1 && value <= 8
		? { significantFigures: value }
		: undefined;
}

function driftOf(form: Pick<PolicyForm, 'driftMinimum' | 'driftMaximum'>): Drift {
	const minimum = allowanceOf(form.driftMinimum) ?? NO_ALLOWANCE;
	const maximum = allowanceOf(form.driftMaximum) ?? NO_ALLOWANCE;
	return 'relative' in minimum && 'relative' in maximum && minimum.relative === maximum.relative
		? minimum.relative
		: { minimum, maximum };
}

/** The rules of a valid form. */
export function policyRulesOf(form: PolicyForm): LimitPolicy {
	const { name, method, tails, span, uncertaintyTreatment: treatment } = form;
	const number = (text: string) => typedNumber(text);
	return limitPolicy.parse({
		name,
		method,
		content: number(form.content),
		confidence: number(form.confidence),
		tails,
		span,
		...(method === 'sigma' ? { k: number(form.k) ?? DEFAULT_K } : {}),
		minimumLots: number(form.minimumLots),
		minimumDevices: number(form.minimumDevices),
		drift: driftOf(form),
		uncertaintyTreatment: treatment,
		...(form.guardBand === '' ? {} : { guardBand: number(form.guardBand) }),
		resolution: resolutionOf(form.resolutionKind, form.resolution),
		...(form.testResolutionKind === 'finer'
			? {}
			: { testResolution: resolutionOf(form.testResolutionKind, form.testResolution) })
	});
}

/** Rules as the form shows them, with the number of the version that is seen. */
export function policyFields(rules: LimitPolicy, seen: number): PolicyForm {
	const { drift, resolution, testResolution } = rules;
	const driftOn = (side: Side) =>
		allowanceField(typeof drift === 'number' ? { relative: drift } : drift[side]);
	return {
		name: rules.name,
		method: rules.method,
		content: String(rules.content),
		confidence: String(rules.confidence),
		tails: rules.tails,
		span: rules.span,
		k: rules.k === undefined ? '' : String(rules.k),
		minimumLots: String(rules.minimumLots),
		minimumDevices: String(rules.minimumDevices),
		driftMinimum: driftOn('minimum'),
		driftMaximum: driftOn('maximum'),
		uncertaintyTreatment: rules.uncertaintyTreatment,
		guardBand: rules.guardBand === undefined ? '' : String(rules.guardBand),
		resolutionKind: 'step' in resolution ? 'step' : 'figures',
		resolution: resolutionField(resolution),
		testResolutionKind:
			testResolution === undefined ? 'finer' : 'step' in testResolution ? 'step' : 'figures',
		testResolution: testResolution === undefined ? '' : resolutionField(testResolution),
		seen
	};
}

function allowanceField(by: Allowance = NO_ALLOWANCE): string {
	return 'relative' in by
		? `${Number((by.relative * 100).toPrecision(12))} %`
		: String(by.absolute);
}

const resolutionField = (of: Resolution) => String('step' in of ? of.step : of.significantFigures);
