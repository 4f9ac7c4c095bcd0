import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import { waitForLink } from './mailed';
import { expectNoViolations, openForm, signInAs, signInWith, ONCE } from './support';

const LINK = /\/sign-in\/invitation\/[\w-]{22}/;
const PASSWORD = 'nine goats on the roof';

async function inviteByPage(page: Page, name: string, role: string): Promise<string> {
	const email = `${name.split(' ')[0]?.toLowerCase()}-${randomUUID()}@shop.example`;
	await openForm(page, '/people');
	await page.getByLabel('Name').fill(name);
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Role', { exact: true }).selectOption(role);
	await page.getByRole('button', { name: 'Send the invitation' }).click();
	await expect(page.getByText('The invitation is on its way.')).toBeVisible();
	return email;
}

test('a button on one invitation leaves the next as it is typed', ONCE, async ({ page }) => {
	await signInAs(page, 'manager');
	const name = `Rowan ${randomUUID().slice(0, 8)}`;
	await inviteByPage(page, name, 'installer');
	await openForm(page, '/people');
	await page.getByLabel('Name').fill('Somebody else');
	await page.getByRole('button', { name: new RegExp(`^Send it again ?, to ${name}`) }).click();
	await expect(page.getByText(/^The invitation is on its way once more/)).toBeVisible();
	await expect(page.getByLabel('Name')).toHaveValue('Somebody else');
	await page.getByRole('button', { name: new RegExp(`^Withdraw it ?, from ${name}`) }).click();
	await expect(page.getByText(/^The invitation is withdrawn/)).toBeVisible();
	await expect(page.getByLabel('Name')).toHaveValue('Somebody else');
	await expect(page.getByText(name)).toHaveCount(0);
	await expectNoViolations(page);
});

test('somebody is invited, joins by the letter’s link, gets another role, and is out at once on leaving', async ({
	page,
	browser,
	baseURL
}) => {
	test.slow();
	await signInAs(page, 'manager');
	const name = `Wren ${randomUUID().slice(0, 8)}`;
	const email = await inviteByPage(page, name, 'installer');
	await expectNoViolations(page);
	const link = await waitForLink(email, LINK);
	await page.goto('/mailbox');
	await page.getByRole('row').filter({ hasText: email }).getByRole('link').click();
	await expect(page.getByText(/asks you to join .* as an installer/)).toBeVisible();

	const theirs = await browser.newContext({ ...(baseURL ? { baseURL } : {}) });
	const other = await theirs.newPage();
	for (let scan = 0; scan < 3; scan++) await other.request.get(link);
	await openForm(other, link);
	await expectNoViolations(other);
	await other.getByLabel('Password').fill('passwordpassword');
	await other.getByRole('button', { name: 'Join and sign in' }).click();
	await expect(other.getByText(/one of the first that anybody would try/).first()).toBeVisible();
	await expectNoViolations(other);
	await other.getByLabel('Password').fill(PASSWORD);
	await other.getByRole('button', { name: 'Join and sign in' }).click();
	await expect(other).toHaveURL(/\/jobs$/);
	await expect(other.getByRole('link', { name: 'Books' }).first()).toHaveCount(0);
	await theirs.request.get(link).then((answer) => expect(answer.status()).toBe(410));

	await openForm(other, '/jobs/new');
	await other.getByLabel('Customer name').fill('Ida Fernleigh');

	await page.goto('/people');
	await page.getByRole('link', { name }).click();
	await expectNoViolations(page);
	await page.getByLabel('Role', { exact: true }).selectOption('engineer');
	await page.getByRole('button', { name: 'Change the role' }).click();
	await expect(page.getByText('The role is changed.')).toBeVisible();
	await expect(page.getByText('Is an engineer here.')).toBeVisible();
	await page.getByRole('button', { name: 'Change the role' }).click();
	await expect(page.getByText(`${name} is an engineer already: nothing was changed.`)).toBeVisible();
	await expect(page.getByText('The role is changed.')).toHaveCount(0);
	await other.getByRole('button', { name: 'Begin the job' }).click();
	await expect(other.getByText(/^You are signed out, and nothing was saved/)).toBeVisible();
	await expect(other.getByLabel('Customer name')).toHaveValue('Ida Fernleigh');
	await expectNoViolations(other);
	await other.goto('/batteries');
	await expect(other).toHaveURL(/\/sign-in/);
	await expect(other.getByText('Your role was changed')).toBeVisible();
	await expectNoViolations(other);
	await signInWith(other, { email, password: PASSWORD });
	expect((await other.goto('/books'))?.status()).toBe(200);

	await page.getByText('They leave').click();
	await page.getByRole('button', { name: `End ${name}’s access now` }).click();
	await expect(page.getByText('Gone, at once and on every device.')).toBeVisible();
	await expect(page.getByText(/Signed in as/)).toBeVisible();
	await expectNoViolations(page);
	await other.reload();
	await expect(other).toHaveURL(/\/sign-in/);
	await expect(other.getByText('Your access to the workshop was ended.')).toBeVisible();
	expect((await theirs.request.get('/api/v1/places')).status()).toBe(401);
	await theirs.close();

	await page.getByRole('button', { name: `Bring ${name} back` }).click();
	await expect(page.getByText(/^Here again\./)).toBeVisible();
});

test('an invitation is sent again and withdrawn, without a script too', async ({
	browser,
	baseURL,
	page
}) => {
	await signInAs(page, 'manager');
	const name = `Odd ${randomUUID().slice(0, 8)}`;
	const email = await inviteByPage(page, name, 'engineer');
	const first = await waitForLink(email, LINK);
	const plain = await browser.newContext({
		...(baseURL ? { baseURL } : {}),
		javaScriptEnabled: false,
		storageState: await page.context().storageState()
	});
	const without = await plain.newPage();
	await without.goto('/people');
	await without.getByRole('button', { name: new RegExp(`^Send it again ?, to ${name}`) }).click();
	await expect(without.getByText('The invitation is on its way once more.')).toBeVisible();
	const second = await waitForLink(email, LINK, 2);
	expect((await page.request.get(first)).status()).toBe(404);
	expect((await page.request.get(second)).status()).toBe(200);
	await without.getByRole('button', { name: new RegExp(`^Withdraw it ?, from ${name}`) }).click();
	await expect(without.getByText('The invitation is withdrawn.')).toBeVisible();
	expect((await page.request.get(second)).status()).toBe(410);
	await plain.close();
});

test('nobody changes their own role, and the last manager cannot leave', ONCE, async ({ page }) => {
	await signInAs(page, 'manager');
	await page.goto('/people');
	await page.getByRole('link', { name: '(you)' }).click();
	await expect(page.getByText('Nobody changes their own role: another manager can.')).toBeVisible();
	await page.getByText('I leave').click();
	await page.getByRole('button', { name: 'End my access now' }).click();
	await expect(page.getByText('The last manager cannot leave')).toBeVisible();
	await expect(page.getByRole('region', { name: 'Something here needs another look' })).toBeFocused();
	await expectNoViolations(page);
});
