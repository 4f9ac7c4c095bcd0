import { expect, test } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, openForm, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('a cable and its fuse are proposed for a mount, held against its heat, and taken back', async ({
	page
}) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	await page.goto(`/jobs/${jobId}`);
	await page.getByRole('link', { name: 'Propose a cable and fuse for mount A' }).click();
	await page.waitForURL(`/mounts/${mountIds[0]}/cable`);
	await openForm(page, page.url());
	await page.getByLabel('Cross-section of the copper').fill('16');
	await page.getByLabel('Length of cable, there and back').fill('6');
	await page.getByLabel('Rating of the fuse').fill('60');
	await page.getByRole('button', { name: 'Propose this' }).click();
	await expect(page.getByText('Choose what the insulation is made for.').first()).toBeVisible();
	await expect(page.getByLabel('Rating of the fuse')).toHaveValue('60');
	await expectNoViolations(page);
	await page.getByRole('radio', { name: '90\u202F°C' }).check();
	await page.getByRole('radio', { name: 'in a tube' }).check();
	await page.getByRole('button', { name: 'Propose this' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await expectNoViolations(page);

	const [hot] = await assessAll(page, jobId);
	const { cable } = await ask(page, 'GET', `/api/v1/assessments/${String(hot!.id)}/outlook`);
	const { findings } = cable as { findings: { holds: boolean }[] };
	await page.goto(`/assessments/${String(hot!.id)}`);
	const part = page.getByRole('region', { name: 'Cable and fuse in that heat' });
	await expect(part.getByText(/16 mm² copper with insulation for/)).toBeVisible();
	await expect(part.getByText('does not hold')).toHaveCount(findings.filter(({ holds }) => !holds).length);
	await expect(part.getByText(/makers’ own curves/)).toBeVisible();
	await expectNoViolations(page);

	await page.goto(`/mounts/${mountIds[0]}/cable`);
	await page.getByRole('button', { name: 'Take the proposal back' }).click();
	await expect(page.getByText('Taken back: nothing is proposed now.')).toBeVisible();
	await expect(page.getByRole('button', { name: 'Take the proposal back' })).toHaveCount(0);
	await expect(page.getByLabel('Rating of the fuse')).toHaveValue('');
});

test('it is proposed without a script, too', async ({ browser, page, baseURL }) => {
	const { mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/mounts/${mountIds[0]}/cable`);
	await plain.getByLabel('Cross-section of the copper').fill('16 mm²');
	await plain.getByLabel('Length of cable, there and back').fill('600 cm');
	await plain.getByLabel('Rating of the fuse').fill('60');
	await plain.getByRole('radio', { name: '105\u202F°C' }).check();
	await plain.getByRole('radio', { name: 'in free air' }).check();
	await plain.getByRole('button', { name: 'Propose this' }).click();
	await expect(plain.getByText('Saved.')).toBeVisible();
	await expect(plain.getByLabel('Length of cable, there and back')).toHaveValue('6');
	await context.close();
});
