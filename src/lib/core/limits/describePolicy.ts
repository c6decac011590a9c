import type { LimitPolicy } from './policy';
import { percent } from './digits';
import { resolutionText } from './resolutionText';

/** What a policy promises, in one or two sentences. */
export function describePolicy(rules: LimitPolicy): string {
	return [methodText(rules), gateText(rules), roundingText(rules)].join(' ');
}

/** Method and promise without the gates: for a line of a table. */
export function methodText(rules: LimitPolicy): string {
	switch (rules.method) {
		case 'normal':
		case 'lots':
		case 'order':
			return `Content ${rules.content} at confidence ${rules.confidence}, ${rules.tails === 'each' ? 'each limit on its own' : 'both limits together'}.`;
		case 'sigma':
			return `Mean ± ${rules.k ?? 3} standard deviations; no guarantee by itself.`;
		default:
			return rules.method satisfies never;
	}
}

function gateText({ minimumLots, minimumDevices }: LimitPolicy): string {
	return `At least ${minimumLots} ${minimumLots === 1 ? 'lot' : 'lots'} and ${minimumDevices} devices.`;
}

function roundingText({ drift, resolution }: LimitPolicy): string {
	const rounding = `${resolutionText(resolution, '')}, rounded outwards.`.replace('\u00a0,', ',');
	return drift === 0 ? rounding : `Drift ${percent(drift)} outwards. ${rounding}`;
}
