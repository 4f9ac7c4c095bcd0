import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { makeAssessableJob, assessAll } from './assessable-job';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';

const ownName = (): string => `Ana ${randomUUID().slice(0, 8)}`;

async function fillNewVehicle(page: Page, customer: string): Promise<void> {
	const form = page.locator('form', { hasText: 'What the engine has to move' });
	await form.getByLabel('Customer name').fill(customer);
	await form
		.getByLabel('Customer e-mail')
		.fill(`${customer.replace(' ', '.').toLowerCase()}@travellers.example`);
	await form.getByLabel('Make', { exact: true }).fill('Farrow');
	await form.getByLabel('Model', { exact: true }).fill('Drover');
	await form.getByLabel('Year').fill('2019');
	await form.getByLabel('Mass, loaded for touring').fill('3.1 t');
	await form.getByLabel('Drag area', { exact: true }).fill('1,25');
}

async function beginJob(page: Page, customer: string): Promise<void> {
	await openForm(page, '/jobs/new');
	await fillNewVehicle(page, customer);
	await page.getByRole('button', { name: 'Begin the job' }).click();
	await expect(page.getByRole('heading', { level: 1, name: customer })).toBeVisible();
}

const rowOf = (page: Page, customer: string) => page.getByRole('row').filter({ hasText: customer });

