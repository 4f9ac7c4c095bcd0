import { access, constants } from 'node:fs/promises';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { Trouble, programTrouble } from './trouble.mjs';

// An ordinary account's PATH leaves out the sbin folders where servers live.
const PLACES = ['/usr/sbin', '/usr/bin', '/usr/local/sbin', '/usr/local/bin', '/sbin', '/bin'];

/**
 * @typedef {{ what: string, packages: string[], programs: string[], instead?: string }} Need `instead` is a program that
 *   does too, when it is there and the better one cannot be had.
 */

/** @type {Need} */
export const MARIADB = {
	what: 'MariaDB',
	packages: ['mariadb-server-core', 'mariadb-client-core'],
	programs: ['mariadbd', 'mariadb-install-db', 'my_print_defaults']
};

/**
 * The browser without windows of its own, which costs the tests half the time of the one with them.
 * @type {Need}
 */
export const CHROMIUM = {
	what: 'Chromium',
	packages: ['chromium-headless-shell'],
	programs: ['chromium-headless-shell'],
	instead: 'chromium'
};

/**
 * What reads the documents back in the tests.
 * @type {Need}
 */
export const POPPLER = {
	what: 'Poppler',
	packages: ['poppler-utils'],
	programs: ['pdftotext', 'pdftoppm', 'pdffonts']
};

/**
 * @param {string} program
 * @returns {Promise<string | null>} its full path
 */
export async function locate(program) {
	for (const place of PLACES) {
		const path = join(place, program);
		const found = await access(path, constants.X_OK).then(
			() => true,
			() => false
		);
		if (found) return path;
	}
	return null;
}

/** @param {Need} need */
export async function isMissing(need) {
	const found = await Promise.all(need.programs.map(locate));
	return found.includes(null);
}

/** @param {Need} need */
async function hasSpare({ instead }) {
	return instead !== undefined && (await locate(instead)) !== null;
}

/** @param {Need} need */
export function installCommand({ packages }) {
	return `apt-get update && apt-get install -y --no-install-recommends ${packages.join(' ')}`;
}

/**
 * The words in front of a command that has to run as root; null when this account cannot.
 * @returns {Promise<string[] | null>}
 */
async function rootPrefix() {
	if (process.getuid?.() === 0) return [];
	const sudo = await locate('sudo');
	if (!sudo) return null;
	const { code } = await run(sudo, ['-n', 'true'], {});
	return code === 0 ? [sudo, '-n'] : null;
}

/**
 * Refuses before anything is begun when something is missing that this account cannot install.
 * @param {Need[]} needs
 */
export async function requireInstallable(needs) {
	for (const need of needs) {
		if (!(await isMissing(need)) || (await hasSpare(need))) continue;
		if ((await locate('apt-get')) === null) {
			throw new Trouble(
				`${need.what} is missing and this system has no apt-get: install ${need.programs.join(', ')} and start again.`
			);
		}
		if ((await rootPrefix()) === null) {
			throw new Trouble(
				`${need.what} is missing and this account may not install it: run  sudo sh -c '${installCommand(need)}'  and start again.`
			);
		}
	}
}

/**
 * Installs from Debian's packages what is missing.
 * @param {Need} need
 * @param {string} logFile
 * @param {(words: string) => void} note
 */
export async function ensureInstalled(need, logFile, note) {
	if (!(await isMissing(need))) return note('already there');
	await requireInstallable([need]);
	const prefix = await rootPrefix();
	if (prefix === null) return note(`${need.instead} does too`);
	note(`installing ${need.packages.join(' and ')}`);
	const words = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', 'sh', '-c', aptScript(need)];
	const [command = 'env', ...args] = words;
	const { code, output } = await run(command, args, { logFile, sparing: true });
	if (code !== 0 || (await isMissing(need))) {
		if (await hasSpare(need)) return note(`not to be had: ${need.instead} does too`);
		throw programTrouble(`${need.what} could not be installed from Debian's packages`, output, logFile);
	}
}

/** @param {Need} need */
function aptScript({ packages }) {
	const apt = 'apt-get -q -o DPkg::Lock::Timeout=120';
	// Lists that do not refresh may still be good enough: the install tells.
	return `${apt} update; ${apt} install -y --no-install-recommends ${packages.join(' ')}`;
}
