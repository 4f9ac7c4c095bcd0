import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, ONCE, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'manager'));

const NARROWED = [
	{
		path: '/review?verdict=cuts-out&since=2026-01',
		words: 'Only installations fitted since Jan 2026, that cut out or get too hot.'
	},
	{
		path: '/review/installations?verdict=cuts-out',
		words: 'Only installations that cut out or get too hot.'
	},
	{ path: '/review/months?zone=BWh', words: 'Only installations of the zone Hot desert (BWh).' },
	{ path: '/review/map?until=2026-12', words: 'Only installations fitted until Dec 2026.' }
];

for (const { path, words } of NARROWED)
	test(`${path} says what it is narrowed to, on paper too`, ONCE, async ({ page }) => {
		await page.goto(path);
		await expect(page.getByText(words)).toBeVisible();
		await expectNoViolations(page);
		await page.emulateMedia({ media: 'print' });
		await expect(page.getByText(words)).toBeVisible();
		await expect(page.getByRole('button', { name: 'Look' })).toBeHidden();
		await expect(page.getByRole('link', { name: 'Show all of them' })).toBeHidden();
		await page.emulateMedia({ media: 'screen' });
		await page.getByRole('link', { name: 'Show all of them' }).click();
		await expect(page.getByText('Only installations')).toHaveCount(0);
	});

test('part of the stock is not called all of it', ONCE, async ({ page }) => {
	await page.goto('/review');
	await expect(page.getByRole('heading', { name: 'All zones together' })).toBeVisible();
	await page.goto('/review?verdict=cuts-out');
	await expect(page.getByRole('heading', { name: 'These installations together' })).toBeVisible();
	await expect(page.getByRole('heading', { name: 'All zones together' })).toHaveCount(0);
	await page.goto('/review/months?zone=BWh');
	await expect(page.getByText(/of all\s+installations like that/)).toBeVisible();
	await expect(page.getByText(/of all\s+that is fitted/)).toHaveCount(0);
	await page.goto('/review/installations?place=999999999');
	await expect(page.getByText('of the place number 999999999, which there is not')).toBeVisible();
});

const widthOf = (page: Page) => page.evaluate(() => document.documentElement.scrollWidth);

for (const width of [360, 768, 1280])
	test(`the pages of the review fit ${width} px`, ONCE, async ({ page }) => {
		await page.setViewportSize({ width, height: 800 });
		for (const path of ['/review', '/review/installations', '/review/map', '/review/months']) {
			await page.goto(path);
			expect(await widthOf(page)).toBe(width);
		}
		await page.goto('/review');
		const ratio = page.getByText(/^\d+\.\d\d \(\d+\.\d\d to \d+\.\d\d\)$/).first();
		const { height } = (await ratio.boundingBox())!;
		// One line: its height is less than two of the page's own.
		expect(height).toBeLessThan(40);
	});

test('the button of the sentence keeps clear of the lines above it', ONCE, async ({ page }) => {
	await page.setViewportSize({ width: 360, height: 800 });
	await page.goto('/review/installations');
	const button = (await page.getByRole('button', { name: 'Look' }).boundingBox())!;
	const boxes = await page
		.getByRole('search')
		.getByRole('combobox')
		.evaluateAll((selects) => selects.map((select) => select.getBoundingClientRect().bottom));
	const above = boxes.filter((bottom) => bottom < button.y + button.height / 2);
	expect(above.length).toBeGreaterThan(0);
	expect(Math.max(...above)).toBeLessThan(button.y - 2);
});

test('the names on the map can be read on a phone', ONCE, async ({ page }) => {
	await page.setViewportSize({ width: 360, height: 800 });
	await page.goto('/review/map');
	const heights = await page
		.locator('svg[aria-label="Map of the places"] text:visible')
		.evaluateAll((names) => names.map((name) => name.getBoundingClientRect().height));
	expect(heights.length).toBeGreaterThan(0);
	expect(Math.min(...heights)).toBeGreaterThan(11);
	await expect(page.getByText('Installations reported dark').filter({ visible: true }).first()).toBeVisible();
});

test('the header of a manager is one line on a desk', ONCE, async ({ page }) => {
	await page.setViewportSize({ width: 1280, height: 800 });
	await page.goto('/review');
	const first = (await page.getByRole('link', { name: 'Jobs', exact: true }).boundingBox())!;
	const last = (await page.getByRole('button', { name: 'Sign out' }).boundingBox())!;
	expect(Math.abs(first.y + first.height / 2 - last.y - last.height / 2)).toBeLessThan(4);
});
