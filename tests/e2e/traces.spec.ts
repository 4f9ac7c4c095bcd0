import { expect, test, type Page } from '@playwright/test';
import { expectNoViolations, ONCE, openForm, signInAs } from './support';

/** Others' long work may be before it. */
const LONG_WORK_MS = 90_000;

interface Row {
	id: number;
	mountId: number;
	name: string;
	state: string;
}

/** The mount of the demo that has traces. */
async function findMount(page: Page): Promise<number> {
	const { rows } = (await (await page.request.get('/api/v1/traces')).json()) as { rows: Row[] };
	return rows.find(({ name }) => name === 'trace-1.csv')!.mountId;
}

const twoDigits = (value: number): string => String(value).padStart(2, '0');

/** A day of a logger of its own, with what goes wrong in one: a mark for a loose plug, a row that ends early, a gap. */
function dayOf(probe: string, date: string): string {
	const rows = Array.from({ length: 480 }, (_, minute) => {
		const isDriving = minute >= 120 && minute < 240;
		const time = `${date} ${twoDigits(Math.floor(minute / 60))}:${twoDigits(minute % 60)}`;
		const airC = (24 + minute / 60).toFixed(1);
		if (minute === 60) return `${time},${airC},-127,0`;
		if (minute === 70) return `${time},${airC}`;
		return `${time},${airC},${(30 + minute / 40).toFixed(1)},${isDriving ? 85 : 0}`;
	});
	rows.splice(300, 30);
	return [`Clock,Outside (°C),${probe},Speed (km/h)`, ...rows, ''].join('\n');
}

const asFile = (name: string, text: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(text) });

async function send(page: Page, mountId: number, name: string, text: string): Promise<void> {
	await openForm(page, `/mounts/${mountId}/traces`);
	await page.getByLabel('The logger’s file').setInputFiles(asFile(name, text));
	await page.getByRole('button', { name: 'Send it' }).click();
	await expect(page.getByRole('heading', { level: 1, name })).toBeVisible();
}

