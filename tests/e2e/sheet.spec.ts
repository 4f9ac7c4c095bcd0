import { expect, test, type Browser, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { makeSendableJob, newAddress, openLetter, readLink, sendSheet, type SendableJob } from './sent-sheet';
import { expectNoViolations, openForm, signInAs, signInAsNeighbour, ONCE } from './support';

const READER = 'Ilse Tarn';
let job: SendableJob;

test.beforeAll(async ({ browser }, { project }) => {
	test.setTimeout(120_000);
	job = await makeSendableJob(browser, project.use.baseURL);
});
test.beforeEach(({ page }) => page.context().addCookies(job.cookies));

/** A customer's phone: signed in nowhere, its scripts switched off. */
async function openPlainly(browser: Browser, link: string): Promise<Page> {
	const context = await browser.newContext({ javaScriptEnabled: false });
	const page = await context.newPage();
	await page.goto(link);
	return page;
}

const sent = (page: Page, sendTo: string) => page.getByRole('listitem').filter({ hasText: sendTo });
const send = (page: Page) => page.getByRole('button', { name: 'Send it to the shop' }).click();

test('the shop sends the page, the customer acknowledges it without a script, the shop sees who and when', async ({
	page,
	browser
}) => {
	const sendTo = newAddress();
	await page.goto(`/jobs/${job.jobId}/sheets`);
	await page.getByLabel('Send to').fill('no address');
	await page.getByRole('button', { name: /^Send/ }).click();
	await expect(page.getByText('Send to must look like name@example.org.').first()).toBeVisible();
	await expect(page.getByLabel('Send to')).toHaveValue('no address');
	await page.getByLabel('Send to').fill(sendTo);
	await page.getByRole('button', { name: /^Send/ }).click();
	await expect(sent(page, sendTo)).toBeVisible();
	await openLetter(page, sendTo);
	const link = await readLink(page);
	await page.goto(`/jobs/${job.jobId}/sheets`);
	await expect(sent(page, sendTo).getByRole('heading')).toHaveText('Sent, not opened');
	await expectNoViolations(page);

	const customer = await openPlainly(browser, link);
	await expect(customer.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expect(customer.getByText(/^The fridge goes dark at/)).toBeVisible();
	await expect(customer.getByText('Konstantin Abernathy-Wollstonecraft')).toBeVisible();
	await expect(
		customer.getByRole('heading', { name: 'Still open before anything is drilled' })
	).toBeVisible();
	await expect(customer.getByText(/On .+ days like this the fridge goes dark\./)).toBeVisible();
	for (const label of ['How often.', 'What would make it safer.', 'How long it lasts.']) {
		await expect(customer.getByText(label)).toBeVisible();
	}
	await page.reload();
	await expect(sent(page, sendTo).getByRole('heading')).toHaveText('Opened, not acknowledged');

	await customer.getByLabel('Your name').fill(READER);
	await customer.getByLabel('I have read this page').check();
	await send(customer);
	await expect(customer.getByText(`Acknowledged by ${READER}`)).toBeVisible();
	await expect(customer.getByLabel('Your name')).toHaveCount(0);
	await page.reload();
	await expect(sent(page, sendTo).getByRole('heading')).toHaveText('Acknowledged');
	await expect(sent(page, sendTo).getByText(`by ${READER}`)).toBeVisible();
	await customer.context().close();
});

test('the page keeps every word when something is missing, and says what', async ({ page, browser }) => {
	const { link } = await sendSheet(page, job);
	const customer = await openPlainly(browser, link);
	await customer.getByLabel('Your name').fill(READER);
	await send(customer);
	await expect(customer).toHaveTitle(/^Error: /);
	await expect(customer.getByText('Tick the box to say that you have read the sheet.').first()).toBeVisible();
	await expect(customer.getByLabel('Your name')).toHaveValue(READER);
	await customer.getByLabel('I have read this page').check();
	await customer.getByLabel('Your name').fill('');
	await send(customer);
	await expect(customer.getByText('Your name is missing.').first()).toBeVisible();
	await expect(customer.getByLabel('I have read this page')).toBeChecked();
	await customer.context().close();
});

test('what is typed for the one survives sending the other, refused or not', async ({ page, browser }) => {
	const { link } = await sendSheet(page, job);
	const customer = await openPlainly(browser, link);
	const question = customer.getByLabel('What would you like to know?');
	await question.fill('May it go into the canopy instead?');
	await send(customer);
	await expect(customer.getByText('Your name is missing.').first()).toBeVisible();
	await expect(question).toHaveValue('May it go into the canopy instead?');
	await customer.getByLabel('Your name').fill(READER);
	await customer.getByLabel('I have read this page').check();
	// Enter beside a question sends the question.
	await customer.getByLabel('Name', { exact: true }).press('Enter');
	await expect(customer.getByText('Your name is missing.').first()).toBeVisible();
	await expect(customer.getByLabel('I have read this page')).toBeChecked();
	await send(customer);
	await expect(customer.getByText(`Acknowledged by ${READER}`)).toBeVisible();
	await expect(customer.getByText('Your question below is not sent yet.')).toBeVisible();
	await expect(question).toHaveValue('May it go into the canopy instead?');
	await customer.context().close();
});

test(
	'a changed hash is refused, and two who acknowledge at once see one name',
	ONCE,
	async ({ page, request }) => {
		const { link } = await sendSheet(page, job);
		const html = await (await request.get(link)).text();
		const contentSha256 = /name="contentSha256" value="([0-9a-f]{64})"/.exec(html)?.[1] ?? '';
		expect(contentSha256).not.toBe('');
		const post = (name: string, hash: string) =>
			request.post(`${link}?/acknowledge`, {
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
	}
);

test('the page reads well by every measure, on the screen and on one sheet of paper', async ({ page }) => {
	const { link } = await sendSheet(page, job);
	const answer = await page.goto(link);
	expect(answer?.headers()).toMatchObject({
		'referrer-policy': 'no-referrer',
		'x-robots-tag': 'noindex, nofollow, noarchive',
		'cache-control': 'no-store'
	});
	await expect(page.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expect(page.locator('meta[name=robots]')).toHaveAttribute('content', 'noindex, nofollow');
	await expect(page.locator('script')).toHaveCount(0);
	await expectNoViolations(page);
	await page.getByText('The same hour by hour').click();
	await expect(page.getByRole('table')).toBeVisible();
	const { scrollWidth, clientWidth } = await page.evaluate(() => {
		const { scrollWidth, clientWidth } = document.documentElement;
		return { scrollWidth, clientWidth };
	});
	expect(scrollWidth).toBeLessThanOrEqual(clientWidth);
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	expect(pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)).toHaveLength(1);
	await page.emulateMedia({ media: 'print' });
	await expectNoViolations(page);
});

test(
	'the page stays on one sheet of paper, however much maker and shop have to say',
	ONCE,
	async ({ page }) => {
		test.slow();
		const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 6 });
		const preDrill = `/api/v1/mounts/${mountIds[0]}/pre-drill`;
		const { questions, version } = await ask(page, 'GET', preDrill);
		const missing = { answer: 'does-not', note: 'It is not there yet. '.repeat(8).slice(0, 160).trim() };
		const failed = (questions as { key: string }[]).slice(0, 5).map(({ key }) => [key, missing] as const);
		await ask(page, 'PUT', preDrill, { answers: Object.fromEntries(failed), version });
		const { battery } = await ask(page, 'GET', `/api/v1/jobs/${jobId}`);
		const record = `/api/v1/batteries/${(battery as { id: number }).id}`;
		for (const [quoted, length] of [
			[20, 12],
			[20, 150],
			[20, 250],
			[20, 1000],
			[250, 12],
			[500, 400],
			[500, 1000]
		] as const) {
			const { id: _, ...now } = await ask(page, 'GET', record);
			await ask(page, 'PUT', record, {
				...now,
				underBonnetWords: 'Not under a bonnet. '.repeat(25).slice(0, quoted)
			});
			const [hot] = await assessAll(page, jobId);
			const reason = 'No other place. '.repeat(63).slice(0, length);
			const decision = { assessmentId: hot!.id, decidedBy: 'Ilse Tarn', reason };
			const { id: recommendationId } = await ask(page, 'POST', '/api/v1/recommendations', decision);
			const { link } = await sendSheet(page, { jobId, recommendationId });
			await page.goto(link);
			await expect(page.getByText(/^Not looked at yet: /)).toBeVisible();
			const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
			expect(
				pdf.toString('latin1').match(/\/Type\s*\/Page\b/g),
				`${quoted} characters of the maker, ${length} of the shop`
			).toHaveLength(1);
		}
	}
);

test('a withdrawn page is gone, in kind words, and the withdrawal asks first', async ({ page, browser }) => {
	const { link, sendTo } = await sendSheet(page, job);
	await page.goto(`/jobs/${job.jobId}/sheets`);
	await sent(page, sendTo).getByRole('link', { name: 'Withdraw it' }).click();
	await expect(page.getByText('this cannot be undone')).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'Keep it' }).click();
	await expect(sent(page, sendTo).getByRole('heading')).toHaveText('Sent, not opened');
	await sent(page, sendTo).getByRole('link', { name: 'Withdraw it' }).click();
	await page.getByRole('button', { name: 'Withdraw it' }).click();
	await expect(sent(page, sendTo).getByRole('heading')).toHaveText('Withdrawn');

	const customer = await openPlainly(browser, link);
	await expect(customer.getByRole('heading', { name: 'This page was withdrawn' })).toBeVisible();
	await expect(customer.getByText('has withdrawn this page')).toBeVisible();
	expect((await customer.request.get(link)).status()).toBe(410);
	await customer.context().close();
});

