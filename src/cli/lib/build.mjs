import { createHash } from 'node:crypto';
import { readFile, readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { writeWhole } from './files.mjs';
import { inTurn } from './lock.mjs';
import { runNpm } from './processes.mjs';
import { programTrouble } from './trouble.mjs';

/** What the build is made from. */
const SOURCES = [
	'src',
	'static',
	'seeds',
	'reference-data',
	'package.json',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'tsconfig.json'
];

const NOT_BUILT = /(^src\/cli\/|\.test\.ts$)/;

/**
 * Every file under the given names, in an order that does not depend on the disk.
 * @param {string} project
 * @param {string[]} names
 * @returns {Promise<string[]>}
 */
async function filesUnder(project, names) {
	const files = [];
	for (const name of [...names].sort()) {
		const kind = await stat(join(project, name)).catch(() => null);
		if (kind?.isFile()) files.push(name);
		if (!kind?.isDirectory()) continue;
		const inside = await readdir(join(project, name));
		files.push(
			...(await filesUnder(
				project,
				inside.map((each) => `${name}/${each}`)
			))
		);
	}
	return files;
}

/**
 * One fingerprint of everything that the build is made from.
 * @param {string} project
 * @param {string[]} [sources]
 */
export async function sourceFingerprint(project, sources = SOURCES) {
	const hash = createHash('sha256').update(process.versions.node);
	for (const file of await filesUnder(project, sources)) {
		if (NOT_BUILT.test(file)) continue;
		const content = await readFile(join(project, file));
		hash.update(`\0${file}\0${content.length}\0`).update(content);
	}
	return hash.digest('hex');
}

/**
 * Builds the application when its sources have changed since the last build. Only a build that went through is marked.
 * @param {{ project: string, lockFile: string, logFile: string }} where
 * @param {(words: string) => void} note
 */
export async function ensureBuild({ project, lockFile, logFile }, note) {
	await inTurn(lockFile, async () => {
		const mark = join(project, 'build', '.fingerprint');
		const fingerprint = await sourceFingerprint(project);
		const last = await readFile(mark, 'utf8').catch(() => null);
		if (last === fingerprint) return note('up to date');
		note(last ? 'the source has changed, building' : 'building');
		await rm(mark, { force: true });
		const { code, output } = await runNpm(['run', 'build'], {
			cwd: project,
			env: { ...process.env, NODE_ENV: 'production' },
			logFile
		});
		if (code !== 0) throw programTrouble('The application could not be built', output, logFile);
		await writeWhole(mark, fingerprint, 0o644);
	});
}
