import { normalBetween, normalUpperTail } from '../../../src/lib/core/stats/normalDistribution';
import { normalQuantile } from '../../../src/lib/core/stats/normalQuantile';
import { roundNearest, roundOutward } from '../../../src/lib/core/units/rounding';
import { identifier, quantity, type Check } from '../check';
import { numberAt, type Row } from '../rows';

/** A value or step that is written as text, so that its decimals are exact. */
const decimal = ({ inputs }: Row, key: string) => Number(inputs[key]);

/** Area J: conformance, guard bands, rounding. */
export const DECISION_CHECKS: readonly Check[] = [
	{
		name: 'probability of conformance',
		covers: quantity('J', 'conformance probability', 'same, unrounded', 'two-sided conformance'),
		value: ({ inputs }) => {
			const [y, u] = [numberAt(inputs, 'y'), numberAt(inputs, 'u')];
			if (inputs['upper_limit'] !== undefined)
				return normalUpperTail((y - numberAt(inputs, 'upper_limit')) / u);
			return normalBetween((numberAt(inputs, 'TL') - y) / u, (numberAt(inputs, 'TU') - y) / u);
		}
	},
	{
		name: 'risk behind a guard band',
		covers: quantity('J', 'largest specific risk'),
		value: ({ inputs }) => normalUpperTail(Math.abs(numberAt(inputs, 'r') * numberAt(inputs, 'k')))
	},
	{
		name: 'guard band for a risk',
		covers: quantity('J', 'guard-band multiplier of u'),
		value: ({ inputs }) => normalQuantile(1 - numberAt(inputs, 'alpha'))
	},
	{
		name: 'rounding to the nearest',
		covers: identifier(/^J-iso80000-(A-12\.275|B-)/),
		value: (row) => roundNearest(decimal(row, 'value'), { step: decimal(row, 'step') }).value
	},
	{
		name: 'rounding outwards',
		covers: identifier(/^J-outward-/),
		value: (row) => {
			const isMinimum = row.id.includes('-min-') || row.id.endsWith('trap2');
			const step = { step: decimal(row, 'step') };
			return roundOutward(decimal(row, 'value'), isMinimum ? 'down' : 'up', step).value;
		}
	}
];
