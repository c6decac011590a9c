import { describe, expect, it } from 'vitest';
import { computeLimitRow } from '$lib/core/limits/computeLimitRow';
import { AT_FOUR_VOLTS, PLAIN_POLICY, threeSmallLots } from '$lib/core/limits/limitTestData';
import { selectLots } from '$lib/core/limits/selectLots';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { capabilityText, limitFacts, withoutLotTexts } from './limitFacts';
import { sharedStart } from './sharedStart';

const devices = threeSmallLots();
const row = computeLimitRow(devices, PLAIN_POLICY, AT_FOUR_VOLTS);

describe('the facts of a derivation', () => {
	it('count the devices outside against what the basis allows', () => {
		const [outside] = limitFacts(row, PLAIN_POLICY, devices);
		expect(outside).toEqual({
			term: 'Outside',
			text: '0 below, 0 allowed; 0 above, 0 allowed'
		});
	});

	it('count nothing where only sums are stored', () => {
		const two = selectLots(devices, (lot) => lot !== 'C');
		if (two === undefined) throw new Error('two lots are left');
		expect(limitFacts(row, PLAIN_POLICY, two).map(({ term }) => term)).toEqual(['Ppk']);
	});

	it('call an index circular that speaks of the devices behind the limit', () => {
		const found = { index: 1.456, lowerBound: 1.339, word: 'capable', isCircular: true } as const;
		expect(capabilityText(found, 0.95)).toBe(
			`1.46, at least 1.34 with confidence 95\u00a0%: capable. ${limitsScreenMessages.circular()}`
		);
		expect(capabilityText({ ...found, lowerBound: null, isCircular: false }, 0.95)).toBe(
			'1.46: capable.'
		);
	});

	it('give the limit without each lot, and why there is none', () => {
		const without = withoutLotTexts(row, 'minimum', PLAIN_POLICY, devices);
		expect(without.map(({ lot }) => lot)).toEqual(['A', 'B', 'C']);
		const rest = selectLots(devices, (lot) => lot !== 'B');
		const again = rest && computeLimitRow(rest, PLAIN_POLICY, AT_FOUR_VOLTS).minimum;
		expect(Number(without[1]?.text)).toBeCloseTo((again?.raw ?? 0) / 1e-12, 2);
		const lots = { ...PLAIN_POLICY, method: 'lots' as const };
		const ofLots = computeLimitRow(devices, lots, AT_FOUR_VOLTS);
		expect(withoutLotTexts(ofLots, 'maximum', lots, devices)[0]?.refusal).toContain('2 lots');
	});
});

it.each([
	[['LK24-011', 'LK24-014'], 'LK24-'],
	[['LK24-011'], ''],
	[['A1', 'A2'], ''],
	[[], '']
])('what %j begin with is “%s”', (names, shared) => {
	expect(sharedStart(names)).toBe(shared);
});
