import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, signInAs } from './support';
import { newAddress, openLetter, readLink } from './sent-sheet';

/** What the tape measure and the eyes say, by the name of the box. */
const BY_THE_EXHAUST: Record<string, string> = {
	...{
		bayPlace: 'firewall-exhaust',
		exhaustFacing: 'square-on',
		exhaustGapMm: '60',
		exhaustSeenWidthMm: '30 cm'
	},
	...{ exhaustSeenHeightMm: '160', exhaustBatterySide: 'long-side', engineFacing: 'at-an-angle' },
	...{ engineGapMm: '4,7 in', engineSeenWidthMm: '450', engineSeenHeightMm: '280', engineBatterySide: 'end' },
	...{ bonnetGapMm: '60', bonnetLining: 'bare', airPath: 'closed-corner', trayMaterial: 'steel' },
	...{ trayThicknessMm: '3', trayLengthMm: '330', trayWidthMm: '185', trayMat: 'none' },
	...{ trayUnderside: 'inner-guard', shieldKind: 'none' }
};
const IN_THE_CABIN: Record<string, string> = { enclosureCooling: 'cooled', enclosureSun: 'unknown' };

async function answer(page: Page, name: string, value: string): Promise<void> {
	const chip = page.locator(`input[type="radio"][name="${name}"][value="${value}"]`);
	if ((await chip.count()) > 0) await chip.check();
	else await page.locator(`input[type="text"][name="${name}"]`).fill(value);
}

