import { expect, test, type Page } from '@playwright/test';
import { ask } from './assessable-job';
import { makeSendableJob, newAddress, openLetter, type SendableJob } from './sent-sheet';
import { readMail } from './mailed';
import { expectNoViolations } from './support';

let job: SendableJob;

test.beforeAll(async ({ browser }, { project }) => {
	test.setTimeout(120_000);
	job = await makeSendableJob(browser, project.use.baseURL);
});
test.beforeEach(({ page }) => page.context().addCookies(job.cookies));

/** To an address on which the local mail server hangs up once it has the letter. */
async function sendUnanswered(page: Page): Promise<string> {
	const sendTo = `unanswered.${newAddress()}`;
	const { recommendationId } = job;
	await ask(page, 'POST', `/api/v1/jobs/${job.jobId}/sheets`, { recommendationId, sendTo });
	return sendTo;
}

const rowOf = (page: Page, sendTo: string) => page.getByRole('listitem').filter({ hasText: sendTo });

async function openUnsure(page: Page, sendTo: string): Promise<void> {
	await expect(async () => {
		await page.goto(`/jobs/${job.jobId}`);
		await expect(rowOf(page, sendTo)).toContainText('It may have arrived', { timeout: 1_000 });
	}).toPass({ timeout: 30_000 });
}

test('a letter whose answer was never heard goes out once, and is noted as arrived', async ({ page }) => {
	const sendTo = await sendUnanswered(page);
	await openUnsure(page, sendTo);
	await expectNoViolations(page);
	await page.goto(`/jobs/${job.jobId}/sheets`);
	await expect(rowOf(page, sendTo)).toContainText('May have arrived');
	await openUnsure(page, sendTo);
	await rowOf(page, sendTo).getByRole('button', { name: 'It arrived' }).click();
	await expect(rowOf(page, sendTo)).toContainText('Sent');
	await expect(rowOf(page, sendTo).getByRole('button')).toHaveCount(0);
	expect(readMail(sendTo)).toHaveLength(1);
});

test('such a letter goes out a second time only once a person says so', async ({ page }) => {
	const sendTo = await sendUnanswered(page);
	await openUnsure(page, sendTo);
	expect(readMail(sendTo)).toHaveLength(1);
	await rowOf(page, sendTo).getByRole('button', { name: 'Send again' }).click();
	await expect.poll(() => readMail(sendTo).length, { timeout: 20_000 }).toBe(2);
	await openLetter(page, sendTo);
});
