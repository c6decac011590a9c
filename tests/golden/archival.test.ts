import { beforeAll, describe, expect, it } from 'vitest';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import { readObjects, textOf, type PdfObjects, type PdfValue } from './readObjects';
import { draftRecord, releaseRecord, tuningDiode } from './sampleDatasheets';
import { runOn } from './tools';

/*
 * The clauses of PDF/A-3b (ISO 19005-3, over ISO 32000-1), one by one, on the file as qpdf and
 * poppler read it. The standard's text was not at hand: clause numbers and demands are from memory,
 * and no validator was. The file is built to the standard, not certified.
 */

let bytes: Uint8Array;
let pdf: PdfObjects;
let contents: string[];

beforeAll(async () => {
	bytes = await renderDatasheet(tuningDiode(), releaseRecord);
	pdf = readObjects(bytes);
	contents = pdf.pages.map((page) => pdf.data(page['/Contents']).toString('latin1'));
});

const ofType = (type: string) => pdf.dicts.filter((dict) => dict['/Type'] === type);
const raw = () => Buffer.from(bytes).toString('latin1');

describe('file structure (6.1)', () => {
	it('begins with its version and a comment of four bytes above 127', () => {
		expect(raw().slice(0, 9)).toBe('%PDF-1.7\n');
		expect(bytes[9]).toBe('%'.charCodeAt(0));
		expect([...bytes.slice(10, 14)].every((byte) => byte > 127)).toBe(true);
	});

	it('has an identifier of two strings, no encryption, and nothing after its end', () => {
		const [first, second] = pdf.list(pdf.trailer['/ID']);
		expect(first).toBe(`b:${releaseRecord.contentHash.slice(0, 32)}`);
		expect(second).toBe(first);
		expect(pdf.trailer['/Encrypt']).toBeUndefined();
		expect(raw()).toMatch(/%%EOF\s?$/);
	});

	it('packs streams by Flate alone, none of them in a file outside', () => {
		const filters = pdf.dicts.flatMap((dict) => (dict['/Filter'] ? [dict['/Filter']] : []));
		expect(new Set(filters)).toEqual(new Set(['/FlateDecode']));
		for (const key of ['/FFilter', '/FDecodeParms'])
			expect(pdf.dicts.filter((dict) => dict[key] !== undefined)).toEqual([]);
	});

	it('keeps within the limits of numbers, names, strings and nesting', () => {
		for (const scalar of pdf.scalars) {
			if (typeof scalar === 'number') expect(Math.abs(scalar)).toBeLessThan(2 ** 31);
			else if (scalar.startsWith('/')) expect(scalar.length).toBeLessThanOrEqual(128);
			else expect(Buffer.byteLength(scalar)).toBeLessThanOrEqual(32_767);
		}
		for (const content of contents) {
			let depth = 0;
			let deepest = 0;
			for (const [operator] of content.matchAll(/(?<=^|\s)[qQ](?=\s|$)/g)) {
				depth += operator === 'q' ? 1 : -1;
				deepest = Math.max(deepest, depth);
			}
			expect(depth).toBe(0);
			expect(deepest).toBeGreaterThan(0);
			expect(deepest).toBeLessThanOrEqual(28);
		}
	});

	it('has no optional content, no form, no embedded program', () => {
		for (const key of ['/OCProperties', '/AcroForm', '/Collection', '/Requirements', '/Perms'])
			expect(pdf.catalog[key]).toBeUndefined();
	});
});

describe('graphics (6.2)', () => {
	it('has one output intent with the profile of sRGB', () => {
		const intents = pdf.list(pdf.catalog['/OutputIntents']).map(pdf.dict);
		expect(intents).toHaveLength(1);
		const [intent] = intents;
		expect(intent?.['/S']).toBe('/GTS_PDFA1');
		expect(textOf(intent?.['/OutputConditionIdentifier'])).toBe('sRGB IEC 61966-2-1');
		expect(pdf.dict(intent?.['/DestOutputProfile'])['/N']).toBe(3);
		const profile = pdf.data(intent?.['/DestOutputProfile']);
		expect(profile.readUInt32BE(0)).toBe(profile.length);
		// A display profile of RGB, at most of version 4.2: the newest that PDF 1.7 names.
		expect(profile.toString('latin1', 12, 20)).toBe('mntrRGB ');
		expect(profile.toString('latin1', 36, 40)).toBe('acsp');
		expect(profile.readUInt32BE(8)).toBeLessThanOrEqual(0x04200000);
	});

	it('paints in the RGB of that intent alone', () => {
		for (const content of contents) {
			const painted = content.match(/(?<=\s)(?:rg|RG|g|G|k|K|cs|CS|sc|SC|scn|SCN|sh)(?=\s|$)/g);
			expect(new Set(painted)).toEqual(new Set(['rg', 'RG']));
		}
	});

	it('asks for no transparency, no pictures, no outside objects', () => {
		const resources = pdf.pages.map((page) => pdf.dict(page['/Resources']));
		expect(resources.map((each) => Object.keys(each))).toEqual(contents.map(() => ['/Font']));
		expect(pdf.pages.flatMap((page) => (page['/Group'] ? [page['/Group']] : []))).toEqual([]);
		for (const content of contents) expect(content).not.toMatch(/(?<=\s)(?:gs|Do|BI|ri)(?=\s)/);
	});
});

