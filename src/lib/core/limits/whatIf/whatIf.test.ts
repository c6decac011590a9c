import { describe, expect, it } from 'vitest';
import { limitsScreenMessages } from '../../messages/limitsScreen';
import type { LimitValue } from '../limit';
import { PLAIN_POLICY } from '../limitTestData';
import { compareLimits } from './compareLimits';
import { readWhatIf } from './readWhatIf';
import { whatIfRules } from './whatIfRules';

const read = (text: string) => readWhatIf(new URLSearchParams(text));
const limit = (raw: number, text: string): LimitValue => ({
	raw: raw * 1e-12,
	printed: Number(text) * 1e-12,
	text,
	derivation: []
});

describe('the form of a trial', () => {
	it('leaves the policy as it is where a field is empty', () => {
		expect(read('whatif=all-lots&content=&drift=')).toEqual({ status: 'read', change: {} });
	});

	it('reads shares, per cent and the lots that stay', () => {
		expect(read('whatif=lots&content=0.95&drift=0.5&guard=1&behind=tested&lot=A&lot=B')).toEqual({
			status: 'read',
			change: { content: 0.95, drift: 0.005, guardBand: 1, basis: 'tested', lots: ['A', 'B'] }
		});
		expect(read('whatif=lots')).toEqual({ status: 'read', change: { lots: [] } });
	});

	it.each([
		['content=1', 'content', limitsScreenMessages.expectsShare('1')],
		['confidence=sure', 'confidence', limitsScreenMessages.expectsShare('sure')],
		['drift=100', 'drift', limitsScreenMessages.expectsDrift('100')],
		['guard=-1', 'guard', limitsScreenMessages.expectsGuardBand('-1')],
		['method=guess', 'method', limitsScreenMessages.expectsChoice('method', 'guess')],
		['behind=typical', 'behind', limitsScreenMessages.expectsChoice('behind', 'typical')]
	])('refuses %s beside its field', (text, field, message) => {
		expect(read(text)).toEqual({ status: 'refused', field, message });
	});
});

it('promises each bias on its own, whatever the policy says', () => {
	const stored = { ...PLAIN_POLICY, span: 'whole-curve' as const };
	expect(whatIfRules(stored, 'characterized', { content: 0.9, sides: 'maximum' })).toEqual({
		rules: { ...PLAIN_POLICY, content: 0.9, span: 'each-bias' },
		sides: ['maximum'],
		declaredBasis: 'characterized'
	});
});

it.each([
	['minimum', 'tighter'],
	['maximum', 'looser']
] as const)('a %s that rises is %s', (side, difference) => {
	expect(compareLimits(side, limit(12.5, '12.5'), limit(12.6, '12.6'))).toMatchObject({
		difference
	});
});

it('tells per cent before rounding, and the same digits as the same', () => {
	const found = compareLimits('minimum', limit(12.5, '12.5'), limit(12.55, '12.5'));
	expect(found.difference).toBe('same');
	expect(found.percent).toBeCloseTo(0.4, 9);
	expect(compareLimits('minimum', null, limit(1, '1'))).toEqual({
		difference: 'gained',
		percent: null
	});
	expect(compareLimits('minimum', limit(1, '1'), null).difference).toBe('lost');
	expect(compareLimits('minimum', null, null).difference).toBe('none');
});

it.each([
	[{ same: 66 }, 'No printed limit changes.'],
	[{ tighter: 13, looser: 1, same: 2 }, '13 limits tighten, 1 limit loosens; the others stay.'],
	[{ lost: 2 }, '2 limits are refused or not promised.']
])('sums up %j', (counts, text) => {
	const none = { tighter: 0, looser: 0, gained: 0, lost: 0, same: 0 };
	expect(limitsScreenMessages.differences({ ...none, ...counts })).toBe(text);
});
