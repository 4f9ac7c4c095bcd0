import { expect, test, type Page } from '@playwright/test';
import { ask } from './assessable-job';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';

interface Place {
	id: number;
	name: string;
}

/** A job without a battery, a day or a mount. */
async function addJob(page: Page): Promise<{ jobId: number; place: Place }> {
	const job = await ask(page, 'POST', '/api/v1/jobs', {
		...{ customerName: 'Ilse Tarn', make: 'Marlow', model: 'Ridge', modelYear: 2019 },
		...{ engineLayout: 'inline', massKg: 3100, dragAreaM2: 1.35, towMassKg: 0, towDragAreaM2: 0 }
	});
	const { rows } = await ask(page, 'GET', '/api/v1/places');
	return { jobId: Number(job.id), place: (rows as Place[])[0]! };
}

async function chooseWithDays(page: Page, place: Place): Promise<void> {
	await page.getByLabel('Same every month').fill('6');
	await page.getByRole('button', { name: 'Fill the year' }).click();
	const days = page.getByRole('group', { name: 'Days on the road' });
	await expect(days.getByLabel('January')).toHaveValue('6');
	await expect(days.getByLabel('December')).toHaveValue('6');
	await expect(page.getByLabel('Place')).toHaveValue(String(place.id));
	await days.getByLabel('July').fill('0');
	await page.getByRole('button', { name: 'Take this day' }).click();
}

const daysOf = async (page: Page, jobId: number): Promise<unknown> =>
	(await ask(page, 'GET', `/api/v1/jobs/${jobId}`)).daysOnRoad;
const SIX_BUT_JULY = [6, 6, 6, 6, 6, 6, 0, 6, 6, 6, 6, 6];

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('the days on the road are filled with one number, and changed in one month', async ({ page }) => {
	const { jobId, place } = await addJob(page);
	await openForm(page, `/jobs/${jobId}/climate?place=${place.id}`);
	await expectNoViolations(page);
	await chooseWithDays(page, place);
	await page.waitForURL((url) => url.pathname === `/jobs/${jobId}`);
	expect(await daysOf(page, jobId)).toEqual(SIX_BUT_JULY);
});

test('a month that is left out is told by its name', ONCE, async ({ page }) => {
	const { jobId, place } = await addJob(page);
	await openForm(page, `/jobs/${jobId}/climate?place=${place.id}`);
	const days = page.getByRole('group', { name: 'Days on the road' });
	await days.getByLabel('March').fill('9');
	await page.getByLabel('Hottest of the day').press('Enter');
	await page.getByRole('link', { name: /^Days on the road: January, February, April/ }).click();
	await expect(days.getByLabel('January')).toBeFocused();
	expect(await daysOf(page, jobId)).toBeNull();
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test(
		'the days on the road are filled with one number, and nothing typed is lost',
		ONCE,
		async ({ page }) => {
			const { jobId, place } = await addJob(page);
			await page.goto(`/jobs/${jobId}/climate?place=${place.id}`);
			await page.getByLabel('Hottest of the day').fill('41,5');
			await page.getByLabel('Same every month').fill('6');
			await page.getByRole('button', { name: 'Fill the year' }).click();
			await expect(page.getByLabel('Hottest of the day')).toHaveValue('41,5');
			expect(await daysOf(page, jobId)).toBeNull();
			await chooseWithDays(page, place);
			expect(await daysOf(page, jobId)).toEqual(SIX_BUT_JULY);
		}
	);
});
