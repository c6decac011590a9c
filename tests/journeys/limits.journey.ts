import AxeBuilder from '@axe-core/playwright';
import { expect } from '@playwright/test';
import { hydrated, test } from './people';

test('an engineer tries other limits by keyboard, and reads where a number comes from', async ({
	visitAs
}) => {
	const page = await visitAs('product');
	await page.goto('/products/LKT-1130/limits');
	await hydrated(page);
	const trial = page.getByRole('form', { name: 'What if' });
	const said = trial.getByRole('status').first();
	await expect(said).toContainText('Nothing is saved');

	await test.step('less content tightens the limits, and nothing is saved', async () => {
		await trial.getByLabel('Content P').focus();
		await page.keyboard.press('ControlOrMeta+a');
		await page.keyboard.type('0.9');
		await expect(said).toContainText('Not saved.');
		await expect(said).toContainText(/\d+ limits tighten/);
		await expect(trial.getByText('tighter').first()).toBeVisible();
	});

	await test.step('a wrong share is refused beside its field', async () => {
		await page.keyboard.press('ControlOrMeta+a');
		await page.keyboard.type('2');
		await expect(trial.getByText('Expected a share between 0 and 1')).toBeVisible();
		await expect(trial.getByLabel('Content P')).toHaveAttribute('aria-invalid', 'true');
		await page.keyboard.press('ControlOrMeta+a');
		await page.keyboard.type('0.9');
		await expect(trial.getByText('Expected a share between 0 and 1')).toHaveCount(0);
	});

	await test.step('a lot is left out by the space bar', async () => {
		const lot = trial.getByRole('checkbox', { name: /^Lot / }).first();
		await lot.focus();
		await page.keyboard.press('Space');
		await expect(said).toContainText('Without');
		await page.keyboard.press('Space');
		await expect(said).not.toContainText('Without');
	});

	await test.step('a number leads to its derivation, and the trial stays', async () => {
		const cell = page.getByRole('table', { name: 'Limits by condition' }).locator('td a').first();
		const digits = (await cell.innerText()).trim();
		await cell.focus();
		await page.keyboard.press('Enter');
		const sheet = page.getByRole('complementary', { name: /^C_tot min at/ });
		await expect(sheet.getByRole('heading', { name: /^C_tot min at|min at/ })).toBeFocused();
		await expect(sheet.locator('.sum').first()).toContainText(digits);
		await expect(sheet.getByRole('term').filter({ hasText: 'Ppk' })).toBeVisible();
		await expect(sheet.getByText('Circular:')).toBeVisible();
		await expect(said).toContainText('Not saved.');
		const { violations } = await new AxeBuilder({ page })
			.exclude('tbody tr:nth-child(n+11)')
			.analyze();
		expect(violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
		await page.keyboard.press('Escape');
		await expect(sheet).toHaveCount(0);
	});
});
