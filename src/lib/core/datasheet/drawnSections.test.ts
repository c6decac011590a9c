import { describe, expect, it } from 'vitest';
import { parseTemplate, TemplateError } from '../template/readTemplate';
import { compareDocuments } from './compareDocuments';
import { datasheetDocument, type DatasheetDocument, type DocumentSection } from './document';
import { fittedTable, type TableSection } from './fittedTable';
import { resolveChart } from './resolveChart';
import { resolveModel } from './resolveModel';
import { resolveOutline } from './resolveOutline';
import { resolveTerminals } from './resolveTerminals';
import { completeSheet } from '../../../../tests/golden/completeSheet';
import { tuningDiode } from '../../../../tests/golden/sampleDatasheets';

function sectionOf<Kind extends DocumentSection['kind']>(document: DatasheetDocument, kind: Kind) {
	const found = document.sections.find((section) => section.kind === kind);
	if (found === undefined) throw new Error(`the sample has no ${kind}`);
	return found as Extract<DocumentSection, { kind: Kind }>;
}

/** Typical values 0.10 pF + 38.5 pF (1 + V_R/2.10 V)^−1.12, to three digits. */
const table: TableSection = sectionOf(tuningDiode(), 'capacitance-table');
const product = {
	partNumber: 'LKT-1130',
	productClass: 'tuning' as const,
	package: 'SOD-323',
	description: ''
};

describe('the law through a printed table', () => {
	it('is the one the table was made of, as far as three digits tell', () => {
		const { zeroBiasCapacitance, junctionPotential, gradingExponent, caseCapacitance } =
			fittedTable(table)?.model ?? {};
		expect(zeroBiasCapacitance).toBeCloseTo(38.5e-12, 12);
		expect(Math.abs((junctionPotential ?? 0) - 2.1)).toBeLessThan(0.05);
		expect(Math.abs((gradingExponent ?? 0) - 1.12)).toBeLessThan(0.02);
		expect(Math.abs((caseCapacitance ?? 0) - 0.1e-12)).toBeLessThan(0.02e-12);
	});

	it('is none where one law does not describe the rows', () => {
		const rows = table.rows.map((row, at) => ({
			...row,
			typical: at === 7 ? { text: '9.00', value: 9e-12 } : row.typical
		}));
		expect(fittedTable({ ...table, rows })).toBeNull();
	});

	it('is none with fewer than six typical values', () => {
		expect(fittedTable({ ...table, rows: table.rows.slice(0, 5) })).toBeNull();
	});
});

describe('the model', () => {
	const model = resolveModel('SPICE model', { product }, table, []);

	it('prints the parameters that its text uses', () => {
		expect(model?.parameters.map(({ name, value }) => [name, value.text])).toEqual([
			['CJO', '38.42'],
			['VJ', '2.128'],
			['M', '1.126'],
			['CC', '0.1061']
		]);
		// ngspice 39 reads this text and gives each of the 15 typical values within 0.2 % at 1 MHz.
		expect(model?.text).toContain('.subckt LKT1130 a k');
		expect(model?.text).toContain("q='3.842e-11*");
		expect(model?.text).toContain('ccase a k 1.061e-13');
	});

	it('says how well it gives the printed values back', () => {
		expect(model?.note).toContain('15 typical values');
		expect(model?.note).toContain('within 0.2 %');
	});

	it('has a name that simulators read, whatever the part is called', () => {
		const odd = { product: { ...product, partNumber: '1N-44/A' } };
		expect(resolveModel('SPICE model', odd, table, [])?.text).toContain('.subckt D1N44A a k');
	});
});

describe('a chart of a table', () => {
	const chart = (show: 'inverse-square' | 'charge' | 'energy') =>
		resolveChart(
			{
				kind: 'chart',
				heading: 'Chart',
				caption: 'Q_C against V_R',
				width: 'half',
				source: { from: 'table', table: table.slot, show }
			},
			{},
			table
		);

	it('has the charge that the law integrates to', () => {
		const points = chart('charge')?.curves[0]?.points ?? [];
		expect(points[0]).toEqual([0, 0]);
		// Python, Simpson's rule with 20 000 steps over 0.1061 + 38.42 (1 + v/2.128)^−1.126: 88.79647 pC
		// at 4.6667 V, 187.18478 pC at 28 V.
		expect(points[10]?.[0]).toBeCloseTo(4.66667, 5);
		expect(points[10]?.[1]).toBeCloseTo(88.7965, 3);
		expect(points.at(-1)).toEqual([28, 187.185]);
		expect(chart('charge')?.y).toEqual({
			symbol: { quantity: 'Q', subscript: 'C' },
			unit: 'pC',
			scale: 'linear'
		});
	});

	it('has 1/C² of the printed digits at each bias', () => {
		const { curves = [], y } = chart('inverse-square') ?? {};
		expect(y?.unit).toBe('1/pF²');
		// 1/25.0² and 1/2.05².
		expect(curves[0]?.points[1]?.[1]).toBeCloseTo(0.0016, 10);
		expect(curves[0]?.points.at(-1)?.[1]).toBeCloseTo(0.2379536, 6);
		expect(curves[0]?.points).toHaveLength(15);
	});

	it('is left out where no curve is stored under its key', () => {
		const axis = { symbol: { quantity: 'I', subscript: 'R' }, unit: 'nA', scale: 'log' as const };
		const template = {
			kind: 'chart' as const,
			heading: 'Reverse current',
			caption: '',
			width: 'half' as const,
			source: { from: 'curves' as const, curves: 'leakage', x: axis, y: axis }
		};
		expect(resolveChart(template, {}, null)).toBeNull();
		const curve = {
			label: 'typical',
			points: [[1, 2] as [number, number], [2, 3] as [number, number]],
			isMeasured: true
		};
		const curves = new Map([['leakage', [curve]]]);
		expect(resolveChart(template, { curves }, null)?.curves).toEqual([curve]);
	});
});