test('sending again stops the link before', ONCE, async ({ page, request }) => {
	const first = await sendSheet(page, job);
	await page.goto(`/jobs/${job.jobId}/sheets`);
	await expect(page.getByText('The link that is out now stops working.')).toBeVisible();
	const second = await sendSheet(page, job);
	expect((await request.get(first.link)).status()).toBe(410);
	expect((await request.get(second.link)).status()).toBe(200);
});

test('a second tab does not make a link dead that it did not know of, unless it is told to', async ({
	page,
	request
}) => {
	const first = await sendSheet(page, job);
	await openForm(page, `/jobs/${job.jobId}/sheets`);
	const meanwhile = await sendSheet(await page.context().newPage(), job);
	expect((await request.get(first.link)).status()).toBe(410);
	await page.getByLabel('Send to').fill(first.sendTo);
	await page.getByRole('button', { name: 'Send a new link' }).click();
	const question = page.getByRole('listitem').filter({ hasText: `sent this page to ${meanwhile.sendTo} on` });
	await expect(question).toContainText('Send a new link all the same?');
	await expect(page.getByLabel('Send to')).toHaveValue(first.sendTo);
	expect((await request.get(meanwhile.link)).status()).toBe(200);
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Send a new link all the same' }).click();
	await expect(sent(page, first.sendTo)).toHaveCount(2);
	expect((await request.get(meanwhile.link)).status()).toBe(410);
});

