import { fileURLToPath } from 'node:url';
import { expect, test } from '@playwright/test';
import { build, type Rollup } from 'vite';
import { ENGINE_CASES } from '../reference/support/cases';
import * as engineHere from '../support/engine-entry';
import { ONCE } from './support';

/** What both have to work out: every day of the table of cases, and draws around one of them. */
const CASES = ENGINE_CASES.map(({ input }) => input);
const SPREAD = { samples: 32, seed: 11 };

/** Runs in Node and in the page: the reports, and the spread, as JSON, where each number has all of its digits. */
function workOut(
	engine: typeof engineHere,
	{ cases, spread }: { cases: unknown[]; spread: typeof SPREAD }
): string[] {
	const reports = cases.map((input) => JSON.stringify(engine.simulateScenario(input)));
	const work = engine.spreadDay(engine.parseScenario(cases[1]), spread);
	for (;;) {
		const step = work.next();
		if (step.done) return [...reports, JSON.stringify(step.value)];
	}
}

/** The engine as one script that sets one name. */
async function bundleEngine(): Promise<string> {
	const entry = fileURLToPath(new URL('../support/engine-entry.ts', import.meta.url));
	const [bundle] = (await build({
		configFile: false,
		logLevel: 'error',
		build: { write: false, minify: false, lib: { entry, formats: ['iife'], name: 'engine' } }
	})) as Rollup.RollupOutput[];
	return bundle!.output[0].code.replace('var engine =', 'globalThis.engine =');
}

test('the engine gives the same digits in Node and in Chromium', ONCE, async ({ page }) => {
	await page.goto('about:blank');
	await page.evaluate(await bundleEngine());
	const there = await page.evaluate(
		`(${workOut.toString()})(engine, ${JSON.stringify({ cases: CASES, spread: SPREAD })})`
	);
	const here = workOut(engineHere, { cases: CASES, spread: SPREAD });
	expect(here.length).toBe(CASES.length + 1);
	expect(there).toEqual(here);
});
