import { describe, expect, it } from 'vitest';
import { boundTo, struckOut, textsOf, AT } from '../../../../tests/factories/draftParts';
import { limitRowOf } from '../../../../tests/factories/limitRows';
import { limitState } from './limitState';

const ALL = ['minimum', 'typical', 'maximum'] as const;
const before = limitRowOf({ bias: 15, texts: ['3.42', '3.80', '4.22'] });
const moved = limitRowOf({ bias: 15, texts: ['3.41', '3.80', '4.22'] });
const movedAgain = limitRowOf({ bias: 15, texts: ['3.40', '3.80', '4.22'] });
const refused = limitRowOf({ bias: 15, texts: [null, '3.80', null], refusals: ['Too few lots.'] });

const kept = (against: ReturnType<typeof limitRowOf> | null) =>
	boundTo(before, {
		kept: { reason: 'old', by: 'Ida Sandvik', at: AT, against: against && textsOf(against) }
	});

describe('a limit', () => {
	it('is unbound without a binding, struck out by one', () => {
		expect(limitState(null, textsOf(before), ALL)).toBe('unbound');
		expect(limitState(struckOut(), textsOf(before), ALL)).toBe('struck out');
	});

	it('stays bound while the measurements print the same, whatever data are behind it', () => {
		expect(limitState(boundTo(before), textsOf(before), ALL)).toBe('bound');
		expect(limitState(boundTo(before), textsOf(before, { inputHash: 'newer' }), ALL)).toBe('bound');
	});

	it('is the same in another unit, and stale when a digit is lost on the way', () => {
		const nanofarads = { unit: 'nF', unitScale: 1e-9, typical: '0.00380' };
		const same = textsOf(before, { ...nanofarads, minimum: '0.00342', maximum: '0.00422' });
		expect(limitState(boundTo(before), same, ALL)).toBe('bound');
		const shorter = textsOf(before, { ...nanofarads, minimum: '0.0034', maximum: '0.0042' });
		expect(limitState(boundTo(before), shorter, ALL)).toBe('stale');
	});

	it('is stale when they print something else', () => {
		expect(limitState(boundTo(before), textsOf(moved), ALL)).toBe('stale');
	});

	it('is unsupported when a required value is refused, or nothing is left', () => {
		expect(limitState(boundTo(before), textsOf(refused), ALL)).toBe('unsupported');
		expect(limitState(boundTo(before), null, ALL)).toBe('unsupported');
	});

	it('is bound by its typical value where that is all it needs', () => {
		expect(limitState(boundTo(refused), textsOf(refused), ['typical'])).toBe('bound');
	});

	it('is overridden once a person kept it, until the data move again', () => {
		expect(limitState(kept(moved), textsOf(moved), ALL)).toBe('overridden');
		expect(limitState(kept(moved), textsOf(movedAgain), ALL)).toBe('stale');
		expect(limitState(kept(null), null, ALL)).toBe('overridden');
		expect(limitState(kept(null), textsOf(refused), ALL)).toBe('unsupported');
	});

	it('is bound again when the data come back to what it prints', () => {
		expect(limitState(kept(moved), textsOf(before), ALL)).toBe('bound');
	});
});
