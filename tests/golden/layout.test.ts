import { describe, expect, it } from 'vitest';
import { drawCharts } from '../../src/lib/server/pdf/renderDatasheet';
import { attachedFiles } from '../../src/lib/server/pdf/attachedFiles';
import { layoutDatasheet } from '../../src/lib/server/pdf/layout/layoutDatasheet';
import type { DatasheetDocument, DocumentSection } from '../../src/lib/core/datasheet/document';
import type { PublicationRecord } from '../../src/lib/core/datasheet/record';
import type { Box, TextBox } from '../../src/lib/server/pdf/layout/box';
import { PACKAGES } from '../../src/lib/core/outline/packages';
import { MEASURE, PAPERS } from '../../src/lib/server/pdf/layout/paper';
import { completeSheet, listedRecord } from './completeSheet';
import { printLayout } from './printLayout';
import { draftRecord, manyRows, releaseRecord, tuningDiode } from './sampleDatasheets';

async function layout(document: DatasheetDocument, record: PublicationRecord) {
	const charts = await drawCharts(document);
	return layoutDatasheet(document, record, { charts, attached: attachedFiles(document) });
}

const LEFT = PAPERS.a4.left;
const HALF = (84 * 72) / 25.4;

const isText = (box: Box): box is TextBox => box.kind === 'text';
const textOf = (box: TextBox) => box.pieces.map(({ text }) => text).join('');
const widthOf = (box: TextBox) => box.pieces.reduce((sum, { width }) => sum + width, 0);

describe('the layout as data', () => {
	it('of a release stays as it was approved', async () => {
		await expect(printLayout(await layout(tuningDiode(), releaseRecord))).toMatchFileSnapshot(
			'release-a4.layout.txt'
		);
	});

	it('of an unfinished preliminary draft on Letter stays as it was approved', async () => {
		const document = tuningDiode({ status: 'preliminary', paper: 'letter', isUnfinished: true });
		await expect(printLayout(await layout(document, draftRecord))).toMatchFileSnapshot(
			'draft-letter.layout.txt'
		);
	});
});

describe('a sheet with every kind of section', () => {
	it('stays as it was approved', async () => {
		await expect(printLayout(await layout(completeSheet(), listedRecord))).toMatchFileSnapshot(
			'complete-a4.layout.txt'
		);
	});

	it.each(PACKAGES.map(({ name }) => name))(
		'keeps %s within its half of the page',
		async (name) => {
			const { pages } = await layout(completeSheet({ packageName: name }), listedRecord);
			const drawings = pages.flatMap(({ boxes }) =>
				boxes.flatMap((box) => (box.kind === 'drawing' && box.width < HALF + 1 ? [box] : []))
			);
			// Terminals, three half charts, circuit, outline, land pattern.
			expect(drawings).toHaveLength(7);
			for (const { x, width } of drawings)
				expect(x + width).toBeLessThanOrEqual(LEFT + MEASURE + 0.01);
		}
	);

	it('numbers its figures in their order', async () => {
		const { pages } = await layout(completeSheet(), listedRecord);
		const figures = pages.flatMap(({ boxes }) =>
			boxes
				.filter(isText)
				.flatMap((box) => /^Fig\.\u00a0(\d+)$/.exec(textOf(box).trim())?.[1] ?? [])
		);
		expect(figures).toEqual(['1', '2', '3', '4', '5', '6', '7']);
	});

	it('keeps heads with what they head, and everything above the foot', async () => {
		for (const paper of ['a4', 'letter'] as const) {
			const { pages, paper: sheet } = await layout(completeSheet({ paper }), listedRecord);
			for (const { boxes } of pages) {
				const body = boxes.filter(isText).filter(({ y }) => y < sheet.footRule);
				const drawn = boxes.flatMap((box) => (box.kind === 'drawing' ? [box.y + box.height] : []));
				const lowest = Math.max(...body.map(({ y }) => y), ...drawn);
				expect(lowest).toBeLessThanOrEqual(sheet.bottom);
				const heads = body.filter(
					(box) => box.pieces[0]?.face === 'slabMedium' && box.pieces[0].size === 11.5
				);
				for (const head of heads) expect(head.y).toBeLessThan(lowest - 20);
			}
		}
	});
});

