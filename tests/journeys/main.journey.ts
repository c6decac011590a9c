import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { expect } from '@playwright/test';
import { expectedTable } from './expectedTable';
import { csvOf, measuredLots, withOneNumberChanged } from './measuredLots';
import { test } from './people';
import { pdfText, printedTable } from './printedTable';
import {
	awaitLimits,
	createDie,
	createProduct,
	fetchBytes,
	openBoundDraft,
	openPage,
	strikeOut,
	typeRating,
	uploadSweeps
} from './steps';

const PART = 'LKT-7001';
const OTHER = 'LKT-7002';
const FILES = 'tests/.work/pdf';
const NOT_MEASURED = [
	'characteristics.reverse-current',
	'characteristics.capacitance-ratio',
	'characteristics.series-resistance'
];

test.describe.configure({ mode: 'serial' });

test('a product engineer carries an upload to a submitted draft', async ({ visitAs }) => {
	test.setTimeout(180_000);
	const page = await visitAs('product');
	await createDie(page, 'T700');
	await createProduct(page, PART, 'T700');
	await uploadSweeps(page, PART, csvOf(measuredLots()));
	await awaitLimits(page, PART);

	await openBoundDraft(page, PART);
	await typeRating(page, PART, { slot: 'ratings.reverse-voltage', maximum: '30' });
	await typeRating(page, PART, {
		slot: 'ratings.junction-temperature',
		minimum: '-55',
		maximum: '150'
	});
	for (const slot of NOT_MEASURED) await strikeOut(page, PART, slot);

	await openPage(page, `/products/${PART}/datasheet`);
	await expect(page.getByText('Nothing is in the way of submitting.')).toBeVisible();
	await page.getByRole('button', { name: 'Submit for verification' }).click();
	await page.waitForURL(`**/products/${PART}/revisions/1`);
	await expect(page.getByText('Revision 1, submitted by Ida Sandvik')).toBeVisible();
});

test('the applications engineer verifies every row and approves', async ({ visitAs }) => {
	const page = await visitAs('applications');
	await openPage(page, '/worklist');
	await page.locator(`a[href="/products/${PART}/revisions/1"]`).first().click();
	await page.waitForURL(`**/products/${PART}/revisions/1`);

	const groupTick = page.getByRole('button', { name: /low-risk/ });
	await expect(groupTick).toBeVisible({ timeout: 30_000 });
	await groupTick.click();
	await expect(groupTick).toBeHidden();
	const open = page.locator('[data-tick] button[aria-pressed="false"]');
	for (let left = await open.count(); left > 0; left -= 1) {
		await open.first().click();
		await expect(open).toHaveCount(left - 1);
	}
	await page.getByRole('button', { name: 'Approve' }).click();
	await expect(page.getByText(/approved/i).first()).toBeVisible();
});

test('marketing publishes, and the PDF holds the table that the file supports', async ({
	visitAs
}) => {
	const page = await visitAs('marketing');
	await openPage(page, `/products/${PART}/releases/publish`);
	await page.getByRole('button', { name: 'Publish 1.0' }).click();
	await openPage(page, `/products/${PART}/releases`);
	const link = page.getByRole('link', { name: 'datasheet.pdf' });
	await expect(link).toBeVisible({ timeout: 60_000 });

	const [download] = await Promise.all([page.waitForEvent('download'), link.click()]);
	const path = await download.path();
	expect(printedTable(path)).toEqual(expectedTable(measuredLots()));

	const text = pdfText(path);
	for (const words of [PART, 'PRODUCTION', 'version 1.0', 'V_R', '30', 'page 1 of']) {
		expect(text).toContain(words);
	}
	expect(text).not.toContain('DRAFT');
});

test('everybody can fetch the release, and it is the same file', async ({ visitAs }) => {
	const page = await visitAs('nobody');
	const listed = await page.request.get('/api/v1/releases');
	expect(await listed.json()).toMatchObject({
		releases: expect.arrayContaining([
			expect.objectContaining({ partNumber: PART, version: '1.0', status: 'current' })
		])
	});
	const path = `/api/v1/releases/${PART}/1.0/datasheet.pdf`;
	const [first, second] = [await fetchBytes(page, path), await fetchBytes(page, path)];
	expect(first.equals(second)).toBe(true);
});

test('one changed number in the file changes the PDF', async ({ visitAs }) => {
	test.setTimeout(120_000);
	const changed = withOneNumberChanged(measuredLots(), { device: 20, bias: 4, factor: 1.02 });
	const page = await visitAs('product');
	await createProduct(page, OTHER, 'T700');
	await uploadSweeps(page, OTHER, csvOf(changed));
	await awaitLimits(page, OTHER);
	await openBoundDraft(page, OTHER);

	mkdirSync(FILES, { recursive: true });
	const path = `${FILES}/${OTHER}.pdf`;
	writeFileSync(path, await fetchBytes(page, `/products/${OTHER}/datasheet/proof.pdf`));
	expect(readFileSync(path).subarray(0, 5).toString()).toBe('%PDF-');
	expect(pdfText(path)).toContain('DRAFT');

	const printed = printedTable(path);
	expect(printed).toEqual(expectedTable(changed));
	const before = expectedTable(measuredLots());
	expect(printed.filter((row, index) => row.maximum !== before[index]?.maximum)).toEqual([
		expect.objectContaining({ bias: '4', maximum: '11.6' })
	]);
});

test('the same file again is refused, and says where it is', async ({ visitAs }) => {
	const page = await visitAs('product');
	await openPage(page, `/products/${PART}/measurements`);
	await page.getByLabel('Drop files here, or choose them').setInputFiles({
		name: 'again.csv',
		mimeType: 'text/csv',
		buffer: Buffer.from(csvOf(measuredLots()))
	});
	await page.getByRole('button', { name: 'Upload' }).click();
	await expect(page.getByRole('link', { name: 'See the first upload' })).toBeVisible();
});
