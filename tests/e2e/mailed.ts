import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Page } from '@playwright/test';

/** Letters to an address in the local mail server's folder, the oldest first, with their lines put together again. */
export function readMail(email: string): string[] {
	const folder = process.env.MAILBOX_DIR ?? '';
	// A letter has its own name only once it is whole.
	return readdirSync(folder)
		.filter((name) => name.endsWith('.eml'))
		.sort()
		.map((name) => readFileSync(join(folder, name), 'utf8').replace(/=\r?\n/g, ''))
		.filter((letter) => letter.includes(`To: ${email}`));
}

/** Waits for so many letters to an address that bring such a link, and gives the newest link. */
export async function waitForLink(email: string, path: RegExp, count = 1): Promise<string> {
	const find = () => readMail(email).flatMap((letter) => path.exec(letter)?.[0] ?? []);
	await expect.poll(() => find().length, { timeout: 20_000 }).toBe(count);
	return find().at(-1) ?? '';
}

/** Signs in by the link that a letter brings, without a password. */
export async function signInByLetter(page: Page, email: string): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('Your e-mail').fill(email);
	await page.getByRole('button', { name: 'Send me a link' }).click();
	await page.goto(await waitForLink(email, /\/sign-in\/link\/[\w-]{22}/));
	await page.getByRole('button', { name: 'Sign in now' }).click();
}
