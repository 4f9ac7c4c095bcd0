import { expect, test } from '@playwright/test';
import { expectNoViolations, openForm, signInAs } from './support';

for (const role of ['engineer', 'manager'] as const) {
	test(`the ${role} sees how the predictions did, the furthest off first, each with its mount`, async ({
		page
	}) => {
		test.slow();
		await signInAs(page, role);
		await page.goto('/accuracy');
		await expect(page.getByRole('heading', { level: 1, name: 'How good are we?' })).toBeVisible();
		await expect(page.getByRole('heading', { level: 2, name: 'Cut-outs' })).toBeVisible();
		await expect(page.getByText('People report trouble more often than quiet')).toBeVisible();
		await expectNoViolations(page);

		// A trace leads to itself, which another test shows.
		const rows = page.getByRole('table', { name: /^Single readings/ }).getByRole('row');
		const reading = rows.filter({ hasText: /Peak label|Capacity test|Cut-outs/ }).first();
		await expect(reading).toBeVisible();
		const assessment = reading.getByRole('link', { name: 'The estimate' });
		await assessment.click();
		await expect(page).toHaveURL(/\/assessments\/\d+$/);
		await page.goBack();
		await reading.getByRole('link').first().click();
		await expect(page).toHaveURL(/\/mounts\/\d+\/field$/);
	});
}

test('readings are narrowed down in the address, with and without a script, and taken along as a table', async ({
	page,
	browser,
	baseURL
}) => {
	await signInAs(page, 'engineer');
	await openForm(page, '/accuracy');
	await page.getByLabel('Kind of reading').selectOption('Only label readings');
	await expect(page).toHaveURL(/kind=label/);
	const rows = page.getByRole('table', { name: /^Single readings/ }).getByRole('row');
	for (const text of (await rows.allInnerTexts()).slice(1)) expect(text).toContain('Peak label');
	const [file] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('link', { name: 'Readings (CSV)' }).click()
	]);
	expect(file.suggestedFilename()).toBe('readings.csv');

	const context = await browser.newContext({ baseURL: baseURL!, javaScriptEnabled: false });
	const plain = await context.newPage();
	await signInAs(plain, 'manager');
	await plain.goto('/accuracy?kind=label&position=chassis-rail');
	await expect(plain.getByText('No reading is like that')).toBeVisible();
	await plain.getByRole('link', { name: 'Show all readings' }).click();
	await expect(plain.getByRole('table', { name: /^Single readings/ })).toBeVisible();
	await context.close();
});

test('the page folds its figures on a phone, shows that tables go on sideways, and prints them all with captions', async ({
	page
}) => {
	await page.setViewportSize({ width: 360, height: 740 });
	await signInAs(page, 'engineer');
	await page.goto('/accuracy');
	const summary = page.locator('summary', { hasText: 'Cut-outs in figures' });
	const table = page.getByRole('table', { name: 'Stated chances against what happened' });
	await expect(summary).toBeVisible();
	await expect(table).toBeHidden();
	await summary.click();
	await expect(table).toBeVisible();
	const region = page.getByRole('region', { name: 'Stated chances against what happened' });
	expect(await region.evaluate((box) => box.scrollWidth > box.clientWidth)).toBe(true);
	expect(await region.evaluate((box) => getComputedStyle(box).backgroundImage)).toContain('linear-gradient');
	await expectNoViolations(page);
	await summary.click();
	await page.emulateMedia({ media: 'print' });
	await page.evaluate(() => window.dispatchEvent(new Event('beforeprint')));
	const captions = page.locator('.prints-captions caption');
	expect(await captions.count()).toBeGreaterThan(3);
	for (const caption of await captions.all()) {
		const box = await caption.evaluate((each) => [each.clientHeight, each.checkVisibility()]);
		const isFolded = await caption.evaluate((each) => each.closest('.no-print') !== null);
		if (!isFolded) expect([Number(box[0]) > 8, box[1]]).toEqual([true, true]);
	}
});
