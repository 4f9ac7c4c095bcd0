import { readFileSync, readdirSync } from 'node:fs';
import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import { expect, test, type APIRequestContext, type APIResponse } from '@playwright/test';
import { ONCE } from './support';
import people from '../../seeds/demo-people.json' with { type: 'json' };
import {
	ROUTE_RULES,
	VISITORS,
	standingOf,
	type RouteRule,
	type Standing,
	type Visitor
} from './route-rules';

const NOT_THERE = '999999';
/** The smallest photo that there is: a PNG of one grey pixel. */
const ONE_PIXEL = Buffer.from(
	'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAAAAAA6fptVAAAACklEQVR4nGNoAAAAggCBd81ytgAAAABJRU5ErkJggg==',
	'base64'
);
/** What these answer depends on who is signed in already; sign-in has tests of its own. */
const ABOUT_SESSIONS = /^\/(sign-in|sign-out)(\/|$)/;
type Ids = Record<string, string>;

async function read<T>(context: APIRequestContext, path: string): Promise<T> {
	const response = await context.get(path);
	expect(response.status(), path).toBe(200);
	return (await response.json()) as T;
}

/** The link in the newest letter to the demo customer. */
function findToken(email: string): string {
	const folder = process.env.MAILBOX_DIR ?? '';
	for (const name of readdirSync(folder).sort().reverse()) {
		const letter = readFileSync(join(folder, name), 'utf8').replace(/=\r?\n/g, '');
		const token = /\/sheet\/([\w-]{22})/.exec(letter)?.[1];
		if (letter.includes(`To: ${email}`) && token) return token;
	}
	throw new Error(`There is no sheet for ${email} in ${folder}.`);
}

/** Somebody of the shop, and somebody who was asked to join it. */
async function findPeople(context: APIRequestContext): Promise<Ids> {
	const email = `asked-${randomUUID()}@shop.example`;
	const asked = await context.post('/api/v1/invitations', {
		data: { name: 'Somebody asked', email, role: 'installer' }
	});
	expect(asked.status()).toBe(201);
	const { people: staff } = await read<{ people: { id: number; role: string }[] }>(context, '/api/v1/people');
	const installer = staff.find(({ role }) => role === 'installer');
	const invitation = (await asked.json()) as { id: number };
	return { personId: String(installer?.id ?? 'none'), invitationId: String(invitation.id) };
}

/** In the manager's mailbox the newest letter that the whole shop may read: an invitation is the manager's alone. */
function findSharedLetter(mailbox: string): string {
	const letters = [...mailbox.matchAll(/href="\/mailbox\/([^"]+)"[^>]*>(?:<!--.*?-->|\s)*([^<]+)/g)];
	return letters.find(([, , subject]) => !subject?.startsWith('Join '))?.[1] ?? 'none';
}

/** A zone of the shop's own in which no place lies. */
async function findZone(context: APIRequestContext): Promise<string> {
	const { rows } = await read<{ rows: { id: number }[] }>(context, '/api/v1/own-zones');
	if (rows[0]) return String(rows[0].id);
	const zone = { name: 'Empty sea', position: 9, rule: 'latitude', fromValue: 0, toValue: 1 };
	const made = await context.post('/api/v1/own-zones', { data: zone });
	expect(made.status(), await made.text()).toBe(201);
	return String(((await made.json()) as { id: number }).id);
}

/** A fit of the shop: a small one is begun where there is none. */
async function findFit(context: APIRequestContext, traceId: string): Promise<string> {
	const { rows } = await read<{ rows: { id: number }[] }>(context, '/api/v1/fits');
	if (rows[0]) return String(rows[0].id);
	const prior = { law: 'lognormal', middle: 20, spread: 0.4 };
	const data = {
		...{ name: 'For every door', traces: [{ traceId: Number(traceId) }], leaveOut: false },
		coefficients: [{ group: 'bay', key: 'leakClosed', prior }]
	};
	const made = await context.post('/api/v1/fits', { data });
	expect(made.status(), await made.text()).toBe(201);
	return String(((await made.json()) as { id: number }).id);
}

