import { describe, expect, it } from 'vitest';
import { forwardVoltage } from './forwardCurrent';
import { forwardFamily } from './forwardFamily';

describe('a forward curve', () => {
	// A sweep made from the law, V = n (kT/q) ln(I/I_s + 1) + I R_s, must give its parameters back.
	const model = { ideality: 1.05, saturationCurrent: 1.2e-7, seriesResistance: 0.032 };
	// 64 a decade: Cheung’s slopes come from neighbours and miss of the order h² of R_s, h in ln I.
	const points = Array.from({ length: 385 }, (_, i) => {
		const current = 1e-6 * 10 ** (i / 64);
		return [forwardVoltage(model, current, 298.15), current] as const;
	});

	it('gives n, I_s and R_s, and n and R_s a second time', () => {
		const found = forwardFamily(points, 298.15);
		if (found.status === 'refused') throw new Error(found.reason);
		expect(found.fit.model.ideality).toBeCloseTo(1.05, 6);
		expect(found.fit.model.saturationCurrent / 1.2e-7).toBeCloseTo(1, 6);
		expect(found.fit.model.seriesResistance).toBeCloseTo(0.032, 8);
		if (typeof found.check === 'string') throw new Error(found.check);
		expect(found.check.ideality).toBeCloseTo(1.05, 1);
		expect(found.check.seriesResistance).toBeCloseTo(0.032, 3);
		expect(found.check.seriesResistanceAgain).toBeCloseTo(0.032, 3);
	});

	it('says why it gives nothing', () => {
		expect(forwardFamily(points.slice(0, 3), 298.15)).toEqual({
			status: 'refused',
			reason: 'forward fit requires at least 4 points, got 3'
		});
	});
});
