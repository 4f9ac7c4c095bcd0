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
	await expect(page.getByText('28 February 2026').first()).toBeVisible();
	await expectNoViolations(page);
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
