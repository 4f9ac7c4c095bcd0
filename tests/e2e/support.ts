import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';
import people from '../../seeds/demo-people.json' with { type: 'json' };

type DemoRole = 'installer' | 'engineer' | 'manager' | 'customer';

/** Of a test to which the size of the screen is nothing: it runs on the desk alone. */
export const ONCE = { tag: '@once' };

interface Person {
	email: string;
	password: string;
}

/** The first demo person of a role. */
export function personOf(role: DemoRole): Person {
	const person = people.find((each) => each.role === role);
	if (!person) throw new Error(`The demo has no ${role}.`);
	return person;
}

/** Goes on as the first demo person of a role. */
export async function signInAs(page: Page, role: DemoRole): Promise<void> {
	await goOnAs(page, personOf(role));
}

/** The manager of the other demo workshop. */
export async function signInAsNeighbour(page: Page): Promise<void> {
	const person = people.find((each) => each.workshop !== people[0]?.workshop);
	if (!person) throw new Error('The demo has no second workshop.');
	await goOnAs(page, person);
}

/** Signs in through the page that people use, for a session of the test's own. */
export async function signInWith(page: Page, { email, password }: Person): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail', { exact: true }).fill(email);
	await page.getByLabel('Password').fill(password);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

const sessions = new Map<string, Awaited<ReturnType<ReturnType<Page['context']>['cookies']>>>();

/** Signs in once for each person; later tests, each in a browser of its own, go on with that session. */
async function goOnAs(page: Page, person: Person): Promise<void> {
	const context = page.context();
	const known = sessions.get(person.email);
	if (known) {
		await context.addCookies(known);
		await page.goto('/');
		return;
	}
	await signInWith(page, person);
	sessions.set(person.email, await context.cookies());
}

/** Opens a page and waits until its script has it in hand: what is chosen before that may not be kept. */
export async function openForm(page: Page, path: string): Promise<void> {
	await page.goto(path, { waitUntil: 'networkidle' });
}

/** Nothing on the page that an accessibility scan by the rules of WCAG 2.2 AA finds fault with. */
export async function expectNoViolations(page: Page): Promise<void> {
	const { violations } = await new AxeBuilder({ page })
		// No page holds a frame, so that the way which needs no second page finds the same.
		.setLegacyMode()
		.withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
		.analyze();
	const found = violations.map(
		({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`
	);
	expect(found).toEqual([]);
}

/** Collects what the browser says where a page as it was sent is not the page that its script would have made. */
export function watchHydration(page: Page): string[] {
	const said: string[] = [];
	page.on('console', (message) => {
		if (/hydration/i.test(message.text())) said.push(`${page.url()}: ${message.text()}`);
	});
	return said;
}
