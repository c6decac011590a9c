import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { normalLowerTail } from './normalDistribution';
import {
	attenuatedCorrelation,
	screenedEdge,
	screenedLowerTail,
	screenedMoments,
	screenedQuantile,
	screenYield
} from './screenedNormal';

const SCREEN = { correlation: 0.8, lowest: -0.5, highest: 2 };

// SciPy 1.10.1 integrate.quad and brentq; R mvtnorm pmvnorm agrees
it('has the quantiles of SciPy behind a screen', () => {
	expect(screenedQuantile(0.01, SCREEN)).toBeCloseTo(-1.35587479, 7);
	const narrow = { correlation: 0.5, lowest: -1, highest: 1 };
	expect(screenedQuantile(0.99, narrow)).toBeCloseTo(2.10830385, 7);
});

it('is the plain normal where the screen is open or says nothing', () => {
	const open = { correlation: 0.8, lowest: -Infinity, highest: Infinity };
	expect(screenedLowerTail(1.3, open)).toBeCloseTo(normalLowerTail(1.3), 12);
	expect(screenedLowerTail(1.3, { ...SCREEN, correlation: 0 })).toBeCloseTo(
		normalLowerTail(1.3),
		12
	);
	expect(screenedMoments(open)).toEqual({ mean: 0, variance: 1 });
	expect(screenYield(open)).toBe(1);
});

// Closed forms of the truncated normal
it('has mean, variance and yield', () => {
	expect(screenedMoments(SCREEN).mean).toBeCloseTo(0.3565950226, 9);
	expect(screenedMoments({ ...SCREEN, correlation: 0.95 }).variance).toBeCloseTo(0.4373759371, 9);
	expect(screenYield({ lowest: -1, highest: 1 })).toBeCloseTo(0.6826894921, 10);
});

it('bounds a device at the edge by more than the screened population needs', () => {
	const edge = screenedEdge(2, { correlation: 0.8, content: 0.99 });
	expect(edge).toBeCloseTo(0.8 * 2 + 2.3263478740408408 * 0.6, 12);
	expect(edge).toBeGreaterThan(screenedQuantile(0.99, SCREEN));
	expect(attenuatedCorrelation(0.95, 0.3)).toBeCloseTo(0.909934971, 9);
});

it('refuses a perfect correlation and a crossed window', () => {
	expect(() => screenedLowerTail(0, { ...SCREEN, correlation: 1 })).toThrow(OutsideDomainError);
	expect(() => screenedQuantile(0.5, { ...SCREEN, lowest: 3 })).toThrow('a highest above 3, got 2');
	expect(() => screenedQuantile(1, SCREEN)).toThrow(OutsideDomainError);
	expect(() => screenedEdge(2, { correlation: 0.8, content: 0 })).toThrow(OutsideDomainError);
});
