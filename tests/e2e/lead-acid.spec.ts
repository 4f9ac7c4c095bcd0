import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { CROWDED_DAY, FLOODED, ask, assessAll, makeAssessableJob } from './assessable-job';
import { sendSheet } from './sent-sheet';
import { ONCE, expectNoViolations, openForm, signInAs } from './support';

const FIGURES = {
	...{ Length: '353', Width: '175', Height: '190', Mass: '27,5', Capacity: '95' },
	...{ 'Internal resistance': '5', 'Highest charge current': '25' },
	...{ 'Highest temperature for charging': '122 °F', 'Highest temperature for use': '60' },
	'Rated life at 25 °C': '6'
};
const CUT_OFF = 'Goes dark at';
/** What only a battery with a BMS does. */
const OF_A_BMS = /\bdark\b|[Cc]omes back|[Cc]uts? out|cut-off at|BMS measures/;

async function fillAgm(page: Page): Promise<string> {
	const model = `Mat ${randomUUID().slice(0, 8)}`;
	await page.getByLabel('Maker', { exact: true }).fill('Emberlow');
	await page.getByLabel('Model', { exact: true }).fill(model);
	for (const [label, text] of Object.entries(FIGURES))
		await page.getByLabel(label, { exact: true }).fill(text);
	return model;
}

async function saveAgm(page: Page, model: string): Promise<void> {
	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(page.getByRole('heading', { level: 1, name: `Emberlow ${model}` })).toBeVisible();
	await expect(page.getByLabel('Chemistry')).toHaveValue('lead-acid-agm');
	await expect(page.getByLabel('Highest temperature for charging')).toHaveValue('50');
	await expect(page.getByLabel('Its charger lowers the voltage')).toBeChecked();
}

/** Pages of A4 that the browser makes of it. */
async function countPaper(page: Page): Promise<number> {
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	return pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)?.length ?? 0;
}

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('the boxes follow the chemistry, and what is wrong is said of its own', async ({ page }) => {
	await openForm(page, '/batteries/new');
	await expect(page.getByLabel(CUT_OFF, { exact: true })).toBeVisible();
	await page.getByLabel('Chemistry').selectOption('Lead-acid, AGM');
	await expect(page.getByLabel(CUT_OFF, { exact: true })).toHaveCount(0);
	await expect(page.getByText('Sealed is not gas-tight')).toBeVisible();
	const model = await fillAgm(page);
	await page.getByLabel('Highest temperature for use').fill('40');
	await page.getByLabel('Its charger lowers the voltage').check();
	await page.getByRole('button', { name: 'Save the battery' }).click();
	await expect(
		page.getByRole('link', { name: 'Highest temperature for charging must be at most 40 °C' })
	).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('Highest temperature for use').fill('60');
	await saveAgm(page, model);
	await expectNoViolations(page);
	await page.goto('/batteries');
	await expect(page.getByRole('row').filter({ hasText: model })).toContainText('may be used up to 60');
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test('a button brings the boxes of the chemistry, and nothing typed is lost', ONCE, async ({ page }) => {
		await page.goto('/batteries/new');
		await page.getByLabel('Maker', { exact: true }).fill('Emberlow');
		await page.getByLabel('Mass', { exact: true }).fill('27,5');
		await page.getByLabel('Chemistry').selectOption('Lead-acid, AGM');
		await page.getByRole('button', { name: 'Show the boxes of this chemistry' }).click();
		await expect(page.getByLabel('Chemistry')).toHaveValue('lead-acid-agm');
		await expect(page.getByLabel('Maker', { exact: true })).toHaveValue('Emberlow');
		await expect(page.getByLabel('Mass', { exact: true })).toHaveValue('27,5');
		await expect(page.getByLabel(CUT_OFF, { exact: true })).toHaveCount(0);
		await expect(page.getByRole('alert')).toHaveCount(0);
		const model = await fillAgm(page);
		await page.getByLabel('Its charger lowers the voltage').check();
		await saveAgm(page, model);
	});

	test('saved with the boxes of another chemistry, the page says what is missing', ONCE, async ({ page }) => {
		await page.goto('/batteries/new');
		await page.getByLabel('Chemistry').selectOption('Lead-acid, gel');
		await page.getByRole('button', { name: 'Save the battery' }).click();
		await expect(page.getByRole('link', { name: 'Highest temperature for use is missing.' })).toBeVisible();
		await expect(page.getByLabel('Highest temperature for use')).toBeVisible();
		await expect(page.getByRole('link', { name: 'Goes dark at is missing.' })).toHaveCount(0);
	});
});

