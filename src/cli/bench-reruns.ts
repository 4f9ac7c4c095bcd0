// How long it takes to assess a workshop's mounts again when a book comes into force, and how soon pages answer meanwhile:
// in the built application with a database of its own, over HTTP.
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { request, type APIRequestContext } from '@playwright/test';
import people from '../../seeds/demo-people.json' with { type: 'json' };
import type { BookView } from '../lib/schemas/books';
import type { RerunView } from '../lib/schemas/reruns';
import { startApplication } from './lib/application.mjs';
import { findMedian, formatSeconds, formatTable } from './lib/bench-table';
import { ensureBuild } from './lib/build.mjs';
import { copyAssessments } from './lib/copy-assessments';
import { PROJECT, STATE } from './lib/folders.mjs';
import { stopEverything } from './lib/processes.mjs';
import { makeRunFolder, openSurroundings } from './lib/testing/surroundings.mjs';

const { values } = parseArgs({ options: { assessments: { type: 'string', default: '10000' } } });
const COUNT = Number(values.assessments);
const PAGE = '/jobs';
const EVERY_MS = 500;
const QUIET_ASKS = 40;
const SHARE = { value: 0.5, origin: 'judgement', source: 'For trying out how long it takes.' };

const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

async function signIn(baseURL: string, role: string): Promise<APIRequestContext> {
	const context = await request.newContext({ baseURL });
	const { email, password } = people.find((each) => each.role === role)!;
	await context.post('/sign-in?/password', { form: { email, password }, headers: { accept: 'text/html' } });
	return context;
}

async function ask<Answer>(
	context: APIRequestContext,
	method: 'GET' | 'POST' | 'PUT',
	path: string,
	data?: object
): Promise<Answer> {
	const answer = await context.fetch(`/api/v1${path}`, { method, timeout: 0, ...(data ? { data } : {}) });
	if (!answer.ok()) throw new Error(`${method} ${path} answered ${answer.status()}: ${await answer.text()}`);
	return (await answer.json()) as Answer;
}

/** Puts a book in force that every mount is assessed with which has no closer one. */
async function putInForce(engineer: APIRequestContext, manager: APIRequestContext): Promise<void> {
	const { rows } = await ask<{ rows: BookView[] }>(engineer, 'GET', '/books');
	const from = rows.find(({ number }) => number === 1)!;
	const draft = await ask<BookView>(engineer, 'POST', '/books', {
		...{ fromBookId: from.id, name: 'For trying out', note: '' }
	});
	const { version } = await ask<BookView>(engineer, 'PUT', `/books/${draft.id}/coefficients/bay.share`, {
		...{ ...SHARE, version: draft.version }
	});
	const state = `/books/${draft.id}/state`;
	const trial = await ask<BookView>(engineer, 'PUT', state, { to: 'on-trial', version });
	await ask(manager, 'PUT', state, { to: 'in-force', version: trial.version });
}

/** Milliseconds that a page takes, asked on the beat until something is over. */
async function watchPage(context: APIRequestContext, isOver: () => boolean): Promise<number[]> {
	const latencies: number[] = [];
	while (!isOver()) {
		const begun = performance.now();
		await (await context.get(PAGE, { timeout: 0 })).body();
		latencies.push(performance.now() - begun);
		await pause(EVERY_MS);
	}
	return latencies.sort((a, b) => a - b);
}

function rowOf(name: string, latencies: number[]): string[] {
	const within = latencies[Math.ceil(0.95 * latencies.length) - 1]!;
	return [name, findMedian(latencies).toFixed(1), within.toFixed(1), String(latencies.length)];
}

async function waitForEnd(context: APIRequestContext): Promise<RerunView> {
	for (;;) {
		const { rows } = await ask<{ rows: RerunView[] }>(context, 'GET', '/reruns');
		const newest = rows[0];
		if (newest?.state === 'done' && newest.total >= COUNT) return newest;
		await pause(1_000);
	}
}

async function run(baseURL: string): Promise<void> {
	const [engineer, manager] = [await signIn(baseURL, 'engineer'), await signIn(baseURL, 'manager')];
	let asked = 0;
	const quiet = await watchPage(manager, () => asked++ >= QUIET_ASKS);
	const begun = performance.now();
	await putInForce(engineer, manager);
	const put = performance.now();
	let isOver = false;
	const watching = watchPage(manager, () => isOver);
	const rerun = await waitForEnd(engineer);
	const tookMs = performance.now() - begun;
	isOver = true;
	const busy = await watching;
	console.log(
		`${rerun.done} assessments made again with their uncertainty, ${rerun.failed} failed, ${rerun.passedOver} passed over: ` +
			`${formatSeconds(tookMs)}, ${(rerun.done / (tookMs / 1_000)).toFixed(1)} a second; ` +
			`to put the book in force took ${formatSeconds(put - begun)}.`
	);
	console.log(
		formatTable([
			[`${PAGE}, every ${EVERY_MS} ms`, 'median ms', '95 of 100 within ms', 'asks'],
			rowOf('before', quiet),
			rowOf('meanwhile', busy)
		])
	);
}

const folder = await makeRunFolder(STATE);
try {
	const logFile = join(folder, 'build.log');
	await ensureBuild({ project: PROJECT, lockFile: join(STATE, 'build.lock'), logFile }, () => undefined);
	const { env, folders, close } = await openSurroundings(join(folder, 'reruns'), { demo: true });
	const application = await startApplication({
		project: PROJECT,
		env,
		logFile: join(folders.log, 'app.log')
	});
	try {
		await copyAssessments(env, COUNT);
		await run(env.ORIGIN!);
	} finally {
		await application.stop();
		await close();
	}
} finally {
	await stopEverything();
	await rm(folder, { recursive: true, force: true });
}
