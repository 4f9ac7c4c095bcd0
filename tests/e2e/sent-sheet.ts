import { expect, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';

const DECISION = {
	decidedBy: 'Ilse Tarn',
	reason: 'No other place is free; a duct is fitted before summer.'
};

/** A job of its own whose hot corner (or cooled cabin) is recommended and can be sent. */
export async function makeRecommendedJob(page: Page, which: 'hot' | 'cool' = 'hot') {
	const job = await makeAssessableJob(page);
	const assessments = await assessAll(page, job.jobId);
	const chosen = assessments[which === 'hot' ? 0 : 1]!;
	await ask(page, 'POST', '/api/v1/recommendations', {
		assessmentId: chosen.id,
		...(which === 'hot' ? DECISION : {})
	});
	return { ...job, sendTo: `${job.customerName.toLowerCase().replace(/\W+/g, '.')}@travellers.example` };
}

/** Sends a job's page through the form that the shop uses. */
export async function sendFromPage(page: Page, jobId: number, sendTo: string): Promise<void> {
	await page.goto(`/jobs/${jobId}/sheets`);
	await page.getByLabel('Send to').fill(sendTo);
	await page.getByRole('button', { name: /Send (the page|a new link)/ }).click();
	await expect(page.getByText(`To ${sendTo}`).first()).toBeVisible();
}

/** Waits for the newest letter to an address in the local mailbox and opens it. */
export async function openLetter(page: Page, recipient: string): Promise<void> {
	await expect(async () => {
		await page.goto('/mailbox');
		await page
			.getByRole('row')
			.filter({ hasText: recipient })
			.first()
			.getByRole('link')
			.click({ timeout: 2_000 });
	}).toPass({ timeout: 30_000 });
	await expect(page.getByText(recipient)).toBeVisible();
}

/** The link that the open letter holds. */
export async function readLink(page: Page): Promise<string> {
	return (await page.getByRole('link', { name: /\/sheet\// }).getAttribute('href')) ?? '';
}
