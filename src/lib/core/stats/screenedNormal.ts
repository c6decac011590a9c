import { OutsideDomainError } from './errors';
import { findRoot } from './findRoot';
import { panelRule } from './gaussLegendre';
import { normalBetween, normalDensity, normalLowerTail } from './normalDistribution';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';

/**
 * A pair of standard normal quantities of which one is screened: X passes between two test limits,
 * both in deviations from its mean, and Y is what the device does elsewhere.
 */
export interface NormalScreen {
	readonly correlation: number;
	readonly lowest: number;
	readonly highest: number;
}

function check(statistic: string, { correlation, lowest, highest }: NormalScreen): void {
	if (!(Math.abs(correlation) < 1))
		throw new OutsideDomainError(statistic, 'a correlation between −1 and 1', correlation);
	if (!(lowest < highest))
		throw new OutsideDomainError(statistic, `a highest above ${lowest}`, highest);
}

/** Share of devices that pass: Φ(b) − Φ(a). */
export function screenYield({ lowest, highest }: Omit<NormalScreen, 'correlation'>): number {
	return normalBetween(lowest, highest);
}

/**
 * P(Y ≤ y) for the devices that pass, by quadrature over X. It holds only while production keeps the
 * distribution of X; a guarantee uses {@link screenedEdge}.
 *
 * @throws {OutsideDomainError} unless −1 < correlation < 1 and lowest < highest
 */
export function screenedLowerTail(y: number, screen: NormalScreen): number {
	check('screenedLowerTail', screen);
	const { correlation, lowest, highest } = screen;
	const from = Math.max(lowest, -12);
	const to = Math.min(highest, 12);
	const residual = Math.sqrt(1 - correlation * correlation);
	const step = correlation === 0 ? 0 : y / correlation;
	const width = correlation === 0 ? 1 : residual / Math.abs(correlation);
	const cuts = [
		...[-8, -5, -3, -1.5, 0, 1.5, 3, 5, 8],
		...[-8, -4, -2, -1, 0, 1, 2, 4, 8].map((z) => step + z * width)
	];
	const inside = cuts.filter((x) => x > from && x < to).sort((a, b) => a - b);
	const { nodes, weights } = panelRule([from, ...inside, to]);
	let sum = 0;
	for (let i = 0; i < nodes.length; i++) {
		const x = nodes[i]!;
		sum += weights[i]! * normalDensity(x) * normalLowerTail((y - correlation * x) / residual);
	}
	return sum / screenYield(screen);
}

/** The y with this probability below it among the devices that pass. */
export function screenedQuantile(probability: number, screen: NormalScreen): number {
	requireProbability('screenedQuantile', 'a probability', probability);
	check('screenedQuantile', screen);
	return findRoot((y) => screenedLowerTail(y, screen) - probability, -40, 40, 1e-12);
}

/** Mean and variance of X among the devices that pass. */
function screenedX({ lowest, highest }: NormalScreen) {
	const pass = normalBetween(lowest, highest);
	const [atLowest, atHighest] = [normalDensity(lowest), normalDensity(highest)];
	const mean = (atLowest - atHighest) / pass;
	const edge = (x: number, density: number) => (Number.isFinite(x) ? x * density : 0);
	const variance = 1 + (edge(lowest, atLowest) - edge(highest, atHighest)) / pass - mean * mean;
	return { mean, variance };
}

/**
 * Mean and variance of Y among the devices that pass, by the moments of the truncated normal.
 *
 * Source: Johnson, Kotz and Balakrishnan 1994, section 13.10.1.
 */
export function screenedMoments(screen: NormalScreen): {
	readonly mean: number;
	readonly variance: number;
} {
	check('screenedMoments', screen);
	const { mean, variance } = screenedX(screen);
	const { correlation } = screen;
	return {
		mean: correlation * mean,
		variance: 1 - correlation * correlation * (1 - variance)
	};
}

/**
 * The bound ρ·b + z_P √(1 − ρ²) for a device at the test limit b itself, which holds for any
 * distribution of X inside the window; the edge rule with known parameters.
 */
export function screenedEdge(
	edge: number,
	{ correlation, content }: { readonly correlation: number; readonly content: number }
): number {
	requireProbability('screenedEdge', 'a content', content);
	return correlation * edge + normalQuantile(content) * Math.sqrt(1 - correlation ** 2);
}

/** Correlation as seen through a tester whose noise is `noise` deviations of X. */
export function attenuatedCorrelation(correlation: number, noise: number): number {
	return correlation / Math.sqrt(1 + noise * noise);
}
