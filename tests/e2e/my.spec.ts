import { expect, test } from '@playwright/test';
import { ask } from './assessable-job';
import { signInByLetter } from './mailed';
import { makeSendableJob, newAddress } from './sent-sheet';
import { expectNoViolations, ONCE, openForm, signInAs } from './support';

test('a customer finds vehicle, documents and history, all within the width of a phone', async ({ page }) => {
	await signInAs(page, 'customer');
	await page.goto('/my');
	await expect(page.getByRole('heading', { name: 'Documents' }).first()).toBeVisible();
	await expect(page.getByRole('heading', { name: 'What happened' }).first()).toBeVisible();
	await expect(page.getByText('Page sent').first()).toBeVisible();
	await expectNoViolations(page);
	await page.setViewportSize({ width: 360, height: 800 });
	const { scrollWidth, clientWidth } = await page.evaluate(() => {
		const { scrollWidth, clientWidth } = document.documentElement;
		return { scrollWidth, clientWidth };
	});
	expect(scrollWidth).toBeLessThanOrEqual(clientWidth);
	const paper = page.getByRole('link', { name: /^Your battery on a hot day/ }).first();
	await paper.focus();
	await page.keyboard.press('Enter');
	await expect(page.getByText(/^Prepared for/)).toBeVisible();
	await expect(page.getByRole('img', { name: /Each dot is one of 50 days like this/ })).toBeVisible();
	await expectNoViolations(page);
});

test(
	'reminders are stopped by a button or in one press of a mail program, and wanted again',
	ONCE,
	async ({ page, request }) => {
		await signInAs(page, 'customer');
		await page.goto('/my');
		await page.getByRole('link', { name: 'Reminders by e-mail' }).click();
		await expect(page.getByRole('button', { name: 'Stop these reminders' })).toBeVisible();
		await expectNoViolations(page);
		// What a mail program posts (RFC 8058): no cookie, one word, and no answer that leads elsewhere.
		const answer = await request.post(page.url(), {
			form: { 'List-Unsubscribe': 'One-Click' },
			maxRedirects: 0
		});
		expect(answer.status()).toBe(200);
		await page.reload();
		await expect(page.getByText('No reminders go out to you')).toBeVisible();
		await expectNoViolations(page);
		await page.getByRole('button', { name: 'Send them again' }).click();
		await expect(page.getByRole('button', { name: 'Stop these reminders' })).toBeVisible();
	}
);

test(
	'a customer takes what is held, asks for deletion, and the manager says why not',
	ONCE,
	async ({ page, browser, baseURL }) => {
		await signInAs(page, 'customer');
		await page.goto('/my/data', { waitUntil: 'networkidle' });
		await expectNoViolations(page);
		const [download] = await Promise.all([
			page.waitForEvent('download'),
			page.getByRole('link', { name: 'Download it' }).click()
		]);
		expect(download.suggestedFilename()).toBe('what-is-held-about-you.zip');
		await page.getByRole('button', { name: 'Ask for deletion' }).click();
		await expect(page.getByText('Tick the box to say that you want this.').first()).toBeVisible();
		await page.getByLabel('Yes, delete what is held about me').check();
		await page.getByRole('button', { name: 'Ask for deletion' }).click();
		await expect(page.getByText(/^You asked for it on/)).toBeVisible();
		await expect(page).toHaveTitle(/^What is held about you/);
		await expect(page.locator(':focus')).toContainText('You asked for it on');
		await expectNoViolations(page);
		await expect(page.getByText('what was deleted cannot be brought back')).toBeVisible();
		await page.getByRole('button', { name: 'Take the request back' }).click();
		await expect(page.getByText(/^You took your request of .+ back$/)).toBeVisible();
		await expectNoViolations(page);
		await page.getByLabel('Yes, delete what is held about me').check();
		await page.getByRole('button', { name: 'Ask for deletion' }).click();
		await expect(page.getByText(/^You asked for it on/)).toBeVisible();

		const context = await browser.newContext({ baseURL: baseURL! });
		const manager = await context.newPage();
		await signInAs(manager, 'manager');
		await manager.goto('/erasures', { waitUntil: 'networkidle' });
		await expectNoViolations(manager);
		await manager.getByRole('radio', { name: 'Refuse it' }).check();
		await manager.getByRole('button', { name: 'Decide, and tell the customer' }).click();
		await expect(manager.getByText('Reason is missing').first()).toBeVisible();
		await expect(manager).toHaveTitle(/^Error: Requests for deletion/);
		await manager.getByLabel('Reason', { exact: true }).fill('The warranty runs until June.');
		await manager.getByRole('button', { name: 'Decide, and tell the customer' }).click();
		await expect(manager.getByText('“The warranty runs until June.”')).toBeVisible();
		await expect(manager).toHaveTitle(/^Requests for deletion/);
		const told = 'Refused. A letter with the reason is on its way.';
		await expect(manager.locator(':focus')).toContainText(told);
		await expectNoViolations(manager);
		await expect(manager.getByText(/Letter to the customer: (Waiting|Sent)/).first()).toBeVisible();
		await expect(async () => {
			await manager.goto('/mailbox');
			await manager
				.getByRole('link', { name: /^Your request for deletion/ })
				.first()
				.click({ timeout: 1_000 });
		}).toPass({ timeout: 20_000 });
		await expect(manager.getByText('The warranty runs until June.')).toBeVisible();
		await context.close();
		await page.reload();
		await expect(page.getByText('The warranty runs until June.')).toBeVisible();
		await expectNoViolations(page);
	}
);

