import type { Condition } from '../characteristics/condition';
import type { Distribution } from '../distributions/summary';
import { roundNearest } from '../units/rounding';
import { inSi } from '../units/unit';
import { significant, withoutNoise } from './digits';
import type { LimitValue } from './limit';
import type { LimitPolicy } from './policy';
import { resolutionText } from './resolutionText';
import { sampleSteps } from './sampleSteps';

/** The type-8 median, in SI. */
export function medianOf(distribution: Distribution): number {
	const median = distribution.quantiles.find(({ probability }) => probability === 0.5);
	if (median === undefined) {
		throw new RangeError(`distribution ${distribution.conditionKey} stores no median`);
	}
	return median.value;
}

/** Typical: the median of the measured devices, rounded to nearest. It is not guaranteed. */
export function typicalValue(
	distribution: Distribution,
	rules: Pick<LimitPolicy, 'resolution'>,
	{ condition, unit, unitScale }: { condition: Condition; unit: string; unitScale: number }
): LimitValue {
	const raw = medianOf(distribution);
	const inUnit = withoutNoise(raw / unitScale);
	const printed = roundNearest(inUnit, rules.resolution);
	return {
		raw,
		printed: inSi(printed.value, { symbol: unit, scale: unitScale }),
		text: printed.text,
		derivation: [
			...sampleSteps(distribution, condition),
			{
				name: 'Median',
				method: 'Sample quantile at 0.5, type 8 of Hyndman and Fan 1996.',
				value: inUnit,
				unit,
				text: significant(inUnit, 7)
			},
			{
				name: 'Round to nearest',
				method: `${resolutionText(rules.resolution, unit)}, in decimal arithmetic.`,
				value: printed.value,
				unit,
				text: printed.text
			}
		]
	};
}