describe('fonts (6.2.11)', () => {
	const composite = () => ofType('/Font').filter((font) => font['/Subtype'] === '/Type0');
	const descendant = (font: Record<string, PdfValue>) =>
		pdf.dict(pdf.list(font['/DescendantFonts'])[0]);

	it('are composite TrueType fonts, embedded, numbered as the file numbers its glyphs', () => {
		expect(composite()).toHaveLength(7);
		for (const font of composite()) {
			expect(font['/Encoding']).toBe('/Identity-H');
			const cid = descendant(font);
			expect(cid['/Subtype']).toBe('/CIDFontType2');
			expect(cid['/CIDToGIDMap']).toBe('/Identity');
			expect(pdf.data(pdf.dict(cid['/FontDescriptor'])['/FontFile2']).length).toBeGreaterThan(500);
		}
	});

	it('have the widths of the embedded programs', () => {
		for (const font of composite()) {
			const cid = descendant(font);
			const program = pdf.data(pdf.dict(cid['/FontDescriptor'])['/FontFile2']);
			const [first, widths] = pdf.list(cid['/W']);
			expect(first).toBe(1);
			const advances = advanceWidths(program);
			// Parts of composed letters follow the letters themselves and are never shown alone.
			expect(pdf.list(widths).length).toBeLessThan(advances.length);
			expect(pdf.list(widths).length).toBeGreaterThan(2);
			pdf.list(widths).forEach((width, at) => expect(width).toBeCloseTo(advances[at + 1] ?? 0, 1));
		}
	});

	it('never print the glyph of a missing character, and give each glyph its characters', () => {
		const byName = new Map(
			Object.entries(pdf.dict(pdf.dict(pdf.pages[0]?.['/Resources'])['/Font'])).map(
				([name, font]) => [name, mappedGlyphs(pdf.data(pdf.dict(font)['/ToUnicode']).toString())]
			)
		);
		let shown = 0;
		for (const content of contents)
			for (const { font, glyph } of shownGlyphs(content)) {
				shown++;
				expect(glyph).not.toBe('0000');
				expect(byName.get(font)?.has(glyph)).toBe(true);
			}
		expect(shown).toBeGreaterThan(5000);
	});
});

describe('annotations and actions (6.3, 6.5)', () => {
	it('are links alone, printed, never hidden', () => {
		const annotations = ofType('/Annot');
		expect(annotations.length).toBeGreaterThan(5);
		for (const annotation of annotations) {
			expect(annotation['/Subtype']).toBe('/Link');
			expect(annotation['/F']).toBe(4);
			expect(textOf(annotation['/Contents'])).toMatch(/^to page \d$/);
		}
	});

	it('do nothing but lead to places: no script, no launch, no action', () => {
		// An element of the tag tree keeps its attributes under the same key.
		const others = pdf.dicts.filter((dict) => dict['/Type'] !== '/StructElem');
		for (const key of ['/A', '/AA', '/OpenAction', '/JS', '/JavaScript', '/URI'])
			expect(others.filter((dict) => dict[key] !== undefined)).toEqual([]);
	});

	it('lead to where the terms and the table stand', () => {
		const placeOf = (name: RegExp) =>
			contents.length -
			1 -
			[...contents.keys()].reverse().findIndex((at) => name.test(pageText(at + 1)));
		const targets = ofType('/Annot').map((annotation) => {
			const [page, fit, left, top] = pdf.list(annotation['/Dest']);
			expect([fit, left]).toEqual(['/XYZ', null]);
			expect(Number(top)).toBeGreaterThan(0);
			return pdf.pages.indexOf(pdf.dict(page));
		});
		expect(new Set(targets)).toEqual(new Set([placeOf(/characterized on 600 devices/)]));
	});
});

const pageText = (page: number) =>
	runOn(bytes, 'pdftotext', (file) => ['-f', `${page}`, '-l', `${page}`, file, '-']).replaceAll(
		/\s+/g,
		' '
	);

