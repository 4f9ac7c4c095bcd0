import { expect, test, type Browser, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { makeRecommendedJob, openLetter, readLink, sendFromPage } from './sent-sheet';
import { expectNoViolations, signInAs, signInAsNeighbour } from './support';

const READER = 'Ilse Tarn';

/** A customer's phone: signed in nowhere, its scripts switched off. */
async function openPlainly(browser: Browser, link: string): Promise<Page> {
	const context = await browser.newContext({ javaScriptEnabled: false });
	const page = await context.newPage();
	await page.goto(link);
	return page;
}

async function acknowledge(page: Page, name: string): Promise<void> {
	await page.getByLabel('Your name').fill(name);
	await page.getByLabel('I have read this page').check();
	await page.getByRole('button', { name: 'Send it to the shop' }).click();
}

/** A sheet of its own, sent by the shop's form; `page` is the installer, at the letter with the link. */
async function sendSheet(page: Page, which: 'hot' | 'cool' = 'hot') {
	await signInAs(page, 'installer');
	const job = await makeRecommendedJob(page, which);
	await sendFromPage(page, job.jobId, job.sendTo);
	await openLetter(page, job.sendTo);
	return { ...job, link: await readLink(page) };
}

test('the shop sends the page, the customer acknowledges it without a script, the shop sees who and when', async ({
	page,
	browser
}) => {
	const { jobId, link } = await sendSheet(page);
	await page.goto(`/jobs/${jobId}/sheets`);
	await expect(page.getByRole('heading', { name: 'Sent, not opened' })).toBeVisible();
	await expectNoViolations(page);

	const customer = await openPlainly(browser, link);
	await expect(customer.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expect(customer.getByText(/^The fridge goes dark at/)).toBeVisible();
	await expect(customer.getByText('No other place is free')).toBeVisible();
	await page.reload();
	await expect(page.getByRole('heading', { name: 'Opened, not acknowledged' })).toBeVisible();

	await acknowledge(customer, READER);
	await expect(customer.getByText(`Acknowledged by ${READER}`)).toBeVisible();
	await expect(customer.getByLabel('Your name')).toHaveCount(0);
	await page.reload();
	await expect(page.getByRole('heading', { name: 'Acknowledged' })).toBeVisible();
	await expect(page.getByText(`by ${READER}`)).toBeVisible();
	await customer.context().close();
});

test('the page keeps every word when something is missing, and says what', async ({ page, browser }) => {
	const { link } = await sendSheet(page, 'cool');
	const customer = await openPlainly(browser, link);
	await customer.getByLabel('Your name').fill(READER);
	await customer.getByRole('button', { name: 'Send it to the shop' }).click();
	await expect(customer).toHaveTitle(/^Error: /);
	await expect(customer.getByText('Tick the box to say that you have read the sheet.').first()).toBeVisible();
	await expect(customer.getByLabel('Your name')).toHaveValue(READER);
	await customer.getByLabel('I have read this page').check();
	await customer.getByLabel('Your name').fill('');
	await customer.getByRole('button', { name: 'Send it to the shop' }).click();
	await expect(customer.getByText('Your name is missing.').first()).toBeVisible();
	await expect(customer.getByLabel('I have read this page')).toBeChecked();
	await customer.context().close();
});

test('a changed hash is refused, two who acknowledge see one name, and a page asks nobody to come back', async ({
	page,
	request
}) => {
	const { link } = await sendSheet(page, 'cool');
	const html = await (await request.get(link)).text();
	const contentSha256 = /name="contentSha256" value="([0-9a-f]{64})"/.exec(html)?.[1] ?? '';
	expect(contentSha256).not.toBe('');
	const post = (name: string, hash: string) =>
		request.post(link, {
			form: { name, understood: 'true', contentSha256: hash },
			headers: { accept: 'text/html', origin: new URL(link).origin },
			maxRedirects: 0
		});
	expect((await post('Forged', '0'.repeat(64))).status()).toBe(409);
	expect(await (await request.get(link)).text()).not.toContain('Acknowledged by');
	const answers = await Promise.all(['Anselm', 'Bettina'].map((name) => post(name, contentSha256)));
	expect(answers.map((answer) => answer.status())).toEqual([303, 303]);
	const after = await (await request.get(link)).text();
	expect(after.match(/Acknowledged by <b[^>]*>(Anselm|Bettina)</g)).toHaveLength(1);
});

test('the link tells nobody where it was opened, is never indexed or kept, and carries no program', async ({
	page,
	request
}) => {
	const { link } = await sendSheet(page, 'cool');
	const answer = await request.get(link);
	expect(answer.headers()).toMatchObject({
		'referrer-policy': 'no-referrer',
		'x-robots-tag': 'noindex, nofollow, noarchive',
		'cache-control': 'no-store'
	});
	const html = await answer.text();
	expect(html).toContain('<meta name="robots" content="noindex, nofollow"');
	expect(html).not.toMatch(/<script\b/);
});

test('a withdrawn page is gone, in kind words, and the withdrawal asks first', async ({ page, browser }) => {
	const { jobId, link, sendTo } = await sendSheet(page);
	await page.goto(`/jobs/${jobId}/sheets`);
	await page.getByRole('link', { name: /Withdraw it/ }).click();
	await expect(page.getByText('this cannot be undone')).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'Keep it' }).click();
	await expect(page.getByRole('heading', { name: 'Withdrawn' })).toHaveCount(0);
	await page.getByRole('link', { name: /Withdraw it/ }).click();
	await page.getByRole('button', { name: 'Withdraw it' }).click();
	await expect(page.getByRole('heading', { name: 'Withdrawn' })).toBeVisible();
	await expect(page.getByText(`To ${sendTo}`)).toBeVisible();

	const customer = await openPlainly(browser, link);
	await expect(customer.getByRole('heading', { name: 'This page was withdrawn' })).toBeVisible();
	await expect(customer.getByText('has withdrawn this page')).toBeVisible();
	expect((await customer.request.get(link)).status()).toBe(410);
	await customer.context().close();
});

