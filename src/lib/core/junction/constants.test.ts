import { expect, it } from 'vitest';
import { thermalVoltage } from './constants';

// k/q = 8.617333262e-5 V/K (CODATA 2018) times 300 K
it('has 25.852 mV at 300 K', () => {
	expect(thermalVoltage(300)).toBeCloseTo(0.025851999786, 11);
});
