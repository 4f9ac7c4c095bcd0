// How soon each view of the review answers: over HTTP, from the built application with a database of its own, at a fixed
// rate and with each latency taken from the moment at which the question was to be asked.
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { chromium, type BrowserContext } from '@playwright/test';
import config from '../../tests/e2e/playwright.config';
import { signInWith } from '../../tests/e2e/support';
import type { ReviewZones } from '../lib/schemas/review';
import { startApplication } from './lib/application.mjs';
import { findMedian, formatSeconds, formatTable } from './lib/bench-table';
import { ensureBuild } from './lib/build.mjs';
import { PROJECT, STATE } from './lib/folders.mjs';
import { inventWorkshop } from './lib/invent-workshop';
import { stopEverything } from './lib/processes.mjs';
import { makeRunFolder, openSurroundings } from './lib/testing/surroundings.mjs';

const { values } = parseArgs({
	options: {
		installations: { type: 'string', default: '100000' },
		few: { type: 'string', default: '1000' },
		asks: { type: 'string', default: '60' },
		every: { type: 'string', default: '250' }
	}
});
const ASKS = Number(values.asks);
const EVERY_MS = Number(values.every);
const WARM_UP = 5;
const PAGE = 50;

/** What the review says of a workshop has to be what stands in the tables that people write to. */
async function requireTrue(
	context: BrowserContext,
	{ standing, darkDays }: { standing: number; darkDays: number }
): Promise<void> {
	const { all } = JSON.parse(await ask(context, `${API}/zones`)) as ReviewZones;
	const reported = all.reportedDays + all.reportedElsewhere;
	if (all.installations === standing && reported === darkDays) return;
	throw new Error(
		`The review counts ${all.installations} installations and ${reported} dark days; there are ${standing} and ${darkDays}.`
	);
}

interface Latencies {
	medianMs: number;
	worstMs: number;
}

const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, Math.max(ms, 0)));

async function ask(context: BrowserContext, path: string): Promise<string> {
	const answer = await context.request.get(path, { timeout: 0 });
	const text = await answer.text();
	if (!answer.ok()) throw new Error(`${path} answered ${answer.status()}: ${text.slice(0, 200)}`);
	return text;
}

/** Asks on the beat whatever became of the question before: one that is slow makes the next ones late, and that counts. */
async function measure(context: BrowserContext, path: string): Promise<Latencies> {
	for (let k = 0; k < WARM_UP; k++) await ask(context, path);
	const begun = performance.now() + EVERY_MS;
	const latencies = await Promise.all(
		Array.from({ length: ASKS }, async (_, k) => {
			const due = begun + k * EVERY_MS;
			await pause(due - performance.now());
			await ask(context, path);
			return performance.now() - due;
		})
	);
	const sorted = latencies.sort((a, b) => a - b);
	return { medianMs: findMedian(sorted), worstMs: sorted[Math.ceil(0.95 * sorted.length) - 1]! };
}

/** Pages on through a list to the page with this number, and says how it is asked for. */
async function findPage(context: BrowserContext, list: string, number: number): Promise<string | null> {
	let path = `${list}limit=${PAGE}`;
	for (let page = 1; page < number; page++) {
		const { next } = JSON.parse(await ask(context, path)) as { next: string | null };
		if (next === null) return null;
		path = `${list}limit=${PAGE}&cursor=${encodeURIComponent(next)}`;
	}
	return path;
}

const API = '/api/v1/review';
const VIEWS: [string, string][] = [
	['page: by zone', '/review'],
	['page: by zone, one verdict, a year', '/review?verdict=runs-close&since=2025-12'],
	['page: by own zones', '/review?kind=own'],
	['page: installations', '/review/installations'],
	['page: installations of a zone', '/review/installations?zone=BWh'],
	['page: of a zone and verdict', '/review/installations?zone=Aw&verdict=cuts-out'],
	['page: overdue', '/review/installations?list=overdue'],
	['page: overdue in a zone', '/review/installations?list=overdue&zone=Dfb'],
	['page: overrides', '/review/installations?list=overrides'],
	['page: not acknowledged', '/review/installations?list=waiting'],
	['page: without a sheet, in a zone', '/review/installations?list=missing&zone=Dfb'],
	['page: reported dark', '/review/installations?list=gone-dark&zone=Csa'],
	['page: map', '/review/map'],
	['page: by month', '/review/months'],
	['API: zones', `${API}/zones`],
	['API: installations', `${API}/installations`],
	['API: months', `${API}/trends`],
	['API: map', `${API}/map`]
];

async function walkPages(context: BrowserContext): Promise<string[][]> {
	const rows: string[][] = [];
	for (const number of [1, 10, 100, 1_000]) {
		const path = await findPage(context, `${API}/installations?`, number);
		if (path === null) continue;
		const { medianMs, worstMs } = await measure(context, path);
		rows.push([`page ${number} of ${PAGE}`, medianMs.toFixed(1), worstMs.toFixed(1)]);
	}
	return rows;
}

const folder = await makeRunFolder(STATE);
try {
	const logFile = join(folder, 'build.log');
	await ensureBuild({ project: PROJECT, lockFile: join(STATE, 'build.lock'), logFile }, () => undefined);
	const { env, folders, close } = await openSurroundings(join(folder, 'review'), { demo: true });
	const application = await startApplication({
		project: PROJECT,
		env,
		logFile: join(folders.log, 'app.log')
	});
	const browser = await chromium.launch(config.use!.launchOptions);
	try {
		const contexts: BrowserContext[] = [];
		for (const count of [Number(values.few), Number(values.installations)]) {
			const manager = await inventWorkshop(env, { installations: count, seed: 1 }, console.log);
			const context = await browser.newContext({ baseURL: env.ORIGIN });
			await signInWith(await context.newPage(), manager);
			await requireTrue(context, manager);
			contexts.push(context);
		}
		const [few, many] = contexts as [BrowserContext, BrowserContext];
		const rows = [];
		for (const [name, path] of VIEWS) {
			const [small, large] = [await measure(few, path), await measure(many, path)];
			rows.push([
				name,
				...[
					small.medianMs.toFixed(1),
					small.worstMs.toFixed(1),
					large.medianMs.toFixed(1),
					large.worstMs.toFixed(1)
				],
				(large.medianMs / small.medianMs).toFixed(1)
			]);
		}
		console.log(
			`\nEach view ${ASKS} times, one every ${EVERY_MS} ms; milliseconds, median and 95 of 100 within:`
		);
		console.log(
			formatTable([
				['', `${values.few}: median`, '95 %', `${values.installations}: median`, '95 %', 'times as long'],
				...rows
			])
		);
		console.log(`\nPaging through ${values.installations}:`);
		console.log(formatTable([['', 'median ms', '95 of 100 within ms'], ...(await walkPages(many))]));
		const begun = performance.now();
		const csv = await ask(many, '/review/installations.csv');
		const lines = csv.split('\r\n').length - 2;
		console.log(`\nThe table of all as CSV: ${lines} rows in ${formatSeconds(performance.now() - begun)}.`);
	} finally {
		await browser.close();
		await application.stop();
		await close();
	}
} finally {
	await stopEverything();
	await rm(folder, { recursive: true, force: true });
}
