import { expect, test, type Page } from '@playwright/test';
import { CROWDED_DAY, ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, signInAs } from './support';

const WHO = 'Ilse Tarn';
const CABLE = {
	...{ areaMm2: 16, insulationC: 90, laying: 'in a tube', conductorLengthM: 6, fuseRatedA: 60 }
};
const SAY_WHY =
	'Say why it goes ahead although it cuts out and the battery’s maker does not allow it under the bonnet.';
const WHY = 'No other place is free; a duct is fitted before summer.';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

/** Pages of the paper that the browser makes, without colours behind. */
async function printPages(page: Page): Promise<number> {
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	return pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)?.length ?? 0;
}

test('a mount that rides it out is recommended and printed', async ({ page }) => {
	test.slow();
	const { jobId, customerName } = await makeAssessableJob(page);
	const [, cool] = await assessAll(page, jobId);
	await page.goto(`/assessments/${String(cool!.id)}`);
	await page.getByRole('link', { name: 'Recommend this mount' }).click();
	await expect(page.getByLabel('Who decided')).toHaveCount(0);
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Recommend mount B' }).click();
	await expect(page.getByText('Recommended and kept.')).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Rides it out' })).toBeVisible();
	await expect(page.getByText(customerName)).toBeVisible();
	for (const who of ['Installer', 'Customer'])
		await expect(page.getByText(who, { exact: true })).toBeVisible();
	await expect(page.getByText('instructions and warranty terms of the battery maker')).toBeVisible();
	await expect(page.getByText(String(cool!.inputsSha256))).toBeVisible();
	const beside = page.getByRole('heading', { name: 'What the estimate says beside its number' });
	await expect(beside).toBeVisible();
	await expect(page.getByText(/On fewer than 1 of 20 days like this the battery goes dark/)).toBeVisible();
	await expect(page.getByText(/Nothing more is needed/)).toBeVisible();
	await expectNoViolations(page);
	await page.emulateMedia({ media: 'print' });
	await expectNoViolations(page);
});

test('going ahead against the verdict takes a named person and a reason', async ({ page }) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await expectNoViolations(page);
	await page.getByLabel('Who decided').fill(WHO);
	await expect(
		page.getByText('in words that the customer understands: at least 10 characters.')
	).toBeVisible();
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(page.getByRole('link', { name: SAY_WHY })).toBeVisible();
	await page.getByLabel('Reason').fill('duct');
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	const tooShort = 'Reason must have at least 10 characters: “duct” has 4.';
	await expect(page.getByRole('link', { name: tooShort })).toBeVisible();
	await expect(page.getByLabel('Who decided')).toHaveValue(WHO);
	await expectNoViolations(page);
	await page.getByLabel('Reason').fill(WHY);
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(page.getByText('Recommended and kept.')).toBeVisible();
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByText(`Decided by ${WHO}, entered by`)).toBeVisible();
	await expect(page.getByText(`Reason: ${WHY}`)).toBeVisible();
});

test('going against the maker’s word takes a named person and a reason, whatever the verdict', async ({
	page
}) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page, { mounts: 1 });
	const { battery, customer, version, ...job } = await ask(page, 'GET', `/api/v1/jobs/${jobId}`);
	expect(battery).toMatchObject({ underBonnet: 'excluded' });
	const { id: placeId } = job.place as { id: number };
	const mild = { placeId, hotDayMaxC: 14, dailyRangeK: 10, sunPeakWPerM2: 600, version };
	await ask(page, 'PUT', `/api/v1/jobs/${jobId}/climate`, mild);
	const [hot] = await assessAll(page, jobId);
	expect(hot!.verdict).not.toBe('cuts-out');
	await page.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await expect(page.getByText('This goes ahead against the maker’s word')).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Recommend it against the maker’s word' }).click();
	const although = 'although the battery’s maker does not allow it under the bonnet.';
	await expect(page.getByRole('link', { name: `Say why it goes ahead ${although}` })).toBeVisible();
	await page.getByLabel('Who decided').fill(WHO);
	await page.getByLabel('Reason').fill(WHY);
	await page.getByRole('button', { name: 'Recommend it against the maker’s word' }).click();
	await expect(page.getByText('Recommended and kept.')).toBeVisible();
	const { id, name, email, phone, version: seen } = customer as Record<string, unknown>;
	const renamed = { name: `Zoë ${String(name)}`, email, phone, version: seen };
	await ask(page, 'PUT', `/api/v1/customers/${String(id)}`, renamed);
	for (const path of [`/jobs/${jobId}/recommendation`, `/jobs/${jobId}/sheets`]) {
		await page.goto(path);
		await expect(page.getByText(`Made out to ${String(name)}`)).toBeVisible();
		await expect(page.getByText(`is called Zoë ${String(name)} now`)).toBeVisible();
		await expectNoViolations(page);
	}
	await page.goto(`/jobs/${jobId}/recommendation`);
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByText(`Goes ahead ${although}`)).toBeVisible();
	await expect(page.getByText(`Reason: ${WHY}`)).toBeVisible();
});

