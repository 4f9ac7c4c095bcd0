import { expect, test } from '@playwright/test';
import { makeSendableJob, openLetter, sendSheet, type SendableJob } from './sent-sheet';
import { expectNoViolations } from './support';

const READER = 'Ilse Tarn';
const ANSWER = 'A duct would help: about nine degrees.';
let job: SendableJob;

test.beforeAll(async ({ browser }, { project }) => {
	test.setTimeout(120_000);
	job = await makeSendableJob(browser, project.use.baseURL);
});
test.beforeEach(({ page }) => page.context().addCookies(job.cookies));

test('a customer asks on the page without a script, the shop answers on the job, the answer comes by e-mail', async ({
	page,
	browser
}) => {
	const { link, sendTo } = await sendSheet(page, job);
	const question = `Would a duct help the one at ${sendTo}?`;
	const context = await browser.newContext({ javaScriptEnabled: false });
	const customer = await context.newPage();
	await customer.goto(link);
	await customer.getByLabel('What would you like to know?').fill(question);
	await customer.getByRole('button', { name: 'Ask the shop' }).click();
	await expect(customer).toHaveTitle(/^Error: /);
	await expect(customer.getByLabel('What would you like to know?')).toHaveValue(question);
	await customer.getByLabel('Name', { exact: true }).fill(READER);
	await customer.getByRole('button', { name: 'Ask the shop' }).click();
	await expect(customer.getByText('has not answered yet').last()).toBeVisible();

	await page.goto(link);
	await expectNoViolations(page);
	await page.goto(`/jobs?search=${encodeURIComponent(job.customerName)}`);
	await expect(page.getByText(/question.? waits?/).first()).toBeVisible();
	await page.goto(`/jobs/${job.jobId}`, { waitUntil: 'networkidle' });
	await expect(page.getByText(question).first()).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'Read and answer' }).click();
	const another = page.getByRole('link', { name: question });
	if ((await another.count()) > 0) await another.click();
	await page.getByRole('button', { name: 'Send the answer' }).click();
	await expect(page.getByText('Your answer is missing.').first()).toBeVisible();
	await page.getByLabel(/^Answer to/).fill(ANSWER);
	await page.getByRole('button', { name: 'Send the answer' }).click();
	await expect(page.getByText(ANSWER).last()).toBeVisible();
	await expect(page.getByLabel(/^Answer to/)).toHaveCount(0);

	await customer.reload();
	await expect(customer.getByText(ANSWER).last()).toBeVisible();
	await context.close();
	await openLetter(page, sendTo, 'answered');
	await expect(page.getByText(`> ${ANSWER}`)).toBeVisible();
	await expect(page.getByText(`> ${question}`)).toBeVisible();
});

test('a question sent by the Enter key and again by its button is one', async ({ page }) => {
	const { link, sendTo } = await sendSheet(page, job);
	const question = `Is the tray at ${sendTo} better?`;
	await page.goto(link);
	const onceKey = await page.locator('input[name="onceKey"]').first().inputValue();
	const headers = { origin: new URL(link).origin };
	for (const [button, name] of [
		['send', ''],
		['ask', READER]
	] as const) {
		const form = { onceKey, askedBy: READER, question, contentSha256: 'x', name };
		const answer = await page.request.post(`${link}?/${button}`, { form, headers });
		expect(answer.ok()).toBe(true);
	}
	await page.reload();
	await expect(page.getByRole('listitem').filter({ hasText: question })).toHaveCount(1);
});
