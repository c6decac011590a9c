import { expect } from '@playwright/test';
import type { Page } from '@playwright/test';
import { hydrated } from './people';

/*
 * What people do on the screens, a step each; stories are made of them.
 */

export async function openPage(page: Page, path: string): Promise<void> {
	await page.goto(path);
	await hydrated(page);
}

export async function createDie(page: Page, name: string): Promise<void> {
	await openPage(page, '/dies/new');
	await page.getByLabel('Name', { exact: true }).fill(name);
	await page.getByLabel('Junction area, mm²').fill('0.09');
	await page.getByLabel('Start from').selectOption({ label: 'Si' });
	await page.getByRole('button', { name: 'Fill the constants in' }).click();
	await expect(page.getByLabel('Relative permittivity')).toHaveValue('11.9');
	await page.getByRole('button', { name: 'Create the die' }).click();
	await page.waitForURL(/\/dies(\?|$)/);
}

export async function createProduct(page: Page, partNumber: string, die: string): Promise<void> {
	await openPage(page, '/products/new');
	await page.getByLabel('Part number').fill(partNumber);
	await page.getByLabel('Class').selectOption({ label: 'Tuning diode' });
	await page.getByLabel('Package').fill('SOD-323');
	await page.getByLabel('Die', { exact: true }).selectOption({ label: die });
	await page.getByLabel('Description').fill('Hyperabrupt silicon variable-capacitance diode');
	await page.getByRole('button', { name: 'Add an ordering code' }).click();
	await page.getByLabel('Code', { exact: true }).first().fill(`${partNumber}-R7`);
	await page.getByLabel('Grade').first().fill('standard');
	await page.getByLabel('Marking').first().fill('K7');
	await page.getByLabel('Packing').first().fill('reel 180 mm');
	await page.getByLabel('Quantity a pack').first().fill('3000');
	await page.getByRole('button', { name: 'Create the product' }).click();
	await page.waitForURL(`**/products/${partNumber}/measurements`);
}

/** Uploads a file, takes the mapping as it was recognised, and waits for the accepted set. */
export async function uploadSweeps(page: Page, partNumber: string, csv: string): Promise<void> {
	await openPage(page, `/products/${partNumber}/measurements`);
	await page.getByLabel('Drop files here, or choose them').setInputFiles({
		name: `${partNumber}.csv`,
		mimeType: 'text/csv',
		buffer: Buffer.from(csv)
	});
	await page.getByRole('button', { name: 'Upload' }).click();
	await page.waitForURL('**/measurements/uploads/*');
	await page.getByRole('button', { name: 'Accept and import' }).click();
	await page.waitForURL('**/measurements/sets/*');
}

/** Waits until the limits of a product are there to be read. */
export async function awaitLimits(page: Page, partNumber: string): Promise<void> {
	await openPage(page, `/products/${partNumber}/limits`);
	await expect(page.getByRole('row', { name: /V_?R = 28 V/ }).first()).toBeVisible({
		timeout: 30_000
	});
}

/** Opens the draft with the policy for one population, and binds what matches. */
export async function openBoundDraft(page: Page, partNumber: string): Promise<void> {
	await openPage(page, `/products/${partNumber}/datasheet`);
	const policies = page.getByLabel('Limit policy of new bindings');
	const policy = await policies.locator('option', { hasText: 'Population' }).first().textContent();
	await policies.selectOption({ label: policy?.trim() ?? '' });
	await page.getByRole('button', { name: 'Open the draft' }).click();
	await page.getByRole('button', { name: 'Bind everything that matches' }).click();
	await expect(page.getByRole('status').first()).toContainText('bound');
}

export interface Rating {
	readonly slot: string;
	readonly minimum?: string;
	readonly maximum: string;
}

export async function typeRating(page: Page, partNumber: string, rating: Rating): Promise<void> {
	await openPage(page, `/products/${partNumber}/datasheet?slot=${rating.slot}`);
	if (rating.minimum !== undefined) {
		await page.locator(`[id="${rating.slot}-minimum"]`).fill(rating.minimum);
	}
	await page.locator(`[id="${rating.slot}-maximum"]`).fill(rating.maximum);
	await page.locator(`[id="${rating.slot}-reason"]`).fill('Design rule of the die.');
	await page.getByRole('button', { name: 'Set the rating' }).click();
	await expect(page.getByText('Typed by Ida Sandvik')).toBeVisible();
}

export async function strikeOut(page: Page, partNumber: string, slot: string): Promise<void> {
	await openPage(page, `/products/${partNumber}/datasheet?slot=${slot}`);
	await page.getByText('Strike out', { exact: true }).first().click();
	await page.locator(`[id="${slot}-strike"]`).fill('No readings of it are stored yet.');
	await page.getByRole('button', { name: 'Strike out' }).click();
	await expect(page.getByText('Struck out by Ida Sandvik')).toBeVisible();
}

/** Downloads what is at a path with the page's own session. */
export async function fetchBytes(page: Page, path: string): Promise<Buffer> {
	const answer = await page.request.get(path, { timeout: 60_000 });
	expect(answer.status(), path).toBe(200);
	return answer.body();
}
