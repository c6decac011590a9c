import type { Distribution } from '../../distributions/summary';
import type { NamedMoment } from './method';

/** The mean of all devices together. */
export function pooledMean({ mean, sampleSize, origin }: Distribution): NamedMoment {
	return {
		value: mean,
		name: 'Mean',
		method:
			origin === 'entered'
				? `As entered for ${sampleSize} devices, not recomputable.`
				: `All ${sampleSize} devices together, not interpolated.`
	};
}

/** The standard deviation of all devices together. */
export function totalDeviation({
	standardDeviation,
	sampleSize,
	origin
}: Distribution): NamedMoment {
	return {
		value: standardDeviation,
		name: 'Spread',
		method:
			origin === 'entered'
				? `As entered for ${sampleSize} devices, not recomputable.`
				: 'Standard deviation of all devices about their own mean, divided by n − 1.'
	};
}
