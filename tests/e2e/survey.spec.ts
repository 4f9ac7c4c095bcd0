import { expect, test, type Page } from '@playwright/test';
import { ask, makeAssessableJob } from './assessable-job';
import { expectNoViolations, personOf, signInAs, signInWith, ONCE } from './support';

/** Under the bonnet, as far as the air path. */
const BEFORE_THE_TRAY = {
	...{ positionKind: 'under-bonnet', bayPlace: 'firewall', exhaustFacing: 'at-an-angle' },
	...{ exhaustGapMm: 180, exhaustSeenWidthMm: 177.8, exhaustSeenHeightMm: 'unknown' },
	...{ exhaustBatterySide: 'end', engineFacing: 'hidden', bonnetGapMm: 45, bonnetLining: 'lined' },
	airPath: 'some-through-flow'
};

const next = (page: Page) => page.getByRole('button', { name: /^(Next|Save)/ });
const verdict = (page: Page) => page.getByText(/^(Rides it out|Runs close|Cuts out)$/);

async function begin(page: Page, kind = 'Under the bonnet'): Promise<{ jobId: number; mountId: number }> {
	const { jobId } = await makeAssessableJob(page, { mounts: 0 });
	await page.goto(`/jobs/${jobId}/mounts/new`);
	await page.getByLabel(kind).check();
	await page.getByLabel('What you call this position').fill('Left guard');
	await page.getByRole('button', { name: 'Begin the survey' }).click();
	await page.waitForURL(/\/survey\/\w+$/);
	return { jobId, mountId: Number(/mounts\/(\d+)/.exec(page.url())?.[1]) };
}

async function go(page: Page, step: string): Promise<void> {
	await page.waitForURL((url) => url.pathname.endsWith(`/survey/${step}`));
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
}

/** Everything that a thumb aims at, with its height; what only readers see is not aimed at. */
const smallTargets = (page: Page): Promise<string[]> =>
	page.locator('main').evaluate((main) => {
		const targets = [
			...main.querySelectorAll<HTMLElement>('a, button, summary, label:has(input), input[type=text]')
		];
		return targets
			.filter((target) => target.checkVisibility() && !target.closest('.visually-hidden'))
			.filter((target) => target.getBoundingClientRect().height < 56)
			.map((target) => `${target.tagName} ${target.textContent.trim()}`);
	});

const isTooWide = (page: Page): Promise<boolean> =>
	page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);

