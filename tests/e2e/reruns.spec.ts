import { expect, test, type Browser, type Page } from '@playwright/test';
import { ask, makeAssessableJob } from './assessable-job';
import { readMail } from './mailed';
import { expectNoViolations, ONCE, signInAs } from './support';

type Json = Record<string, unknown>;
const BODY = 'Hello Ilse,\n\nplease ring us before your next hot trip.';

async function open(
	browser: Browser,
	baseURL: string | undefined,
	role: 'engineer' | 'manager'
): Promise<Page> {
	const context = await browser.newContext({ baseURL: baseURL! });
	const page = await context.newPage();
	await signInAs(page, role);
	return page;
}

/** A job whose engine layout no other test has, assessed with the demo’s book for that. */
async function makeLoneJob(page: Page, email: string) {
	const { jobId, customerName } = await makeAssessableJob(page, { mounts: 1 });
	const job = await ask(page, 'GET', `/api/v1/jobs/${jobId}`);
	const { id: vehicleId, ...vehicle } = job.vehicle as Json;
	await ask(page, 'PUT', `/api/v1/vehicles/${String(vehicleId)}`, { ...vehicle, engineLayout: 'flat' });
	const { id: customerId, ...customer } = job.customer as Json;
	await ask(page, 'PUT', `/api/v1/customers/${String(customerId)}`, { ...customer, email });
	await ask(page, 'POST', `/api/v1/jobs/${jobId}/assessments`);
	return { jobId, customerName };
}

/** A book for flat engines under the bonnet in which the exhaust hardly radiates, on trial. */
async function putOnTrial(engineer: Page, name: string): Promise<number> {
	const { rows } = (await ask(engineer, 'GET', '/api/v1/books')) as {
		rows: { id: number; number: number }[];
	};
	const fromBookId = rows.find(({ number }) => number === 1)!.id;
	const scope = { engineLayout: 'flat', positionKind: 'under-bonnet' };
	const draft = await ask(engineer, 'POST', '/api/v1/books', { fromBookId, name, note: '', ...scope });
	const path = `/api/v1/books/${String(draft.id)}`;
	const changed = await ask(engineer, 'PUT', `${path}/coefficients/exhaust.emissivity`, {
		...{ value: 0.05, origin: 'judgement', source: 'Made up for this test.', version: draft.version }
	});
	await ask(engineer, 'PUT', `${path}/state`, { to: 'on-trial', version: changed.version });
	return draft.id as number;
}

test(
	'a book comes into force, its mounts are assessed again, and a customer hears that the verdict changed',
	ONCE,
	async ({ page, browser, baseURL }) => {
		test.slow();
		const email = `reader-${Date.now()}@travellers.example`;
		await signInAs(page, 'installer');
		const { customerName } = await makeLoneJob(page, email);
		const engineer = await open(browser, baseURL, 'engineer');
		const bookId = await putOnTrial(engineer, `Flat ${Date.now()}`);

		const manager = await open(browser, baseURL, 'manager');
		await manager.goto(`/books/${bookId}`);
		await manager.getByRole('button', { name: 'Put it in force' }).click();
		await manager.getByRole('link', { name: /came into force$/ }).click();
		await expect(
			manager.getByRole('heading', { level: 1, name: /came into force: assessed again$/ })
		).toBeVisible();
		await expect(manager.getByText(/^Done, /)).toBeVisible({ timeout: 60_000 });
		await expectNoViolations(manager);

		await engineer.goto('/reruns');
		await expectNoViolations(engineer);
		await engineer.goto(manager.url());
		await engineer.getByRole('link', { name: new RegExp(`${customerName}$`) }).click();
		await expect(engineer.getByText('Cuts out', { exact: true })).toBeVisible();
		await expect(engineer.getByText('The customer was sent no page.')).toBeVisible();
		await expectNoViolations(engineer);
		await expect(engineer.getByRole('textbox', { name: 'Letter', exact: true })).toHaveValue(
			/an estimate, not a certificate/
		);
		await engineer.getByRole('textbox', { name: 'Letter', exact: true }).fill('');
		await engineer.getByRole('button', { name: 'Send it' }).click();
		await expect(engineer.getByText('Letter is missing.').first()).toBeVisible();
		await engineer.getByRole('textbox', { name: 'Letter', exact: true }).fill(BODY);
		await engineer.getByRole('button', { name: 'Send it' }).click();
		await expect(engineer.getByText(/^A letter went to the customer: /)).toBeVisible();
		await expect.poll(() => readMail(email).length, { timeout: 20_000 }).toBe(1);
		expect(readMail(email)[0]).toContain('please ring us before your next hot trip.');

		await manager.reload();
		await expect(manager.getByRole('row', { name: new RegExp(customerName) })).toContainText(/by letter/i);
		await expectNoViolations(manager);
		for (const each of [engineer, manager]) await each.context().close();
	}
);

test('what a book changed can be read without a script, and told otherwise', async ({ browser, baseURL }) => {
	const context = await browser.newContext({ baseURL: baseURL!, javaScriptEnabled: false });
	const page = await context.newPage();
	await signInAs(page, 'engineer');
	await page.goto('/books');
	await page.getByRole('link', { name: 'Assessed again' }).click();
	await page.getByRole('link', { name: /^Book 2 came into force/ }).click();
	await page.getByRole('link', { name: /Perpetua Lindqvale$/ }).click();
	await expect(page.getByText('Rides it out', { exact: true })).toBeVisible();
	await expect(page.getByRole('link', { name: 'The one of before' })).toBeVisible();
	await context.close();
});
