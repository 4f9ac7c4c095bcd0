import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { expectNoViolations, signInAs } from './support';

const LITHIUM = {
	...{ chemistry: 'lithium-iron-phosphate', capacityAh: 100, massKg: 12.85, internalResistanceMohm: 12 },
	...{ lengthMm: 320, widthMm: 165, heightMm: 215, maxChargeA: 50, sensor: 'cells', chargeCutC: 60 },
	...{ chargeResetC: 50, cutDelayS: 0, autoReset: true, underBonnet: 'silent' },
	dataSheet: 'Invented for the tests'
};
const AGREED = { ...LITHIUM, dischargeCutC: 110, dischargeResetC: 95 };
const WHY = { decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };

async function recommend(page: Page, jobId: number): Promise<number> {
	const [hot] = await assessAll(page, jobId);
	const made = await ask(page, 'POST', '/api/v1/recommendations', { assessmentId: hot!.id, ...WHY });
	return made.id as number;
}

test('another battery than agreed is not judged by the agreed one, and the fitting follows the newer recommendation', async ({
	page
}) => {
	test.slow();
	await signInAs(page, 'installer');
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1, battery: AGREED });
	const [mountId] = mountIds;
	const first = await recommend(page, jobId);
	const model = `Low ${randomUUID().slice(0, 8)}`;
	await ask(page, 'PUT', `/api/v1/mounts/${mountId}/fitting`, {
		...{ fittedOn: '2026-01-31', fittedBy: 'Ida Fenn', serialNumber: 'X-7', note: '', version: null },
		differences: [{ key: 'battery', fitted: `Fenmoor ${model}` }]
	});
	await ask(page, 'POST', `/api/v1/mounts/${mountId}/field-notes`, {
		...{ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 36, withinHours: 0.5 },
		...{ wentDarkHour: 17, cameBackHour: 20 }
	});
	await page.goto(`/mounts/${mountId}/field`);
	await expect(page.getByRole('heading', { name: 'Was it heat? It cannot be judged yet' })).toBeVisible();
	await expect(page.getByText('The estimate is not of what was fitted')).toBeVisible();
	await expectNoViolations(page);
	await page.goto(`/mounts/${mountId}/handover/print`);
	await expect(page.getByText('Battery, fitted instead')).toBeVisible();

	await page.goto(`/jobs/${jobId}`);
	await page.getByRole('link', { name: 'Assess it as it was fitted' }).click();
	await expect(page).toHaveURL(new RegExp(`/jobs/${jobId}/battery`));
	const low = { ...LITHIUM, maker: 'Fenmoor', model, dischargeCutC: 65, dischargeResetC: 55 };
	const { id: batteryRecordId } = await ask(page, 'POST', '/api/v1/batteries', low);
	const { version } = await ask(page, 'GET', `/api/v1/jobs/${jobId}`);
	await ask(page, 'PUT', `/api/v1/jobs/${jobId}/battery`, { batteryRecordId, version });
	await recommend(page, jobId);

	await page.goto(`/jobs/${jobId}`);
	await page.getByRole('link', { name: 'Hold the fitting against the newer recommendation' }).click();
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Hold it against recommendation 2 of' }).click();
	const news = page.getByRole('status').filter({ hasText: 'Held against recommendation 2.' });
	await expect(news).toBeVisible({ timeout: 60_000 });
	await expect(page.getByText(/^Fitted as agreed\./)).toBeVisible();
	await expect(page.getByLabel('Battery', { exact: true })).toHaveValue('');
	await expectNoViolations(page);
	await page.goto(`/mounts/${mountId}/field`);
	await expect(page.getByRole('heading', { name: /^Was it heat\? (Yes|Perhaps|Hardly)$/ })).toBeVisible();
	await expect(page.getByText('Worked out anew for what is agreed now.')).toBeVisible();
	await expectNoViolations(page);

	await page.goto(`/mounts/${mountId}/fitted?heldBefore=${first}`);
	await page.getByRole('button', { name: 'Undo: hold it against recommendation 1' }).click();
	await expect(page.getByText('A newer recommendation was made for this mount')).toBeVisible({
		timeout: 60_000
	});
	await expect(page.getByLabel('Battery', { exact: true })).toHaveValue(`Fenmoor ${model}`);
});
