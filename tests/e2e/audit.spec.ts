import { expect, test } from '@playwright/test';
import { expectNoViolations, ONCE, personOf, signInAs, signInWith } from './support';

test.beforeEach(({ page }) => signInAs(page, 'manager'));

test('the trail is searched, read in plain words, taken as CSV, and found whole', async ({ page }) => {
	await page.goto('/audit');
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Check it now' }).click();
	await expect(page.getByText(/^Checked whole at/)).toBeVisible();
	await page.getByLabel('Did what').selectOption({ label: 'recommended a mount' });
	await page.getByLabel('From').fill('2020-01-01');
	await page.getByRole('button', { name: 'Look' }).click();
	await expect(page).toHaveURL(/action=recommendation\.made/);
	const entries = page.getByRole('listitem').filter({ hasText: 'recommended a mount' });
	await expect(entries.first()).toBeVisible();
	await expect(page.getByRole('listitem').filter({ hasText: 'signed in' })).toHaveCount(0);
	await entries.first().getByText('What was recorded').click();
	await expect(entries.first().getByText('verdict', { exact: true })).toBeVisible();
	await expectNoViolations(page);
	const href = await page.getByRole('link', { name: 'Take it as CSV' }).getAttribute('href');
	const table = await page.request.get(href ?? '');
	expect(table.headers()['content-type']).toContain('text/csv');
	const lines = (await table.text()).trim().split('\n');
	expect(lines[0]).toContain('number,at (UTC),who');
	expect(lines.slice(1).every((line) => line.includes('recommendation.made'))).toBe(true);
	expect(lines.length).toBeGreaterThan(1);
	await page.getByLabel('With the words').fill('nothing says this');
	await page.getByRole('button', { name: 'Look' }).click();
	await expect(page.getByText('Nothing is like that')).toBeVisible();
	await expectNoViolations(page);
});

test('days the wrong way round are said at their box, and people are found by name', async ({ page }) => {
	await page.goto('/audit');
	const who = await page.getByRole('listitem').locator('b').first().innerText();
	await page.getByLabel('From').fill('2026-03-04');
	await page.getByLabel('To', { exact: true }).fill('2026-03-03');
	await page.getByRole('button', { name: 'Look' }).click();
	await expect(page).toHaveTitle(/^Error: Audit trail/);
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'To must be 2026-03-04 or later, as From is.' }).click();
	await expect(page.getByLabel('To', { exact: true })).toBeFocused();
	await expect(page.getByLabel('From')).toHaveValue('2026-03-04');
	await page.goto('/audit');
	await page.getByLabel('With the words').fill(who);
	await page.getByRole('button', { name: 'Look' }).click();
	await expect(page).toHaveURL(/words=/);
	await expect(page.getByRole('listitem').filter({ hasText: who }).first()).toBeVisible();
	await expectNoViolations(page);
});

test('a long trail goes on page by page', async ({ page }) => {
	await page.goto('/audit');
	const first = await page
		.getByText(/, entry \d+$/)
		.first()
		.innerText();
	await page.getByRole('link', { name: 'More' }).click();
	await expect(page.getByRole('link', { name: 'Back to the newest' })).toBeVisible();
	const next = await page
		.getByText(/, entry \d+$/)
		.first()
		.innerText();
	const numberOf = (text: string): number => Number(/entry (\d+)/.exec(text)?.[1]);
	expect(numberOf(next)).toBeLessThanOrEqual(numberOf(first) - 50);
});

test(
	'what the trail links to is there, also after a customer signed in',
	ONCE,
	async ({ page, browser, baseURL }) => {
		const context = await browser.newContext(baseURL ? { baseURL } : {});
		await signInWith(await context.newPage(), personOf('customer'));
		await context.close();
		const answer = await page.request.get('/api/v1/audit?subject=person&limit=100');
		const { rows } = (await answer.json()) as { rows: { href: string | null; subjectName: string | null }[] };
		expect(rows.some(({ href }) => href === null)).toBe(true);
		const hrefs = [...new Set(rows.flatMap(({ href }) => href ?? []))];
		expect(hrefs.length).toBeGreaterThan(0);
		for (const href of hrefs) expect((await page.request.get(href)).status()).toBe(200);
		await page.goto('/audit?subject=person');
		const customer = page
			.getByRole('listitem')
			.filter({ hasText: /Odile Vantongeren signed in/ })
			.first();
		await expect(customer).toBeVisible();
		await expect(customer.getByRole('link')).toHaveCount(0);
	}
);
