import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, openForm, signInAs } from './support';

const FIGURES = {
	Length: '310',
	Width: '6.8 in',
	Height: '220',
	Mass: '12,4',
	Capacity: '100',
	'Internal resistance': '8',
	'Highest charge current': '50',
	'Charging stops at': '60',
	'Charging comes back at': '50',
	'Goes dark at': '80',
	'Comes back at': '57',
	'Delay before a cut-off': '5'
};

async function fillBattery(page: Page, model: string): Promise<void> {
	await page.getByLabel('Maker', { exact: true }).fill('Emberlow');
	await page.getByLabel('Model', { exact: true }).fill(model);
	await page.getByLabel('What the BMS measures').selectOption('The cells');
	for (const [label, text] of Object.entries(FIGURES))
		await page.getByLabel(label, { exact: true }).fill(text);
}

async function addBattery(page: Page): Promise<string> {
	const model = `Slab ${randomUUID().slice(0, 8)}`;
	await openForm(page, '/batteries/new');
	await fillBattery(page, model);
	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(page.getByRole('heading', { level: 1, name: `Emberlow ${model}` })).toBeVisible();
	return model;
}

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('a battery is copied from its data sheet, and the list shows what its maker says', async ({ page }) => {
	const model = await addBattery(page);
	await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
	await expect(page.getByLabel('Width', { exact: true })).toHaveValue('172.72');
	await expectNoViolations(page);
	await page.goto('/batteries');
	await expectNoViolations(page);
	const row = page.getByRole('row').filter({ hasText: model });
	await expect(row).toContainText('not said');
	await expect(row).toContainText('100 Ah');
});

test('what a maker says must be quoted, with where it is written, and is cautioned about', async ({
	page
}) => {
	await openForm(page, '/batteries/new');
	await expect(page.getByText('The maker is silent about under-bonnet use')).toBeVisible();
	await fillBattery(page, `Slab ${randomUUID().slice(0, 8)}`);
	await page.getByRole('radio', { name: 'Excludes it' }).check();
	await expect(page.getByText('The maker excludes under-bonnet use')).toBeVisible();
	await page.getByLabel('Comes back at', { exact: true }).fill('85');
	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(
		page.getByRole('link', { name: 'Copy what the maker says about under-bonnet use' })
	).toBeVisible();
	await expect(page.getByRole('link', { name: 'Say where that is written' })).toBeVisible();
	await expect(page.getByRole('link', { name: 'Comes back at must be below 80 °C' })).toBeVisible();
	await expect(page.getByLabel('Mass', { exact: true })).toHaveValue('12,4');
	await expectNoViolations(page);
});

test('when somebody else saved meanwhile, both versions are shown and nothing is lost', async ({
	page,
	context
}) => {
	await addBattery(page);
	const address = page.url().split('?')[0]!;
	const colleague = await context.newPage();
	await openForm(colleague, address);
	await colleague.getByLabel('Goes dark at', { exact: true }).fill('75');
	await colleague.getByRole('button', { name: 'Save the battery' }).click();
	await expect(colleague.getByText('Saved.', { exact: true })).toBeVisible();

	await page.getByLabel('Capacity', { exact: true }).fill('95');
	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(page.getByText('Somebody saved this battery while you had it open')).toBeVisible();
	const differs = page.getByRole('table', { name: 'What differs' });
	await expect(differs.getByRole('row', { name: 'Capacity' })).toHaveText(/95\s*100/);
	await expect(differs.getByRole('row', { name: 'Goes dark at' })).toHaveText(/80\s*75/);
	await expect(page.getByLabel('Capacity', { exact: true })).toHaveValue('95');
	await expectNoViolations(page);

	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
	await openForm(colleague, address);
	await expect(colleague.getByLabel('Capacity', { exact: true })).toHaveValue('95');
	await expect(colleague.getByLabel('Goes dark at', { exact: true })).toHaveValue('80');
});