test.describe('with a script', () => {
	test.beforeEach(({ page }) => signInAs(page, 'installer'));

	test('a position is named and surveyed by thumb, one question a page', async ({ page }) => {
		await begin(page);
		await go(page, 'place');
		await expect(page.getByText('1 of 7')).toBeVisible();
		await page.getByLabel('By the firewall, on the exhaust side').check();
		await expect(verdict(page)).toBeVisible();
		await page.getByRole('button', { name: 'Next: exhaust' }).click();

		await go(page, 'exhaust');
		await page.getByLabel('At an angle').check();
		await page.getByRole('textbox', { name: 'Gap to the exhaust' }).fill('18 cm');
		await page.getByRole('textbox', { name: 'Width of hot pipe in view' }).fill('7 in');
		await page.getByLabel('Height of hot pipe in view: I do not know').check();
		await page.getByLabel('A long side').check();
		await expect(verdict(page)).toBeVisible();
		await expectNoViolations(page);
		await next(page).click();

		await go(page, 'engine');
		await page.getByLabel('Hidden behind something').check();
		await expect(page.getByRole('textbox', { name: 'Gap to the engine' })).toBeHidden();
		await next(page).click();

		await go(page, 'bonnet');
		await page.getByRole('button', { name: 'More: Gap up to the bonnet' }).click();
		await page.getByRole('button', { name: 'More: Gap up to the bonnet' }).click();
		await expect(page.getByRole('textbox', { name: 'Gap up to the bonnet' })).toHaveValue('45');
	});

	test('the last questions lead to all answers, each of which can be changed before the end', async ({
		page
	}) => {
		const { jobId, mountId } = await begin(page);
		const { version } = await ask(page, 'GET', `/api/v1/mounts/${mountId}`);
		await ask(page, 'PUT', `/api/v1/mounts/${mountId}/survey`, {
			...{ survey: BEFORE_THE_TRAY, complete: false, version }
		});
		await page.goto(`/mounts/${mountId}/survey`);
		await go(page, 'tray');
		await expect(verdict(page)).toBeVisible();
		for (const unknown of await page.getByLabel('I do not know').all()) await unknown.check();
		await next(page).click();
		await go(page, 'shield');
		await page.getByLabel('None', { exact: true }).check();
		await page.getByRole('button', { name: 'Next: check your answers' }).click();

		await go(page, 'check');
		await expect(page.getByText('177.8\u202Fmm')).toBeVisible();
		await expect(page.getByText('Height of hot pipe in view: not known.')).toBeVisible();
		await expect(verdict(page)).toBeVisible();
		await expectNoViolations(page);

		await page.getByRole('link', { name: 'Change Air around the battery' }).click();
		await page.getByLabel('Open to the airstream').check();
		await page.getByRole('button', { name: 'Save and go back to your answers' }).click();
		await go(page, 'check');
		await expect(page.getByText('Open to the airstream')).toBeVisible();
		await page.getByRole('button', { name: 'Finish the survey' }).click();
		await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
		await expect(page.getByText('Under the bonnet, surveyed')).toBeVisible();
	});

	test('what was chosen before the script came stays chosen', async ({ page }) => {
		const { jobId } = await makeAssessableJob(page, { mounts: 0 });
		let comes = () => {};
		const script = new Promise<void>((resolve) => (comes = resolve));
		await page.route('**/_app/**/*.js', async (route) => {
			await script;
			await route.continue();
		});
		await page.goto(`/jobs/${jobId}/mounts/new`, { waitUntil: 'commit' });
		await page.getByLabel('In the cabin').check();
		await page.getByLabel('What you call this position').fill('Behind the seat');
		comes();
		await page.waitForLoadState('networkidle');
		await expect(page.getByLabel('In the cabin')).toBeChecked();
		await page.getByRole('button', { name: 'Begin the survey' }).click();
		await page.waitForURL(/\/survey\/\w+$/);
	});

	test('a new position asks what it is called and where it would go', async ({ page }) => {
		const { jobId } = await makeAssessableJob(page, { mounts: 0 });
		await page.goto(`/jobs/${jobId}/mounts/new`);
		await expectNoViolations(page);
		await page.getByRole('button', { name: 'Begin the survey' }).click();
		await expect(page.getByRole('link', { name: 'What you call this position is missing.' })).toBeVisible();
		await expect(page.getByRole('link', { name: /^Where it would go/ })).toBeVisible();
		await expect(page).toHaveTitle(/^Error: /);
	});

	test('nothing moves under the thumb while the day is drawn', async ({ page }) => {
		const { mountId } = await begin(page);
		let comes = () => {};
		const script = new Promise<void>((resolve) => (comes = resolve));
		await page.route('**/_app/**/*.js', async (route) => {
			await script;
			await route.continue();
		});
		await page.goto(`/mounts/${mountId}/survey/shield`, { waitUntil: 'commit' });
		const button = page.getByRole('button', { name: 'Next: check your answers' });
		await expect(button).toBeVisible();
		await page.evaluate(() => document.fonts.ready);
		const before = await button.boundingBox();
		comes();
		await expect(verdict(page)).toBeVisible();
		await expect(page.getByRole('status').filter({ has: verdict(page) })).toHaveText(/of 20 days/);
		const after = await button.boundingBox();
		expect(Math.abs(after!.y - before!.y)).toBeLessThan(2);
	});

	test('the curve and the verdict follow each answer', async ({ page }) => {
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/exhaust`);
		await page.getByLabel('Hidden behind something').check();
		const line = page.getByRole('status').filter({ has: verdict(page) });
		await expect(line).toHaveText(/°C at/);
		const hidden = await line.innerText();
		await page.getByLabel('Square on to the battery').check();
		await page.getByRole('textbox', { name: 'Gap to the exhaust' }).fill('40');
		await expect(line).not.toHaveText(hidden);
		await expect(page.locator('main figure svg').first()).toBeVisible();
	});

	test('an answer that is missing or wrong is named on top, and the focus goes there', async ({ page }) => {
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/exhaust`);
		await page.getByLabel('At an angle').check();
		await page.getByRole('textbox', { name: 'Gap to the exhaust' }).fill('5 m');
		await next(page).click();
		const summary = page.getByRole('region', { name: 'Every question takes an answer' });
		await expect(summary).toBeFocused();
		await expect(page).toHaveTitle(/^Error: /);
		await expect(summary.getByRole('link')).toHaveText([
			'Gap to the exhaust must be at most 2000 mm.',
			'Width of hot pipe in view is missing.',
			'Height of hot pipe in view is missing.',
			'Side towards the exhaust is missing.'
		]);
		await expectNoViolations(page);
		await summary.getByRole('link', { name: 'Gap to the exhaust' }).click();
		await expect(page.getByRole('textbox', { name: 'Gap to the exhaust' })).toHaveValue('5 m');
	});

	test('a finished survey needs every answer, and says which are missing', async ({ page }) => {
		const { mountId } = await begin(page, 'In the cabin');
		await page.goto(`/mounts/${mountId}/survey/check`);
		await page.getByRole('button', { name: 'Finish the survey' }).click();
		await expect(page.getByRole('link', { name: /Air conditioning is not answered yet/ })).toBeVisible();
		await expect(page).toHaveTitle(/^Error: /);
	});

	test('what was typed outlives the page, and is gone once the workshop has it', async ({ page }) => {
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/bonnet`);
		await page.getByRole('textbox', { name: 'Gap up to the bonnet' }).fill('62');
		await expect(page.getByText(/Saved on this phone \d\d:\d\d/)).toBeVisible();
		await page.reload();
		await expect(page.getByText('was still on this phone')).toBeVisible();
		await expect(page.getByRole('textbox', { name: 'Gap up to the bonnet' })).toHaveValue('62');
		await page.getByLabel('Bare metal').check();
		await next(page).click();
		await go(page, 'air');
		await page.goto(`/mounts/${mountId}/survey/bonnet`);
		await expect(page.getByRole('textbox', { name: 'Gap up to the bonnet' })).toHaveValue('62');
		await expect(verdict(page)).toBeVisible();
		await expect(page.getByText('was still on this phone')).toBeHidden();
	});

	test('what was typed is gone from the phone after signing out', async ({ page }) => {
		await page.context().clearCookies();
		await signInWith(page, personOf('installer'));
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/bonnet`);
		await page.getByRole('textbox', { name: 'Gap up to the bonnet' }).fill('62');
		await expect(page.getByText(/Saved on this phone/)).toBeVisible();
		const menu = page.getByText('Menu', { exact: true });
		if (await menu.isVisible()) await menu.click();
		await page.getByRole('button', { name: 'Sign out' }).filter({ visible: true }).click();
		await page.waitForURL(/sign-in/);
		const left = await page.evaluate(async () => (await indexedDB.databases()).map(({ name }) => name));
		expect(left).not.toContain('soakline-drafts');
	});

	test('without signal the answers wait on the phone', async ({ page, context }) => {
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/place`);
		await page.getByLabel('Half way back').check();
		await expect(verdict(page)).toBeVisible();
		await context.setOffline(true);
		await next(page).click();
		await expect(page.getByText('waiting for signal')).toBeVisible();
		await expect(page.getByLabel('Half way back')).toBeChecked();
		await context.setOffline(false);
		await next(page).click();
		await go(page, 'exhaust');
	});

	test('two people on one survey lose nothing: who comes second sees both', ONCE, async ({ page }) => {
		const { mountId } = await begin(page);
		await page.goto(`/mounts/${mountId}/survey/place`);
		await page.getByLabel('Half way back').check();
		await expect(verdict(page)).toBeVisible();
		const { version } = await ask(page, 'GET', `/api/v1/mounts/${mountId}`);
		const survey = { positionKind: 'under-bonnet', bayPlace: 'firewall' };
		await ask(page, 'PUT', `/api/v1/mounts/${mountId}/survey`, { survey, complete: false, version });
		await next(page).click();
		await expect(page.getByText('Somebody changed this survey').first()).toBeVisible();
		await expect(page.getByText('By the firewall, away from the exhaust').last()).toBeVisible();
		await expect(page.getByLabel('Half way back')).toBeChecked();
		await next(page).click();
		await go(page, 'exhaust');
		const stored = await ask(page, 'GET', `/api/v1/mounts/${mountId}`);
		expect(stored.survey).toMatchObject({ bayPlace: 'middle' });
	});

	test('every target of a step is large enough for dirty hands, and nothing is wider than the screen', async ({
		page
	}) => {
		const { mountId } = await begin(page);
		for (const step of ['place', 'exhaust', 'tray', 'shield', 'check']) {
			await page.goto(`/mounts/${mountId}/survey/${step}`);
			await expect(verdict(page)).toBeVisible();
			expect(await smallTargets(page)).toEqual([]);
			expect(await isTooWide(page)).toBe(false);
		}
	});

	test('a position that was removed can be put back with its answers', async ({ page }) => {
		const { jobId, mountId } = await begin(page);
		await page.getByLabel('Half way back').check();
		await next(page).click();
		await go(page, 'exhaust');
		await page.goto(`/jobs/${jobId}`);
		await page.getByRole('button', { name: 'Remove mount A, Left guard' }).click();
		await expect(page.getByText('Mount A was removed.')).toBeVisible();
		await page.getByRole('button', { name: 'Put it back' }).click();
		await expect(page.getByRole('link', { name: /Left guard/ })).toBeVisible();
		const { survey } = await ask(page, 'GET', `/api/v1/mounts/${mountId}`);
		expect(survey).toMatchObject({ bayPlace: 'middle' });
	});
});

test.describe('what a job lacks', () => {
	test('is said where the curve would be, with the way there', async ({ page }) => {
		await signInAs(page, 'installer');
		const job = await ask(page, 'POST', '/api/v1/jobs', {
			...{ customerName: 'Bram Oster', make: 'Marlow', model: 'Ridge', modelYear: 2018 },
			...{ engineLayout: 'inline', massKg: 2900, dragAreaM2: 1.3, towMassKg: 0, towDragAreaM2: 0 }
		});
		const mount = await ask(page, 'POST', `/api/v1/jobs/${String(job.id)}/mounts`, {
			...{ name: 'Behind the seat', positionKind: 'cabin' }
		});
		await page.goto(`/mounts/${String(mount.id)}/survey/cooling`);
		await expect(page.getByText('Before the day can be shown')).toBeVisible();
		for (const part of ['Choose the battery', 'Choose the place and its hot day', 'Plan the day']) {
			await expect(page.getByRole('link', { name: part })).toBeVisible();
		}
		await expect(verdict(page)).toBeHidden();
	});
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test('each page of the survey saves and leads to the next', async ({ page }) => {
		await signInAs(page, 'installer');
		const { mountId } = await begin(page, 'In a canopy or tray box');
		await go(page, 'sun');
		await next(page).click();
		await expect(page.getByRole('link', { name: 'Sun on it is missing.' })).toBeVisible();
		await expect(page).toHaveTitle(/^Error: /);
		await page.getByLabel('Full sun most of the day').check();
		await next(page).click();
		await go(page, 'box-air');
		await page.getByLabel('Sealed against dust').check();
		await next(page).click();
		await go(page, 'tray');
		await page.getByLabel('Steel', { exact: true }).check();
		await page.getByRole('textbox', { name: 'Thickness of the tray' }).fill('thick');
		await page.getByRole('textbox', { name: 'Length of the tray' }).fill('40 cm');
		await page.getByLabel('Width of the tray: I do not know').check();
		await page.getByLabel('Rubber mat').check();
		await next(page).click();
		await expect(
			page.getByRole('link', { name: 'Thickness of the tray must be a number of mm from' })
		).toBeVisible();
		await expect(page.getByRole('textbox', { name: 'Length of the tray' })).toHaveValue('40 cm');
		await expect(page.getByLabel('Width of the tray: I do not know')).toBeChecked();
		await page.getByRole('textbox', { name: 'Thickness of the tray' }).fill('3');
		await next(page).click();
		await go(page, 'check');
		await page.getByRole('button', { name: 'Finish the survey' }).click();
		await page.waitForURL((url) => /^\/jobs\/\d+$/.test(url.pathname));
		const mount = await ask(page, 'GET', `/api/v1/mounts/${mountId}`);
		expect(mount).toMatchObject({
			surveyComplete: true,
			survey: { enclosureSun: 'full-sun', trayLengthMm: 400, trayWidthMm: 'unknown', trayThicknessMm: 3 }
		});
	});
});