describe('columns of numbers', () => {
	it('meet on one decimal axis in every row of the capacitance table', async () => {
		const { pages } = await layout(tuningDiode(), releaseRecord);
		const typical = ['30.4', '25.0', '18.3', '8.59', '2.05'];
		const axes = typical.map((number) => {
			const box = pages[1]?.boxes
				.filter(isText)
				.filter((each) => textOf(each) === number)
				.find(({ x }) => x > 150 && x < 260);
			const whole = Number(number) >= 10 ? 2 : 1;
			// Source Sans digits are 0.497 em wide at 400.
			return (box?.x ?? 0) + whole * 0.497 * 8.5;
		});
		for (const axis of axes) expect(axis).toBeCloseTo(axes[0] ?? 0, 6);
	});

	it('keep their axis under the mark of a preliminary limit', async () => {
		const [plain, marked] = await Promise.all([
			layout(tuningDiode(), releaseRecord),
			layout(tuningDiode({ status: 'preliminary' }), releaseRecord)
		]);
		const xOf = (laidOut: typeof plain, text: string) =>
			laidOut.pages[1]?.boxes
				.filter(isText)
				.filter((box) => box.pieces[0]?.text === text)
				.map(({ x }) => x);
		expect(xOf(marked, '33.5')).toEqual(xOf(plain, '33.5'));
	});
});

describe('a table longer than a page', () => {
	const document = tuningDiode({ rows: manyRows(200) });

	it('prints each of its 200 rows once, in order', async () => {
		const { pages } = await layout(document, releaseRecord);
		const biases = pages.flatMap(({ boxes }) =>
			boxes
				.filter(isText)
				.filter((box) => box.pieces[0]?.face === 'sansBold' && /^\d+\.\d\d$/.test(textOf(box)))
				.map(textOf)
		);
		expect(biases).toEqual(manyRows(200).map(([bias]) => bias));
	});

	it('repeats its heads on each page, out of the reading order', async () => {
		const { pages } = await layout(document, releaseRecord);
		const heads = pages.flatMap(({ boxes }) =>
			boxes
				.filter(isText)
				.filter((box) => textOf(box) === 'Total capacitance against reverse voltage')
				.map(({ tag }) => tag)
		);
		expect(heads).toHaveLength(5);
		expect(heads.slice(1)).toEqual([null, null, null, null]);
	});

	it('keeps everything above the foot of each page', async () => {
		const { pages, paper } = await layout(document, releaseRecord);
		const lowest = pages.flatMap(({ boxes }) =>
			boxes
				.filter(isText)
				.filter(({ y }) => y < paper.footRule)
				.map(({ y }) => y)
		);
		expect(Math.max(...lowest)).toBeLessThanOrEqual(paper.bottom);
	});

	it('explains its marks on each page that carries them', async () => {
		const { pages } = await layout(document, releaseRecord);
		const explained = pages.map(({ boxes }) =>
			boxes.filter(isText).some((box) => textOf(box).includes('characterized'))
		);
		const marked = pages.map(({ boxes }) =>
			boxes.filter(isText).some((box) => textOf(box) === 'C')
		);
		expect(marked.filter(Boolean)).toHaveLength(5);
		expect(explained.map((has, at) => has || !marked[at])).toEqual(pages.map(() => true));
	});
});

