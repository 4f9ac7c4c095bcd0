import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import people from '../../seeds/demo-people.json' with { type: 'json' };
import { expectNoViolations, personOf, signInWith, ONCE } from './support';

const engineer = people.find(({ role }) => role === 'engineer') ?? { email: '', password: '' };

function findSignInLinks(email: string): string[] {
	const folder = process.env.MAILBOX_DIR ?? '';
	return readdirSync(folder)
		.sort()
		.map((name) => readFileSync(join(folder, name), 'utf8'))
		.filter((letter) => letter.includes(`To: ${email}`))
		.flatMap((letter) => /\/sign-in\/link\/[\w-]{22}/.exec(letter.replace(/=\r?\n/g, ''))?.[0] ?? []);
}

test('a wrong password says so in one sentence, and keeps the address', async ({ page }) => {
	await page.goto('/sign-in');
	await expectNoViolations(page);
	await page.getByLabel('E-mail', { exact: true }).fill('nobody@shop.example');
	await page.getByLabel('Password').fill('not the password at all');
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page.getByText('The e-mail or the password is not right.')).toBeVisible();
	await expect(page).toHaveTitle(/^Error: Sign in/);
	await expect(page.getByLabel('E-mail', { exact: true })).toHaveValue('nobody@shop.example');
	await expect(page.getByLabel('Password')).toHaveValue('');
	await expectNoViolations(page);
});

test('a page that needs a person leads to the sign-in page and back to itself', ONCE, async ({ page }) => {
	await page.goto('/places/new');
	await expect(page).toHaveURL(/\/sign-in\?to=%2Fplaces%2Fnew$/);
	await page.getByLabel('E-mail', { exact: true }).fill(engineer.email);
	await page.getByLabel('Password').fill(engineer.password);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/places\/new$/);
});

test('nobody is led out of the house after sign-in', ONCE, async ({ page }) => {
	await page.goto('/sign-in?to=//elsewhere.example/');
	await page.getByLabel('E-mail', { exact: true }).fill(engineer.email);
	await page.getByLabel('Password').fill(engineer.password);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/jobs$/);
});

test(
	'signing out ends the session everywhere that its cookie was copied to',
	ONCE,
	async ({ page, playwright, baseURL }) => {
		await signInWith(page, personOf('engineer'));
		const state = await page.context().storageState();
		const copy = await playwright.request.newContext({ baseURL, storageState: state });
		expect((await copy.get('/api/v1/places')).status()).toBe(200);
		const menu = page.getByText('Menu', { exact: true });
		if (await menu.isVisible()) await menu.click();
		await page.getByRole('button', { name: 'Sign out' }).filter({ visible: true }).click();
		await expect(page).toHaveURL(/\/sign-in$/);
		expect((await copy.get('/api/v1/places')).status()).toBe(401);
		await copy.dispose();
	}
);

test('a mailed link signs in once, by its button and not by being opened', async ({ page }, { project }) => {
	// Each project has a person of its own, so that the two never read each other's letters.
	const person = people.filter(({ role }) => role === 'installer')[project.name === 'phone' ? 1 : 0];
	const before = findSignInLinks(person?.email ?? '').length;
	await page.goto('/sign-in');
	await page.getByLabel('Your e-mail').fill(person?.email ?? '');
	await page.getByRole('button', { name: 'Send me a link' }).click();
	await expect(page.getByText('Look into your mail.')).toBeVisible();
	await expect.poll(() => findSignInLinks(person?.email ?? '').length, { timeout: 20_000 }).toBe(before + 1);
	const link = findSignInLinks(person?.email ?? '').at(-1) ?? '';
	for (let scan = 0; scan < 3; scan++) await page.request.get(link);
	await page.goto(link);
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Sign in now' }).click();
	await expect(page).toHaveURL(/\/jobs$/);
	await page.context().clearCookies();
	await page.goto(link);
	await page.getByRole('button', { name: 'Sign in now' }).click();
	await expect(page.getByText('This link has been used or is too old. Ask for a new one.')).toBeVisible();
});

test('sign-in works without a script', async ({ browser, baseURL }) => {
	const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
	const page = await context.newPage();
	await page.goto('/sign-in');
	await page.getByLabel('E-mail', { exact: true }).fill(engineer.email);
	await page.getByLabel('Password').fill(engineer.password);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/jobs$/);
	await context.close();
});

test('the headers of every answer hold the line', ONCE, async ({ request, baseURL }) => {
	const page = await request.get('/sign-in');
	const headers = page.headers();
	expect(headers['content-security-policy']).toContain("default-src 'none'");
	expect(headers['content-security-policy']).toMatch(/style-src 'self'( 'nonce-[^']+')?;/);
	expect(headers['content-security-policy']).not.toContain('unsafe-inline');
	expect(headers['x-content-type-options']).toBe('nosniff');
	expect(headers['cache-control']).toBe('no-store');
	const forged = await request.post('/sign-in?/link', {
		form: { email: 'nobody@shop.example' },
		headers: { 'sec-fetch-site': 'cross-site' }
	});
	expect(forged.status()).toBe(403);
	expect((await request.get('/auth/session')).status()).toBe(404);
	expect((await request.get(`${baseURL}//elsewhere.example`, { maxRedirects: 0 })).status()).toBe(404);
});

test(
	'a good sign-in costs no try, so that a busy shop never locks itself out',
	ONCE,
	async ({ playwright, baseURL }) => {
		for (let time = 1; time <= 12; time++) {
			const request = await playwright.request.newContext({ baseURL });
			const form = { email: engineer.email, password: engineer.password };
			const headers = { accept: 'text/html' };
			const response = await request.post('/sign-in?/password', { form, headers, maxRedirects: 0 });
			expect(response.status(), `sign-in ${time}`).toBe(302);
			await request.dispose();
		}
	}
);
