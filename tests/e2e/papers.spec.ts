import { expect, test, type Page } from '@playwright/test';
import { readPdf, type ReadDocument } from '../support/documents';
import { ask, assessAll, makeAssessableJob } from './assessable-job';
import { ONCE, signInAs } from './support';

/** What a link leads to, read with programs that had no part in making it. */
async function readLinked(page: Page, name: string | RegExp): Promise<ReadDocument> {
	const href = await page.getByRole('link', { name }).first().getAttribute('href');
	const response = await page.request.get(href ?? '');
	expect(response.status(), href ?? 'no link').toBe(200);
	expect(response.headers()['content-type']).toBe('application/pdf');
	return readPdf(await response.body());
}

/** Every page carries something that prints, and the words are there. */
function expectPaper({ inkShares, text }: ReadDocument, words: readonly string[]): void {
	for (const share of inkShares) expect(share).toBeGreaterThan(0.003);
	const told = text.replace(/\s+/g, ' ');
	for (const each of words) expect(told).toContain(each);
}

test(
	'the installer takes away what was recommended, and what was fitted, as documents',
	ONCE,
	async ({ page }) => {
		test.slow();
		await signInAs(page, 'installer');
		const { jobId, mountIds, customerName } = await makeAssessableJob(page, { mounts: 1 });
		const [hot] = await assessAll(page, jobId);
		const why = { decidedBy: 'Ida Fenn', reason: 'A duct is fitted before summer.' };
		const { id } = await ask(page, 'POST', '/api/v1/recommendations', { assessmentId: hot!.id, ...why });
		await page.goto(`/recommendations/${String(id)}/print`);
		const recommendation = await readLinked(page, 'As a PDF document');
		expectPaper(recommendation, [
			...['Recommendation 1', customerName, 'Decided by Ida Fenn', 'Cuts out'],
			...['A duct is fitted before summer.', 'Before anyone acts on this']
		]);
		expect(recommendation.pages).toBe(2);
		// The picture of the day: a page of words alone is less than a twentieth ink at this size.
		expect(recommendation.inkShares[0]).toBeGreaterThan(0.02);

		await ask(page, 'PUT', `/api/v1/mounts/${mountIds[0]}/fitting`, {
			...{ fittedOn: '2026-01-31', fittedBy: 'Ida Fenn', serialNumber: 'X-1', version: null },
			differences: [{ key: 'fuse', fitted: '80 A, bolted' }]
		});
		await page.goto(`/mounts/${mountIds[0]}/fitted`);
		expectPaper(await readLinked(page, /^PDF ?, the handover/), [
			'Handover',
			'80 A, bolted',
			'When it goes dark'
		]);
		expectPaper(await readLinked(page, /^PDF ?, the warranty file/), ['Warranty file', 'X-1', customerName]);
	}
);

test('a customer takes away what they were recommended', ONCE, async ({ page }) => {
	await signInAs(page, 'customer');
	await page.goto('/my');
	expectPaper(await readLinked(page, /^Recommendation: .* \(PDF\)/), [
		'Recommendation',
		'Before anyone acts on this'
	]);
});