describe('what is long or empty', () => {
	const partNumber = 'LKT-1130-ABCDEFGHIJ-0123456789-ABCDEFGHIJ-0123456789-ABCDEFG';

	it('sets a part number of 60 characters whole, within its column, on every page', async () => {
		expect(partNumber).toHaveLength(60);
		const { pages, paper } = await layout(tuningDiode({ partNumber }), releaseRecord);
		const set = pages[0]?.boxes
			.filter(isText)
			.filter((box) => box.pieces[0]?.face === 'slabBold' && (box.pieces[0].size ?? 0) >= 15);
		expect(set?.map((box) => textOf(box).trim()).join('')).toBe(partNumber);
		for (const box of set ?? []) expect(widthOf(box)).toBeLessThanOrEqual((114 * 72) / 25.4 + 5);
		for (const { boxes } of pages.slice(1)) {
			const head = boxes.filter(isText).find((box) => textOf(box) === partNumber);
			expect((head?.x ?? 0) + (head ? widthOf(head) : 0)).toBeLessThan(paper.width - 100);
		}
	});

	it.each([
		['paragraph', 'headline'],
		['list', 'features']
	] as const)('carries a %s longer than a page on over pages, line by line', async (_, block) => {
		const words = Array.from({ length: 1800 }, (_, at) => `word${at}`);
		const full = tuningDiode();
		const long: DatasheetDocument = {
			...full,
			sections: full.sections.map((section) =>
				section.kind === 'prose' && section.block === block
					? {
							...section,
							paragraphs: Array.from({ length: 18 }, (_, at) => [
								{ kind: 'text' as const, text: words.slice(at * 100, at * 100 + 100).join(' ') }
							])
						}
					: section
			)
		};
		const { pages, paper } = await layout(long, releaseRecord);
		const printed = pages
			.flatMap(({ boxes }) => boxes.filter(isText).filter(({ y }) => y < paper.footRule))
			.map(textOf)
			.join(' ')
			.match(/word\d+/g);
		expect(printed).toEqual(words);
		for (const { boxes } of pages) {
			const lowest = boxes.filter(isText).filter(({ y }) => y < paper.footRule);
			expect(Math.max(...lowest.map(({ y }) => y))).toBeLessThanOrEqual(paper.bottom);
		}
	});

	it('leaves out sections with nothing in them', async () => {
		const full = tuningDiode();
		const document: DatasheetDocument = {
			...full,
			basisNotes: [],
			footnotes: [],
			sections: full.sections.map((section): DocumentSection => {
				if (section.kind === 'prose') return { ...section, paragraphs: [] };
				if (section.kind === 'headline-figures') return { ...section, figures: [] };
				if (section.kind === 'capacitance-chart') return { ...section, points: [] };
				if (section.kind === 'notice') return { ...section, paragraphs: [] };
				if ('rows' in section) return { ...section, rows: [] };
				return section;
			})
		};
		const { pages, bookmarks } = await layout(document, { ...releaseRecord, history: [] });
		expect(pages).toHaveLength(1);
		expect(bookmarks).toEqual([]);
	});

	it('says where the curve begins when a row stands at 0 V', async () => {
		const rows: ReturnType<typeof manyRows> = [
			['0', '36', '40', '44', 'characterized'],
			...manyRows(8)
		];
		const { pages } = await layout(tuningDiode({ rows }), releaseRecord);
		const printed = pages.flatMap(({ boxes }) => boxes.filter(isText).map(textOf)).join('');
		expect(printed).toContain('first positive bias; 0\u00a0V: see\u00a0the\u00a0table.');
	});
});

describe('change bars and proof marks', () => {
	const bars = (boxes: readonly Box[]) =>
		boxes.filter((box) => box.kind === 'rule' && box.weight === 1.5 && box.from[0] < 57);

	it('stand beside changed rows only, and say so in the tag tree', async () => {
		const laidOut = await layout(tuningDiode(), releaseRecord);
		const changed = laidOut.structure.filter(({ actualText }) => actualText === 'changed');
		expect(bars(laidOut.pages[0]?.boxes ?? [])).toHaveLength(3);
		expect(bars(laidOut.pages[1]?.boxes ?? [])).toHaveLength(3);
		// Ordering, rating, two characteristics, one bias, the chart; the list item's bar is bare.
		expect(changed).toHaveLength(6);
	});

	it('mark every page of a draft and none of a release', async () => {
		const count = (laidOut: Awaited<ReturnType<typeof layout>>) =>
			laidOut.pages.map(
				({ boxes }) =>
					boxes.filter((box) => isText(box) && textOf(box) === 'DRAFT' && box.turned).length
			);
		expect(count(await layout(tuningDiode(), draftRecord))).toEqual([3, 3, 3]);
		expect(count(await layout(tuningDiode(), releaseRecord))).toEqual([0, 0, 0]);
	});

	it('box the state of a slot on a proof, and never on a release', async () => {
		const document = tuningDiode({ isUnfinished: true });
		const boxed = (laidOut: Awaited<ReturnType<typeof layout>>, word: string) =>
			laidOut.pages
				.flatMap(({ boxes }) => boxes.filter(isText))
				.filter((box) => textOf(box) === word).length;
		const proof = await layout(document, draftRecord);
		// Headline figure, table row and key; table row and key.
		expect([boxed(proof, 'stale'), boxed(proof, 'unbound')]).toEqual([3, 2]);
		const release = await layout(document, releaseRecord);
		expect([boxed(release, 'stale'), boxed(release, 'unbound')]).toEqual([0, 0]);
	});
});
