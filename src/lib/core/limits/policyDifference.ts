import { driftText } from './driftText';
import type { LimitPolicy, Resolution } from './policy';
import { resolutionText } from './resolutionText';

export interface PolicyChange {
	readonly what: string;
	readonly before: string;
	readonly after: string;
}

const resolutionWords = (of: Resolution | undefined) =>
	of === undefined ? 'one finer than printed' : resolutionText(of, 'units').replace('\u00a0', ' ');

/** Every rule of a policy in words, so that two versions can be compared line by line. */
const RULES = {
	name: { what: 'Name', text: ({ name }) => name },
	method: { what: 'Method', text: ({ method }) => method },
	content: { what: 'Content P', text: ({ content }) => String(content) },
	confidence: { what: 'Confidence γ', text: ({ confidence }) => String(confidence) },
	tails: {
		what: 'Tails',
		text: ({ tails }) => (tails === 'each' ? 'each on its own' : 'both together')
	},
	span: {
		what: 'Span',
		text: ({ span }) => (span === 'each-bias' ? 'each bias' : 'whole curve')
	},
	k: { what: 'k', text: ({ k }) => (k === undefined ? 'none' : String(k)) },
	minimumLots: { what: 'Lots, at least', text: ({ minimumLots }) => String(minimumLots) },
	minimumDevices: {
		what: 'Devices, at least',
		text: ({ minimumDevices }) => String(minimumDevices)
	},
	drift: { what: 'Drift', text: ({ drift }) => driftText(drift) },
	uncertaintyTreatment: {
		what: 'Uncertainty',
		text: ({ uncertaintyTreatment: treatment }) =>
			treatment === 'outwards' ? 'added outwards' : 'not added'
	},
	guardBand: {
		what: 'Guard band r',
		text: ({ guardBand }) => (guardBand === undefined ? 'none' : String(guardBand))
	},
	resolution: { what: 'Resolution', text: ({ resolution }) => resolutionWords(resolution) },
	testResolution: {
		what: 'Resolution of test limits',
		text: ({ testResolution }) => resolutionWords(testResolution)
	}
} as const satisfies Record<
	keyof LimitPolicy,
	{ readonly what: string; readonly text: (rules: LimitPolicy) => string }
>;

/** What a version of a policy says otherwise than the one before it. */
export function policyDifference(before: LimitPolicy, after: LimitPolicy): PolicyChange[] {
	return Object.values(RULES).flatMap(({ what, text }) => {
		const [old, now] = [text(before), text(after)];
		return old === now ? [] : [{ what, before: old, after: now }];
	});
}
