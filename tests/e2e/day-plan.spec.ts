import { expect, test, type Page } from '@playwright/test';
import { ask, makeAssessableJob } from './assessable-job';
import { expectNoViolations, signInAs, ONCE } from './support';

const legs = (page: Page) =>
	page
		.getByRole('list')
		.filter({ has: page.locator('[id^="leg-"]') })
		.getByRole('listitem');
const opener = (page: Page, leg: number) =>
	legs(page)
		.nth(leg - 1)
		.getByRole('button', { expanded: false });
const verdict = (page: Page) => page.getByText(/^(Rides it out|Runs close|Cuts out)$/);
const save = (page: Page) => page.getByRole('button', { name: 'Save the day' }).last();

const kindsOf = (page: Page): Promise<string[]> => legs(page).locator('b').allTextContents();

async function openDay(page: Page, mounts = 1): Promise<number> {
	const { jobId } = await makeAssessableJob(page, { mounts });
	await page.goto(`/jobs/${jobId}/day`);
	await expect(page.getByRole('heading', { level: 1, name: 'The hot day' })).toBeVisible();
	return jobId;
}

async function storedLegs(page: Page, jobId: number): Promise<Record<string, unknown>[]> {
	const { dayPlan } = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
	return (dayPlan as { legs: Record<string, unknown>[] }).legs;
}