/** Ids of one demo job and everything that hangs on it, to put into the routes. */
async function findIds(
	context: APIRequestContext,
	customers: APIRequestContext,
	customer: { name: string; email: string }
): Promise<Ids> {
	const { rows } = await read<{ rows: { id: number }[] }>(
		context,
		`/api/v1/jobs?search=${customer.name.split(' ')[0]}`
	);
	const jobId = String(rows.at(-1)?.id);
	type Record = { id: number };
	type Job = { customer: Record; vehicle: Record; battery: Record; place: Record; mounts: Record[] };
	const job = await read<Job>(context, `/api/v1/jobs/${jobId}`);
	const of = (record: Record | undefined) => String(record?.id);
	const assessments = await read<{ rows: Record[] }>(context, `/api/v1/jobs/${jobId}/assessments`);
	const sheets = await read<{ rows: (Record & { withdrawnAt: string | null })[] }>(
		context,
		`/api/v1/jobs/${jobId}/sheets`
	);
	const books = await read<{ rows: Record[] }>(context, '/api/v1/books');
	const reruns = await read<{ rows: Record[] }>(context, '/api/v1/reruns');
	const rerunId = of(reruns.rows.at(-1));
	const changes = await read<{ rows: Record[] }>(context, `/api/v1/reruns/${rerunId}/changes`);
	const traces = await read<{ rows: (Record & { state: string; name: string })[] }>(
		context,
		'/api/v1/traces'
	);
	const traceId = of(traces.rows.find(({ name }) => name === 'trace-1.csv'));
	const jobPage = await (await context.get(`/jobs/${jobId}/recommendation`)).text();
	const mailbox = await (await context.get('/mailbox')).text();
	const recommendationId = /\/recommendations\/(\d+)\/print/.exec(jobPage)?.[1] ?? 'none';
	const { assessment } = await read<{ assessment: { mountId: number } }>(
		context,
		`/api/v1/recommendations/${recommendationId}`
	);
	const mountId = String(assessment.mountId);
	const fitting = await read<{ followUps: Record[] }>(context, `/api/v1/mounts/${mountId}/fitting`);
	const letters = await read<{ rows: Record[] }>(context, `/api/v1/jobs/${jobId}/letters`);
	const own = await (await customers.get('/my')).text();
	const file = { name: 'a.png', mimeType: 'image/png', buffer: ONE_PIXEL };
	const sent = await context.post(`/api/v1/mounts/${mountId}/files`, { multipart: { file } });
	expect(sent.status(), await sent.text()).toBe(201);
	const note = { kind: 'inspection', notedOn: new Date().toISOString().slice(0, 10), words: 'Dry and tight' };
	const noted = await context.post(`/api/v1/mounts/${mountId}/field-notes`, { data: note });
	expect(noted.status(), await noted.text()).toBe(201);
	const { rows: notes } = (await noted.json()) as { rows: Record[] };
	return {
		...(await findPeople(context)),
		zoneId: await findZone(context),
		jobId,
		mountId,
		fileId: of((await sent.json()) as Record),
		noteId: of(notes[0]),
		followUpId: of(fitting.followUps[0]),
		kind: 'inspection',
		paper: 'handover',
		step: 'exhaust',
		assessmentId: of(assessments.rows[0]),
		recommendationId,
		batteryId: of(job.battery),
		placeId: of(job.place),
		customerId: of(job.customer),
		vehicleId: of(job.vehicle),
		bookId: of(books.rows[0]),
		otherId: of(books.rows[0]),
		traceId,
		fitId: await findFit(context, traceId),
		coefficient: 'bay.share',
		rerunId,
		itemId: of(changes.rows[0]),
		sheetId: of(sheets.rows.find(({ withdrawnAt }) => withdrawnAt === null)),
		messageId: findSharedLetter(mailbox),
		letterId: of(letters.rows[0]),
		stop: /href="\/reminders\/([^"]+)"/.exec(own)?.[1] ?? 'none',
		token: findToken(customer.email)
	};
}

