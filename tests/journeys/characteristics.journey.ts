import AxeBuilder from '@axe-core/playwright';
import { expect } from '@playwright/test';
import { hydrated, test } from './people';

test('readings show their limits, censored ones are said, and a number leads to its derivation', async ({
	visitAs
}) => {
	const page = await visitAs('product');
	await page.goto('/products/LKT-1130/characteristics');
	await hydrated(page);
	const table = page.getByRole('table', { name: 'Readings and derived characteristics' });
	const leakage = table.getByRole('row', { name: /V_R = 28.V, 25.°C/ }).first();
	await expect(leakage).toContainText('at or below the floor');

	await leakage.getByRole('link').first().focus();
	await page.keyboard.press('Enter');
	await page.waitForURL(/of=I_R/);
	await expect(page.getByText('censored ones are counted beside them')).toBeVisible();
	await expect(page.getByText(/Activation energy 0\.\d+ eV/)).toBeVisible();

	const ratio = table.getByRole('row', { name: /second V_R = 28/ }).first();
	await ratio.getByRole('link', { name: /^typ .*derivation/ }).click();
	await expect(page.getByRole('heading', { name: 'C_ratio typ' })).toBeVisible();
	await expect(page.getByText('Sample quantile at 0.5')).toBeVisible();
	expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
	await page.keyboard.press('Escape');
	await expect(page.getByRole('heading', { name: 'C_ratio typ' })).toBeHidden();

	await page.goto('/products/LKR-2406/characteristics');
	await hydrated(page);
	await expect(
		page.getByRole('table', { name: 'Extracted from the median forward curves' })
	).toContainText('Ω');
	await page.setViewportSize({ width: 390, height: 844 });
	const overflow = await page.evaluate(
		() => document.documentElement.scrollWidth - window.innerWidth
	);
	expect(overflow).toBeLessThanOrEqual(0);
});