test('sending again stops the link before', async ({ page, request }) => {
	const { jobId, link, sendTo } = await sendSheet(page, 'cool');
	await page.goto(`/jobs/${jobId}/sheets`);
	await expect(page.getByText('The link that is out now stops working.')).toBeVisible();
	await sendFromPage(page, jobId, `again.${sendTo}`);
	expect((await request.get(link)).status()).toBe(410);
});

test('a link that leads nowhere says so', async ({ page }) => {
	const answer = await page.goto('/sheet/AAAAAAAAAAAAAAAAAAAAAA');
	expect(answer?.status()).toBe(404);
	await expect(page.getByRole('heading', { name: 'This link leads nowhere' })).toBeVisible();
	await expectNoViolations(page);
});

test('the page reads well by every measure, on the screen and on one sheet of paper', async ({ page }) => {
	await signInAs(page, 'installer');
	const { jobId } = await makeAssessableJob(page, { mounts: 6 });
	const [hot] = await assessAll(page, jobId);
	await ask(page, 'POST', '/api/v1/recommendations', {
		...{ assessmentId: hot!.id, decidedBy: 'Konstantin Abernathy-Wollstonecraft' },
		reason: 'The tray is fixed and the customer wants it there all the same. '.repeat(15).trim()
	});
	const sendTo = `whole.${jobId}@travellers.example`;
	await sendFromPage(page, jobId, sendTo);
	await openLetter(page, sendTo);
	await page.goto(await readLink(page));
	await expect(page.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expectNoViolations(page);
	await page.getByText('The same hour by hour').click();
	await expect(page.getByRole('table')).toBeVisible();
	const { scrollWidth, clientWidth } = await page.evaluate(() => document.documentElement);
	expect(scrollWidth).toBeLessThanOrEqual(clientWidth);
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	expect(pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)).toHaveLength(1);
	await page.emulateMedia({ media: 'print' });
	await expectNoViolations(page);
});

test('the neighbour finds nothing, and a customer has no way into the shop’s pages', async ({ page }) => {
	await signInAs(page, 'installer');
	const { jobId } = await makeRecommendedJob(page, 'cool');
	await page.context().clearCookies();
	await signInAsNeighbour(page);
	expect((await page.goto(`/jobs/${jobId}/sheets`))?.status()).toBe(404);
	await page.context().clearCookies();
	await signInAs(page, 'customer');
	expect((await page.goto(`/jobs/${jobId}/sheets`))?.status()).toBe(403);
	expect((await page.goto('/mailbox'))?.status()).toBe(403);
});

test('a customer finds their own pages after signing in, and the shop does not', async ({ page }) => {
	await signInAs(page, 'customer');
	await page.goto('/my');
	await expect(page.getByRole('heading', { level: 1, name: 'Your pages' })).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('rowheader').first().getByRole('link').click();
	await expect(page.getByText('Prepared for Odile Vantongeren')).toBeVisible();
	await expectNoViolations(page);
	const own = page.url();
	await page.context().clearCookies();
	await signInAs(page, 'installer');
	expect((await page.goto('/my'))?.status()).toBe(403);
	expect((await page.goto(own))?.status()).toBe(403);
});
