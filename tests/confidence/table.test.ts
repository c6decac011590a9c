import { expect, it } from 'vitest';
import type { Cell } from '../../src/tasks/confidence/study';
import { cellLine, confidenceTable } from '../../src/tasks/confidence/table';

const cell = (lots: number, lotShare: number, confidence: number): Cell => ({
	method: 'normal',
	promise: 'each',
	shape: 'lots of 25',
	lotSizes: Array.from({ length: lots }, () => 25),
	lotShare,
	confidence,
	standardError: 0.0022,
	simulations: 10_000
});

it('sets a row a limit, a column a number of lots, and marks what falls short', () => {
	const cells = [cell(3, 0, 0.951), cell(3, 0.6, 0.5), cell(12, 0, 0.93)];
	expect(confidenceTable(cells).split('\n')).toEqual([
		'| limit | 3 lots | 12 lots |',
		'| --- | --- | --- |',
		'| normal · each · lots of 25 | 95.1 _50.0_ | **93.0** |'
	]);
});

it('says of a cell what came out, how surely, and what is known of it', () => {
	expect(cellLine(cell(3, 0.6, 0.5))).toBe(
		'normal | each | 3 lots of 25 | lot share 0.6 | 50.0 % of 95.0 % | ± 0.22 % (10000) | limitation: pooled lots'
	);
});