/** Both that speaks against it: the verdict, and the maker of the flooded battery. */
const AGAINST = 'it gets too hot and the battery’s maker does not allow it under the bonnet';

test('a mount that gets too hot says so everywhere, and nothing goes dark', async ({ page }) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page, { battery: FLOODED });
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/assessments/${String(hot!.id)}`);
	await expect(page.getByRole('heading', { level: 1, name: 'Gets too hot' })).toBeVisible();
	await expect(page.getByText(/hotter than the 60\s°C that it may have in use/)).toBeVisible();
	await expect(page.getByText('Charging voltage at the hottest')).toBeVisible();
	await expect(page.getByText(/Openings of 17\scm² low and high/)).toBeVisible();
	await expect(page.getByText('Vent it to the open')).toBeVisible();
	await expectNoViolations(page);

	await page.goto(`/jobs/${jobId}/compare`);
	await expect(page.getByRole('main')).toContainText('gets too hot', { ignoreCase: true });
	expect(await page.getByRole('main').innerText()).not.toMatch(OF_A_BMS);

	await page.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await expect(page.getByRole('link', { name: `Say why it goes ahead although ${AGAINST}.` })).toBeVisible();
	await page.getByLabel('Who decided').fill('Ilse Tarn');
	await page.getByLabel('Reason').fill('A duct and another charger follow before summer.');
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByText(`Goes ahead although ${AGAINST}.`)).toBeVisible();
	await expect(page.getByText('up to 60 °C; it has no BMS')).toBeVisible();
	expect(await page.getByRole('article').innerText()).not.toMatch(OF_A_BMS);
	expect(await countPaper(page)).toBe(2);
	await page.emulateMedia({ media: 'print' });
	await expectNoViolations(page);
});

test('the paper is two pages of A4 for a battery without a BMS too', ONCE, async ({ page }) => {
	test.slow();
	const { jobId } = await makeAssessableJob(page, { mounts: 6, legs: CROWDED_DAY, battery: FLOODED });
	const [hot] = await assessAll(page, jobId);
	await page.goto(`/jobs/${jobId}/recommendation?assessment=${String(hot!.id)}`);
	await page.getByLabel('Who decided').fill('Ilse Tarn');
	await page
		.getByLabel('Reason')
		.fill('The trip is short and the shop knows the road well. '.repeat(19).trim());
	await page.getByRole('button', { name: 'Recommend it against the verdict' }).click();
	await page.getByRole('link', { name: 'Print the recommendation' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Gets too hot' })).toBeVisible();
	expect(await countPaper(page)).toBe(2);
});

test(
	'the customer’s page stays on one sheet of paper for it, however much there is to say',
	ONCE,
	async ({ page }) => {
		test.slow();
		const { jobId } = await makeAssessableJob(page, { mounts: 6, battery: FLOODED });
		const { battery } = await ask(page, 'GET', `/api/v1/jobs/${jobId}`);
		const record = `/api/v1/batteries/${(battery as { id: number }).id}`;
		for (const [quoted, length] of [
			[20, 12],
			[20, 1000],
			[500, 400],
			[500, 1000]
		] as const) {
			const { id: _, ...now } = await ask(page, 'GET', record);
			const underBonnetWords = 'Not under a bonnet. '.repeat(25).slice(0, quoted);
			await ask(page, 'PUT', record, { ...now, underBonnetWords });
			const [hot] = await assessAll(page, jobId);
			const reason = 'No other place. '.repeat(63).slice(0, length);
			const decision = { assessmentId: hot!.id, decidedBy: 'Ilse Tarn', reason };
			const { id: recommendationId } = await ask(page, 'POST', '/api/v1/recommendations', decision);
			const { link } = await sendSheet(page, { jobId, recommendationId });
			await page.goto(link);
			await expect(page.getByRole('heading', { level: 1, name: 'Gets too hot' })).toBeVisible();
			expect(await countPaper(page), `${quoted} characters of the maker, ${length} of the shop`).toBe(1);
		}
	}
);
