import { expect, test, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, openForm, ONCE, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

const answer = (page: Page, question: RegExp, name: string) =>
	page.getByRole('radiogroup', { name: question }).getByRole('radio', { name, exact: true }).check();

test('what to look at before drilling is answered and signed, and what stays open is printed', async ({
	page
}) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page);
	await page.goto(`/jobs/${jobId}`);
	await page.getByRole('link', { name: /^Before drilling.*mount A/ }).click();
	await openForm(page, `/mounts/${mountIds[0]}/pre-drill`);
	await expect(page.getByText('12 points are open.')).toHaveCount(0);
	await expect(page.getByText('10 points are open.')).toBeVisible();
	await expectNoViolations(page);
	await answer(page, /behind every place that will be drilled/, 'Yes');
	await answer(page, /fuse at each end/, 'No');
	await page.getByRole('button', { name: 'Save the answers' }).click();
	await expect(page.getByRole('link', { name: 'Fuse: say what is missing.' })).toBeVisible();
	await page.locator('input[name="fuseNote"]').fill('No fuse at the starting battery yet.');
	await page.getByRole('button', { name: 'Save the answers' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await expect(page.getByText('9 points are open.')).toBeVisible();
	// Signing keeps what was answered since, and asks for what is missing before it signs anything.
	await answer(page, /torque/, 'Does not arise');
	await page.getByLabel('Your name').fill('Ida Fenn');
	await page.getByRole('button', { name: 'Save and sign' }).click();
	const missing = page.getByRole('link', { name: 'Terminals: say why it does not arise here.' });
	await expect(missing).toBeInViewport();
	await expect(page.getByText(/Signed by/)).toHaveCount(0);
	await page.locator('input[name="torqueNote"]').fill('Clamps, no bolts.');
	await page.getByRole('button', { name: 'Save and sign' }).click();
	await expect(page.getByText(/Signed by Ida Fenn/)).toBeVisible();
	await expect(page.getByText('8 points are open.')).toBeVisible();
	await expect(page.locator('input[name="torqueNote"]')).toHaveValue('Clamps, no bolts.');
	await expectNoViolations(page);

	const [hot] = await assessAll(page, jobId);
	const words = { assessmentId: hot!.id, decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };
	const { id } = await ask(page, 'POST', '/api/v1/recommendations', words);
	await page.goto(`/jobs/${jobId}/recommendation`);
	await expect(page.getByText('does not hold: No fuse at the starting battery yet.')).toBeVisible();
	await page.goto(`/recommendations/${String(id)}/print`);
	await expect(page.getByText('8 points are open (page 2).')).toBeVisible();
	await expect(page.getByText('does not hold. No fuse at the starting battery yet.')).toBeVisible();
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	expect(pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)).toHaveLength(2);
});

test('Enter in a note saves, and does not lead away to the photos', ONCE, async ({ page }) => {
	const { mountIds } = await makeAssessableJob(page, { mounts: 1 });
	await openForm(page, `/mounts/${mountIds[0]}/pre-drill`);
	await answer(page, /fuse at each end/, 'No');
	await page.locator('input[name="fuseNote"]').fill('None yet.');
	await page.locator('input[name="fuseNote"]').press('Enter');
	await expect(page.getByText('Saved.')).toBeVisible();
});

test('it is answered without a script, too', ONCE, async ({ browser, page, baseURL }) => {
	const { mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/mounts/${mountIds[0]}/pre-drill`);
	await answer(plain, /torque/, 'Does not arise');
	await plain.locator('input[name="torqueNote"]').fill('Clamps, no bolts.');
	await plain.getByRole('button', { name: 'Save the answers' }).click();
	await expect(plain.getByText('Saved.')).toBeVisible();
	await expect(plain.locator('input[name="torqueNote"]')).toHaveValue('Clamps, no bolts.');
	await context.close();
});
