import { expect, test } from '@playwright/test';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';

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

test('a draft is begun, changed with a source, laid beside its origin, and waits on trial for a second person', async ({
	page,
	browser,
	baseURL
}) => {
	test.slow();
	await signInAs(page, 'engineer');
	await openForm(page, '/books/new');
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Begin the draft' }).click();
	await expect(page.getByText('Name is missing.').first()).toBeVisible();
	const name = `Vans ${Date.now()}`;
	await page.getByLabel('For positions').selectOption('Under the bonnet');
	await page.getByLabel('For engines').selectOption('Vee engines');
	await page.getByLabel('Name', { exact: true }).fill(name);
	await page.getByRole('button', { name: 'Begin the draft' }).click();
	await expect(page.getByRole('heading', { level: 1, name: new RegExp(`${name}$`) })).toBeVisible();
	await expect(page.getByText('For: vee engines, under the bonnet.')).toBeVisible();
	const book = page.url().replace(/\?.*/, '');

	await page.getByRole('link', { name: /^Gas temperature at full load/ }).click();
	await expect(page.getByLabel('Value')).toHaveValue('760');
	await expectNoViolations(page);
	await page.getByLabel('Value').fill('9000');
	await page.getByRole('button', { name: 'Save the value' }).click();
	await expect(
		page.getByText(/Gas temperature at full load must be more than −?-?273/).first()
	).toBeVisible();
	await page.getByLabel('Value').fill('742');
	await page.getByRole('radio', { name: 'Judgement' }).check();
	await page.getByLabel('Source').fill('Seen on two vans of this shop.');
	await page.getByRole('button', { name: 'Save the value' }).click();
	await expect(page.getByRole('row', { name: /Gas temperature at full load/ })).toContainText('742 °C');

	await page
		.getByRole('link', { name: /Thermal model defaults/ })
		.first()
		.click();
	await expect(page.getByRole('row', { name: /Gas temperature at full load/ })).toContainText(
		'742 °C, judgement'
	);
	await expectNoViolations(page);
	await page.goto(book);
	await page.getByRole('button', { name: 'Put it on trial' }).click();
	await expect(page.getByText('It waits for a second person')).toBeVisible();
	await expect(page.getByRole('link', { name: /^Gas temperature at full load/ })).toHaveCount(0);

	const context = await browser.newContext({ baseURL: baseURL! });
	const manager = await context.newPage();
	await signInAs(manager, 'manager');
	await manager.goto(book);
	await expect(manager.getByRole('button', { name: 'Put it in force' })).toBeVisible();
	await expectNoViolations(manager);
	// Not pressed: every other test assesses with the book in force.
	await manager.getByRole('button', { name: 'Withdraw it' }).click();
	await expect(manager.getByText(/^Withdrawn, made/)).toBeVisible();
	await context.close();
});
