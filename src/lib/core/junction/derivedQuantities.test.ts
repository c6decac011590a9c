import { expect, it } from 'vitest';
import {
	capacitanceRatio,
	qualityFactor,
	seriesResistanceFromQuality,
	temperatureCoefficient
} from './derivedQuantities';
import { JunctionDataError } from './errors';

// By hand: 1/(2π · 50 MHz · 12 pF · 0.5 Ω) = 530.5
it('has the quality factor and the resistance behind it', () => {
	expect(qualityFactor(50e6, 12e-12, 0.5)).toBeCloseTo(530.516, 3);
	expect(seriesResistanceFromQuality(50e6, 12e-12, 530.5164769)).toBeCloseTo(0.5, 9);
	expect(() => qualityFactor(50e6, 12e-12, 0)).toThrow(JunctionDataError);
});

it('has the ratio', () => {
	expect(capacitanceRatio(18e-12, 7.2e-12)).toBeCloseTo(2.5, 14);
	expect(() => capacitanceRatio(0, 1)).toThrow(JunctionDataError);
	expect(() => capacitanceRatio(1, 0)).toThrow(JunctionDataError);
});

it('has the slope of ln C against temperature', () => {
	const at = (celsius: number) => 12e-12 * Math.exp(200e-6 * (celsius - 25));
	expect(temperatureCoefficient([25, 85], [at(25), at(85)])).toBeCloseTo(200e-6, 15);
	expect(temperatureCoefficient([-40, 25, 85], [-40, 25, 85].map(at))).toBeCloseTo(200e-6, 15);
	expect(() => temperatureCoefficient([25], [at(25)])).toThrow('at least 2 temperatures');
	expect(() => temperatureCoefficient([25, 25], [1, 2])).toThrow('temperatures that differ');
	expect(() => temperatureCoefficient([25, 85], [1, -2])).toThrow('positive capacitances');
});
