import { closeSync, openSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { launch } from './processes.mjs';
import { programTrouble } from './trouble.mjs';

const PROGRAM = fileURLToPath(new URL('../local-mail.mjs', import.meta.url));
const WITH_PARENT = new URL('./exit-with-parent.mjs', import.meta.url).href;

/**
 * Starts the local mail server and waits until it listens.
 * @param {{ port: number, folder: string, logFile: string }} where
 */
export async function startMailbox({ port, folder, logFile }) {
	const log = openSync(logFile, 'w', 0o600);
	try {
		const launched = launch(process.execPath, ['--import', WITH_PARENT, PROGRAM, String(port), folder], {
			stdio: ['ignore', log, log, 'ipc']
		});
		const up = await Promise.race([
			new Promise((resolve) => launched.child.once('message', () => resolve(true))),
			launched.ended.then(() => false)
		]);
		if (!up) {
			throw programTrouble('The local mail server did not start', await readFile(logFile, 'utf8'), logFile);
		}
		return launched;
	} finally {
		closeSync(log);
	}
}

/**
 * What the application reads the way for its mail from.
 * @param {{ port: number, folder: string }} where
 */
export function mailEnv({ port, folder }) {
	return { SMTP_URL: `smtp://127.0.0.1:${port}`, MAILBOX_DIR: folder };
}
