import { expect, it } from 'vitest';
import { forwardCurrent, forwardVoltage } from './forwardCurrent';

const DIODE = { ideality: 1.05, saturationCurrent: 3.6648148443e-10, seriesResistance: 5 };

// SciPy 1.10.1: special.lambertw at 0.2 V, cross-checked by root finding
it('has the current of SciPy', () => {
	expect(forwardCurrent(DIODE, 0.2, 300) / 5.8021715e-7).toBeCloseTo(1, 7);
});

it('is its own inverse, with and without series resistance', () => {
	for (const voltage of [-0.1, 0.05, 0.3, 0.8, 5]) {
		const current = forwardCurrent(DIODE, voltage, 300);
		expect(forwardVoltage(DIODE, current, 300)).toBeCloseTo(voltage, 8);
	}
	const ideal = { ...DIODE, seriesResistance: 0 };
	expect(forwardVoltage(ideal, forwardCurrent(ideal, 0.3, 300), 300)).toBeCloseTo(0.3, 12);
});
