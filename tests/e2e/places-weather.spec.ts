import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, openForm, signInAs, ONCE } from './support';
import { makeEpw, makeEpwLines } from '../support/weather-files';

const EPW = Buffer.from(makeEpw());

interface Place {
	id: number;
	version: number;
	hotDayMaxC: number;
	monthlyMaxC: number[] | null;
	weatherFile: { name: string; sha256: string } | null;
}

async function addPlace(page: Page): Promise<Place> {
	const response = await page.request.post('/api/v1/places', {
		data: {
			...{ name: `Salt Lake ${randomUUID().slice(0, 8)}`, latitudeDeg: -28, longitudeDeg: 137 },
			...{ altitudeM: 20, climateZone: 'BWh', hotDayMaxC: 44, dailyRangeK: 16, sunPeakWPerM2: 1000 },
			source: 'Invented for a test.'
		}
	});
	expect(response.status()).toBe(201);
	return (await response.json()) as Place;
}

async function readPlace(page: Page, id: number): Promise<Place> {
	return (await (await page.request.get(`/api/v1/places/${id}`)).json()) as Place;
}

async function chooseFile(page: Page, name: string, buffer: Buffer): Promise<void> {
	await page.getByLabel('Weather file').setInputFiles({ name, mimeType: 'text/plain', buffer });
	await page.getByRole('button', { name: 'See what it would change' }).click();
}

test.beforeEach(({ page }) => signInAs(page, 'installer'));

test('a weather file is looked at, taken, and put back', async ({ page }) => {
	const { id } = await addPlace(page);
	await openForm(page, `/places/${id}`);
	await page.getByRole('link', { name: 'Take them from a weather file' }).click();
	await expectNoViolations(page);
	await chooseFile(page, 'lake.epw', EPW);
	await expect(page.getByRole('heading', { name: 'What lake.epw would change' })).toBeVisible();
	await expectNoViolations(page);
	const hotDay = page.getByRole('table', { name: 'The hot day, now and by the file' });
	await expect(hotDay.getByRole('row', { name: 'Down to the coolest' })).toContainText('14.0');
	await expect(page.getByRole('row', { name: /^January/ })).toContainText('35.9');
	expect((await readPlace(page, id)).monthlyMaxC).toBeNull();
	await page.getByLabel('Take latitude, longitude and altitude').check();
	await page.getByRole('button', { name: 'Yes, take these figures' }).click();
	await expect(page.getByText('The figures of the weather file are in.')).toBeVisible();
	await expectNoViolations(page);
	await expect(page.getByLabel('Latitude')).toHaveValue('−28.5');
	const highest = page.getByRole('group', { name: 'Mean of the daily highest, °C' });
	await expect(highest.getByLabel('January')).toHaveValue(/^35\.9/);
	await page.getByRole('button', { name: 'Put it back' }).click();
	await expect(page.getByText('Put back as it was before the weather file.')).toBeVisible();
	await expect(page.getByLabel('Latitude')).toHaveValue('−28');
	await expect(highest.getByLabel('January')).toHaveValue('');
});

test('a weather file with faults is told line by line, and changes nothing', async ({ page }) => {
	const { id, version } = await addPlace(page);
	const faulty = makeEpwLines().map((line, index) => {
		if (index === 19) return `${line},1`;
		return index === 29 ? line.replace(/\?9\?9,[^,]+/, '?9?9,hot') : line;
	});
	await openForm(page, `/places/${id}/weather`);
	await chooseFile(page, 'lake.epw', Buffer.from(faulty.join('\n')));
	await expect(page.getByRole('heading', { name: 'The file was not taken' })).toBeVisible();
	await expect(page.getByText('Line 20: found 36 columns; needed: 35 columns.')).toBeVisible();
	await expect(
		page.getByText('Line 30, column 7 (dry bulb): found hot; needed: a number within −90 to 60 °C.')
	).toBeVisible();
	await expectNoViolations(page);
	expect(await readPlace(page, id)).toMatchObject({ version, monthlyMaxC: null, weatherFile: null });
	await page.getByRole('button', { name: 'See what it would change' }).click();
	await expect(page.getByText('The file is missing, or there is nothing in it: choose one.')).toBeVisible();
	await chooseFile(page, 'large.epw', Buffer.alloc(5.5 * 1024 * 1024, 'x'));
	await expect(page.getByText('The file is larger than 5 MB, the most that is read here.')).toBeVisible();
});

test('a place that somebody changed meanwhile is shown anew before it is changed', ONCE, async ({ page }) => {
	const { version, weatherFile: _none, ...place } = await addPlace(page);
	const { id } = place;
	await openForm(page, `/places/${id}/weather`);
	await chooseFile(page, 'lake.epw', EPW);
	const hotDay = page.getByRole('table', { name: 'The hot day, now and by the file' });
	await expect(hotDay).toContainText('44.0');
	const change = { ...place, hotDayMaxC: 46, version };
	expect((await page.request.put(`/api/v1/places/${id}`, { data: change })).status()).toBe(200);
	await page.getByRole('button', { name: 'Yes, take these figures' }).click();
	await expect(page.getByText(/^Somebody changed this place while you had it open/)).toBeVisible();
	await expect(hotDay).toContainText('46.0');
	expect(await readPlace(page, id)).toMatchObject({ hotDayMaxC: 46, weatherFile: null });
	await page.getByRole('button', { name: 'Yes, take these figures' }).click();
	await expect(page.getByText('The figures of the weather file are in.')).toBeVisible();
});