test('a link that leads nowhere says so', ONCE, async ({ page }) => {
	const answer = await page.goto('/sheet/AAAAAAAAAAAAAAAAAAAAAA');
	expect(answer?.status()).toBe(404);
	await expect(page.getByRole('heading', { name: 'This link leads nowhere' })).toBeVisible();
	await expectNoViolations(page);
});

test(
	'the neighbour finds nothing, and a customer has no way into the shop’s pages',
	ONCE,
	async ({ page }) => {
		await page.context().clearCookies();
		await signInAsNeighbour(page);
		expect((await page.goto(`/jobs/${job.jobId}/sheets`))?.status()).toBe(404);
		await page.context().clearCookies();
		await signInAs(page, 'customer');
		expect((await page.goto(`/jobs/${job.jobId}/sheets`))?.status()).toBe(403);
		expect((await page.goto('/mailbox'))?.status()).toBe(403);
	}
);

test('a customer finds their own pages after signing in, and the shop does not', async ({ page }) => {
	await page.context().clearCookies();
	await signInAs(page, 'customer');
	await page.goto('/my');
	await expect(page.getByRole('heading', { level: 1, name: 'Your pages' })).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('rowheader').first().getByRole('link').click();
	await expect(page.getByText('Prepared for Odile Vantongeren')).toBeVisible();
	await expectNoViolations(page);
	const own = page.url();
	await page.context().clearCookies();
	await page.context().addCookies(job.cookies);
	expect((await page.goto('/my'))?.status()).toBe(403);
	expect((await page.goto(own))?.status()).toBe(403);
});
