import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { ensureBuild } from '../build.mjs';
import { readJson } from '../files.mjs';
import { run } from '../processes.mjs';
import { Trouble } from '../trouble.mjs';
import { heldAgainstEnding, playwrightCounts, vitestCounts, wholeCheck } from './counts.mjs';
import { impersonalEnv, openApplication, openSurroundings } from './surroundings.mjs';

/**
 * @typedef {{ project: string, state: string, folder: string, filters: string[] }} Place
 * @typedef {{ counts: import('./counts.mjs').Counts, output: string }} Outcome
 * @typedef {import('./schedule.mjs').Phase<Outcome>} TestPhase
 */

const OUTPUT_CHARS = 400_000;

/** @param {string} name */
const bin = (name) => join('node_modules', name);
const VITEST = bin('vitest/vitest.mjs');
const PLAYWRIGHT = bin('@playwright/test/cli.js');

/**
 * @param {Place} place
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} [env]
 */
function runNode({ project }, args, env = impersonalEnv()) {
	return run(process.execPath, args, { cwd: project, env, keepChars: OUTPUT_CHARS });
}

/** @param {Place} place @param {string} name @param {string[]} args @returns {TestPhase} */
function whole(place, name, args) {
	return {
		name,
		work: async () => {
			const { code, output } = await runNode(place, args);
			return { counts: wholeCheck(code), output };
		}
	};
}

/**
 * @param {Place} place
 * @param {string[]} projects vitest's
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<Outcome>}
 */
async function runVitest(place, projects, env) {
	const report = join(place.folder, `${projects.join('-')}.json`);
	const { code, output } = await runNode(
		place,
		[
			VITEST,
			'run',
			...projects.map((project) => `--project=${project}`),
			'--reporter=default',
			'--reporter=json',
			`--outputFile.json=${report}`,
			...place.filters
		],
		env
	);
	return { counts: heldAgainstEnding(vitestCounts(await readJson(report)), code), output };
}

/** @param {Place} place @returns {Promise<Outcome>} */
async function runServices(place) {
	const surroundings = await openSurroundings(join(place.folder, 'services'), { demo: false });
	try {
		return await runVitest(place, ['services', 'settings'], { ...surroundings.env, NODE_ENV: 'test' });
	} finally {
		await surroundings.close();
	}
}

/** @param {Place} place @param {(words: string) => void} note */
async function build({ project, state, folder }, note) {
	const logFile = join(folder, 'build.log');
	await ensureBuild({ project, lockFile: join(state, 'build.lock'), logFile }, note);
	return readFile(logFile, 'utf8').catch(() => '');
}

/** @param {Place} place @returns {Promise<Outcome>} */
async function runBuild(place) {
	/** @type {string[]} */
	const notes = [];
	try {
		await build(place, (words) => notes.push(words));
		return { counts: wholeCheck(0), output: notes.join('\n') };
	} catch (error) {
		if (!(error instanceof Trouble)) throw error;
		const log = await readFile(join(place.folder, 'build.log'), 'utf8').catch(() => '');
		return { counts: wholeCheck(1), output: `${log}\n${error.message}` };
	}
}

/** @param {Place} place @returns {Promise<Outcome>} */
async function runBrowser(place) {
	await build(place, () => undefined);
	const application = await openApplication(place.project, join(place.folder, 'e2e'));
	try {
		const report = join(place.folder, 'e2e.json');
		const { code, output } = await runNode(
			place,
			[
				PLAYWRIGHT,
				'test',
				'--config=tests/e2e/playwright.config.ts',
				'--reporter=list,json',
				...place.filters
			],
			{ ...application.env, PLAYWRIGHT_JSON_OUTPUT_FILE: report }
		);
		const counts = heldAgainstEnding(playwrightCounts(await readJson(report)), code);
		return { counts, output: counts.failed ? output + (await lastOfLog(application.logFile)) : output };
	} finally {
		await application.close();
	}
}

/** @param {string} logFile */
async function lastOfLog(logFile) {
	const lines = (await readFile(logFile, 'utf8').catch(() => '')).split('\n');
	return `\nThe last of the application's log:\n${lines.slice(-40).join('\n')}`;
}

/**
 * Everything that has to hold, long ones early; the browser's runs alone, for it needs both cores.
 * @param {Place} place
 * @returns {TestPhase[]}
 */
export function allPhases(place) {
	return [
		{ name: 'build', work: () => runBuild(place) },
		whole(place, 'lint', [bin('eslint/bin/eslint.js'), '.']),
		whole(place, 'format', [bin('prettier/bin/prettier.cjs'), '--check', '.']),
		whole(place, 'types', [
			bin('svelte-check/bin/svelte-check'),
			'--tsconfig',
			'./tsconfig.json',
			'--fail-on-warnings'
		]),
		{ name: 'unit', work: () => runVitest(place, ['unit']) },
		{ name: 'components', work: () => runVitest(place, ['components']) },
		{ name: 'reference', work: () => runVitest(place, ['reference']) },
		{ name: 'services', work: () => runServices(place) },
		{ name: 'e2e', needs: 'build', alone: true, work: () => runBrowser(place) }
	];
}
