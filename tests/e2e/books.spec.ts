import { expect, test } from '@playwright/test';
import { expectNoViolations, signInAs, ONCE } from './support';

test('an engineer reads each coefficient with its unit and its source', async ({ page }) => {
	// The scan looks at some seventy rows.
	test.slow();
	await signInAs(page, 'engineer');
	await page.goto('/books');
	await expect(page.getByText('in force').first()).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('link', { name: /^1\. / }).click();
	await expect(page.getByRole('heading', { level: 2, name: 'Engine and radiator' })).toBeVisible();
	const row = page.getByRole('row', { name: /Gas temperature at full load/ });
	await expect(row).toContainText('760 °C');
	await expect(row).toContainText('Engineering judgement');
	await expect(page.getByText(/Oxidised steel, 0\.74 to 0\.82/)).toBeVisible();
	await expectNoViolations(page);
});

test('an installer has no books to look after', ONCE, async ({ page }) => {
	await signInAs(page, 'installer');
	const response = await page.goto('/books');
	expect(response?.status()).toBe(403);
	await expectNoViolations(page);
});
