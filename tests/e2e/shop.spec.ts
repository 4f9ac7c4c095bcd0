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

const NOT_A_LOGO = 'The logo must be a PNG or JPEG picture of at most 5 MB.';
const TOO_LARGE = 'The file is larger than 5 MB, the most that is read here.';
const pictureOf = (buffer: Buffer) => ({ name: 'logo.png', mimeType: 'image/png', buffer });
const drawLogo = (): Promise<Buffer> =>
	sharp({ create: { width: 90, height: 30, channels: 3, background: '#0f4c4a' } })
		.png()
		.toBuffer();

for (const javaScriptEnabled of [true, false]) {
	test.describe(`the details of the shop, ${javaScriptEnabled ? 'with' : 'without'} a script`, () => {
		test.use({ javaScriptEnabled });

		test(
			'stay as typed whatever is done beside them, and take only a telephone number',
			ONCE,
			async ({ page }) => {
				await openForm(page, '/shop');
				const number = page.getByLabel('Business number');
				const phone = page.getByLabel('Telephone');
				await number.fill('BN not saved yet');
				await phone.fill('ask for Ada');
				const choices = [
					[Buffer.from('<svg xmlns="a"></svg>'), NOT_A_LOGO],
					[Buffer.alloc(6 * 1024 * 1024), TOO_LARGE]
				] as const;
				for (const [buffer, refusal] of choices) {
					await page.getByLabel(/logo$/).setInputFiles(pictureOf(buffer));
					await page.getByRole('button', { name: 'Take this logo' }).click();
					await expect(page.getByRole('link', { name: refusal })).toHaveAttribute('href', '#field-file');
					await expect(page.getByLabel(/logo$/)).toHaveAccessibleDescription(new RegExp(refusal));
					await expect(number).toHaveValue('BN not saved yet');
				}
				await page.getByLabel(/logo$/).setInputFiles(pictureOf(await drawLogo()));
				await page.getByRole('button', { name: 'Take this logo' }).click();
				await expect(page.getByText(/^The logo stands on prints/)).toBeVisible();
				await expect(number).toHaveValue('BN not saved yet');
				await page.getByRole('button', { name: 'Go on without it' }).click();
				await expect(page.getByText(/go on without a logo/)).toBeVisible();
				await expect(number).toHaveValue('BN not saved yet');
				await page.getByRole('button', { name: 'Save the shop' }).click();
				await expect(page.getByRole('link', { name: /^Telephone takes only digits, spaces,/ })).toBeVisible();
				await expect(phone).toHaveValue('ask for Ada');
			}
		);
	});
}

test('a logo is taken from a picture and nothing else, and can go', ONCE, async ({ page }) => {
	await page.goto('/shop');
	const svg = { name: 'logo.png', mimeType: 'image/png', buffer: Buffer.from('<svg xmlns="a"></svg>') };
	await page.getByLabel(/logo$/).setInputFiles(svg);
	await page.getByRole('button', { name: 'Take this logo' }).click();
	await expect(page.getByRole('link', { name: NOT_A_LOGO })).toBeVisible();
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
		const forged = await page.request.post('/shop/retention', { form: { years: '4', version: '0' } });
		expect(await forged.text()).toContain('Choose 2, 3, 5, 7 or 10 years, or no limit.');
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
