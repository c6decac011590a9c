import { describe, expect, it } from 'vitest';
import { findCharacteristic } from '../characteristics/catalogue';
import { measurementMessages } from '../messages/measurements';
import { UNITS } from '../units/unit';
import { findReadingSuspects } from './readingSuspects';
import { ReadingSeries } from './readingTable';
import type { CensorFlag } from './censorMark';

const at = { temperatureCelsius: 25, reverseVoltage: 60 };

function judged(
	key: string,
	values: readonly (number | readonly [number, CensorFlag])[],
	decimals: number
) {
	const characteristic = findCharacteristic(key);
	if (characteristic === undefined) throw new Error(key);
	const series = new ReadingSeries(characteristic, at, UNITS.current[0]);
	for (const [device, entry] of values.entries()) {
		const [value, flag] = typeof entry === 'number' ? [entry, 0 as const] : entry;
		series.add(device, value, flag, decimals);
	}
	return findReadingSuspects(
		series,
		values.map(() => 'A')
	);
}

const LOT = [1.1, 1.3, 0.9, 1.2, 1.05, 0.95, 1.15];

describe('suspect readings', () => {
	// R 4.2.2: y <- log(c(1.1,1.3,0.9,1.2,1.05,0.95,1.15,9)); (y - median(y))/mad(y, constant=1.482602218505602)
	// gives 13.13575556072700 for the last and at most 1.41 in size for the others.
	it('are those that lie more than six robust standard deviations from their lot', () => {
		const { suspects } = judged('I_R', [...LOT, 9], 3);
		expect(suspects.map(({ device }) => device)).toEqual([7]);
		const [found] = suspects;
		const z = found?.reason.robustZ ?? Number.NaN;
		expect(z).toBeCloseTo(13.135755560727, 10);
		expect(found?.conditionKey).toBe('I_R T=25;VR=60');
		expect(found?.reason.text).toBe(
			measurementMessages.readingOutlier({
				what: 'ln I_R',
				z,
				lot: 'A',
				at: 'V_R = 60\u00a0V, 25\u00a0°C'
			})
		);
	});

	it('compare a voltage as it is, and not below the resolution', () => {
		expect(judged('V_F', [0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.506], 3).suspects).toEqual([]);
		const [found] = judged('V_F', [0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.507], 3).suspects;
		expect(found?.device).toBe(6);
		expect(found?.reason.robustZ).toBeCloseTo(7, 9);
	});

	it('are bounds only on the side they are bounds to', () => {
		expect(judged('I_R', [...LOT, [9, -1]], 3).suspects).toEqual([]);
		expect(judged('I_R', [...LOT, [9, 1]], 3).suspects.map(({ device }) => device)).toEqual([7]);
		expect(judged('I_R', [...LOT, [0.01, -1]], 3).suspects.map(({ device }) => device)).toEqual([
			7
		]);
		expect(judged('I_R', [...LOT, [0.01, 1]], 3).suspects).toEqual([]);
	});

	it('are not looked for in small lots, nor where more than a quarter are bounds', () => {
		expect(judged('I_R', [1, 1, 1, 99], 3)).toEqual({ suspects: [], lotsNotJudged: ['A'] });
		const floor = [0.1, -1] as const;
		expect(judged('I_R', [...LOT, 9, floor, floor, floor], 3)).toEqual({
			suspects: [],
			lotsNotJudged: ['A']
		});
		expect(judged('I_R', [...LOT, 9, floor], 3).lotsNotJudged).toEqual([]);
	});
});
