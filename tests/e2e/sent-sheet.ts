import { randomUUID } from 'node:crypto';
import { expect, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { signInAs } from './support';

/** As long as a reason may be, nearly: what the paper must take. */
export const REASON = 'The tray is fixed and the customer wants it there all the same. '.repeat(15).trim();

export interface SendableJob {
	jobId: number;
	customerName: string;
	recommendationId: unknown;
	/** The installer who made it, still signed in. */
	cookies: Awaited<ReturnType<BrowserContext['cookies']>>;
}

/** A job of its own with as many positions as one takes, whose hot corner is recommended against its verdict. */
export async function makeSendableJob(browser: Browser, baseURL: string | undefined): Promise<SendableJob> {
	const context = await browser.newContext({ baseURL: baseURL! });
	const page = await context.newPage();
	await signInAs(page, 'installer');
	const { jobId, customerName } = await makeAssessableJob(page, { mounts: 6 });
	const [hot] = await assessAll(page, jobId);
	// What a shop has looked at before it recommends is there; a page that is sent waits for it otherwise.
	await ask(page, 'GET', `/api/v1/assessments/${String(hot!.id)}/outlook`);
	const recommendation = await ask(page, 'POST', '/api/v1/recommendations', {
		...{ assessmentId: hot!.id, decidedBy: 'Konstantin Abernathy-Wollstonecraft', reason: REASON }
	});
	const cookies = await context.cookies();
	await context.close();
	return { jobId, customerName, recommendationId: recommendation.id, cookies };
}

export const newAddress = (): string => `reader.${randomUUID().slice(0, 8)}@travellers.example`;

/** Sends the job's page and gives its link, as it stands in the letter. */
export async function sendSheet(
	page: Page,
	{ jobId, recommendationId }: Pick<SendableJob, 'jobId' | 'recommendationId'>
) {
	const sendTo = newAddress();
	await ask(page, 'POST', `/api/v1/jobs/${jobId}/sheets`, { recommendationId, sendTo });
	await openLetter(page, sendTo);
	return { sendTo, link: await readLink(page) };
}

/** Waits for the letter to an address in the local mailbox, of several the one about something, and opens it. */
export async function openLetter(page: Page, recipient: string, about = ''): Promise<void> {
	const row = page.getByRole('row').filter({ hasText: recipient }).filter({ hasText: about });
	await expect(async () => {
		await page.goto('/mailbox');
		await expect(row).toHaveCount(1, { timeout: 1_000 });
	}).toPass();
	await row.getByRole('link').click();
	await page.waitForURL(/\/mailbox\/.+/);
}

/** The link that the open letter holds. */
export async function readLink(page: Page): Promise<string> {
	return (await page.getByRole('link', { name: /\/sheet\// }).getAttribute('href')) ?? '';
}
