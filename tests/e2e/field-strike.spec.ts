import { expect, test, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { signInByLetter } from './mailed';
import { newAddress } from './sent-sheet';
import { expectNoViolations, ONCE, openForm, signInAs } from './support';

const CAPACITY_TEST = { kind: 'capacity-test', currentA: 5, cutOffV: 10.8, tempC: 25 };

/** A battery that was fitted, with a test of 95 Ah and one of 45 Ah; its customer was sent a page. */
async function makeTested(page: Page, email: string) {
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const [hot] = await assessAll(page, jobId);
	const why = { decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };
	const { id } = await ask(page, 'POST', '/api/v1/recommendations', { assessmentId: hot!.id, ...why });
	await ask(page, 'POST', `/api/v1/jobs/${jobId}/sheets`, { recommendationId: id, sendTo: email });
	const mount = `/api/v1/mounts/${mountIds[0]}`;
	await ask(page, 'PUT', `${mount}/fitting`, {
		...{ fittedOn: '2026-01-31', fittedBy: 'Ida Fenn', serialNumber: 'X-1', differences: [], version: null }
	});
	for (const [notedOn, capacityAh] of [
		['2026-09-01', 95],
		['2026-10-01', 45]
	] as const)
		await ask(page, 'POST', `${mount}/field-notes`, { ...CAPACITY_TEST, notedOn, capacityAh });
	const { customer } = (await ask(page, 'GET', `/api/v1/jobs/${jobId}`)) as {
		customer: { id: number; name: string; version: number };
	};
	const { id: customerId, name, version } = customer;
	await ask(page, 'PUT', `/api/v1/customers/${customerId}`, { name, phone: '', email, version });
	return mountIds[0]!;
}

test(
	'a slip of the pen is struck out: it stands in the papers as struck, and counts nowhere',
	ONCE,
	async ({ page, browser, baseURL }) => {
		test.slow();
		await signInAs(page, 'installer');
		const email = newAddress();
		const mountId = await makeTested(page, email);
		const notes = `/mounts/${mountId}/field`;

		await page.goto(notes);
		await expect(page.getByText(/^By 2 tests it is down to 80/)).toBeVisible();
		const slip = page.getByRole('listitem').filter({ hasText: '1 October 2026' });
		await slip.getByRole('link', { name: /^Strike it out/ }).click();
		await page.waitForURL(/\/strike$/);
		await openForm(page, page.url());
		await expect(page.getByText(/^It stays on record/)).toBeVisible();
		await expectNoViolations(page);
		await page.getByLabel('Reason', { exact: true }).fill('oops');
		await page.getByRole('button', { name: 'Strike it out' }).click();
		await expect(page.getByText(/^Reason must be at least 5 characters/).first()).toBeVisible();
		await expect(page.getByLabel('Reason', { exact: true })).toHaveValue('oops');
		await expectNoViolations(page);
		await page.getByLabel('Reason', { exact: true }).fill('It was 95 Ah: a slip of the pen');
		await page.getByRole('button', { name: 'Strike it out' }).click();

		await expect(page.getByText('Struck out. The note stays on record, and counts nowhere.')).toBeVisible();
		await expect(page.getByText(/^By one test it is down to 80/)).toBeVisible();
		await expect(slip.locator('s')).toHaveText('Capacity test');
		await expect(slip).toContainText(/Struck out by .+ on \d+ \w+ 2\d{3}: It was 95 Ah: a slip of the pen/);
		await expect(slip.getByRole('link', { name: /^Strike it out/ })).toHaveCount(0);
		await expectNoViolations(page);

		await page.goto(`/mounts/${mountId}/warranty-file/print`);
		const row = page.getByRole('row').filter({ hasText: 'Capacity test, struck out' });
		await expect(row).toContainText('It was 95 Ah: a slip of the pen');
		await expect(page.getByText(/By one test it is down to 80/)).toBeVisible();

		const visit = await browser.newContext({ baseURL: baseURL! });
		const own = await visit.newPage();
		await signInByLetter(own, email);
		await expect(own).toHaveURL(/\/my$/);
		await expect(own.getByText(/Struck out by the shop on .*: it does not count\./)).toBeVisible();
		await expect(own.getByText('It holds 95')).toBeVisible();
		await expect(own.getByText('It holds 45')).toHaveCount(0);
		await expect(own.getByText('slip of the pen')).toHaveCount(0);
		await expectNoViolations(own);
		await visit.close();
	}
);

test('a note is struck out in a browser that runs no script', ONCE, async ({ page, browser, baseURL }) => {
	test.slow();
	await signInAs(page, 'installer');
	const mountId = await makeTested(page, newAddress());
	const context = await browser.newContext({ baseURL: baseURL!, javaScriptEnabled: false });
	await context.addCookies(await page.context().cookies());
	const plain = await context.newPage();
	await plain.goto(`/mounts/${mountId}/field`);
	await plain
		.getByRole('link', { name: /^Strike it out/ })
		.first()
		.click();
	const tooLong = 'So it was not. '.repeat(30).trim();
	await plain.getByLabel('Reason', { exact: true }).fill(tooLong);
	await plain.getByRole('button', { name: 'Strike it out' }).click();
	await expect(plain.getByText('Reason must be 300 characters or fewer.').first()).toBeVisible();
	await expect(plain.getByLabel('Reason', { exact: true })).toHaveValue(tooLong);
	await plain.getByLabel('Reason', { exact: true }).fill('It was 95 Ah');
	await plain.getByRole('button', { name: 'Strike it out' }).click();
	await expect(plain.getByText('Struck out. The note stays on record, and counts nowhere.')).toBeVisible();
	await context.close();
});
