import { expect, test } from '@playwright/test';
import sharp from 'sharp';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';

test.beforeEach(({ page }) => signInAs(page, 'manager'));

test('the manager keeps the details of the shop, and they stay as they were typed', async ({ page }, {
	project
}) => {
	await openForm(page, '/shop');
	await expectNoViolations(page);
	const number = `BN ${project.name}`;
	await page.getByLabel('Business number').fill(number);
	await page.getByLabel('E-mail', { exact: true }).fill('no address');
	await page.getByRole('button', { name: 'Save the shop' }).click();
	await expect(page.getByText(/E-mail must look like/).first()).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('E-mail', { exact: true }).fill('bench@wattle-and-wire.example');
	await page.getByRole('button', { name: 'Save the shop' }).click();
	// The other size of screen may have saved the same shop meanwhile.
	const late = page.getByText(/while you had it open/);
	await expect(
		page
			.getByText(/^Saved\./)
			.or(late)
			.first()
	).toBeVisible();
});

test('a logo is taken from a picture and nothing else, and can go', ONCE, async ({ page }) => {
	await page.goto('/shop');
	const svg = { name: 'logo.png', mimeType: 'image/png', buffer: Buffer.from('<svg xmlns="a"></svg>') };
	await page.getByLabel(/logo$/).setInputFiles(svg);
	await page.getByRole('button', { name: 'Take this logo' }).click();
	await expect(page.getByText('The logo must be a PNG or JPEG picture.')).toBeVisible();
	const background = '#0f4c4a';
	const create = { width: 240, height: 60, channels: 3 as const, background };
	const buffer = await sharp({ create }).png().toBuffer();
	await page.getByLabel(/logo$/).setInputFiles({ name: 'logo.png', mimeType: 'image/png', buffer });
	await page.getByRole('button', { name: 'Take this logo' }).click();
	await expect(page.getByRole('img', { name: /^Logo of/ })).toBeVisible();
	await expectNoViolations(page);
	const size = await page
		.getByRole('img', { name: /^Logo of/ })
		.evaluate((image: HTMLImageElement) => [image.naturalWidth, image.naturalHeight]);
	expect(size).toEqual([240, 60]);
	await page.getByRole('button', { name: 'Go on without it' }).click();
	await expect(page.getByText('Prints, pages and letters go on without a logo.')).toBeVisible();
	await expect(page.getByRole('img', { name: /^Logo of/ })).toHaveCount(0);
});

test(
	'cautions are shown by region, ours always there, and retention by whom it reaches',
	ONCE,
	async ({ page }) => {
		await openForm(page, '/shop/cautions');
		await expectNoViolations(page);
		await page.getByLabel('Rules in').selectOption('north-america');
		await expect(page.getByText(/NFPA 1192/)).toBeVisible();
		await expect(page.getByText('An estimate, not a certificate')).toBeVisible();
		await page.goto('/shop/retention');
		await expectNoViolations(page);
		await page.getByLabel('Keep them').selectOption('2');
		await page.getByRole('button', { name: 'See whom that reaches' }).click();
		await expect(page.getByRole('heading', { name: 'With 2 years' })).toBeVisible();
		await expect(page.getByText('Nobody’s data are older than that.')).toBeVisible();
		await expect(page.getByRole('button', { name: 'Keep them 2 years' })).toBeVisible();
		await expectNoViolations(page);
		for (const years of ['-4', 'many']) {
			await page.goto(`/shop/retention?years=${years}`);
			await page.getByRole('link', { name: 'Choose 2, 3, 5, 7 or 10 years, or no limit.' }).click();
			await expect(page.getByLabel('Keep them')).toBeFocused();
		}
		await expect(page.getByRole('heading', { name: 'With the rule of now' })).toBeVisible();
		await expectNoViolations(page);
	}
);
