import { execFileSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, signInAs, ONCE } from './support';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('an assessment says what happens, why, and what made it', async ({ page }) => {
	const { jobId, customerName } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/assessments/${String(hot!.id)}`);
	await expect(page.getByRole('heading', { level: 1, name: 'Cuts out' })).toBeVisible();
	await expect(page.getByText(/The fridge goes dark at \d\d:\d\d/)).toBeVisible();
	await expect(page.getByText(customerName)).toBeVisible();
	await expect(page.getByRole('img', { name: /The cells are hottest at/ }).first()).toBeVisible();
	for (const label of [
		'Headroom',
		'Cells hottest',
		'Goes dark',
		'Comes back',
		'Dark in all',
		'Charge missed'
	]) {
		await expect(page.getByRole('term').filter({ hasText: new RegExp(`^${label}$`) })).toBeVisible();
	}
	await expect(page.getByText('Not for engine compartments.').first()).toBeVisible();
	await expect(page.getByRole('link', { name: /^B: Behind seat/ })).toBeVisible();
	await expect(page.getByText('An estimate, not a certificate').first()).toBeVisible();
	await expect(page.getByText(String(hot!.inputsSha256))).toBeVisible();
	await expectNoViolations(page);
});

test('an assessment says beside its number how sure it is, how often, what it would take and how long it lives', async ({
	page
}) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	const address = `/assessments/${String(hot!.id)}`;
	await page.goto(address);
	const chapter = page.getByRole('region', { name: 'What the estimate says beside its number' });
	// Nobody asks for it again: the page itself hears when it is there.
	await expect(chapter.getByText(/^On .+ days like this the battery goes dark\.$/)).toBeVisible({
		timeout: 90_000
	});
	const outlook = await ask(page, 'GET', `/api/v1${address}/outlook`);
	const { daysOfTwenty } = outlook.day as { daysOfTwenty: number };
	expect(await chapter.locator('circle.dark').count()).toBe(daysOfTwenty);
	for (const title of [
		'In a year like the customer’s',
		'What it would take',
		'How hot a day, how long a drive',
		'What to measure first',
		'How it wears',
		'Cable and fuse in that heat'
	]) {
		await expect(chapter.getByRole('heading', { level: 3, name: title })).toBeVisible();
	}
	await expect(page.getByRole('img', { name: /nine in ten between/ }).first()).toBeVisible();
	await expect(page.getByRole('term').filter({ hasText: /^Cut-out days a year$/ })).toBeVisible();
	await chapter.getByText('How that settled as more days were drawn').click();
	await expect(chapter.getByRole('rowheader', { name: '128' })).toBeVisible();
	await expectNoViolations(page);
	await page.emulateMedia({ colorScheme: 'dark' });
	await expectNoViolations(page);
});

test('without a script the same is there when one looks again', async ({ browser, page, baseURL }) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page, { mounts: 1 });
	const [hot] = await assessAll(page, jobId);
	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/assessments/${String(hot!.id)}`);
	await expect(plain.getByText('It is being worked out, which takes some seconds.')).toBeVisible();
	await ask(page, 'GET', `/api/v1/assessments/${String(hot!.id)}/outlook`);
	await plain.getByRole('link', { name: 'Look again' }).click();
	await expect(plain.getByText(/^On .+ days like this the battery goes dark\.$/)).toBeVisible();
	await expect(plain.getByText('It is being worked out')).toHaveCount(0);
	await context.close();
});

test('what went in can be read, answer by answer and number by number', async ({ page }) => {
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/assessments/${String(hot!.id)}`);
	await page.getByText('The mount as it was surveyed').click();
	await expect(page.getByText('Gap to the exhaust')).toBeVisible();
	await page.getByText('How each number of the model came about').click();
	await expect(page.getByText(/coaxial parallel discs/).first()).toBeVisible();
	await expectNoViolations(page);
});

test('can be made again on the spot, digit for digit', ONCE, async ({ page }) => {
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/assessments/${String(hot!.id)}`);
	await page.getByRole('button', { name: 'Make it again and compare' }).click();
	await expect(page.getByText('every digit is the same')).toBeVisible();
});

test('says when it is out of date, and the mount is assessed again from there', async ({ page }) => {
	const { jobId } = await makeAssessableJob(page);
	const [hot] = await assessAll(page, jobId);
	const { dayPlan } = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
	await ask(page, 'PUT', `/api/v1/jobs/${jobId}/day-plan`, { ...(dayPlan as object), chargerMaxA: 20 });
	await page.goto(`/assessments/${String(hot!.id)}`);
	await expect(page.getByText('Out of date')).toBeVisible();
	await expect(page.getByRole('link', { name: 'Recommend this mount' })).toHaveCount(0);
	await page.getByRole('button', { name: 'Assess it as it is now' }).click();
	await page.waitForURL((url) => url.pathname !== `/assessments/${String(hot!.id)}`);
	await expect(page.getByText('Out of date')).toHaveCount(0);
	await expect(page.getByRole('link', { name: 'Recommend this mount' })).toBeVisible();
});

test('mounts stand side by side, figure by figure, and one is chosen', async ({ page, isMobile }) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page, { mounts: 3 });
	await page.goto(`/jobs/${jobId}/compare`);
	await page.getByRole('button', { name: 'Assess all surveyed mounts' }).click();
	const figures = isMobile ? page.locator('.narrow') : page.locator('table.wide');
	await expect(figures.getByText('cuts out').first()).toBeVisible();
	await expect(figures.getByText('rides it out').first()).toBeVisible();
	await expect(figures.getByText('Headroom').first()).toBeVisible();
	await expectNoViolations(page);
	await figures.getByRole('link', { name: 'Recommend B' }).click();
	await expect(page.getByRole('heading', { level: 1, name: /^Recommend mount B/ })).toBeVisible();
});

test(
	'the interface runs a scenario as the command line does, and refuses what cannot be',
	ONCE,
	async ({ page }) => {
		const scenario = { legs: [{ minutes: 240, engineOn: true, speedKmh: 90 }, { minutes: 240 }] };
		const file = join(tmpdir(), `soakline-${randomUUID()}.json`);
		writeFileSync(file, JSON.stringify(scenario));
		const printed = execFileSync('npm', ['run', '-s', 'simulate', '--', file], { encoding: 'utf8' });
		rmSync(file);
		expect(await ask(page, 'POST', '/api/v1/simulations', scenario)).toEqual(JSON.parse(printed));
		const post = (data: unknown) => page.request.post('/api/v1/simulations', { data });
		const refused = await post({ legs: [{ minutes: 60 }], battery: { cellHeatCapacity: 0 } });
		expect(refused.status()).toBe(422);
		expect(refused.headers()['content-type']).toContain('application/problem+json');
		expect(await refused.json()).toMatchObject({
			code: 'invalid_input',
			problems: [{ code: 'out_of_range', path: 'battery.cellHeatCapacity', value: 0 }]
		});
		const large = await post({ legs: [{ minutes: 60 }], note: 'x'.repeat(600_000) });
		expect(large.status()).toBe(413);
		expect(await large.json()).toMatchObject({ code: 'too_large' });
	}
);
