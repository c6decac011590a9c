import { beforeAll, describe, expect, it } from 'vitest';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import type { DatasheetDocument, RichText } from '../../src/lib/core/datasheet/document';
import { canonicalBytes } from '../../src/lib/core/datasheet/canonicalBytes';
import { draftRecord, manyRows, releaseRecord, tuningDiode } from './sampleDatasheets';
import { runOn } from './tools';

const text = (bytes: Uint8Array) => runOn(bytes, 'pdftotext', (file) => ['-layout', file, '-']);

/** The cells of a printed line, spaces apart. */
const cells = (line: string) => line.trim().split(/\s+/);

let release: Uint8Array;
beforeAll(async () => {
	release = await renderDatasheet(tuningDiode(), releaseRecord);
});

describe('what pdftotext reads', () => {
	it('gives every row of the capacitance table on one line, in order', () => {
		const lines = text(release).split('\n').map(cells);
		const section = tuningDiode().sections.find(({ kind }) => kind === 'capacitance-table');
		const rows = section?.kind === 'capacitance-table' ? section.rows : [];
		const marks = { tested: 'T', correlation: 'G', characterized: 'C' } as const;
		expect(rows).toHaveLength(15);
		for (const row of rows)
			expect(lines).toContainEqual([
				row.bias.text,
				row.minimum?.text,
				row.typical?.text,
				row.maximum?.text,
				row.deviationMinimum?.text,
				row.deviationMaximum?.text,
				row.ratio?.text,
				marks[row.basis as keyof typeof marks]
			]);
	});

	it('gives all 200 rows of a table over several pages', async () => {
		const rows = manyRows(200);
		const bytes = await renderDatasheet(tuningDiode({ rows }), releaseRecord);
		const found = text(bytes)
			.split('\n')
			.map(cells)
			.filter((line) => line.at(-1) === 'C' && line.length === 8)
			.map((line) => line.slice(0, 4));
		expect(found).toEqual(rows.map((row) => row.slice(0, 4)));
	});

	it('gives symbols, signs and Greek as they are typed', async () => {
		const characters = 'µ Ω ° ± ≤ ≥ − × · ² ³ φ ε – — Δ α ∞ ≈ … “ ” ’';
		const paragraph: RichText = [
			{ kind: 'symbol', symbol: { quantity: 'V', subscript: 'R' } },
			{ kind: 'text', text: ' = 4 V ' },
			{ kind: 'text', text: characters }
		];
		const sample = tuningDiode();
		const document: DatasheetDocument = {
			...sample,
			sections: sample.sections.map((section) =>
				section.kind === 'prose' && section.style === 'paragraph'
					? { ...section, paragraphs: [paragraph] }
					: section
			)
		};
		const read = text(await renderDatasheet(document, releaseRecord)).replaceAll(/\s+/g, ' ');
		expect(read).toContain('V_R = 4 V');
		for (const character of characters.split(' ')) expect(read).toContain(character);
	});

	it('gives the draft its word and what it is a proof of', async () => {
		const read = text(await renderDatasheet(tuningDiode(), draftRecord));
		expect(read).toContain(
			'open draft of LKT-1130, proof of 2026-11-02 14:20 Z, content 256ce4bb373d'
		);
		expect(read).toMatch(/DRAFT\s*, not for release/);
		expect(read).toContain('2.0 proposed');
	});
});

describe('what other programs find', () => {
	it('qpdf: no damage', () => {
		expect(runOn(release, 'qpdf', (file) => ['--check', file])).toContain(
			'No syntax or stream encoding errors found'
		);
	});

	it('pdffonts: seven faces, each embedded, as a subset, with a way back to Unicode', () => {
		const fonts = runOn(release, 'pdffonts', (file) => [file])
			.trim()
			.split('\n')
			.slice(2)
			.map(cells);
		expect(fonts.map(([name]) => name).toSorted()).toEqual([
			'PLATEA+SourceSans3-Regular',
			'PLATEB+SourceSans3-Italic',
			'PLATEC+SourceSans3-SemiBold',
			'PLATED+SourceSans3-SemiBoldItalic',
			'PLATEE+RobotoSlab-Regular',
			'PLATEF+RobotoSlab-Medium',
			'PLATEG+RobotoSlab-Bold'
		]);
		for (const font of fonts) expect(font.slice(-5, -2)).toEqual(['yes', 'yes', 'yes']);
	});

	it('pdfimages: none, the chart is made of vectors', () => {
		const listed = runOn(release, 'pdfimages', (file) => ['-list', file])
			.trim()
			.split('\n');
		expect(listed).toHaveLength(2);
	});

	it('pdfinfo: tagged, titled, dated by the record alone', () => {
		const facts = runOn(release, 'pdfinfo', (file) => ['-isodates', file]);
		expect(facts).toMatch(/^Tagged: +yes$/m);
		expect(facts).toMatch(/^Title: +LKT-1130, Tuning diode: datasheet$/m);
		expect(facts).toMatch(/^CreationDate: +2026-11-10T08:30:00Z$/m);
		expect(facts).toMatch(/^ModDate: +2026-11-10T08:30:00Z$/m);
		expect(facts).toMatch(/^Pages: +3$/m);
		expect(facts).toMatch(/^Page size: +595\.276 x 841\.89 pts \(A4\)$/m);
	});

	it('pdfinfo: the tag tree has tables with header cells, and a row reads as a row', () => {
		const tree = runOn(release, 'pdfinfo', (file) => ['-struct-text', file]);
		const flat = tree.replaceAll(/\s+/g, ' ');
		expect(flat).toContain('H1 (block) "LKT-1130"');
		expect(flat).toContain('H2 (block) "Total capacitance against reverse voltage"');
		expect(flat).toContain(
			'TR TH: /Scope /Row "4" TD "10.9" TD "11.8" TD "12.7" TD "−7.6" TD "+7.6" TD "5.76" TD "G"'
		);
		expect(flat).toContain('TH: /Scope /Column "Basis"');
	});

	it('pdfdetach: the attached files are the document and its table', () => {
		const listed = runOn(release, 'pdfdetach', (file) => ['-list', file]);
		expect(listed).toContain('datasheet.json');
		expect(listed).toContain('capacitance-table.csv');
		const saved = (name: string) =>
			runOn(release, 'sh', (file) => ['-c', `pdfdetach -saveall ${file} && cat ${name}`]);
		expect(saved('datasheet.json')).toBe(new TextDecoder().decode(canonicalBytes(tuningDiode())));
		expect(saved('capacitance-table.csv').split('\r\n')[5]).toBe(
			'25,1000000,4,10.9,11.8,12.7,pF,guaranteed by correlation'
		);
	});

	it('mutool: a second reader shows the same three pages', () => {
		const read = runOn(release, 'mutool', (file) => ['draw', '-q', '-F', 'txt', file]);
		expect(read).toContain('Total capacitance against reverse voltage');
		expect(read).toContain('page 3 of 3');
	});
});

describe('what a sheet refuses', () => {
	it('a character that the faces lack, by name', async () => {
		const document = { ...tuningDiode(), description: 'diode 二极管' };
		await expect(renderDatasheet(document, releaseRecord)).rejects.toThrow(
			'The faces of the printed sheet have no “二” (U+4E8C), “极” (U+6781), “管” (U+7BA1).'
		);
	});
});
