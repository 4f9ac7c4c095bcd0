// Checks everything that has to hold, on a machine that may have nothing but Node and npm, and ends with one line of
// counts. `--only NAME` runs one phase; words after it go to that phase's runner. Uses Node's own modules only.
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { ensureDependencies } from './lib/dependencies.mjs';
import { PROJECT, STATE, makeStateFolders } from './lib/folders.mjs';
import { inTurn } from './lib/lock.mjs';
import { CHROMIUM, MARIADB, POPPLER, ensureInstalled, requireInstallable } from './lib/packages.mjs';
import { run, stopEverything } from './lib/processes.mjs';
import { say, sayTime, step } from './lib/steps.mjs';
import { onStopSignal } from './lib/stop-signal.mjs';
import { lastLine, noCounts, sumCounts } from './lib/testing/counts.mjs';
import { allPhases } from './lib/testing/phases.mjs';
import { runPhases } from './lib/testing/schedule.mjs';
import { clearLeftRuns, makeRunFolder } from './lib/testing/surroundings.mjs';
import {
	FRESH_NEEDS_MB,
	Trouble,
	programTrouble,
	requireFreeSpace,
	requireNode,
	sentenceFor
} from './lib/trouble.mjs';

const stopSignal = onStopSignal(stopEverything);

/** @param {string[]} words @returns {{ only: string | null, filters: string[] }} */
function readArguments([flag, only, ...filters]) {
	if (flag === undefined) return { only: null, filters: [] };
	if (flag !== '--only' || only === undefined)
		throw new Trouble('Usage: npm test [-- --only PHASE [FILTER ...]]');
	return { only, filters };
}

/** @param {string | null} only */
async function prepare(only) {
	requireNode(process.versions.node);
	await requireFreeSpace(PROJECT, FRESH_NEEDS_MB);
	const needs = [
		...(only === null || only === 'services' || only === 'e2e' ? [MARIADB] : []),
		...(only === null || only === 'e2e' ? [CHROMIUM] : []),
		...(only === null || only === 'services' || only === 'e2e' ? [POPPLER] : [])
	];
	await requireInstallable(needs);
	const { log } = await makeStateFolders(STATE);
	for (const need of needs) {
		await step(need.what, (note) => ensureInstalled(need, join(log, 'packages.log'), note));
	}
	await step('Dependencies', (note) =>
		inTurn(join(STATE, 'install.lock'), () =>
			ensureDependencies(PROJECT, join(log, 'dependencies.log'), note)
		)
	);
	await step('Generated', async () => {
		const logFile = join(log, 'generated.log');
		const kit = join('node_modules', '@sveltejs', 'kit', 'svelte-kit.js');
		const { code, output } = await run(process.execPath, [kit, 'sync'], { cwd: PROJECT, logFile });
		if (code !== 0) throw programTrouble('The generated types could not be written', output, logFile);
	});
}

/**
 * One phase to its end; a failure outside its runner counts as one failed.
 * @param {import('./lib/testing/phases.mjs').TestPhase} phase
 * @param {number} begun
 */
async function runOne(phase, begun) {
	const outcome = await phase.work().catch((error) => ({
		counts: { ...noCounts(), failed: 1 },
		output: sentenceFor(error)
	}));
	if (stopSignal.happened()) return outcome;
	const { counts, output } = outcome;
	say(`\n── ${phase.name}: ${lastLine(counts)} in ${sayTime(performance.now() - begun)} ──`);
	if (output.trim()) say(output.trim());
	for (const remark of counts.remarks) say(`! ${remark}`);
	return outcome;
}

async function runTests() {
	const { only, filters } = readArguments(process.argv.slice(2));
	const begun = performance.now();
	await prepare(only);
	await clearLeftRuns(STATE);
	const folder = await makeRunFolder(STATE);
	try {
		const phases = allPhases({ project: PROJECT, state: STATE, folder, filters });
		const chosen = only === null ? phases : phases.filter(({ name }) => name === only);
		if (chosen.length === 0) {
			throw new Trouble(
				`No phase is called "${only}": there are ${phases.map(({ name }) => name).join(', ')}.`
			);
		}
		const outcomes = await runPhases(chosen, runOne);
		say(`\nAll of it took ${sayTime(performance.now() - begun)}.`);
		return sumCounts(outcomes.map(({ counts }) => counts));
	} finally {
		await stopEverything();
		await rm(folder, { recursive: true, force: true });
	}
}

const counts = await runTests().catch((error) => {
	say(`\n${sentenceFor(error)}`);
	return { ...noCounts(), failed: 1 };
});
if (stopSignal.happened()) say('Stopped before the end.');
say(lastLine(counts));
process.exit(counts.failed > 0 || stopSignal.happened() ? 1 : 0);