/** Answers one page of the survey after another, as they come, until the answers are shown for a check. */
async function survey(page: Page, answers: Record<string, string>): Promise<void> {
	for (let step = 0; !new URL(page.url()).pathname.endsWith('/check'); step++) {
		expect(step, 'the survey ends').toBeLessThan(8);
		const asked = await page
			.locator('form [name]')
			.evaluateAll((boxes) => boxes.map((box) => (box as HTMLInputElement).name));
		for (const [name, value] of Object.entries(answers))
			if (asked.includes(name)) await answer(page, name, value);
		const before = page.url();
		await page.getByRole('button', { name: /^Next: / }).click();
		await page.waitForURL((url) => url.href !== before);
	}
	await page.getByRole('button', { name: 'Finish the survey' }).click();
	await page.waitForURL(/\/jobs\/\d+([?#]|$)/);
}

async function addMount(
	page: Page,
	where: string,
	name: string,
	answers: Record<string, string>
): Promise<void> {
	await page.getByLabel(where).check();
	await page.getByLabel('What you call this position').fill(name);
	await page.getByRole('button', { name: 'Begin the survey' }).click();
	await page.waitForURL(/\/mounts\/\d+\/survey\//);
	await expectNoViolations(page);
	await survey(page, answers);
}

async function beginJob(page: Page, customer: string): Promise<void> {
	await page.goto('/jobs');
	await page.getByRole('link', { name: 'New job' }).click();
	await page.getByLabel('Customer name').fill(customer);
	await page.getByLabel('Make', { exact: true }).fill('Torrigan');
	await page.getByLabel('Model', { exact: true }).fill('Drover 9');
	await page.getByLabel('Year').fill('2021');
	await page.getByLabel('Engine layout').selectOption('inline');
	await page.getByLabel('Mass, loaded for touring').fill('3,1 t');
	await page.getByLabel('Drag area', { exact: true }).fill('1,4');
	await page.getByLabel('Trailer mass').fill('2400');
	await page.getByLabel('Drag area the trailer adds').fill('1.2');
	await page.getByRole('button', { name: 'Begin the job' }).click();
	await page.waitForURL(/\/jobs\/\d+$/);
}

test('the installer goes from a new job to a printed recommendation, the customer reads and acknowledges', async ({
	page,
	browser
}, { project }) => {
	test.setTimeout(240_000);
	const tag = randomUUID().slice(0, 8);
	const customer = `Perdita Thornquist ${tag}`;
	await signInAs(page, 'installer');
	await beginJob(page, customer);
	const jobUrl = page.url();

	await page.getByRole('link', { name: 'Choose the battery' }).click();
	await page.getByLabel(/Twelve-120/).check();
	await page.getByRole('button', { name: 'Take this battery' }).click();

	await page.getByRole('link', { name: 'Choose the place and hot day' }).click();
	await page.getByLabel('Place', { exact: true }).selectOption({ label: await alice(page) });
	await page.getByLabel('Hottest of the day').fill('42,5');
	await page.getByRole('button', { name: 'Take this day' }).click();

	await page.getByRole('link', { name: 'Draw the day' }).click();
	await page.getByRole('button', { name: /Long highway day, towing/ }).click();
	await page.getByRole('button', { name: 'Save the day', exact: true }).last().click();
	await page.waitForURL((url) => url.href.startsWith(jobUrl) && !url.pathname.endsWith('/day'));

	await page.getByRole('link', { name: 'Add the first position' }).click();
	await addMount(page, 'Under the bonnet', 'By the exhaust', BY_THE_EXHAUST);
	await page.goto(`${jobUrl}/mounts/new`);
	await addMount(page, 'In the cabin', 'Under the seat', IN_THE_CABIN);

	await page.goto(jobUrl);
	await page.getByRole('button', { name: 'Assess', exact: true }).click();
	await page.waitForURL(/\/compare/);
	await expect(page.getByText('By the exhaust').first()).toBeVisible();
	await expect(page.getByText('Under the seat').first()).toBeVisible();
	await expectNoViolations(page);

	await page.goto(`${jobUrl}/recommendation`);
	await page.getByRole('link', { name: 'Recommend B' }).click();
	await page.getByRole('button', { name: 'Recommend mount B' }).click();
	await expect(page.getByText('Recommended and kept.')).toBeVisible();
	const print = await page
		.getByRole('link', { name: /[Pp]rint/ })
		.first()
		.getAttribute('href');
	await page.goto(print ?? 'none');
	await expect(page.getByText(customer).first()).toBeVisible();
	await expect(page.getByText('Rides it out').first()).toBeVisible();
	if (project.name === 'desk')
		expect(countPages(await page.pdf({ format: 'A4', preferCSSPageSize: true }))).toBe(2);

	const sendTo = newAddress();
	await page.goto(`${jobUrl}/sheets`);
	await page.getByLabel('Send to').fill(sendTo);
	await page.getByRole('button', { name: /^Send/ }).click();
	await openLetter(page, sendTo);
	const link = await readLink(page);

	const phone = await browser.newContext();
	const reader = await phone.newPage();
	await reader.goto(link);
	await expect(reader.getByRole('heading', { level: 1, name: 'Rides it out' })).toBeVisible();
	await reader.getByLabel('Your name').fill(customer);
	await reader.getByLabel('I have read this page').check();
	await reader.getByRole('button', { name: 'Send it to the shop' }).click();
	await expect(reader.getByText(`Acknowledged by ${customer}`)).toBeVisible();
	await phone.close();

	await page.goto(jobUrl);
	await expect(page.getByText('The customer has acknowledged the sheet.')).toBeVisible();
});

/** The words of the list for the demo's desert. */
async function alice(page: Page): Promise<string> {
	await expect(page.getByRole('heading', { name: 'Where, and how hot?' })).toBeVisible();
	await page.waitForLoadState('networkidle');
	const words = await page.getByLabel('Place', { exact: true }).locator('option').allTextContents();
	return words.find((each) => each.includes('Alice Springs'))?.trim() ?? 'none';
}

const countPages = (pdf: Buffer): number =>
	pdf.toString('latin1').match(/\/Type\s*\/Page\b(?!s)/g)?.length ?? 0;

test('the engineer reads the book in force and makes an assessment again, to the last digit', async ({
	page
}) => {
	await signInAs(page, 'engineer');
	await page.goto('/books');
	await expectNoViolations(page);
	await page.getByRole('link', { name: /Thermal model defaults/ }).click();
	await expect(page.getByText(/Engineering judgement/).first()).toBeVisible();
	await page.goto('/assessments/1');
	await page.getByRole('button', { name: 'Make it again and compare' }).click();
	await expect(page.getByText('Made again from what was stored: every digit is the same.')).toBeVisible();
	const answer = await page.request.post('/api/v1/simulations', { data: { legs: [{ minutes: 60 }] } });
	expect(answer.status()).toBe(200);
	expect(await answer.json()).toMatchObject({ events: [], energy: {}, hourly: expect.any(Array) });
});

test('the manager sees every job by its verdict and climate, and the address keeps the question', async ({
	page
}) => {
	await signInAs(page, 'manager');
	// Other tests add jobs of this kind to the first page meanwhile: the search finds one among them.
	await page.goto('/jobs?search=Pell&verdict=cuts-out&zone=BWh');
	await expect(page.getByText('Ignatius Pell').first()).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/jobs?search=Dunmore&verdict=cuts-out&zone=BWh');
	await expect(page.getByText('Saffron Dunmore')).toHaveCount(0);
});

test('the customer signs in, finds their own page and nobody else’s', async ({ page }) => {
	await signInAs(page, 'customer');
	await expect(page).toHaveURL(/\/my$/);
	await expectNoViolations(page);
	await page
		.getByRole('link', { name: /Torrigan Drover 4/ })
		.first()
		.click();
	await expect(page.getByRole('heading', { level: 1, name: 'Rides it out' })).toBeVisible();
	await expect(page.getByText(/Acknowledged by Odile Vantongeren/)).toBeVisible();
	const pdf = await page.pdf({ format: 'A4', printBackground: false, preferCSSPageSize: true });
	expect(pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)).toHaveLength(1);
	expect((await page.request.get('/jobs')).status()).toBe(403);
});
