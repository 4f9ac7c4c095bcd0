import { expect, test } from '@playwright/test';
import { makeSendableJob, readLink, sendSheet } from './sent-sheet';
import { expectNoViolations, signInAs, signInAsNeighbour, ONCE } from './support';

test('a letter that the shop sent can be read in the mailbox, and its link followed', async ({
	page,
	browser,
	baseURL
}) => {
	const job = await makeSendableJob(browser, baseURL);
	await page.context().addCookies(job.cookies);
	const { sendTo } = await sendSheet(page, job);
	await expect(page.getByText(`Hello ${job.customerName},`)).toBeVisible();
	await expect(page.getByText(sendTo)).toBeVisible();
	await expectNoViolations(page);
	const letter = page.url();
	expect(new URL(await readLink(page)).origin).toBe(new URL(letter).origin);
	await page.goto('/mailbox');
	await expectNoViolations(page);
	await page.goto(letter);
	await page.getByRole('link', { name: /\/sheet\// }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();

	await page.context().clearCookies();
	await signInAsNeighbour(page);
	expect((await page.goto(letter))?.status()).toBe(404);
	await page.goto('/mailbox');
	await expect(page.getByText(sendTo)).toHaveCount(0);
});

test('a letter that nobody sent is not there', ONCE, async ({ page }) => {
	await signInAs(page, 'installer');
	expect((await page.goto('/mailbox/no-such-letter'))?.status()).toBe(404);
});