test.describe('with a script', () => {
	test.beforeEach(({ page }) => signInAs(page, 'installer'));

	test('a template becomes the day, is changed leg by leg, and is saved', async ({ page }) => {
		const jobId = await openDay(page);
		await expect(verdict(page)).toBeVisible();
		await expectNoViolations(page);
		await page.getByText('Begin with a template').click();
		await page.getByRole('button', { name: 'Use Short hops with stops' }).click();
		await expect(page.getByLabel('Name of the day')).toHaveValue('Short hops with stops');
		await expect(page.getByText('Your legs were replaced')).toBeVisible();

		const first = legs(page).first();
		await first.getByLabel('Length').fill('1 h');
		await first.getByLabel('Surface').selectOption('Gravel');
		await opener(page, 2).click();
		const second = legs(page).nth(1);
		await second.getByLabel('Bonnet up').check();
		await expectNoViolations(page);
		await save(page).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
		const [one, two] = await storedLegs(page, jobId);
		expect(one).toMatchObject({ kind: 'drive', minutes: 60, surface: 'gravel' });
		expect(two).toMatchObject({ kind: 'stop', bonnetOpen: true, speedKmh: 0 });
	});

	test('a leg that was removed, and legs that a template replaced, come back', async ({ page }) => {
		await openDay(page);
		const before = await kindsOf(page);
		await expect(verdict(page)).toBeVisible();
		await opener(page, 2).click();
		await page.getByRole('button', { name: 'Remove leg 2' }).click();
		await expect(page.getByText('Leg 2, stop, was removed.')).toBeVisible();
		await expect(legs(page)).toHaveCount(before.length - 1);
		await page.getByRole('button', { name: 'Put it back' }).click();
		expect(await kindsOf(page)).toEqual(before);

		await page.getByText('Begin with a template').click();
		await page.getByRole('button', { name: 'Use Corrugated track day' }).click();
		await page.getByRole('button', { name: 'Put it back' }).click();
		expect(await kindsOf(page)).toEqual(before);
	});

	test('legs change places by keys', async ({ page }) => {
		await openDay(page);
		await expect(verdict(page)).toBeVisible();
		const before = await kindsOf(page);
		const later = page.getByRole('button', { name: 'Leg 1 later' });
		await later.focus();
		await page.keyboard.press('Enter');
		await expect(page.getByText('Leg 1 is now leg 2')).toBeAttached();
		expect(await kindsOf(page)).toEqual([before[1], before[0], ...before.slice(2)]);
		await expect(page.getByRole('button', { name: 'Leg 2 later' })).toBeFocused();
	});

	test('legs change places by dragging', async ({ page }) => {
		await openDay(page);
		await expect(verdict(page)).toBeVisible();
		const before = await kindsOf(page);
		await legs(page).first().getByRole('button', { expanded: true }).click();
		const grip = legs(page).first().locator('.grip');
		await grip.scrollIntoViewIfNeeded();
		const from = (await grip.boundingBox())!;
		const to = (await legs(page).nth(1).boundingBox())!;
		await page.mouse.move(from.x + from.width / 2, from.y + from.height / 2);
		await page.mouse.down();
		await page.mouse.move(from.x + from.width / 2, to.y + to.height / 2, { steps: 6 });
		await page.mouse.up();
		expect(await kindsOf(page)).toEqual([before[1], before[0], ...before.slice(2)]);
	});

	test('the boundary between two legs moves by keys, five minutes a press', async ({ page }) => {
		const jobId = await openDay(page);
		await expect(verdict(page)).toBeVisible();
		const boundary = page.getByRole('slider', { name: 'Between leg 1 and leg 2' });
		await boundary.focus();
		await page.keyboard.press('ArrowLeft');
		await page.keyboard.press('ArrowLeft');
		await expect(boundary).toHaveAttribute('aria-valuetext', /^09:20, leg 1 lasts 2\u202Fh 20\u202Fmin$/);
		await save(page).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
		const [one, two] = await storedLegs(page, jobId);
		expect([one?.minutes, two?.minutes]).toEqual([140, 30]);
	});

	test('the boundary between two legs is dragged along the strip', async ({ page }) => {
		const jobId = await openDay(page);
		await expect(verdict(page)).toBeVisible();
		const boundary = page.getByRole('slider', { name: 'Between leg 1 and leg 2' });
		await boundary.evaluate((slider) => slider.scrollIntoView({ block: 'center' }));
		const circle = (await boundary.locator('circle').boundingBox())!;
		await page.mouse.move(circle.x + circle.width / 2, circle.y + circle.height / 2);
		await page.mouse.down();
		await page.mouse.move(circle.x - 200, circle.y, { steps: 8 });
		await page.mouse.up();
		await save(page).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
		const [one, two] = await storedLegs(page, jobId);
		expect(Number(one?.minutes)).toBeLessThan(150);
		expect(Number(one?.minutes) % 5).toBe(0);
		expect(Number(one?.minutes) + Number(two?.minutes)).toBe(170);
	});

	test('the curve follows the day, for the position that is chosen', async ({ page }) => {
		await openDay(page, 2);
		const line = page.getByRole('status').filter({ has: verdict(page) });
		await expect(line).toHaveText(/°C at/);
		const before = await line.innerText();
		await page.getByLabel('Shown for').selectOption({ index: 1 });
		await expect(line).not.toHaveText(before);
		const cabin = await line.innerText();
		await page.getByLabel('Charger').fill('0');
		await expect(line).not.toHaveText(cabin);
		await page.getByLabel('Charger').fill('a lot');
		await expect(page.getByText('cannot be read yet')).toBeVisible();
	});

	test('what is wrong is named leg by leg, and its leg opens', async ({ page }) => {
		await openDay(page);
		await expect(verdict(page)).toBeVisible();
		await opener(page, 3).click();
		await legs(page).nth(2).getByLabel('Length').fill('all day');
		await opener(page, 1).click();
		await save(page).click();
		const problem = page.getByRole('link', { name: 'Leg 3: Length must be a number of min from 1 to 1440.' });
		await expect(problem).toBeVisible();
		await expect(page).toHaveTitle(/^Error: /);
		await expect(legs(page).nth(2).getByLabel('Length')).toHaveValue('all day');
		await expect(legs(page).nth(2).getByLabel('Length')).toBeVisible();
		await expectNoViolations(page);
	});

	test(
		'a day that somebody else changed meanwhile is not lost, and not overwritten unasked',
		ONCE,
		async ({ page }) => {
			const jobId = await openDay(page);
			await expect(verdict(page)).toBeVisible();
			await page.getByLabel('Name of the day').fill('Mine');
			const { dayPlan } = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
			const { id: _, jobId: __, ...theirs } = dayPlan as Record<string, unknown>;
			await ask(page, 'PUT', `/api/v1/jobs/${jobId}/day-plan`, { ...theirs, name: 'Theirs' });
			await save(page).click();
			await expect(page.getByText('Somebody changed this day')).toBeVisible();
			await expect(page.getByLabel('Name of the day')).toHaveValue('Mine');
			const between = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
			expect(between.dayPlan).toMatchObject({ name: 'Theirs' });
			await save(page).click();
			await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
			const after = await ask(page, 'GET', `/api/v1/jobs/${jobId}/day-plan`);
			expect(after.dayPlan).toMatchObject({ name: 'Mine' });
		}
	);

	test('what was changed outlives the page until it is saved', async ({ page }) => {
		await openDay(page);
		await expect(verdict(page)).toBeVisible();
		await page.getByLabel('Name of the day').fill('Half drawn');
		await expect(page.getByText(/Saved on this phone/)).toBeVisible();
		await page.reload();
		await expect(page.getByText('was still on this phone')).toBeVisible();
		await expect(page.getByLabel('Name of the day')).toHaveValue('Half drawn');
		await page.getByRole('button', { name: 'Use what was saved instead' }).click();
		await expect(page.getByLabel('Name of the day')).toHaveValue('Long hot day, towing');
	});
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test('legs are added, moved, removed and put back by buttons, and nothing typed is lost', async ({
		page
	}) => {
		await signInAs(page, 'installer');
		const jobId = await openDay(page);
		const before = await legs(page).count();
		await page.getByLabel('Name of the day').fill('Drawn by hand');
		await page.getByLabel('Length').first().fill('two hours');
		await page.getByRole('button', { name: 'Add a leg' }).click();
		await expect(legs(page)).toHaveCount(before + 1);
		await expect(page.getByLabel('Name of the day')).toHaveValue('Drawn by hand');
		await page.getByRole('button', { name: 'Leg 1 later' }).click();
		await expect(page.getByLabel('Length').nth(1)).toHaveValue('two hours');
		await page.getByRole('button', { name: 'Remove leg 2' }).click();
		await expect(legs(page)).toHaveCount(before);
		await page.getByRole('button', { name: 'Put it back' }).click();
		await expect(page.getByLabel('Length').nth(1)).toHaveValue('two hours');
		await save(page).click();
		await expect(
			page.getByRole('link', { name: 'Leg 2: Length must be a number of min from 1 to 1440.' })
		).toBeVisible();
		await page.getByLabel('Length').nth(1).fill('2 h');
		await save(page).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
		const stored = await storedLegs(page, jobId);
		expect(stored).toHaveLength(before + 1);
		expect(stored[1]).toMatchObject({ kind: 'drive', minutes: 120 });
	});

	test('an empty day begins with a template', async ({ page }) => {
		await signInAs(page, 'installer');
		const job = await ask(page, 'POST', '/api/v1/jobs', {
			...{ customerName: 'Bram Oster', make: 'Marlow', model: 'Ridge', modelYear: 2018 },
			...{ engineLayout: 'inline', massKg: 2900, dragAreaM2: 1.3, towMassKg: 0, towDragAreaM2: 0 }
		});
		await page.goto(`/jobs/${String(job.id)}/day`);
		await save(page).click();
		await expect(page.getByText('A day needs at least one leg.').first()).toBeVisible();
		await page.getByRole('button', { name: 'Use Two days on the road' }).click();
		await save(page).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${String(job.id)}`);
		expect((await storedLegs(page, job.id as number)).length).toBeGreaterThan(8);
	});
});
