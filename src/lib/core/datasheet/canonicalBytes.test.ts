import { expect, it } from 'vitest';
import { canonicalBytes } from './canonicalBytes';

const text = (value: unknown) => new TextDecoder().decode(canonicalBytes(value));

// RFC 8785, section 3.2.2 and its result in 3.2.3.
it('writes the example of RFC 8785', () => {
	const example = {
		numbers: [Number('333333333.33333329'), 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
		string: '\u20ac$\u000F\u000aA\'\u0042\u0022\u005c\\"/',
		literals: [null, true, false]
	};
	expect(text(example)).toBe(
		'{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],' +
			'"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}'
	);
});

// RFC 8785, section 3.2.3: by UTF-16 code units, so that an emoji stands before U+FB33.
it('sorts keys by UTF-16 code units', () => {
	const keys = ['\u20ac', '\r', '\ufb33', '1', '\ud83d\ude00', '\u0080', '\u00f6'];
	const sorted = Object.keys(
		JSON.parse(text(Object.fromEntries(keys.map((key) => [key, ''])))) as object
	).filter((key) => key !== '1');
	expect(sorted).toEqual(['\r', '\u0080', '\u00f6', '\u20ac', '\ud83d\ude00', '\ufb33']);
});

it('gives the same bytes whatever order an object was built in', () => {
	expect(canonicalBytes({ a: 1, b: { d: 2, c: 3 } })).toEqual(
		canonicalBytes({ b: { c: 3, d: 2 }, a: 1 })
	);
	expect(text({ b: 1, a: 2 })).toBe('{"a":2,"b":1}');
});
