import { join } from 'node:path';
import { readJson } from './files.mjs';
import { runNpm } from './processes.mjs';
import { programTrouble } from './trouble.mjs';

/** @typedef {{ version?: string, integrity?: string, optional?: boolean }} Package */

/**
 * Whether what is installed is what the lock asks for. npm writes its own list of what it installed last of all,
 * so that a broken-off installation has none.
 * @param {unknown} lock package-lock.json
 * @param {unknown} installed node_modules/.package-lock.json
 */
export function isUpToDate(lock, installed) {
	const wanted = packagesOf(lock);
	const found = packagesOf(installed);
	if (!wanted || !found) return false;
	const surplus = Object.keys(found).some((path) => !(path in wanted));
	return (
		!surplus && Object.entries(wanted).every(([path, each]) => path === '' || matches(each, found[path]))
	);
}

/** @param {Package} wanted @param {Package | undefined} found */
function matches(wanted, found) {
	// Optional packages for other systems are in the lock and never installed here.
	if (!found) return wanted.optional === true;
	return wanted.version === found.version && wanted.integrity === found.integrity;
}

/**
 * @param {unknown} file
 * @returns {Record<string, Package> | null}
 */
function packagesOf(file) {
	if (typeof file !== 'object' || file === null || !('packages' in file)) return null;
	return /** @type {Record<string, Package>} */ (file.packages);
}

/**
 * Installs the dependencies when the lock has changed since the last time.
 * @param {string} project
 * @param {string} logFile
 * @param {(words: string) => void} note
 */
export async function ensureDependencies(project, logFile, note) {
	const lock = await readJson(join(project, 'package-lock.json'));
	const installed = await readJson(join(project, 'node_modules', '.package-lock.json'));
	if (isUpToDate(lock, installed)) return note('up to date');
	note(installed ? 'the lock has changed, installing' : 'installing');
	const { code, output } = await runNpm(['ci', '--include=dev', '--no-audit', '--no-fund'], {
		cwd: project,
		logFile
	});
	if (code !== 0) throw programTrouble('The dependencies could not be installed', output, logFile);
}
