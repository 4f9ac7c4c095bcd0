import { randomUUID } from 'node:crypto';
import { expect, test, type Browser, type Page } from '@playwright/test';
import { generate } from 'otplib';
import { readMail, signInByLetter, waitForLink } from './mailed';
import { expectNoViolations, ONCE, signInAs, signInWith } from './support';

const PASSWORD = 'nine goats on the roof';

type Joining = 'engineer' | 'manager';

/** Somebody new in the demo workshop, invited by its manager, in a browser of their own. */
async function join(role: Joining, manager: Page, browser: Browser, baseURL: string | undefined) {
	const name = `Vesna ${randomUUID().slice(0, 8)}`;
	const email = `vesna-${randomUUID()}@shop.example`;
	const data = { name, email, role };
	const asked = await manager.request.post('/api/v1/invitations', { data });
	expect(asked.status()).toBe(201);
	const link = await waitForLink(email, /\/sign-in\/invitation\/[\w-]{22}/);
	const context = await browser.newContext(baseURL ? { baseURL } : {});
	const page = await context.newPage();
	await page.goto(link);
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Join and sign in' }).click();
	await expect(page).toHaveURL(/\/jobs$/);
	return { page, context, name, email };
}

async function enterCode(page: Page, code: string): Promise<void> {
	await page.getByLabel('Code').fill(code);
	await page.getByRole('button', { name: 'Sign in' }).click();
}

async function enterPassword(page: Page, email: string): Promise<void> {
	await page.context().clearCookies();
	await page.goto('/sign-in?to=/places');
	await page.getByLabel('E-mail', { exact: true }).fill(email);
	await page.getByLabel('Password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/sign-in\/second-step/);
}

test('a second factor is set up, asked for after password and link, and reset by the manager', async ({
	page,
	browser,
	baseURL
}) => {
	test.slow();
	await signInAs(page, 'manager');
	const engineer = await join('engineer', page, browser, baseURL);
	const theirs = engineer.page;
	await theirs.goto('/second-factor');
	await expectNoViolations(theirs);
	await theirs.getByRole('button', { name: 'Set it up' }).click();
	await expect(theirs.getByRole('img', { name: /Picture of the key/ })).toBeVisible();
	await expectNoViolations(theirs);
	const key = (await theirs.locator('[data-key]').innerText()).replace(/\s/g, '');
	const codeNow = (stepsOn: number) =>
		generate({ secret: key, epoch: Math.floor(Date.now() / 1000) + 30 * stepsOn });
	await theirs.getByLabel('Code').fill('000 00');
	await theirs.getByRole('button', { name: 'Turn it on' }).click();
	const wrong = theirs.getByRole('link', { name: /^This code is not right/ });
	await expect(wrong).toBeVisible();
	await expect(theirs.getByRole('region', { name: 'Something here needs another look' })).toBeFocused();
	await wrong.click();
	await expect(theirs.getByLabel('Code')).toBeFocused();
	await theirs.getByRole('button', { name: 'Turn it on' }).click();
	await expect(theirs.getByRole('link', { name: 'Code is missing.' })).toBeVisible();
	await theirs.getByLabel('Code').fill(await codeNow(0));
	await theirs.getByRole('button', { name: 'Turn it on' }).click();
	await expect(theirs.getByText('this page shows them once')).toBeVisible();
	await expectNoViolations(theirs);
	const recovery = await theirs.locator('[data-recovery]').allInnerTexts();
	expect(recovery).toHaveLength(10);
	await theirs.getByRole('link', { name: 'I have them' }).click();
	await expect(theirs.getByText('10 recovery codes are left.')).toBeVisible();
	await expectNoViolations(theirs);

	await enterPassword(theirs, engineer.email);
	await expectNoViolations(theirs);
	expect((await theirs.request.get('/api/v1/places')).status()).toBe(401);
	const code = await codeNow(1);
	await enterCode(theirs, code);
	await expect(theirs).toHaveURL(/\/places$/);

	await enterPassword(theirs, engineer.email);
	await enterCode(theirs, code);
	await expect(theirs.getByText(/^This code is not right, or it was used already/).first()).toBeVisible();
	await expectNoViolations(theirs);
	await enterCode(theirs, recovery[0] ?? '');
	await expect(theirs).toHaveURL(/\/places$/);

	await theirs.context().clearCookies();
	await signInByLetter(theirs, engineer.email);
	await expect(theirs).toHaveURL(/\/sign-in\/second-step/);
	await enterCode(theirs, recovery[1] ?? '');
	await expect(theirs).toHaveURL(/\/jobs$/);

	await page.goto('/people');
	await page.getByRole('link', { name: engineer.name }).click();
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Reset the second factor' }).click();
	await expect(page.getByText('The second factor is reset.')).toBeVisible();
	const told = () =>
		readMail(engineer.email).some((letter) => letter.includes('has reset your second factor'));
	await expect.poll(told, { timeout: 20_000 }).toBe(true);
	await theirs.goto('/places');
	await expect(theirs).toHaveURL(/\/sign-in/);
	await signInWith(theirs, { email: engineer.email, password: PASSWORD });
	await expect(theirs).toHaveURL(/\/jobs$/);
	await engineer.context.close();
});

test('nobody gets to the second step without the first', async ({ page }) => {
	await page.goto('/sign-in/second-step');
	await expect(page).toHaveURL(/\/sign-in$/);
});

test(
	'who asks others for a second factor has one, and reads beforehand whom it holds up',
	ONCE,
	async ({ page, browser, baseURL }) => {
		await signInAs(page, 'manager');
		await page.goto('/shop');
		const rule = (of: Page) => of.getByRole('region', { name: 'Second factor' });
		await expect(rule(page).getByText('Before you can ask others for it, set up your own.')).toBeVisible();
		await expect(rule(page).getByRole('button')).toHaveCount(0);
		const { version } = (await (await page.request.get('/api/v1/shop')).json()) as { version: number };
		const asked = await page.request.put('/api/v1/shop/second-factor', {
			data: { requiresSecondFactor: true, version }
		});
		expect(asked.status()).toBe(409);
		expect(await asked.text()).toContain('Set up your own second factor before');

		const second = await join('manager', page, browser, baseURL);
		const theirs = second.page;
		await theirs.goto('/second-factor');
		await theirs.getByRole('button', { name: 'Set it up' }).click();
		const key = (await theirs.locator('[data-key]').innerText()).replace(/\s/g, '');
		await theirs.getByLabel('Code').fill(await generate({ secret: key }));
		await theirs.getByRole('button', { name: 'Turn it on' }).click();
		await theirs.getByRole('link', { name: 'I have them' }).click();
		await theirs.goto('/shop');
		await expect(
			rule(theirs).getByText(/nothing but the page that sets it up.*Marit Oakshott \(manager\)/)
		).toBeVisible();
		await expect(
			rule(theirs).getByRole('button', { name: 'Ask managers and engineers for it' })
		).toBeVisible();
		await expectNoViolations(theirs);
		await second.context.close();
	}
);