describe('metadata (6.6)', () => {
	const meta = () => runOn(bytes, 'pdfinfo', (file) => ['-meta', file]);
	const element = (name: string) =>
		new RegExp(`<${name}>(?:<rdf:(?:Alt|Seq|Bag)><rdf:li[^>]*>)?([^<]*)<`).exec(meta())?.[1];

	it('is one packet of XMP, not packed', () => {
		const stream = pdf.dict(pdf.catalog['/Metadata']);
		expect([stream['/Type'], stream['/Subtype'], stream['/Filter']]).toEqual([
			'/Metadata',
			'/XML',
			undefined
		]);
		expect(raw()).toContain('<pdfaid:part>3</pdfaid:part>');
		expect(meta()).toMatch(/^<\?xpacket begin="\ufeff" id="W5M0MpCehiHzreSzNTczkc9d"\?>/);
	});

	it('says to what the file is built', () => {
		expect(element('pdfaid:part')).toBe('3');
		expect(element('pdfaid:conformance')).toBe('B');
		expect(meta()).toContain('xmlns:pdfaid="http://www.aiim.org/pdfa/ns/id/"');
	});

	it.each([
		['/Title', 'dc:title'],
		['/Author', 'dc:creator'],
		['/Subject', 'dc:description'],
		['/Creator', 'xmp:CreatorTool'],
		['/Producer', 'pdf:Producer']
	])('%s says the same as %s', (key, name) => {
		const info = pdf.dict(pdf.trailer['/Info']);
		expect(textOf(info[key]).length).toBeGreaterThan(3);
		expect(element(name)).toBe(textOf(info[key]));
	});

	it.each([
		['/CreationDate', 'xmp:CreateDate'],
		['/ModDate', 'xmp:ModifyDate']
	])('%s is the instant of %s', (key, name) => {
		expect(textOf(pdf.dict(pdf.trailer['/Info'])[key])).toBe('D:20261110083000Z');
		expect(element(name)).toBe('2026-11-10T08:30:00Z');
	});

	it('has nothing in the document information that XMP does not say', () => {
		expect(Object.keys(pdf.dict(pdf.trailer['/Info'])).toSorted()).toEqual(
			[
				'/Author',
				'/CreationDate',
				'/Creator',
				'/ModDate',
				'/Producer',
				'/Subject',
				'/Title'
			].toSorted()
		);
	});
});

describe('embedded files (6.8)', () => {
	it('have type, dates, description and their relationship to the document', () => {
		const files = pdf.list(pdf.catalog['/AF']).map(pdf.dict);
		expect(files.map((file) => [textOf(file['/UF']), file['/AFRelationship']])).toEqual([
			['capacitance-table.csv', '/Data'],
			['datasheet.json', '/Source']
		]);
		const types: Record<string, string> = {
			'capacitance-table.csv': '/text/csv',
			'datasheet.json': '/application/json'
		};
		for (const file of files) {
			expect(textOf(file['/F'])).toBe(textOf(file['/UF']));
			expect(textOf(file['/Desc']).length).toBeGreaterThan(5);
			const stream = pdf.dict(pdf.dict(file['/EF'])['/F']);
			expect(stream['/Subtype']).toBe(types[textOf(file['/UF'])]);
			const parameters = pdf.dict(stream['/Params']);
			expect(parameters['/Size']).toBe(pdf.data(pdf.dict(file['/EF'])['/F']).length);
			expect(textOf(parameters['/ModDate'])).toBe('D:20261110083000Z');
		}
	});

	it('stand in the tree of names in order, and each in AF', () => {
		const tree = pdf.dict(pdf.dict(pdf.catalog['/Names'])['/EmbeddedFiles']);
		const names = pdf.list(tree['/Names']);
		const keys = names.filter((_, at) => at % 2 === 0).map(textOf);
		expect(keys).toEqual([...keys].sort());
		expect(names.filter((_, at) => at % 2 === 1)).toEqual(pdf.list(pdf.catalog['/AF']));
		expect(ofType('/Filespec')).toHaveLength(keys.length);
	});
});

