import { expect, it } from 'vitest';
import { z } from 'zod';
import { firstProblem, requestPath, schemaProblems } from './requestProblems';

it('writes a place as a script would', () => {
	expect(requestPath(['capacitances', 3])).toBe('capacitances[3]');
	expect(requestPath(['fixed', 'caseCapacitance'])).toBe('fixed.caseCapacitance');
	expect(requestPath([])).toBe('');
});

it('gives every finding of a schema its place', () => {
	const read = z
		.object({ values: z.array(z.number('a number is needed')) })
		.safeParse({ values: [1, 'x', null] });
	expect(read.success ? [] : schemaProblems(read.error)).toEqual([
		{ path: 'values[1]', message: 'a number is needed' },
		{ path: 'values[2]', message: 'a number is needed' }
	]);
});

it('leads with the first problem and counts the others', () => {
	const problem = { path: 'biases', message: 'Too few.' };
	expect(firstProblem([problem])).toBe('biases: Too few.');
	expect(firstProblem([problem, problem])).toBe('biases: Too few. (and 1 more, see `errors`)');
	expect(firstProblem([{ path: '', message: 'Nothing.' }])).toBe('Nothing.');
	expect(() => firstProblem([])).toThrow(RangeError);
});
