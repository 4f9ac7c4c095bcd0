import { expect, test } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, openForm, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('what was fitted is kept against what was agreed, looked at again by date, and learnt from', async ({
	page
}) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const [hot] = await assessAll(page, jobId);
	const words = { assessmentId: hot!.id, decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };
	await ask(page, 'POST', '/api/v1/recommendations', words);
	await page.goto(`/jobs/${jobId}/recommendation`);
	await page.getByRole('link', { name: 'Say what was fitted' }).click();
	await openForm(page, `/mounts/${mountIds[0]}/fitted`);
	await expectNoViolations(page);
	await page.getByLabel('Fitted on').fill('2026-01-31');
	await page.getByLabel('Fuse', { exact: true }).fill('80 A, bolted');
	await page.getByRole('button', { name: 'Keep what was fitted' }).click();
	await expect(page.getByText('One thing is not as agreed.')).toBeVisible();
	await expect(page.getByText('That is before it was recommended')).toBeVisible();
	await expect(page.getByText('28 February 2026').first()).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('button', { name: /^Done.*28 February/ }).click();
	const news = page.getByRole('status').filter({ hasText: 'The look of 28 February 2026 is noted as done.' });
	await expect(news).toBeFocused();
	await expectNoViolations(page);
	await page.getByRole('button', { name: /^Undo.*28 February 2026/ }).click();
	await expect(page.getByText('The look of 28 February 2026 stands open again.')).toBeVisible();
	await expect(page.getByText(/done .* by/)).toHaveCount(0);
	await page.getByRole('button', { name: /^Done.*28 February/ }).click();
	await expect(page.getByText(/done .* by/)).toBeVisible();
	const calendar = await page.request.get(`/mounts/${mountIds[0]}/follow-ups.ics`);
	expect(calendar.headers()['content-type']).toContain('text/calendar');
	expect((await calendar.text()).match(/BEGIN:VEVENT/g)).toHaveLength(2);

	await page.goto(`/mounts/${mountIds[0]}/field`);
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'Went dark' }).click();
	await openForm(page, `/mounts/${mountIds[0]}/field/new/cut-out`);
	await page.getByLabel('The day', { exact: true }).fill('2026-02-10');
	await page.getByLabel('Went dark at').fill('half past five');
	await page.getByRole('button', { name: 'Keep this note' }).click();
	await expect(page.getByText('Went dark at must be a time such as 17:30.').first()).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('Went dark at').fill('4:30');
	await page.getByLabel('Came back by itself at').fill('4:40');
	await page.getByLabel('Hottest of that day').fill('25');
	await page.getByRole('button', { name: 'Keep this note' }).click();
	await expect(page.getByText('Noted, and kept for good.')).toBeVisible({ timeout: 30_000 });
	await expect(page.getByRole('heading', { name: 'Was it heat? Hardly' })).toBeVisible();
	await expect(page.getByText('Look at these next, in this order:')).toBeVisible();
	await expectNoViolations(page);

	await openForm(page, `/mounts/${mountIds[0]}/field/new/peak-label`);
	await page.getByLabel('Read on', { exact: true }).fill('2026-02-20');
	await page.getByRole('radio', { name: 'On the case' }).check();
	await page.getByLabel('Highest field that has turned').fill('77');
	await page.getByLabel('Hottest of that day').fill('42');
	await page.getByRole('button', { name: 'Keep this note' }).click();
	await expect(page.getByText('Noted, and kept for good.')).toBeVisible({ timeout: 30_000 });
	await expect(page.getByRole('heading', { name: 'What it teaches' })).toBeVisible();
	await expect(page.getByRole('row', { name: /Dark days a year/ })).toBeVisible();
	await expectNoViolations(page);
});

test('a look long before its date asks first, without a script too; the job says what is next', async ({
	browser,
	page,
	baseURL
}) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const [hot] = await assessAll(page, jobId);
	const words = { assessmentId: hot!.id, decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };
	const { id: recommendationId } = await ask(page, 'POST', '/api/v1/recommendations', words);
	const today = new Date().toISOString().slice(0, 10);
	await ask(page, 'PUT', `/api/v1/mounts/${mountIds[0]}/fitting`, {
		...{ fittedOn: today, fittedBy: 'Ida Fenn', serialNumber: '', note: '', differences: [], version: null }
	});
	await page.goto(`/jobs/${jobId}`);
	await expect(page.getByText('what was recommended has not gone to the customer')).toBeVisible();
	const sheet = { recommendationId, sendTo: 'ida@travellers.example' };
	await ask(page, 'POST', `/api/v1/jobs/${jobId}/sheets`, sheet);
	await page.goto(`/jobs/${jobId}`);
	await expect(page.getByText('The battery is fitted. Mount A is to be looked at next on')).toBeVisible();
	await page.getByRole('link', { name: 'See the dates' }).click();
	await expect(page.getByText(/reminder goes to the (customer|workshop) by e-mail/)).toBeVisible();

	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/mounts/${mountIds[0]}/fitted`);
	const lastLook = plain.getByRole('listitem').filter({ hasText: 'After 12 months' });
	await lastLook.getByRole('button', { name: /^Done/ }).click();
	const question = plain.getByRole('region', { name: /^Done already\? It is due on/ });
	await expect(question).toBeVisible();
	await expect(plain.getByText(/, done .* by/)).toHaveCount(0);
	await question.getByRole('link', { name: 'Not yet' }).click();
	await expect(question).toHaveCount(0);
	await lastLook.getByRole('button', { name: /^Done/ }).click();
	await question.getByRole('button', { name: 'Yes, it is done' }).click();
	await expect(lastLook.getByText(/, done .* by/)).toBeVisible();
	await plain.getByRole('button', { name: /^Undo/ }).click();
	await expect(plain.getByText(/stands open again/)).toBeVisible();
	await expect(plain.getByText(/, done .* by/)).toHaveCount(0);
	await context.close();

	await openForm(page, `/mounts/${mountIds[0]}/fitted`);
	await page.getByRole('button', { name: /^Done/ }).last().click();
	await expect(page.getByRole('region', { name: /^Done already/ })).toBeFocused();
	await expectNoViolations(page);
});
