import type { LimitPolicy } from './policy';
import { driftText } from './driftText';
import { DEFAULT_K } from './methods/sigma';
import { resolutionText } from './resolutionText';

/** What a policy promises, in one or two sentences. */
export function describePolicy(rules: LimitPolicy): string {
	return [methodText(rules), gateText(rules), roundingText(rules)].join(' ');
}

/** Method and promise without the gates: for a line of a table. */
export function methodText(rules: LimitPolicy): string {
	switch (rules.method) {
		case 'lots':
			return `For devices of future lots: ${promiseText(rules)}`;
		case 'normal':
			return `One normal population: ${promiseText(rules)}`;
		case 'order':
			return `Any shape, by order statistics: ${promiseText(rules)}`;
		case 'sigma':
			return `Mean ± ${rules.k ?? DEFAULT_K} standard deviations; no guarantee by itself.`;
		default:
			return rules.method satisfies never;
	}
}

function promiseText({ content, confidence, tails }: LimitPolicy): string {
	return `content ${content} at confidence ${confidence}, ${tails === 'each' ? 'each limit on its own' : 'both limits together'}.`;
}

function gateText({ minimumLots, minimumDevices }: LimitPolicy): string {
	return `At least ${minimumLots} ${minimumLots === 1 ? 'lot' : 'lots'} and ${minimumDevices} devices.`;
}

function roundingText({ drift, resolution }: LimitPolicy): string {
	const rounding = `${resolutionText(resolution, '')}, rounded outwards.`.replace('\u00a0,', ',');
	const words = driftText(drift);
	return words === 'none' ? rounding : `Drift ${words} outwards. ${rounding}`;
}