describe('reading order and language (ISO 32000-1, 14.7 and 14.9)', () => {
	const elements = () => ofType('/StructElem');

	it('is marked, has a language and shows its title', () => {
		expect(pdf.dict(pdf.catalog['/MarkInfo'])['/Marked']).toBe(true);
		expect(textOf(pdf.catalog['/Lang'])).toBe('en');
		expect(pdf.dict(pdf.catalog['/ViewerPreferences'])['/DisplayDocTitle']).toBe(true);
	});

	it('uses roles that PDF names, and gives figures a text', () => {
		const standard =
			'Document Sect H1 H2 H3 P L LI Lbl LBody Table TR TH TD Figure Caption Note Link Span';
		for (const element of elements()) {
			expect(standard.split(' ')).toContain(textOf(element['/S']).slice(1));
			if (element['/S'] === '/Figure') expect(textOf(element['/Alt']).length).toBeGreaterThan(40);
		}
	});

	it('finds its way back from every stretch of every page', () => {
		const tree = pdf.dict(pdf.dict(pdf.catalog['/StructTreeRoot'])['/ParentTree']);
		const numbers = pdf.list(tree['/Nums']);
		const parentOf = new Map(
			numbers.flatMap((key, at) => (at % 2 === 0 ? [[key, numbers[at + 1]] as const] : []))
		);
		pdf.pages.forEach((page, at) => {
			const ids = [...(contents[at] ?? '').matchAll(/\/MCID (\d+)/g)].map(([, id]) => Number(id));
			const parents = pdf.list(parentOf.get(page['/StructParents'] ?? null));
			expect(ids).toEqual(parents.map((_, id) => id));
			for (const parent of parents) expect(pdf.dict(parent)['/Type']).toBe('/StructElem');
		});
		for (const annotation of ofType('/Annot')) {
			const parent = pdf.dict(parentOf.get(annotation['/StructParent'] ?? null));
			expect(parent['/S']).toBe('/Link');
			const kids = pdf.list(parent['/K']).map(pdf.dict);
			expect(kids.filter((kid) => pdf.dict(kid['/Obj']) === annotation)).toHaveLength(1);
		}
	});

	it('leaves nothing on the page unmarked', () => {
		for (const content of contents) {
			let depth = 0;
			for (const line of content.split('\n')) {
				if (/ (?:BDC|BMC)$/.test(line)) depth++;
				else if (line === 'EMC') depth--;
				else expect(depth).toBe(1);
			}
			expect(depth).toBe(0);
		}
	});

	it('has a bookmark for each section, on its page', () => {
		const outline = runOn(bytes, 'mutool', (file) => ['show', file, 'outline']);
		const lines = outline.trim().split('\n');
		expect(lines.map((line) => /"(.*)"/.exec(line)?.[1])).toEqual([
			'Features, Applications',
			'Ordering',
			'Limiting values',
			'Characteristics',
			'Total capacitance against reverse voltage',
			'Capacitance chart',
			'Revision history',
			'Notice'
		]);
		lines.forEach((line) => {
			const [, title = '', page = '0'] = /"(.*)"\s+#page=(\d+)/.exec(line) ?? [];
			expect(pageText(Number(page))).toContain(title.split(',')[0]);
		});
	});
});

it('a proof keeps to the same clauses where it differs: its bar, its margin, its marks', async () => {
	const proof = readObjects(
		await renderDatasheet(tuningDiode({ isUnfinished: true }), draftRecord)
	);
	expect(proof.list(proof.catalog['/OutputIntents'])).toHaveLength(1);
	for (const page of proof.pages) {
		expect(Object.keys(proof.dict(page['/Resources']))).toEqual(['/Font']);
		expect(proof.data(page['/Contents']).toString('latin1')).not.toMatch(/(?<=\s)gs(?=\s)/);
	}
});

/** Advance widths of a TrueType program in thousandths of its size, from its head, hhea and hmtx. */
function advanceWidths(program: Buffer): number[] {
	const tables = new Map(
		Array.from({ length: program.readUInt16BE(4) }, (_, at) => {
			const entry = 12 + at * 16;
			return [program.toString('latin1', entry, entry + 4), program.readUInt32BE(entry + 8)];
		})
	);
	const unitsPerEm = program.readUInt16BE((tables.get('head') ?? 0) + 18);
	const count = program.readUInt16BE((tables.get('hhea') ?? 0) + 34);
	const glyphs = program.readUInt16BE((tables.get('maxp') ?? 0) + 4);
	return Array.from({ length: glyphs }, (_, at) => {
		const metric = (tables.get('hmtx') ?? 0) + Math.min(at, count - 1) * 4;
		return (program.readUInt16BE(metric) * 1000) / unitsPerEm;
	});
}

const mappedGlyphs = (map: string) =>
	new Set([...map.matchAll(/^<([0-9a-f]{4})> <[0-9A-F]+>$/gim)].map(([, glyph]) => glyph));

/** The glyphs a page shows, with the resource name of their font. */
function shownGlyphs(content: string): { font: string; glyph: string | undefined }[] {
	let font = '';
	return content.split('\n').flatMap((line) => {
		font = /^(\/F\d) [\d.]+ Tf$/.exec(line)?.[1] ?? font;
		if (!/ TJ(?: ET)?$/.test(line)) return [];
		return [...line.matchAll(/<([0-9a-f]+)>/g)].flatMap(([, hex = '']) =>
			(hex.match(/.{4}/g) ?? []).map((glyph) => ({ font, glyph }))
		);
	});
}