test(
	'a customer who was sent a page signs in by e-mail, and is gone everywhere when deletion is granted',
	ONCE,
	async ({ page, browser, baseURL }) => {
		test.slow();
		const { jobId, recommendationId, cookies, customerName } = await makeSendableJob(browser, baseURL);
		const email = newAddress();
		const shop = await browser.newContext({ baseURL: baseURL! });
		await shop.addCookies(cookies);
		const desk = await shop.newPage();
		const job = await ask(desk, 'GET', `/api/v1/jobs/${jobId}`);
		const { id, name, version } = job.customer as { id: number; name: string; version: number };
		await ask(desk, 'PUT', `/api/v1/customers/${id}`, { name, phone: '', email, version });
		await ask(desk, 'POST', `/api/v1/jobs/${jobId}/sheets`, { recommendationId, sendTo: email });

		await signInByLetter(page, email);
		await expect(page).toHaveURL(/\/my$/);
		await expect(page.getByRole('link', { name: /^Your battery on a hot day/ })).toBeVisible();
		await page.goto('/my/data');
		await page.getByLabel('Yes, delete what is held about me').check();
		await page.getByRole('button', { name: 'Ask for deletion' }).click();
		await expect(page.getByText(/^You asked for it on/)).toBeVisible();

		await shop.clearCookies();
		await signInAs(desk, 'manager');
		await desk.goto('/shop');
		await expect(
			desk.getByText(/^(One request waits, since|\d+ requests wait, the oldest since) /)
		).toBeVisible();
		await desk.goto('/jobs');
		await expect(desk.getByText(/(One request waits|requests wait), /)).toBeVisible();
		await expectNoViolations(desk);
		await openForm(desk, `/jobs/${jobId}`);
		await expect(desk.getByText('The customer asks for deletion')).toBeVisible();
		await expectNoViolations(desk);
		await desk.getByRole('link', { name: 'Look, and decide' }).click();
		await expect(desk.getByRole('heading', { name: `${customerName} asks for deletion` })).toBeVisible();
		await desk.getByRole('radio', { name: 'Grant it' }).check();
		await desk.getByRole('button', { name: 'Decide, and tell the customer' }).click();
		await expect(desk.getByText(/^Granted, and everything is deleted\. A letter/)).toBeVisible();
		await expect(desk.getByText(`${customerName} asks for deletion`)).toHaveCount(0);
		await desk.goto(`/jobs/${jobId}`);
		await expect(desk.getByText('(erased)').first()).toBeVisible();
		await expect(desk.getByText(customerName)).toHaveCount(0);
		await shop.close();
		await page.goto('/my');
		await expect(page).toHaveURL(/\/sign-in/);
	}
);
