import { describe, expect, it } from 'vitest';
import { sampleDocument } from '../../../../tests/factories/sampleDocument';
import type { Change } from './change';
import { changedRows, compareDocuments } from './compareDocuments';
import type { CapacitanceRow, DatasheetDocument, RatingRow } from './document';
import { summarizeChanges } from './summarizeChanges';

const before = sampleDocument();
const ROW = 'capacitance.25c.VR=4';

function withCapacitance(change: (row: CapacitanceRow) => CapacitanceRow): DatasheetDocument {
	return {
		...before,
		sections: before.sections.map((section) =>
			section.kind === 'capacitance-table'
				? { ...section, rows: section.rows.map((row) => (row.id === ROW ? change(row) : row)) }
				: section
		)
	};
}

function withRating(change: (row: RatingRow) => RatingRow): DatasheetDocument {
	return {
		...before,
		sections: before.sections.map((section) =>
			section.kind === 'ratings' ? { ...section, rows: section.rows.map(change) } : section
		)
	};
}

const number = (text: string) => ({ text, value: Number(text) * 1e-12 });
const said = (changes: readonly Change[]) =>
	changes.map(({ kind, area, row, part }) => [kind, area, row, part]);

it('finds nothing between equal documents', () => {
	expect(compareDocuments(before, sampleDocument())).toEqual([]);
});

// The sample prints 10.9, 11.8, 12.7 pF at 4 V.
describe.each([
	['a lower minimum', { minimum: number('10.8') }, 'loosened', 'minimum', -0.1 / 10.9],
	['a higher minimum', { minimum: number('11.0') }, 'tightened', 'minimum', 0.1 / 10.9],
	['a lower maximum', { maximum: number('12.6') }, 'tightened', 'maximum', -0.1 / 12.7],
	['a higher maximum', { maximum: number('12.8') }, 'loosened', 'maximum', 0.1 / 12.7],
	['another typical value', { typical: number('11.9') }, 'moved', 'typical', 0.1 / 11.8]
] as const)('%s', (_name, change, kind, part, relative) => {
	const [found, ...rest] = compareDocuments(
		before,
		withCapacitance((row) => ({ ...row, ...change }))
	);

	it(`is ${kind}`, () => {
		expect(found).toMatchObject({ kind, part, row: ROW });
		expect(found?.relative).toBeCloseTo(relative, 12);
		expect(rest).toEqual([]);
	});
});

it.each([
	['minimum', null, 'removed', 'guarantee'],
	['typical', null, 'removed', 'typical']
] as const)('a %s that is printed no more is removed', (part, value, kind, area) => {
	const after = withCapacitance((row) => ({ ...row, [part]: value }));
	expect(said(compareDocuments(before, after))).toEqual([[kind, area, ROW, part]]);
	expect(said(compareDocuments(after, before))).toEqual([['added', area, ROW, part]]);
});

it('says the same value in another unit is no change', () => {
	const after = withCapacitance((row) => ({
		...row,
		minimum: row.minimum && { ...row.minimum, text: '0.0109' }
	}));
	expect(compareDocuments(before, after)).toEqual([]);
});

it('weighs a basis by its strength', () => {
	const weaker = withCapacitance((row) => ({ ...row, basis: 'typical' }));
	expect(said(compareDocuments(before, weaker))).toEqual([['loosened', 'basis', ROW, 'basis']]);
	expect(said(compareDocuments(weaker, before))).toEqual([['tightened', 'basis', ROW, 'basis']]);
});

it('takes another condition for a loosened promise at the old one', () => {
	const after = {
		...before,
		sections: before.sections.map((section) =>
			section.kind === 'capacitance-table' ? { ...section, frequency: 1e5 } : section
		)
	};
	const kinds = new Set(compareDocuments(before, after).map(({ kind, area }) => `${kind} ${area}`));
	expect(kinds).toEqual(new Set(['loosened condition']));
});

it('reports a changed rating as a rating either way', () => {
	const after = withRating((row) =>
		row.id === 'ratings.power' ? { ...row, maximum: { text: '300', value: 0.3 } } : row
	);
	const [found] = compareDocuments(before, after);
	expect(found).toMatchObject({ kind: 'rating', area: 'rating', before: '250', after: '300' });
	expect(found?.relative).toBeCloseTo(0.2, 12);
});

it('reports rows that came and went', () => {
	const after = {
		...before,
		sections: before.sections.map((section) =>
			section.kind === 'capacitance-table'
				? { ...section, rows: section.rows.filter(({ id }) => id !== ROW) }
				: section
		)
	};
	expect(compareDocuments(before, after)[0]).toMatchObject({
		kind: 'removed',
		area: 'guarantee',
		before: 'min 10.9, typ 11.8, max 12.7 pF'
	});
	expect(compareDocuments(after, before)[0]).toMatchObject({ kind: 'added', row: ROW });
});

describe('the terms of a basis', () => {
	const terms = (text: string) =>
		sampleDocument({ basisNotes: [{ basis: 'characterized', mark: 'C', text }] });
	const at95 = terms('95 % of devices with 95 % confidence');

	it.each([
		['90 % of devices with 95 % confidence', 'loosened', 'basis'],
		['99 % of devices with 90 % confidence', 'loosened', 'basis'],
		['99 % of devices with 95 % confidence', 'tightened', 'basis'],
		['95 % of all devices with 95 % confidence', 'text', 'text']
	])('%s', (text, kind, area) => {
		expect(said(compareDocuments(at95, terms(text)))).toEqual([
			[kind, area, 'basis.characterized', 'terms']
		]);
	});
});

it('reports texts, and ordering codes that came and went', () => {
	const after = sampleDocument({
		description: 'Another description',
		sections: before.sections.map((section) =>
			section.kind === 'ordering' ? { ...section, rows: [] } : section
		)
	});
	expect(said(compareDocuments(before, after))).toEqual([
		['removed', 'ordering', 'ordering.LKT-1130-R7', 'text'],
		['text', 'text', 'masthead.description', 'text']
	]);
});

it('puts the weightiest first and sums them up in a line', () => {
	const after = withCapacitance((row) => ({
		...row,
		minimum: number('10.8'),
		typical: number('11.9'),
		maximum: number('12.6')
	}));
	const changes = compareDocuments(before, after);
	expect(changes.map(({ kind }) => kind)).toEqual(['loosened', 'tightened', 'moved']);
	expect(changedRows(changes)).toEqual([ROW]);
	expect(summarizeChanges(changes)).toBe(
		'1 limit loosened, 1 limit tightened, 1 typical value moved.'
	);
	expect(summarizeChanges([])).toBe('No change in content.');
});
