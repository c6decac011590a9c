import { readFileSync } from 'node:fs';
import AxeBuilder from '@axe-core/playwright';
import { expect } from '@playwright/test';
import { hydrated, test } from './people';

test('the 1/C² window by keyboard, both axes, and what can be taken along', async ({ visitAs }) => {
	const page = await visitAs('product');
	await page.goto('/products/LKR-2406/cv');
	await hydrated(page);

	await test.step('the line follows the window', async () => {
		const results = page.locator('.results');
		const before = (await results.textContent()) ?? '';
		const from = page.getByRole('slider', { name: 'Window from' });
		await expect(from).toHaveAttribute('aria-valuetext', '0 V');
		await from.focus();
		await page.keyboard.press('End');
		// The edges keep two measured biases apart: a line needs three.
		await expect(from).not.toHaveAttribute('aria-valuetext', '0 V');
		await expect(page.getByRole('slider', { name: 'Window to' })).toHaveAttribute(
			'aria-valuetext',
			'60 V'
		);
		await expect(results).not.toHaveText(before);
		await page.keyboard.press('Home');
		await expect(results).toHaveText(before);
	});

	await test.step('axes are a part of the address', async () => {
		await page
			.getByRole('navigation', { name: 'Axis of the reverse voltage' })
			.getByRole('link', { name: 'linear' })
			.press('Enter');
		await expect(page).toHaveURL(/x=linear/);
		await expect(page.locator('.drawing').first()).toHaveAttribute('data-drawn', 'true');
	});

	await test.step('a chart as a picture, the model as a file', async () => {
		const [picture] = await Promise.all([
			page.waitForEvent('download'),
			page.getByRole('button', { name: 'PNG' }).first().click()
		]);
		const bytes = readFileSync(await picture.path());
		expect(bytes.subarray(1, 4).toString('latin1')).toBe('PNG');
		const [model] = await Promise.all([
			page.waitForEvent('download'),
			page.getByRole('link', { name: 'SPICE model' }).click()
		]);
		expect(readFileSync(await model.path(), 'utf8')).toContain('* LKR-2406, typical device');
	});

	await test.step('the coverage of data; axe finds nothing there', async () => {
		await page.getByRole('link', { name: 'Coverage of data' }).press('Enter');
		await expect(page.getByRole('heading', { name: 'What each policy would need' })).toBeVisible();
		const { violations } = await new AxeBuilder({ page })
			.exclude('tbody tr:nth-child(n+11)')
			.analyze();
		expect(violations.map(({ id }) => id)).toEqual([]);
	});
});