test('an engineer sends a file with faults, puts its columns right, sees what was repaired, and sets the legs', async ({
	page
}) => {
	test.slow();
	await signInAs(page, 'engineer');
	const mountId = await findMount(page);
	const probe = `Probe ${Date.now() % 10_000}`;
	await openForm(page, `/mounts/${mountId}/traces`);
	await expectNoViolations(page);
	await send(page, mountId, 'tuesday.csv', dayOf(probe, '2026-02-03'));

	await expect(page.getByText('its columns named in line 1')).toBeVisible();
	await expect(page.getByText('The file says no time zone')).toBeVisible();
	await expectNoViolations(page);
	await page.getByLabel('Column 3 is').selectOption('Cells');
	await page.getByLabel('Time zone of the logger’s clock').fill('Nowhere/Else');
	await page.getByLabel('Column 2 is').selectOption('Cells');
	await page.getByRole('button', { name: 'Read the file' }).click();
	// Both at once, each at its box.
	await expect(page.getByText('there is none called “Nowhere/Else”').first()).toBeVisible();
	await page.getByRole('link', { name: /^Column 3 is Cells, and so is column 2/ }).click();
	await expect(page.getByLabel('Column 3 is')).toBeFocused();
	await expect(page.getByLabel('Column 3 is')).toHaveValue('cellC');
	await expectNoViolations(page);
	await page.getByLabel('Column 2 is').selectOption('Outside air');
	await page.getByLabel('Time zone of the logger’s clock').fill('Australia/Darwin');
	await page.getByRole('button', { name: 'Read the file' }).click();

	await expect(page.getByRole('heading', { name: 'What became of the file' })).toBeVisible();
	await expect(page.getByText('A mark of the sensor or the logger')).toBeVisible();
	await expect(page.getByText('Line 62, column 3')).toBeVisible();
	await expect(page.getByText('The row ends before its last column.').first()).toBeVisible();
	await expect(page.getByText('3 Feb 2026, 04:59 to 05:30')).toBeVisible();
	await expectNoViolations(page);

	await page.getByRole('link', { name: 'Closer' }).click();
	await expect(page).toHaveURL(/from=\d+&to=\d+/);
	await page.getByRole('group', { name: /^Plot\./ }).press('0');
	await expect(page.getByRole('link', { name: 'Farther' })).toHaveCount(0);

	const end = page.getByLabel('ends at minute').first();
	await expect(end).toHaveValue('120');
	await page.getByRole('slider', { name: 'End of leg 1' }).press('PageUp');
	await expect(end).toHaveValue('130');
	await page.getByRole('slider', { name: 'End of leg 1' }).press('ArrowLeft');
	await expect(end).toHaveValue('129');
	// What cannot be is said at its box, holds up the saving, and nothing is lost.
	await end.fill('2000');
	await end.press('Tab');
	await expect(page.getByText(/“2000” is no minute from 1 to \d+, between the ends/)).toBeVisible();
	await page.getByRole('button', { name: 'Save the legs' }).last().click();
	await expect(end).toBeFocused();
	await expect(end).toHaveValue('2000');
	const { width, height } = page.viewportSize()!;
	await page.setViewportSize({ width: width + 40, height });
	await expect(end).toHaveValue('2000');
	await page.setViewportSize({ width, height });
	await end.fill('129');
	await end.press('Tab');
	await expect(page.getByText('is no minute from')).toHaveCount(0);
	// A box that is moved otherwise shows what it moved to, and holds nothing up.
	await end.fill('2000');
	await end.press('Tab');
	await page.getByRole('slider', { name: 'End of leg 1' }).press('ArrowLeft');
	await expect(end).toHaveValue('128');
	await expect(page.getByText('is no minute from')).toHaveCount(0);
	await page.getByRole('slider', { name: 'End of leg 1' }).press('ArrowRight');
	await expect(end).toHaveValue('129');
	await page.getByRole('button', { name: 'Split leg 1' }).click();
	await page.getByLabel('Leg 2', { exact: true }).selectOption('Driving');
	await page.getByRole('button', { name: 'Save the legs' }).last().click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.reload();
	await expect(page.getByLabel('ends at minute').nth(1)).toHaveValue('129');
	await expect(page.getByLabel('Leg 2', { exact: true })).toHaveValue('driving');
	const tracePath = new URL(page.url()).pathname;

	// What was measured stands beside what had been predicted of it, once that is worked out, without anybody looking again.
	const beside = page.getByRole('region', { name: 'Against what was predicted' });
	await expect(beside.getByText('Measured at the cells')).toBeVisible({ timeout: LONG_WORK_MS });
	await expect(beside.getByText('It is counted.')).toBeVisible();
	await expectNoViolations(page);
	await page.goto('/accuracy?kind=trace');
	await expect(page.getByRole('heading', { level: 2, name: 'Traces' })).toBeVisible();
	const held = page.getByRole('row').filter({ hasText: 'Trace, 3 Feb 2026' }).first();
	await expect(held.getByText('entered after the day')).toBeVisible();
	await expectNoViolations(page);
	await expect(page.locator(`a[href="${tracePath}"]`).first()).toBeVisible();

	await send(page, mountId, 'wednesday.csv', dayOf(probe, '2026-02-04'));
	await expect(page.getByText('This logger is known')).toBeVisible();
	await expect(page.getByLabel('Column 3 is')).toHaveValue('cellC');
	await expect(page.getByLabel('Time zone of the logger’s clock')).toHaveValue('Australia/Darwin');
	await page.getByLabel('These figures were made up, not measured').check();
	await page.getByRole('button', { name: 'Read the file' }).click();
	await expect(page.getByRole('heading', { name: 'What became of the file' })).toBeVisible();
	await expect(page.getByText('Synthetic', { exact: true })).toBeVisible();
	await page.getByRole('button', { name: 'Remove the trace' }).click();
	await expect(page.getByText('The trace was removed.')).toBeVisible();
	await page.getByRole('button', { name: 'Put it back' }).click();
	await expect(page.getByRole('link', { name: 'wednesday.csv (synthetic)' }).first()).toBeVisible();
});

test('a boundary follows the pointer, and the plot shows what was dragged over', ONCE, async ({ page }) => {
	await signInAs(page, 'engineer');
	const mountId = await findMount(page);
	await page.goto(`/mounts/${mountId}/traces`);
	await page.getByRole('link', { name: 'trace-2.csv (synthetic)' }).click();
	await page.waitForLoadState('networkidle');
	// The picture has taken the room that there is.
	await expect(
		page
			.getByRole('group', { name: /^Plot\./ })
			.locator('svg')
			.first()
	).not.toHaveAttribute('width', '720');
	const slider = page.getByRole('slider', { name: 'End of leg 1' });
	await slider.scrollIntoViewIfNeeded();
	const before = Number(await slider.getAttribute('aria-valuenow'));
	const box = (await slider.boundingBox())!;
	await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
	await page.mouse.down();
	await page.mouse.move(box.x + box.width / 2 + 60, box.y + box.height / 2, { steps: 4 });
	await page.mouse.up();
	const after = Number(await slider.getAttribute('aria-valuenow'));
	expect(after).toBeGreaterThan(before + 20);
	await expect(page.getByText('Not saved yet.')).toBeVisible();
	await page.getByRole('button', { name: 'As they were saved' }).click();
	await expect(slider).toHaveAttribute('aria-valuenow', String(before));

	const frame = page.getByRole('group', { name: /^Plot\./ });
	await frame.scrollIntoViewIfNeeded();
	const plot = (await frame.boundingBox())!;
	await page.mouse.move(plot.x + 200, plot.y + 120);
	await page.mouse.down();
	await page.mouse.move(plot.x + 400, plot.y + 120, { steps: 4 });
	await page.mouse.up();
	await expect(page).toHaveURL(/from=\d+&to=\d+/);
	await expect(page.getByRole('link', { name: 'Farther' })).toBeVisible();
});

