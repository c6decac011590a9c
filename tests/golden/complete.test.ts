import { beforeAll, describe, expect, it } from 'vitest';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import { completeSheet, listedRecord } from './completeSheet';
import { readObjects, textOf } from './readObjects';
import { runOn } from './tools';

const document = completeSheet();
let bytes: Uint8Array;
beforeAll(async () => {
	bytes = await renderDatasheet(document, listedRecord);
});

const text = (page?: number) =>
	runOn(bytes, 'pdftotext', (file) => [
		'-layout',
		...(page === undefined ? [] : ['-f', `${page}`, '-l', `${page}`]),
		file,
		'-'
	]);
/** Every line with single spaces. */
const lines = () =>
	text()
		.split('\n')
		.map((line) => line.trim().replaceAll(/\s+/g, ' '));

describe('what pdftotext reads of the sections', () => {
	it('gives the terminals and the code on the body', () => {
		const all = lines().join('\n');
		expect(all).toContain('1 cathode (K), banded end');
		expect(all).toContain('2 anode (A)');
		expect(all).toContain('Marking code K4; body seen from above');
	});

	it('gives thermal resistances as rows, with their basis', () => {
		expect(lines()).toContain(
			'R_th(j-a) thermal resistance, junction to ambient FR4 1.6 mm – 430 500 K/W C'
		);
	});

	it('gives the texts of charts and circuits: they are no pictures', () => {
		const all = text();
		for (const words of [
			'typical, by the law of the model',
			'not measured',
			'capacitance',
			'bridge',
			'100 kΩ',
			'max 200 nA, S'
		])
			expect(all).toContain(words);
		const listed = runOn(bytes, 'pdfimages', (file) => ['-list', file])
			.trim()
			.split('\n');
		expect(listed).toHaveLength(2);
	});

	it('gives each dimension of the package as a row', () => {
		const all = lines().join('\n');
		for (const row of [
			'height 0.80 0.90 1.00',
			'lead width 0.25 0.32 0.40',
			'length over leads 2.30 2.50 2.70',
			'outer distance 2.86',
			'pad length 0.63'
		])
			expect(all).toContain(row);
	});

	it('gives the parameters of the model', () => {
		const all = lines().join('\n');
		expect(all).toMatch(/CJO zero-bias junction capacitance 38\.42 pF/);
		expect(all).toMatch(/VJ junction potential 2\.128 V/);
	});

	it('gives the differences of the newest version one by one', () => {
		expect(lines()).toContain('rating P_tot at T_a ≤ 25 °C, maximum 300 mW 250 mW');
		expect(lines()).toContain('added ordering code LKT-1130-R13 – –');
	});
});

describe('what other programs find', () => {
	it('pdfinfo: drawings have words, tables of dimensions have heads and row heads', () => {
		const tree = runOn(bytes, 'pdfinfo', (file) => ['-struct-text', file]).replaceAll(/\s+/g, ' ');
		expect(tree).toContain('TH: /Scope /Row "length over leads" TD "2.30" TD "2.50" TD "2.70"');
		expect(tree).toContain('TH: /Scope /Column "Parameter"');
		const alternatives = readObjects(bytes)
			.dicts.filter((dict) => dict['/S'] === '/Figure')
			.map((dict) => textOf(dict['/Alt']));
		expect(alternatives).toHaveLength(8);
		expect(alternatives.join('\n')).toContain('H_E length over leads 2.50 mm');
		expect(alternatives.join('\n')).toContain(
			'Chart of Q_C in pC, linear, against V_R in V, linear'
		);
	});

	it('pdfdetach: model.lib is the model that the sheet prints', () => {
		const saved = runOn(bytes, 'sh', (file) => [
			'-c',
			`pdfdetach -saveall ${file} && cat model.lib`
		]);
		const model = document.sections.find((section) => section.kind === 'model');
		expect(saved).toBe(model?.kind === 'model' ? model.text : '');
		expect(saved).toContain('.ends LKT1130');
		const pdf = readObjects(bytes);
		expect(
			pdf
				.list(pdf.catalog['/AF'])
				.map(pdf.dict)
				.map((file) => [textOf(file['/UF']), file['/AFRelationship']])
		).toEqual([
			['capacitance-table.csv', '/Data'],
			['datasheet.json', '/Source'],
			['model.lib', '/Supplement']
		]);
	});

	it('qpdf: a link leads from the name of the model file to the page of the model', () => {
		const pdf = readObjects(bytes);
		const linked = pdf.list(pdf.pages[0]?.['/Annots']).map(pdf.dict);
		const targets = linked.map((link) => pdf.pages.indexOf(pdf.dict(pdf.list(link['/Dest'])[0])));
		const page = [1, 2, 3, 4, 5].find(
			(number) => text(number).includes('SPICE model') && number > 1
		);
		expect(targets).toContain((page ?? 0) - 1);
	});

	it('mutool: a second reader shows the same pages', () => {
		const read = runOn(bytes, 'mutool', (file) => ['draw', '-q', '-F', 'txt', file]);
		for (const words of ['Package outline and land pattern', 'SPICE model', 'page 5 of 5'])
			expect(read).toContain(words);
	});
});