test.describe('with a script', () => {
	test.beforeEach(({ page }) => signInAs(page, 'installer'));

	test('a job is begun in one form, and its sheet says what to do next, step by step', async ({ page }) => {
		const customer = ownName();
		await beginJob(page, customer);
		await expect(page.getByText('3.1 t loaded')).toBeVisible();
		await expectNoViolations(page);

		await page.getByRole('link', { name: 'Choose the battery' }).click();
		await expectNoViolations(page);
		await page.getByRole('radio', { name: 'Veltissa Camp 100' }).check();
		await expect(page.getByText('The maker excludes under-bonnet use')).toBeVisible();
		await page.getByRole('radio', { name: 'Quendar Q100 Bay' }).check();
		await expect(page.getByText('Read the maker’s conditions')).toBeVisible();
		await page.getByRole('button', { name: 'Take this battery' }).click();

		await page.getByRole('link', { name: 'Choose the place and hot day' }).click();
		await expectNoViolations(page);
		await page
			.getByLabel('Place', { exact: true })
			.selectOption({ label: 'Darwin, Northern Territory: Hot, with a dry season (Aw)' });
		await expect(page.getByLabel('Hottest of the day')).toHaveValue('36');
		await page.getByLabel('Hottest of the day').fill('100 °F');
		await page.getByRole('button', { name: 'Take this day' }).click();
		await expect(page.getByText('Darwin, 38 °C')).toBeVisible();
		await expect(page.getByRole('link', { name: 'Draw the day' })).toHaveAttribute(
			'href',
			/\/jobs\/\d+\/day$/
		);
	});

	test('a form that is wrong says where, and keeps every word', async ({ page }) => {
		await openForm(page, '/jobs/new');
		await fillNewVehicle(page, ' ');
		await page.getByLabel('Year').fill('soon');
		await page.getByRole('button', { name: 'Begin the job' }).click();
		await expect(page).toHaveTitle(/^Error: New job/);
		await expect(page.getByRole('link', { name: 'Customer name is missing.' })).toBeVisible();
		await page.getByRole('link', { name: 'Year must be a number from' }).click();
		await expect(page.getByLabel('Year')).toBeFocused();
		await expect(page.getByLabel('Year')).toHaveValue('soon');
		await expect(page.getByLabel('Mass, loaded for touring')).toHaveValue('3.1 t');
		await expectNoViolations(page);
	});

	test('a typical body fills the boxes of mass and drag area', async ({ page }) => {
		await openForm(page, '/jobs/new');
		await page.getByLabel('A body like').selectOption('Wagon');
		await expect(page.getByLabel('Mass, loaded for touring')).toHaveValue('2200');
		await expect(page.getByLabel('Drag area', { exact: true })).toHaveValue('0.9');
		await page.getByLabel('Behind it, something like').selectOption('Low camper trailer');
		await expect(page.getByLabel('Trailer mass')).toHaveValue('1500');
	});

	test('a vehicle that the shop knows needs a word and a button', async ({ page }) => {
		const customer = ownName();
		await beginJob(page, customer);
		await openForm(page, '/jobs/new');
		await page.getByLabel('Registration, customer, make or model').pressSequentially(customer);
		await expect(page.getByRole('listitem').filter({ hasText: customer })).toHaveCount(1);
		await expectNoViolations(page);
		await page.getByRole('button', { name: `Begin a job on Farrow Drover 2019 of ${customer}` }).click();
		await expect(page.getByRole('heading', { level: 1, name: customer })).toBeVisible();
		await page.goto(`/jobs?search=${encodeURIComponent(customer)}`);
		await expect(rowOf(page, customer)).toHaveCount(2);
	});

	test('the list is filtered through the API, the address keeps it, and back goes back', async ({ page }) => {
		const customer = ownName();
		await beginJob(page, customer);
		await page.goto('/jobs');
		await expectNoViolations(page);
		const asked = page.waitForResponse((response) => response.url().includes('/api/v1/jobs?search='));
		await page.getByLabel('with the words').pressSequentially(customer);
		expect((await asked).status()).toBe(200);
		await expect(page.getByText('1 job', { exact: true })).toBeVisible();
		await expect(page).toHaveURL(/search=Ana/);
		await page.getByLabel('Verdict').selectOption('cut out or get too hot');
		await expect(page.getByText('No job is like that')).toBeVisible();
		await expect(page).toHaveURL(/verdict=cuts-out/);
		await page.goBack();
		await expect(page.getByLabel('Verdict')).toHaveValue('');
		await rowOf(page, customer).getByRole('link').click();
		await expect(page.getByRole('heading', { level: 1, name: customer })).toBeVisible();
		await page.goBack();
		await expect(rowOf(page, customer)).toHaveCount(1);
	});

	test('the list is ordered from its sentence', async ({ page }) => {
		await openForm(page, '/jobs?verdict=cuts-out&sort=least-headroom');
		const headrooms = async () => {
			const texts = await page.getByRole('cell').filter({ hasText: /K$/ }).allInnerTexts();
			return texts.map((text) => Number(text.replace('−', '-').replace(/[^\d.-]/g, '')));
		};
		await expect(page.getByRole('row').nth(1)).toBeVisible();
		const rising = await headrooms();
		expect(rising.at(-1)).toBeGreaterThan(rising[0]!);
		expect(rising).toEqual([...rising].sort((a, b) => a - b));
		await page.getByLabel('Order').selectOption('most headroom first');
		await expect(page).toHaveURL(/sort=most-headroom/);
		// Jobs that other tests begin meanwhile may have joined the list: it is held to its own order.
		await expect.poll(async () => (await headrooms())[0]).toBeGreaterThan(rising[0]!);
		const falling = await headrooms();
		expect(falling).toEqual([...falling].sort((a, b) => b - a));
	});

	test('a list that cannot be asked for says why and leads back', async ({ page }) => {
		await page.goto('/jobs?cursor=made-up');
		await expect(page.getByText('This page of the list cannot be found')).toBeVisible();
		await page.getByRole('link', { name: 'Show all jobs' }).click();
		await expect(page.getByRole('table', { name: 'Jobs' })).toBeVisible();
	});

	test('a job that changed after its assessment says so and asks for another', async ({ page }) => {
		const { jobId } = await makeAssessableJob(page);
		await assessAll(page, jobId);
		await page.goto(`/jobs/${jobId}`);
		await expect(page.getByText('Changed since the last assessment')).toHaveCount(0);
		await expectNoViolations(page);
		await openForm(page, `/jobs/${jobId}/climate`);
		await page.getByLabel('Hottest of the day').fill('31');
		await page.getByRole('button', { name: 'Take this day' }).click();
		await expect(page.getByText('Here the hot day is no longer what the verdicts')).toBeVisible();
		await page.getByRole('button', { name: 'Assess again' }).click();
		await page.waitForURL(/compare/);
		await page.goto(`/jobs/${jobId}`);
		await expect(page.getByText('Changed since the last assessment')).toHaveCount(0);
	});

	test('the customer and the vehicle of a job can be put right', async ({ page }) => {
		const customer = ownName();
		await beginJob(page, customer);
		await page.getByRole('link', { name: 'Change customer' }).click();
		await expectNoViolations(page);
		await page.getByLabel('Customer phone').fill('00 0000 0303');
		await page.getByRole('button', { name: 'Save the customer' }).click();
		await expect(page.getByText('00 0000 0303')).toBeVisible();
		await page.getByRole('link', { name: 'Change vehicle' }).click();
		await expectNoViolations(page);
		await page.getByLabel('Trailer mass').fill('1500');
		await page.getByRole('button', { name: 'Save the vehicle' }).click();
		await expect(page.getByText('1.5 t behind it')).toBeVisible();
	});
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test('a second press of the button begins no second job', ONCE, async ({ page }) => {
		await signInAs(page, 'installer');
		await page.goto('/jobs/new');
		await fillNewVehicle(page, ownName());
		const sent = page.waitForRequest((request) => request.method() === 'POST');
		await page.getByRole('button', { name: 'Begin the job' }).click();
		await page.waitForURL(/\/jobs\/\d+$/);
		const again = await page.request.fetch(await sent, { maxRedirects: 0 });
		expect(await again.json()).toMatchObject({ type: 'redirect', location: new URL(page.url()).pathname });
	});

	test('a job is begun, found in the list and given its hot day', async ({ page }) => {
		const customer = ownName();
		await signInAs(page, 'installer');
		await beginJob(page, customer);
		await page
			.getByRole('link', { name: 'Change place' })
			.or(page.getByRole('link', { name: /Choose place/ }))
			.first()
			.click();
		await page.getByRole('link', { name: 'Cape Town' }).click();
		await expect(page.getByLabel('Hottest of the day')).toHaveValue('36');
		await page.getByRole('button', { name: 'Take this day' }).click();
		await expect(page.getByText('Cape Town, 36 °C')).toBeVisible();
		await page.goto('/jobs');
		await page.getByLabel('with the words').fill(customer);
		await page.getByLabel('Climate').selectOption('Mild wet winters, hot dry summers (Csa)');
		await page.getByRole('button', { name: 'Look' }).click();
		await expect(rowOf(page, customer)).toHaveCount(1);
		await expect(page.getByText('1 job', { exact: true })).toBeVisible();
	});
});
