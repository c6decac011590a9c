import { expect, it } from 'vitest';
import { changedFields } from './changedFields';

it('names what the stored version says differently', () => {
	type Typed = { package: string; description: string; code: string[]; rowVersion: number };
	const typed = Object.freeze({
		package: 'SOD-323',
		description: 'Tuning',
		code: ['A'],
		rowVersion: 1
	});
	const saved = Object.freeze({
		package: 'SOD-523',
		description: 'Tuning',
		code: ['A', 'B'],
		rowVersion: 2
	});
	expect(
		changedFields<Typed>(typed, saved, {
			package: 'package',
			description: 'description',
			code: 'codes'
		})
	).toEqual([
		{ name: 'package', saved: 'SOD-523' },
		{ name: 'codes', saved: 'A, B' }
	]);
});
