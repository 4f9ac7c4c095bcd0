import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, ONCE, openForm, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'manager'));

/** Cells of a table as text, row by row. */
const cellsOf = (page: Page): Promise<string[][]> =>
	page
		.locator('main table tbody tr')
		.evaluateAll((rows) =>
			rows.map((row) =>
				[...row.querySelectorAll('th, td')].map((cell) => (cell as HTMLElement).innerText.trim())
			)
		);

/** A quoted cell may hold commas and line ends. */
function readCsv(text: string): string[][] {
	const rows: string[][] = [[]];
	for (const [, quoted, plain, end] of text
		.replace(/^\uFEFF/, '')
		.matchAll(/(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n|$)/g)) {
		rows.at(-1)!.push(quoted?.replaceAll('""', '"') ?? plain ?? '');
		if (end === '\r\n') rows.push([]);
	}
	return rows.filter((row) => row.length > 1);
}

test('the review leads from a zone to its installations and on to each mount', async ({ page }) => {
	await page.goto('/review');
	await expect(page.getByRole('heading', { level: 1, name: 'Review' })).toBeVisible();
	await expectNoViolations(page);
	const zones = await cellsOf(page);
	expect(zones.length).toBeGreaterThanOrEqual(4);
	expect(zones.map(([name]) => name)).toContain('Hot desert (BWh)');
	await expect(page.getByText(/Of \d+ installations? the chance is not known/)).toBeVisible();

	await page.getByRole('link', { name: 'Hot desert (BWh)' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('Installations: Hot desert (BWh)');
	await expectNoViolations(page);
	// Other tests fit batteries there meanwhile: the two are read again until none came in between.
	await expect(async () => {
		await page.goto('/review');
		const desert = (await cellsOf(page)).find(([name]) => name === 'Hot desert (BWh)');
		await page.getByRole('link', { name: 'Hot desert (BWh)' }).click();
		await expect(page.getByRole('heading', { level: 1 })).toHaveText('Installations: Hot desert (BWh)');
		expect(String((await cellsOf(page)).length)).toBe(desert![1]!.replace(/\D/g, ''));
	}).toPass();
	await page.getByRole('link', { name: 'Ignatius Pell' }).click();
	await page.waitForURL(/\/mounts\/\d+\/fitted$/);
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
});

test('what is to be seen to has lists of its own', async ({ page }) => {
	await page.goto('/review');
	await page.getByRole('link', { name: /gone ahead against the verdict/ }).click();
	await expect(page.getByText(/Marit Oakshott: The customer knows/)).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/review/installations?list=overdue');
	await expect(page.getByText(/\d+ days late/).first()).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/review/installations?list=waiting');
	await expect(page.getByText(/not acknowledged/).first()).toBeVisible();
	await page.goto('/review/installations?since=2031-01');
	await expect(page.getByText('No installation is like that')).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/review?verdict=perhaps&since=spring');
	await expect(page.getByRole('heading', { level: 1, name: 'Review' })).toBeVisible();
	await expect(page.getByText('There is no verdict “perhaps”.')).toBeVisible();
	await expect(page.getByText('Fitted since must be a month, such as 2026-03.')).toBeVisible();
	await expect(page.getByRole('link', { name: 'Hot desert (BWh)' })).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/review/installations?cursor=made.up');
	await page.getByRole('link', { name: 'Back to the review' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Review' })).toBeVisible();
});

test('the table for other programs says what the page says', async ({ page }) => {
	await page.goto('/review/installations');
	const listed = await cellsOf(page);
	const answer = await page.request.get('/review/installations.csv');
	expect(answer.headers()['content-type']).toBe('text/csv; charset=utf-8');
	const text = await answer.text();
	expect(text.charCodeAt(0)).toBe(0xfeff);
	const [heads, ...rows] = readCsv(text);
	expect(heads).toContain('Predicted dark days since fitted');
	expect(rows).toHaveLength(listed.length);
	expect(rows.map((row) => row[heads!.indexOf('Customer')])).toEqual(listed.map(([customer]) => customer));
	const overridden = rows.find((row) => row[heads!.indexOf('Customer')] === 'Ignatius Pell')!;
	expect(overridden[heads!.indexOf('Reported dark days')]).toBe('2');
	expect(overridden[heads!.indexOf('Reason')]).toContain('fridge goes dark');
	const chances = new Set(rows.map((row) => row[heads!.indexOf('Chance of going dark')]));
	expect(chances).toEqual(new Set(['known', 'not known', 'no BMS']));
});

test('the map needs no network and its marks lead on', async ({ page }) => {
	const asked: string[] = [];
	page.on('request', (request) => asked.push(new URL(request.url()).origin));
	await page.goto('/review/map', { waitUntil: 'networkidle' });
	expect(new Set(asked)).toEqual(new Set([new URL(page.url()).origin]));
	await expectNoViolations(page);
	const mark = page.getByRole('link', { name: /^Alice Springs: \d+ installations, 1 reported dark$/ });
	await mark.focus();
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('Installations: Alice Springs');
});

test('the months show a picture and the same in figures', async ({ page }) => {
	await page.goto('/review/months');
	await expect(page.getByRole('img', { name: /^Month by month/ })).toBeVisible();
	await expect(page.getByText(/In these 24 months\s+\d+\s+installations were\s+fitted/)).toBeVisible();
	await expectNoViolations(page);
});

test('a zone of one’s own takes its places, and is changed and removed', ONCE, async ({ page }) => {
	const name = `Tropics ${Date.now()}`;
	await openForm(page, '/review/zones/new');
	await expectNoViolations(page);
	await page.getByLabel('Name of the zone').fill(name);
	await page.getByLabel('Rule').selectOption('latitude');
	await page.getByRole('button', { name: 'Add the zone' }).click();
	await expect(page.getByText('Give where the range begins, or where it ends.').first()).toBeVisible();
	await page.getByLabel('From', { exact: true }).fill('about -20');
	await page.getByRole('button', { name: 'Add the zone' }).click();
	await expect(page.getByRole('link', { name: 'From must be a number from −90 to 90.' })).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('From', { exact: true }).fill('-20');
	await page.getByLabel('To below').fill('20');
	await page.getByRole('button', { name: 'Add the zone' }).click();
	await expect(page.getByText('Saved, and every place put into its zone.')).toBeVisible();
	await expectNoViolations(page);
	await expect(page.getByRole('row', { name: new RegExp(`${name}.*Darwin`) })).toBeVisible();
	await page.goto('/review?kind=own');
	await expect(page.getByRole('link', { name })).toBeVisible();
	await expect(page.getByRole('link', { name: 'In none of your zones' })).toBeVisible();
	await page.goto('/review/zones');
	await page.getByRole('link', { name }).click();
	await page.waitForLoadState('networkidle');
	await page.getByLabel('Rule').selectOption('places');
	// A list of places has no use for a range: what is wrong with it holds nothing up.
	await page.getByLabel('To below').fill('somewhere');
	await page.getByLabel('Places, one a line').fill('Nowhere at all');
	await page.getByRole('button', { name: 'Save the zone' }).click();
	await expect(page.getByText('There is no place called Nowhere at all.').first()).toBeVisible();
	await page.getByLabel('Places, one a line').fill('brisbane');
	await page.getByRole('button', { name: 'Save the zone' }).click();
	await expect(
		page.getByRole('row', { name: new RegExp(`${name}.*one chosen place.*Brisbane`) })
	).toBeVisible();
	await page.getByRole('link', { name }).click();
	await page.getByRole('button', { name: 'Remove the zone' }).click();
	await expect(page.getByText('Removed.')).toBeVisible();
	await expect(page.getByRole('link', { name })).toHaveCount(0);
});
