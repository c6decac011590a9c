import fc from 'fast-check';
import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import { oneSidedToleranceFactor } from './toleranceFactor';

// R 4.2.2: qt(0.95, 9, qnorm(0.99) * sqrt(10)) / sqrt(10)
it('matches R for ten devices, 99 % content at 95 % confidence', () => {
	expect(oneSidedToleranceFactor(10, { content: 0.99, confidence: 0.95 })).toBeCloseTo(
		3.981117845,
		8
	);
});

// The worked case of the design: 75 devices, 95 % shared between two limits.
it('is 2.838 for 75 devices, 99 % content at 97.5 % confidence', () => {
	expect(oneSidedToleranceFactor(75, { content: 0.99, confidence: 0.975 })).toBeCloseTo(2.838, 3);
});

it('nears the quantile itself for a million devices', () => {
	const factor = oneSidedToleranceFactor(1_000_000, { content: 0.999999, confidence: 0.95 });
	// z + z_γ √((1 + z²/2)/n) = 4.753424309 + 0.005772: the leading terms of the expansion
	expect(factor).toBeCloseTo(4.7592, 4);
});

it('grows with content and with confidence, and shrinks with devices', () => {
	const share = fc.double({ min: 0.5, max: 0.9999, noNaN: true });
	const devices = fc.integer({ min: 2, max: 3000 });
	fc.assert(
		fc.property(devices, share, share, share, share, (n, p1, p2, g1, g2) => {
			const [content, moreContent] = [Math.min(p1, p2), Math.max(p1, p2)];
			const [confidence, moreConfidence] = [Math.min(g1, g2), Math.max(g1, g2)];
			const least = oneSidedToleranceFactor(n, { content, confidence });
			const slack = 1e-9;
			expect(oneSidedToleranceFactor(n, { content: moreContent, confidence })).toBeGreaterThan(
				least - slack
			);
			expect(oneSidedToleranceFactor(n, { content, confidence: moreConfidence })).toBeGreaterThan(
				least - slack
			);
			expect(oneSidedToleranceFactor(n + 1, { content, confidence })).toBeLessThan(least + slack);
		}),
		{ numRuns: 60 }
	);
});

it('refuses one device, half a device and a certainty', () => {
	const promise = { content: 0.99, confidence: 0.95 };
	expect(() => oneSidedToleranceFactor(1, promise)).toThrow(SampleTooSmallError);
	expect(() => oneSidedToleranceFactor(10.5, promise)).toThrow('a whole number of devices');
	expect(() => oneSidedToleranceFactor(10, { content: 1, confidence: 0.95 })).toThrow(
		OutsideDomainError
	);
	expect(() => oneSidedToleranceFactor(10, { content: 0.9, confidence: 0 })).toThrow(
		'oneSidedToleranceFactor requires a confidence between 0 and 1, got 0'
	);
});
