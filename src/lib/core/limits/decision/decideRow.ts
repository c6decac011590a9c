import type { Distribution } from '../../distributions/summary';
import { inSi } from '../../units/unit';
import type { Allowance, Side } from '../allowance';
import { readDigits } from '../digits';
import type { LimitRow, LimitValue } from '../limit';
import type { LimitPolicy } from '../policy';
import { statedUncertainty } from '../statedUncertainty';
import { testLimit } from '../testLimit';
import { testYield } from '../testYield';
import type { DecidedLimit, LimitDecision } from './limitDecision';

/**
 * A computed row with the limits that a person decided in their place. Each keeps the machine's
 * derivation, ends it with the decision, and gets its own test limit and yield.
 */
export function decideRow(
	row: LimitRow,
	decided: DecidedLimit,
	{ rules, distribution }: { readonly rules: LimitPolicy; readonly distribution: Distribution }
): LimitRow {
	const { decision } = decided;
	const isTested = row.basis === 'tested' || rules.guardBand !== undefined;
	const uncertainty = testerUncertainty(decision, rules, distribution);
	const { unit, unitScale } = decision;
	const on = (side: Side): LimitValue | null => {
		const machine = row[side];
		const text = decision[side] ?? machine?.text;
		if (text === undefined) return null;
		const test = isTested
			? testLimit(readDigits(text), { side, rules, uncertainty, unit, unitScale })
			: undefined;
		if (machine !== null && decision[side] === null) {
			return test === undefined ? machine : { ...machine, test };
		}
		return decidedValue(machine, { side, text, test, decided });
	};
	const [minimum, maximum] = [on('minimum'), on('maximum')];
	const test = { minimum: minimum?.test?.value ?? null, maximum: maximum?.test?.value ?? null };
	return {
		...row,
		minimum,
		maximum,
		...(test.minimum === null && test.maximum === null
			? {}
			: { testYield: testYield(distribution, test) })
	};
}

/** U of the production tester: as it was decided, or else as the measurement sets state it. */
export function testerUncertainty(
	decision: Pick<LimitDecision, 'testerUncertainty'> | undefined,
	rules: LimitPolicy,
	distribution: Distribution
): Allowance {
	const decided = decision?.testerUncertainty ?? null;
	return decided === null
		? (statedUncertainty(distribution, rules).stated ?? { relative: 0 })
		: { absolute: decided };
}

function decidedValue(
	machine: LimitValue | null,
	{
		side,
		text,
		test,
		decided
	}: {
		readonly side: Side;
		readonly text: string;
		readonly test: LimitValue['test'];
		readonly decided: DecidedLimit;
	}
): LimitValue {
	const { unit, unitScale } = decided.decision;
	const value = readDigits(text);
	const printed = inSi(value, { symbol: unit, scale: unitScale });
	const said = machine === null ? 'The machine prints none' : `The machine prints ${machine.text}`;
	return {
		raw: machine?.raw ?? printed,
		printed,
		text,
		derivation: [
			...(machine?.derivation ?? []),
			{
				name: `Decided ${side}`,
				method: `${said}${machine === null ? '' : `\u00a0${unit}`}. ${decided.by}, ${decided.at.slice(0, 10)}: ${decided.reason}`,
				value,
				unit,
				text
			}
		],
		...(test === undefined ? {} : { test }),
		...(machine?.factor === undefined ? {} : { factor: machine.factor })
	};
}
