import { expect, test, type Page } from '@playwright/test';
import sharp from 'sharp';
import { makeAssessableJob } from './assessable-job';
import { expectNoViolations, openForm, signInAs } from './support';

test.beforeEach(({ page }) => signInAs(page, 'installer'));

const photo = async (name: string, background: string) => ({
	name,
	mimeType: 'image/jpeg',
	buffer: await sharp({ create: { width: 640, height: 480, channels: 3, background } })
		.jpeg()
		.toBuffer()
});
const TEXT = { name: 'notes.txt', mimeType: 'text/plain', buffer: Buffer.from('Bracket by the left guard.') };

/** Adds two photos and a text, says of one what it shows, makes it the picture, takes it away and puts it back. */
async function goThrough(
	page: Page,
	{ jobId, mountId }: { jobId: number; mountId: number },
	/** A scan needs a script. */
	scan: (page: Page) => Promise<void> = () => Promise.resolve()
): Promise<void> {
	await expect(page.getByText('Nothing here yet.')).toBeVisible();
	await scan(page);
	const files = [await photo('left.jpg', '#884422'), TEXT, await photo('right.jpg', '#224488')];
	await page.getByLabel('Photos or documents').setInputFiles(files);
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByText('2 files were kept.')).toBeVisible();
	await expect(page.getByText('“notes.txt” is text, whatever its name says.')).toBeVisible();
	await expect(page.getByRole('img', { name: /\.jpg$/ })).toHaveCount(2);
	await scan(page);

	await page.getByLabel('Caption of left.jpg').fill('The bracket');
	await page.getByRole('button', { name: 'Save the caption of left.jpg' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByRole('button', { name: /picture.*The bracket/ }).click();
	await expect(page.getByText('The mount’s picture', { exact: true })).toBeVisible();
	await page.goto(`/jobs/${jobId}`);
	await expect(page.getByRole('img', { name: 'The bracket' })).toBeVisible();

	await page.goto(`/mounts/${mountId}/photos`);
	await page.getByRole('button', { name: 'Remove The bracket' }).click();
	await expect(page.getByText('The file was removed.')).toBeVisible();
	await expect(page.getByRole('img', { name: 'The bracket' })).toHaveCount(0);
	await scan(page);
	await page.getByRole('button', { name: 'Put it back' }).click();
	await expect(page.getByRole('img', { name: 'The bracket' })).toBeVisible();
}

test('photos of a mount come in together, one that is refused takes none along', async ({ page }) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const mountId = mountIds[0]!;
	await openForm(page, `/mounts/${mountId}/photos`);
	await goThrough(page, { jobId, mountId }, expectNoViolations);

	await openForm(page, `/mounts/${mountId}/pre-drill`);
	await page.getByRole('radio', { name: 'Yes', exact: true }).first().check();
	await page
		.getByRole('button', { name: /^Add a photo/ })
		.first()
		.click();
	await page.waitForURL(/photos\?question=/);
	await expect(page.getByLabel('Belongs to')).toHaveValue(/^question:/);
	await page.getByLabel('Photos or documents').setInputFiles(await photo('question.jpg', '#228844'));
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByText('One file was kept.')).toBeVisible();
	await page.goto(`/mounts/${mountId}/pre-drill`);
	await expect(page.getByRole('button', { name: /^One photo, add another/ })).toHaveCount(1);
	await expect(page.getByRole('radio', { name: 'Yes', exact: true }).first()).toBeChecked();
	await expectNoViolations(page);
});

test('pressed twice, captions typed meanwhile, and one that is too long: nothing is lost or doubled', async ({
	page
}) => {
	test.slow();
	const { mountIds } = await makeAssessableJob(page, { mounts: 1 });
	await openForm(page, `/mounts/${mountIds[0]}/photos`);
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByText('No file was chosen: choose one or more.')).toBeVisible();
	await page
		.getByLabel('Photos or documents')
		.setInputFiles([await photo('left.jpg', '#884422'), await photo('right.jpg', '#224488')]);
	await page.getByRole('button', { name: 'Add them' }).dblclick();
	await expect(page.getByText('2 files were kept.')).toBeVisible();
	await expect(page.getByText('No file was chosen')).toHaveCount(0);
	await expect(page.getByRole('img', { name: /\.jpg$/ })).toHaveCount(2);

	const left = page.getByLabel('Caption of left.jpg');
	await left.fill('x'.repeat(201));
	await page.getByLabel('Caption of right.jpg').fill('The right guard');
	await page.getByRole('button', { name: 'Save the caption of left.jpg' }).click();
	await expect(page.getByText('Caption must be 200 characters or fewer.')).toBeVisible();
	await expect(left).toHaveValue('x'.repeat(201));
	await left.fill('The left guard');
	await page.getByRole('button', { name: 'Save the caption of left.jpg' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByLabel('Photos or documents').setInputFiles(await photo('rear.jpg', '#228844'));
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByLabel('Caption of rear.jpg')).toBeVisible();
	await expect(page.getByLabel('Caption of right.jpg')).toHaveValue('The right guard');
});

test('a photo that breaks off on the way is sent again by itself, and can be called off', async ({
	page
}) => {
	test.slow();
	const { mountIds } = await makeAssessableJob(page, { mounts: 1 });
	await openForm(page, `/mounts/${mountIds[0]}/photos`);
	let tries = 0;
	await page.route('**/api/v1/mounts/*/files?*', (route) => {
		tries += 1;
		return tries === 1 ? route.abort('connectionreset') : route.continue();
	});
	await page.getByLabel('Photos or documents').setInputFiles(await photo('left.jpg', '#884422'));
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByText('Broke off: it is tried again in a moment.')).toBeVisible();
	await expect(page.getByText('One file was kept.')).toBeVisible();
	expect(tries).toBe(2);

	await page.unroute('**/api/v1/mounts/*/files?*');
	// A dead spot: nothing that is sent arrives.
	await page.route('**/api/v1/mounts/*/files?*', () => undefined);
	await page.getByLabel('Photos or documents').setInputFiles(await photo('rear.jpg', '#228844'));
	await page.getByRole('button', { name: 'Add them' }).click();
	await expect(page.getByRole('progressbar')).toBeVisible();
	await expectNoViolations(page);
	await page.getByRole('button', { name: 'Call off rear.jpg' }).click();
	await expect(page.getByText('Called off.')).toBeVisible();
	await page.reload();
	await expect(page.getByRole('img', { name: 'left.jpg' })).toBeVisible();
	await expect(page.getByRole('img', { name: 'rear.jpg' })).toHaveCount(0);
});

test('they come in without a script, too', async ({ browser, page, baseURL }) => {
	test.slow();
	const { jobId, mountIds } = await makeAssessableJob(page, { mounts: 1 });
	const mountId = mountIds[0]!;
	const storageState = await page.context().storageState();
	const context = await browser.newContext({ javaScriptEnabled: false, storageState, baseURL: baseURL! });
	const plain = await context.newPage();
	await plain.goto(`/mounts/${mountId}/photos`);
	await goThrough(plain, { jobId, mountId });
	await context.close();
});
