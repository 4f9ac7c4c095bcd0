import { expect, test } from '@playwright/test';
import { makeRecommendedJob, openLetter, readLink, sendFromPage } from './sent-sheet';
import { expectNoViolations, signInAs, signInAsNeighbour } from './support';

test('a letter that the shop sent can be read in the mailbox, and its link followed', async ({ page }) => {
	await signInAs(page, 'installer');
	const { jobId, sendTo, customerName } = await makeRecommendedJob(page, 'cool');
	await sendFromPage(page, jobId, sendTo);
	await page.goto('/mailbox');
	await expectNoViolations(page);
	await openLetter(page, sendTo);
	await expect(page.getByText(`Hello ${customerName},`)).toBeVisible();
	await expectNoViolations(page);
	const letter = page.url();
	expect(new URL(await readLink(page)).origin).toBe(new URL(letter).origin);
	await page.getByRole('link', { name: /\/sheet\// }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Rides it out' })).toBeVisible();

	await page.context().clearCookies();
	await signInAsNeighbour(page);
	expect((await page.goto(letter))?.status()).toBe(404);
	await page.goto('/mailbox');
	await expect(page.getByText(sendTo)).toHaveCount(0);
});

test('a letter that nobody sent is not there', async ({ page }) => {
	await signInAs(page, 'installer');
	expect((await page.goto('/mailbox/no-such-letter'))?.status()).toBe(404);
});