test(
	'what is no trace is refused in words, with a script and without one',
	ONCE,
	async ({ page, browser, baseURL }) => {
		await signInAs(page, 'engineer');
		const mountId = await findMount(page);
		await openForm(page, `/mounts/${mountId}/traces`);
		await page
			.getByLabel('The logger’s file')
			.setInputFiles(asFile('letter.csv', 'Dear all,\nnothing here.\n'));
		await page.getByRole('button', { name: 'Send it' }).click();
		await expect(page.getByRole('heading', { name: 'The file was not taken' })).toBeVisible();
		await expect(page.getByText(/No row has a time and a number\. Line 1/).first()).toBeVisible();
		await expectNoViolations(page);

		const context = await browser.newContext({ baseURL: baseURL!, javaScriptEnabled: false });
		await context.addCookies(await page.context().cookies());
		const plain = await context.newPage();
		await plain.goto(`/mounts/${mountId}/traces`);
		await plain.getByRole('button', { name: 'Send it' }).click();
		await expect(plain.getByText('The file is missing: choose one.').first()).toBeVisible();
		const text = dayOf('Plain cells', '2026-02-05');
		await plain.getByLabel('The logger’s file').setInputFiles(asFile('plain.csv', text));
		await plain.getByRole('button', { name: 'Send it' }).click();
		await plain.getByRole('button', { name: 'Read the file' }).click();
		await expect(async () => {
			await plain.reload();
			await expect(plain.getByRole('heading', { name: 'Legs' })).toBeVisible({ timeout: 500 });
		}).toPass();
		const legs = await plain.getByLabel('ends at minute').count();
		await plain.getByRole('button', { name: 'Split leg 1' }).click();
		await expect(plain.getByText('Saved.')).toBeVisible();
		await expect(plain.getByLabel('ends at minute')).toHaveCount(legs + 1);
		// What cannot be is refused with everything as it was typed.
		await plain.getByLabel('Leg 2', { exact: true }).selectOption('Driving');
		await plain.getByLabel('ends at minute').nth(1).fill('91');
		await plain.getByLabel('ends at minute').first().fill('soon');
		await plain.getByRole('button', { name: 'Save the legs' }).last().click();
		await expect(plain.getByText('“soon” is no minute from').first()).toBeVisible();
		await expect(plain.getByLabel('ends at minute').first()).toHaveValue('soon');
		await expect(plain.getByLabel('ends at minute').nth(1)).toHaveValue('91');
		await expect(plain.getByLabel('Leg 2', { exact: true })).toHaveValue('driving');
		await plain.getByLabel('ends at minute').first().fill('40');
		await plain.getByRole('button', { name: 'Save the legs' }).last().click();
		await expect(plain.getByText('Saved.')).toBeVisible();
		await expect(plain.getByLabel('ends at minute').nth(1)).toHaveValue('91');
		await plain.getByRole('link', { name: 'Closer' }).click();
		await expect(plain.getByRole('link', { name: 'Farther' })).toBeVisible();
		// The same file once more is taken, and said to be the same.
		await plain.goto(`/mounts/${mountId}/traces`);
		await plain.getByLabel('The logger’s file').setInputFiles(asFile('again.csv', text));
		await plain.getByRole('button', { name: 'Send it' }).click();
		await expect(plain.getByText('This file was sent in before')).toBeVisible();
		await expect(plain.getByRole('link', { name: 'plain.csv' })).toBeVisible();
		await expect(plain.getByRole('button', { name: 'Read the file' })).toBeVisible();
		await context.close();
	}
);

test(
	'traces made up for the demo say so everywhere, and an installer has none to look after',
	ONCE,
	async ({ page }) => {
		await signInAs(page, 'engineer');
		await page.goto('/traces');
		await expect(page.getByRole('link', { name: 'trace-3.csv (synthetic)' })).toBeVisible();
		await expectNoViolations(page);
		await page.getByRole('link', { name: 'trace-3.csv (synthetic)' }).click();
		await expect(page.getByText('These figures were made up, not measured')).toBeVisible();
		await expect(page).toHaveTitle(/trace-3\.csv, synthetic/);
	}
);

test('an installer is shown no traces', ONCE, async ({ page }) => {
	await signInAs(page, 'installer');
	expect((await page.goto('/traces'))?.status()).toBe(403);
});