test('a later recommendation stands beside the one that a fitting is held against', async ({ page }) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const [hot] = await assessAll(page, jobId);
	const decision = { assessmentId: hot!.id, decidedBy: WHO, reason: WHY };
	await ask(page, 'POST', '/api/v1/recommendations', decision);
	const again = `/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`;
	await page.goto(again);
	await expect(page.getByText('Mount A has a recommendation already')).toBeVisible();
	await expect(page.getByText('What was fitted is held against')).toHaveCount(0);
	await ask(page, 'PUT', `/api/v1/mounts/${mountIds[0]}/fitting`, {
		...{ fittedOn: '2026-01-31', fittedBy: 'Ida Fenn', serialNumber: '', note: '' },
		...{ differences: [], version: null }
	});
	await page.goto(again);
	await expect(page.getByText('What was fitted is held against recommendation 1,')).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('Who decided').fill('Odo Marsh');
	await page.getByLabel('Reason').fill('The duct is in now, and it stays.');
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(page.getByText('What was fitted is held against an earlier one')).toBeVisible();
	await expectNoViolations(page);
	const before = page.getByRole('region', { name: 'Recommended before' });
	await expect(before.getByText(/held against this one; later came recommendation 2 on/)).toBeVisible();
	await before.getByRole('link', { name: 'Recommendation 1,' }).click();
	await expect(page.getByText(/held against this one; later came recommendation 2 on/)).toBeVisible();
	await page.getByRole('link', { name: /the later one$/ }).click();
	await expect(page.getByText('Decided by Odo Marsh, entered by')).toBeVisible();
	await expect(page.getByText('later came')).toHaveCount(0);
});

test('a recommendation whose day changed since says so, where it is shown and where it would be sent', async ({
	page
}) => {
	const { jobId } = await makeAssessableJob(page);
	const [, cool] = await assessAll(page, jobId);
	await ask(page, 'POST', '/api/v1/recommendations', { assessmentId: cool!.id });
	const shown = [`/jobs/${jobId}/recommendation`, `/jobs/${jobId}/sheets`];
	const notice = page.getByText('This recommendation is out of date');
	for (const path of shown) {
		await page.goto(path);
		await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
		await expect(notice).toHaveCount(0);
	}
	const { dayPlan } = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
	const { id: _, jobId: __, ...plan } = dayPlan as Record<string, unknown>;
	await ask(page, 'PUT', `/api/v1/jobs/${jobId}/day-plan`, { ...plan, startHour: 9 });
	for (const path of shown) {
		await page.goto(path);
		await expect(notice).toBeVisible();
	}
	await expectNoViolations(page);
});

test('it works without a script', async ({ browser, page, baseURL }) => {
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await plain.getByLabel('Reason').fill(WHY);
	await plain.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(plain.getByLabel('Reason')).toHaveValue(WHY);
	await plain.getByLabel('Who decided').fill(WHO);
	await plain.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(plain.getByText('Recommended and kept.')).toBeVisible();
	await context.close();
});

test('the paper is two pages of A4, even when there is as much to say as there can be', async ({ page }) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 6, legs: CROWDED_DAY });
	const mount = `/api/v1/mounts/${mountIds[0]}`;
	const { version } = await ask(page, 'GET', mount);
	await ask(page, 'PUT', `${mount}/cable`, { cable: CABLE, version });
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await page.getByLabel('Who decided').fill(WHO);
	await page
		.getByLabel('Reason')
		.fill('The trip is short and the shop knows the road well. '.repeat(19).trim());
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expect(page.getByText('16 mm² copper with insulation for')).toBeVisible();
	await expect(page.getByRole('img', { name: /nine in ten between/ })).toBeVisible();
	expect(await printPages(page)).toBe(2);
});
