import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import type { LimitPolicy } from './policy';

/** Why the data is too little for the policy; empty when it is enough. */
export function gateRefusals(distribution: Distribution, rules: LimitPolicy): string[] {
	const { sampleSize } = distribution;
	return [
		...lotRefusals(distribution, rules),
		...(sampleSize < rules.minimumDevices
			? [limitMessages.tooFewDevices(rules.minimumDevices, sampleSize)]
			: [])
	];
}

/** An entered summary knows no lots; it passes only where a policy asks for no more than one. */
function lotRefusals(
	{ independentLots, origin }: Distribution,
	{ minimumLots }: LimitPolicy
): string[] {
	if (origin === 'entered') {
		return minimumLots > 1 ? [limitMessages.enteredLotsUnknown(minimumLots)] : [];
	}
	return independentLots < minimumLots
		? [limitMessages.tooFewLots(minimumLots, independentLots)]
		: [];
}