test('figures that were changed on their way through the page are not taken', ONCE, async ({ page }) => {
	const { id, version } = await addPlace(page);
	await openForm(page, `/places/${id}/weather`);
	await chooseFile(page, 'lake.epw', EPW);
	await page.locator('input[name="reading"]').evaluate((box: HTMLInputElement) => {
		box.value = box.value.replace('lake.epw', 'official.epw');
	});
	await page.getByRole('button', { name: 'Yes, take these figures' }).click();
	await expect(page.getByText(/did not come back whole/)).toBeVisible();
	expect(await readPlace(page, id)).toMatchObject({ version, weatherFile: null });
});

test('the months of a place are typed in, all twelve or none', ONCE, async ({ page }) => {
	const { id } = await addPlace(page);
	await openForm(page, `/places/${id}`);
	const highest = page.getByRole('group', { name: 'Mean of the daily highest, °C' });
	const spread = page.getByRole('group', { name: 'Spread from day to day, K' });
	for (const box of await highest.getByRole('textbox').all()) await box.fill('86 °F');
	for (const box of await spread.getByRole('textbox').all()) await box.fill('3,5');
	await highest.getByLabel('April').fill('');
	await page.getByLabel('Where the months come from').fill('Our own log.');
	await page.getByRole('button', { name: 'Save the place' }).click();
	await page
		.getByRole('link', {
			name: 'Mean of the daily highest: April is missing. Give all twelve months, or none.'
		})
		.click();
	await expect(highest.getByLabel('April')).toBeFocused();
	await highest.getByLabel('April').fill('28');
	await page.getByRole('button', { name: 'Save the place' }).click();
	await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
	const { monthlyMaxC } = await readPlace(page, id);
	expect(monthlyMaxC).toEqual([30, 30, 30, 28, 30, 30, 30, 30, 30, 30, 30, 30]);
});

test.describe('without a script', () => {
	test.use({ javaScriptEnabled: false });

	test('a weather file is looked at, taken, and put back', ONCE, async ({ page }) => {
		const { id } = await addPlace(page);
		await page.goto(`/places/${id}/weather`);
		await chooseFile(page, 'lake.epw', EPW);
		await page.getByRole('button', { name: 'Yes, take these figures' }).click();
		await expect(page.getByText('The figures of the weather file are in.')).toBeVisible();
		expect((await readPlace(page, id)).weatherFile?.name).toBe('lake.epw');
		await page.getByRole('button', { name: 'Put it back' }).click();
		await expect(page.getByText('Put back as it was before the weather file.')).toBeVisible();
		expect(await readPlace(page, id)).toMatchObject({ hotDayMaxC: 44, weatherFile: null });
	});
});

test.describe('a weather file by the API', () => {
	const address = ({ id, version }: Place, more = ''): string =>
		`/api/v1/places/${id}/weather?version=${version}${more}`;
	const body = (data: Buffer) => ({ headers: { 'content-type': 'text/plain' }, data });

	test('is only looked at, then saved, once for a key', ONCE, async ({ page }) => {
		const place = await addPlace(page);
		const preview = await page.request.post(address(place, '&preview=true'), body(EPW));
		expect(await preview.json()).toMatchObject({ saved: false, reading: { hottestMonth: 'January' } });
		expect((await readPlace(page, place.id)).monthlyMaxC).toBeNull();
		const file = { name: 'lake.epw', mimeType: 'text/plain', buffer: EPW };
		const save = () =>
			page.request.post(address(place), {
				...{ multipart: { file }, headers: { 'idempotency-key': `weather-${place.id}` } }
			});
		const [first, second] = [await save(), await save()];
		expect(await first.json()).toMatchObject({ saved: true, place: { weatherFile: { name: 'lake.epw' } } });
		expect(await second.json()).toEqual(await first.json());
		const late = await page.request.post(address(place), body(EPW));
		expect(late.status()).toBe(409);
	});

	test('with faults is answered by their lines and columns', ONCE, async ({ page }) => {
		const place = await addPlace(page);
		const faulty = makeEpw().replace('?9?9,26.0000', '?9?9,99.9');
		const response = await page.request.post(address(place), body(Buffer.from(faulty)));
		expect(response.status()).toBe(422);
		expect(response.headers()['content-type']).toBe('application/problem+json');
		expect(await response.json()).toMatchObject({
			problems: [{ code: 'missing-value', line: 9, column: { number: 7, name: 'dry bulb' }, value: '99.9' }]
		});
	});

	test('is refused when it is too large, or no text at all', ONCE, async ({ page }) => {
		const place = await addPlace(page);
		const large = await page.request.post(address(place), body(Buffer.alloc(5 * 1024 * 1024 + 1, 'x')));
		expect(large.status()).toBe(413);
		const noise = await page.request.post(address(place), body(Buffer.from([0x50, 0x4b, 3, 4, 0, 255])));
		expect(noise.status()).toBe(422);
		const json = await page.request.post(address(place), { data: {} });
		expect(json.status()).toBe(400);
	});
});
