import { randomInt } from 'node:crypto';
import { expect, test } from '@playwright/test';
import { ask } from './assessable-job';
import { expectNoViolations, ONCE, openForm, signInAs } from './support';

// One list for the whole workshop: what changes it does so once, and puts it back.
test(
	'engineer and manager keep what the remedies cost, and a wrong figure keeps every word',
	ONCE,
	async ({ page }) => {
		await signInAs(page, 'engineer');
		const before = await ask(page, 'GET', '/api/v1/remedies');
		const parts = `${randomInt(100, 900)}.5`;
		await openForm(page, '/remedies');
		const wrap = page.getByRole('group', { name: 'Reflective wrap' });
		await wrap.getByLabel('Parts').fill('cheap');
		await wrap.getByLabel('Work').fill('45 min');
		await page.getByRole('button', { name: 'Save the list' }).click();
		const refused = 'Reflective wrap, parts must be a number from 0 to 100000.';
		await expect(page.getByRole('link', { name: refused })).toBeVisible();
		await expect(wrap.getByLabel('Work')).toHaveValue('45 min');
		await expectNoViolations(page);
		await wrap.getByLabel('Parts').fill(parts);
		await page.getByRole('button', { name: 'Save the list' }).click();
		await expect(page.getByText('Saved.')).toBeVisible();
		await expect(wrap.getByLabel('Parts')).toHaveValue(parts);
		await expect(wrap.getByLabel('Work')).toHaveValue('0.75');
		await expectNoViolations(page);
		await signInAs(page, 'installer');
		await page.goto('/remedies');
		await expect(page.getByText(`parts ${parts}0, work`)).toBeVisible();
		await signInAs(page, 'engineer');
		const { version } = await ask(page, 'GET', '/api/v1/remedies');
		const offers = (before.offers as Record<string, unknown>[]).map(({ key, cost, hours, offered }) => ({
			...{ key, cost, hours, offered }
		}));
		await ask(page, 'PUT', '/api/v1/remedies', { moneyPerHour: before.moneyPerHour, offers, version });
	}
);

test('an installer reads the list and finds no box in it', async ({ page }) => {
	await signInAs(page, 'installer');
	await page.goto('/remedies');
	await expect(page.getByRole('heading', { level: 1, name: 'Remedies and what they cost' })).toBeVisible();
	await expect(page.getByText('Reflective wrap')).toBeVisible();
	await expect(page.getByText('An hour of work counts as')).toBeVisible();
	await expect(page.getByRole('textbox')).toHaveCount(0);
	await expectNoViolations(page);
});
