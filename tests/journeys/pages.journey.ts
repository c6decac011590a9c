import AxeBuilder from '@axe-core/playwright';
import { expect } from '@playwright/test';
import type { Page } from '@playwright/test';
import { hydrated, test } from './people';
import type { Somebody } from './people';

/** Every page with the demo's data, seen by somebody who may; then empty and refused ones. */
const PAGES: readonly (readonly [name: string, path: string, somebody: Somebody | 'nobody'])[] = [
	['sign-in', '/sign-in', 'nobody'],
	['library-public', '/library', 'nobody'],
	['library-product-public', '/library/LKT-1130', 'nobody'],
	['worklist-product', '/worklist', 'product'],
	['worklist-applications', '/worklist', 'applications'],
	['worklist-reader', '/worklist', 'reader'],
	['account', '/account', 'product'],
	['products', '/products', 'product'],
	['products-none', '/products?search=nothing-like-it', 'product'],
	['product-new', '/products/new', 'product'],
	['product-edit', '/products/LKT-1130/edit', 'product'],
	['dies', '/dies', 'product'],
	['die-new', '/dies/new', 'product'],
	['measurements', '/products/LKT-1130/measurements', 'product'],
	['measurement-set', '/products/LKT-1130/measurements/sets/1', 'product'],
	['cv', '/products/LKT-1130/cv', 'product'],
	['limits', '/products/LKT-1130/limits', 'product'],
	['datasheet', '/products/LKT-1130/datasheet', 'product'],
	['datasheet-marketing', '/products/LKR-2406/datasheet', 'marketing'],
	['verification', '/products/LKR-2406/revisions/1', 'applications'],
	['verification-done', '/products/LKT-1130/revisions/1', 'applications'],
	['releases', '/products/LKT-1130/releases', 'marketing'],
	['releases-none', '/products/LKR-2406/releases', 'marketing'],
	['templates', '/templates', 'product'],
	['template', '/templates/tuning', 'product'],
	['library', '/library', 'reader'],
	['people', '/administration/people', 'administrator'],
	['policy', '/administration/policies/future-lots-99-95', 'administrator'],
	['audit', '/administration/audit', 'administrator'],
	['refused', '/administration/people', 'reader'],
	['not-found', '/products/LKT-0000', 'product']
];

async function open(page: Page, path: string): Promise<void> {
	await page.goto(path);
	await hydrated(page);
}

/** With PICTURES=1 each page is kept as a picture, to be looked at. */
async function picture(page: Page, name: string): Promise<void> {
	if (process.env['PICTURES'] !== '1') return;
	await page.screenshot({ path: `tests/.work/screens/${name}.png`, fullPage: true });
}

async function findings(page: Page, rules?: readonly string[]): Promise<string[]> {
	// The rows of a table are alike: its first ten stand for the rest.
	const axe = new AxeBuilder({ page }).exclude('tbody tr:nth-child(n+11)');
	const { violations } = await (rules ? axe.withRules([...rules]) : axe).analyze();
	return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' | ')}`);
}

/** What no page may do, whatever its width: run out of the window sideways. */
const overflow = (page: Page) =>
	page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

for (const [name, path, somebody] of PAGES) {
	test(`${name}: axe finds nothing, light and dark, and it fits a phone`, async ({ visitAs }) => {
		const page = await visitAs(somebody);
		await open(page, path);
		await picture(page, `${name}-light`);
		expect(await findings(page)).toEqual([]);

		await page.emulateMedia({ colorScheme: 'dark' });
		await picture(page, `${name}-dark`);
		// The other colours are all that the dark side changes.
		expect(await findings(page, ['color-contrast'])).toEqual([]);

		await page.setViewportSize({ width: 390, height: 844 });
		await picture(page, `${name}-390`);
		expect(await overflow(page)).toBeLessThanOrEqual(0);
	});
}