describe('the package of a product', () => {
	const template = { kind: 'outline' as const, heading: 'Package', hasLand: true };

	it('is printed with its dimensions and its land pattern', () => {
		const outline = resolveOutline(template, { product });
		expect(outline?.dimensions.find(({ name }) => name === 'length over leads')).toMatchObject({
			minimum: '2.30',
			nominal: '2.50',
			maximum: '2.70'
		});
		expect(outline?.land).toHaveLength(4);
		expect(resolveOutline({ ...template, hasLand: false }, { product })?.land).toEqual([]);
	});

	it('is left out when nobody knows its outline', () => {
		expect(resolveOutline(template, { product: { ...product, package: 'LS2' } })).toBeNull();
	});

	it('carries the marking that all its ordering codes have', () => {
		const terminals = {
			kind: 'terminals' as const,
			heading: 'Terminals',
			graphic: 'tuning' as const,
			terminals: [
				{ number: '1', name: 'cathode' },
				{ number: '2', name: 'anode' }
			],
			hasBand: true
		};
		const codes = (...markings: string[]) => ({
			orderingCodes: markings.map((marking) => ({
				code: `A-${marking}`,
				grade: '',
				marking,
				packing: '',
				quantity: 1
			}))
		});
		expect(resolveTerminals(terminals, codes('K4', 'K4')).marking).toBe('K4');
		expect(resolveTerminals(terminals, codes('K4', 'K5')).marking).toBeNull();
		expect(resolveTerminals(terminals, codes()).marking).toBeNull();
	});
});

describe('formats', () => {
	const template = (format: string) => ({
		format,
		key: 'sample',
		name: 'Sample',
		productClass: 'tuning',
		sources: '',
		sections: [{ kind: 'masthead' }, { kind: 'outline', heading: 'Package', hasLand: true }]
	});

	it('the second takes the sections that came with it, the first refuses them by place', () => {
		expect(parseTemplate(template('platen-template-2'), 'sample').sections).toHaveLength(2);
		expect(() => parseTemplate(template('platen-template-1'), 'sample')).toThrow(
			new TemplateError('sample', [
				'sections.1.kind: expected a template of format 2 for a section "outline"'
			])
		);
	});

	it('a chart or model must name a table of its template', () => {
		const sections = [{ kind: 'model', heading: 'Model', table: 'capacitance.25c' }];
		expect(() => parseTemplate({ ...template('platen-template-2'), sections }, 'sample')).toThrow(
			'sections.0.table: expected the slot of a table, got "capacitance.25c"'
		);
	});

	it('documents of both are read', () => {
		expect(datasheetDocument.parse(tuningDiode()).format).toBe('platen-datasheet-1');
		expect(datasheetDocument.parse(completeSheet()).format).toBe('platen-datasheet-2');
		expect(
			datasheetDocument.safeParse({ ...tuningDiode(), format: 'platen-datasheet-3' }).success
		).toBe(false);
	});
});

describe('what changed in drawings', () => {
	const changed = (edit: (section: DocumentSection) => DocumentSection) => {
		const before = completeSheet();
		const after = { ...before, sections: before.sections.map(edit) };
		return compareDocuments(before, after).map(({ row, before: was, after: is }) => [row, was, is]);
	};

	it('names the dimension that moved', () => {
		expect(
			changed((section) =>
				section.kind === 'outline'
					? {
							...section,
							dimensions: section.dimensions.map((each) =>
								each.name === 'height' ? { ...each, maximum: '1.10' } : each
							)
						}
					: section
			)
		).toEqual([['outline.A', '0.80 / 0.90 / 1.00 mm', '0.80 / 0.90 / 1.10 mm']]);
	});

	it('names the parameter of the model, the curve and the circuit', () => {
		const rows = changed((section) => {
			if (section.kind === 'model')
				return {
					...section,
					parameters: section.parameters.map((each) =>
						each.name === 'M' ? { ...each, value: { text: '1.130', value: 1.13 } } : each
					)
				};
			if (section.kind === 'chart' && section.heading === 'Reciprocal square')
				return {
					...section,
					curves: section.curves.map((curve) => ({ ...curve, points: curve.points.slice(1) }))
				};
			if (section.kind === 'test-circuit') return { ...section, circuit: 'series-resistance' };
			return section;
		}).map(([row]) => row);
		expect(rows.toSorted()).toEqual(
			[
				'model.M',
				'chart.Reciprocal square.typical',
				'test-circuit.capacitance',
				'test-circuit.series-resistance'
			].toSorted()
		);
	});

	it('is nothing when nothing did', () => {
		expect(changed((section) => section)).toEqual([]);
	});
});
