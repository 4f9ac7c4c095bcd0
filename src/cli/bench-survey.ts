// How soon the survey's picture follows a control that is moved, in the browser, with the built application behind it.
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { chromium, type Page } from '@playwright/test';
import config from '../../tests/e2e/playwright.config';
import { makeAssessableJob } from '../../tests/e2e/assessable-job';
import { personOf, signInWith } from '../../tests/e2e/support';
import { ensureBuild } from './lib/build.mjs';
import { findMedian, formatTable } from './lib/bench-table';
import { PROJECT, STATE } from './lib/folders.mjs';
import { stopEverything } from './lib/processes.mjs';
import { makeRunFolder, openApplication } from './lib/testing/surroundings.mjs';

const MOVES = 40;
const WARM_UP = 10;

interface Move {
	pictureMs: number;
	bandMs: number;
}

/** Moves a control, and waits for the frames that show the day's curve anew and then the band around it. */
function move(page: Page, name: string): Promise<Move> {
	return page.getByRole('button', { name, exact: true }).evaluate(
		(button) =>
			new Promise<Move>((resolve) => {
				const picture = document.querySelector('.day-ribbon .picture')!;
				const begun = performance.now();
				let pictureMs = 0;
				const observer = new MutationObserver(() =>
					requestAnimationFrame(() => {
						const ms = performance.now() - begun;
						if (pictureMs === 0) pictureMs = ms;
						if (!document.querySelector('.chance')?.textContent) return;
						observer.disconnect();
						resolve({ pictureMs, bandMs: ms });
					})
				);
				observer.observe(picture, { childList: true, subtree: true });
				(button as HTMLButtonElement).click();
			})
	);
}

async function watchMoves(page: Page): Promise<Move[]> {
	const { mountIds } = await makeAssessableJob(page);
	await page.goto(`/mounts/${mountIds[0]}/survey/bonnet`, { waitUntil: 'networkidle' });
	const moves: Move[] = [];
	for (let k = 0; k < WARM_UP + MOVES; k++) {
		const moved = await move(page, `${k % 2 ? 'Less' : 'More'}: Gap up to the bonnet`);
		if (k >= WARM_UP) moves.push(moved);
	}
	return moves;
}

const folder = await makeRunFolder(STATE);
try {
	const logFile = join(folder, 'build.log');
	await ensureBuild({ project: PROJECT, lockFile: join(STATE, 'build.lock'), logFile }, () => undefined);
	const application = await openApplication(PROJECT, join(folder, 'bench'));
	const browser = await chromium.launch(config.use!.launchOptions);
	try {
		const page = await browser.newPage({ baseURL: application.env.E2E_BASE_URL });
		await signInWith(page, personOf('installer'));
		const moves = await watchMoves(page);
		const row = (name: string, read: (each: Move) => number) => {
			const all = moves.map(read).sort((a, b) => a - b);
			const worst = all[Math.floor(0.95 * all.length)]!;
			return [name, findMedian(all).toFixed(1), worst.toFixed(1)];
		};
		console.log(
			`\nThe survey in Chromium ${browser.version()}, from a moved control to the frame that shows it:`
		);
		console.log(
			formatTable([
				['', 'median ms', '95 of 100 within ms'],
				row('the curve of the day', ({ pictureMs }) => pictureMs),
				row('the band around it', ({ bandMs }) => bandMs)
			])
		);
	} finally {
		await browser.close();
		await application.close();
	}
} finally {
	await stopEverything();
	await rm(folder, { recursive: true, force: true });
}
