import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';

async function fillPlace(page: Page, name: string): Promise<void> {
	await page.getByLabel('Place', { exact: true }).fill(name);
	await page.getByLabel('Climate class').selectOption({ label: 'Hot desert (BWh)' });
	await page.getByLabel('Latitude').fill('−28,5');
	await page.getByLabel('Longitude').fill('137');
	await page.getByLabel('Altitude').fill('400 ft');
	await page.getByLabel('Hottest of the day').fill('112 °F');
	await page.getByLabel('From the hottest down to the coolest').fill('16');
	await page.getByLabel('Sun at noon').fill('1050');
}

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('a place is added with its hot day, in the units that people use', async ({ page }) => {
	const name = `Salt Lake ${randomUUID().slice(0, 8)}`;
	await openForm(page, '/places/new');
	await expectNoViolations(page);
	await fillPlace(page, name);
	await page.getByLabel('Where the figures come from').fill('Invented for a test.');
	await page.getByRole('button', { name: 'Save the place' }).click();
	await expect(page.getByRole('heading', { level: 1, name })).toBeVisible();
	await expect(page.getByLabel('Latitude')).toHaveValue('−28.5');
	await expect(page.getByLabel('Altitude')).toHaveValue('121.92');
	await page.goto('/places');
	await expectNoViolations(page);
	const row = page.getByRole('row').filter({ hasText: name });
	await expect(row).toContainText('Hot desert (BWh)');
	await expect(row).toContainText('44 °C');
});

test('figures without a source are not taken, and stay in their boxes', async ({ page }) => {
	await openForm(page, '/places/new');
	await fillPlace(page, `Salt Lake ${randomUUID().slice(0, 8)}`);
	await page.getByRole('button', { name: 'Save the place' }).click();
	await page.getByRole('link', { name: 'Where the figures come from is missing.' }).click();
	await expect(page.getByLabel('Where the figures come from')).toBeFocused();
	await expect(page.getByLabel('Hottest of the day')).toHaveValue('112 °F');
	await expectNoViolations(page);
});

test('a place is changed, and one of another number is not there', ONCE, async ({ page }) => {
	await openForm(page, '/places/new');
	const name = `Salt Lake ${randomUUID().slice(0, 8)}`;
	await fillPlace(page, name);
	await page.getByLabel('Where the figures come from').fill('Invented for a test.');
	await page.getByRole('button', { name: 'Save the place' }).click();
	await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
	await page.getByLabel('Hottest of the day').fill('41');
	const answered = page.waitForResponse((response) => response.request().method() === 'POST');
	await page.getByRole('button', { name: 'Save the place' }).click();
	await answered;
	await page.goto('/places');
	await expect(page.getByRole('row').filter({ hasText: name })).toContainText('41 °C');
	const missing = await page.goto('/places/999999999');
	expect(missing?.status()).toBe(404);
});