async function signIn(context: APIRequestContext, visitor: Visitor): Promise<void> {
	if (visitor === 'nobody') return;
	const home = people[0]?.workshop;
	const ofHome = (role: string) => people.filter((each) => each.workshop === home && each.role === role);
	const strangers: Partial<Record<Visitor, (typeof people)[number] | undefined>> = {
		neighbour: people.find(({ workshop }) => workshop !== home),
		'other customer': ofHome('customer')[1]
	};
	const person = visitor in strangers ? strangers[visitor] : ofHome(visitor)[0];
	const form = { email: person?.email ?? '', password: person?.password ?? '' };
	const response = await context.post('/sign-in?/password', {
		form,
		maxRedirects: 0,
		headers: { accept: 'text/html' }
	});
	expect(response.status()).toBe(302);
}

const fill = (route: string, ids: Ids): string =>
	route.replace(/\[(\w+)(?:=\w+)?\]/g, (_, name: string) => ids[name] ?? 'none');

/** Records that are not there: whoever is let in finds nothing to change. */
const emptied = (ids: Ids): Ids => Object.fromEntries(Object.keys(ids).map((name) => [name, NOT_THERE]));

function ask(context: APIRequestContext, rule: RouteRule, method: string, ids: Ids): Promise<APIResponse> {
	const path = fill(rule.route, ids);
	const options = { maxRedirects: 0 };
	if (method === 'GET') return context.get(path, options);
	if (rule.route.startsWith('/api/')) {
		return context.fetch(path, { ...options, method, data: rule.bodies?.[method] ?? {} });
	}
	const action = method === 'default' ? path : `${path}?/${method}`;
	return context.post(action, { ...options, form: { nothing: '' }, headers: { accept: 'text/html' } });
}

/** What an answer means to the one who asked. */
function standingIn(response: APIResponse, rule: RouteRule, method: string): Standing | string {
	const status = response.status();
	const to = response.headers().location ?? '';
	if (status === 401 || (status >= 300 && status < 400 && to.startsWith('/sign-in')))
		return 'asked to sign in';
	if (status === 403) return 'refused';
	if (status === 404) return 'told there is no such thing';
	if (status === 409 && rule.nothingFor === method) return 'let in';
	const good = rule.leadsOn ? status < 400 : status < 300;
	return good || status === 422 ? 'let in' : `${status}`;
}

for (const visitor of VISITORS) {
	test(`every route meets ${visitor} as it should`, ONCE, async ({ playwright, baseURL }) => {
		test.setTimeout(180_000);
		const [context, guide, reader] = await Promise.all([
			playwright.request.newContext({ baseURL }),
			playwright.request.newContext({ baseURL }),
			playwright.request.newContext({ baseURL })
		]);
		await signIn(guide, 'manager');
		await signIn(reader, 'customer');
		const customer = people.find(({ role }) => role === 'customer') ?? { name: '', email: '' };
		const ids = await findIds(guide, reader, customer);
		expect(Object.values(ids)).not.toContain('none');
		await signIn(context, visitor);
		for (const rule of ROUTE_RULES.filter(({ route }) => !ABOUT_SESSIONS.test(route))) {
			for (const method of rule.methods) {
				const expected = standingOf(visitor, rule, method);
				const changes = method !== 'GET' && expected === 'let in' && rule.owned === true;
				const response = await ask(context, rule, method, changes ? emptied(ids) : ids);
				const met = standingIn(response, rule, method);
				const what = `${visitor}: ${method} ${rule.route} (${response.status()})`;
				if (changes) expect.soft(['let in', 'told there is no such thing'], what).toContain(met);
				else if (rule.route === '/' || rule.route === '/sign-in')
					expect.soft(response.status(), what).toBeLessThan(500);
				else expect.soft(met, what).toBe(expected);
			}
		}
		await Promise.all([context.dispose(), guide.dispose(), reader.dispose()]);
	});
}
