import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import type { LimitPolicy } from './policy';

/** Why the data is too little for the policy; empty when it is enough. */
export function gateRefusals(distribution: Distribution, rules: LimitPolicy): string[] {
	const { independentLots, sampleSize } = distribution;
	return [
		...(independentLots < rules.minimumLots
			? [limitMessages.tooFewLots(rules.minimumLots, independentLots)]
			: []),
		...(sampleSize < rules.minimumDevices
			? [limitMessages.tooFewDevices(rules.minimumDevices, sampleSize)]
			: [])
	];
}
