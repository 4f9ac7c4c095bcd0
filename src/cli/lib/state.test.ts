import { mkdtemp, readFile, readdir, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { readJson, writeWhole } from './files.mjs';
import { makeStateFolders } from './folders.mjs';
import { endsTooOften } from './keep-running.mjs';
import { inTurn, processBeginning, takeLock } from './lock.mjs';
import { initStatements, localConnection } from './mariadb.mjs';
import { loadSecrets } from './secrets.mjs';
import { sayTime } from './steps.mjs';

let folder: string;
const modeOf = async (name: string) => ((await stat(join(folder, name))).mode & 0o777).toString(8);
const sentence = (holder: number) => `held by ${holder}`;

beforeEach(async () => {
	folder = await mkdtemp(join(tmpdir(), 'state-'));
});

afterEach(() => rm(folder, { recursive: true }));

describe('secrets', () => {
	it('are made once, differ, and are for this account alone', async () => {
		const first = await loadSecrets(folder);
		expect(await loadSecrets(folder)).toEqual(first);
		expect(new Set(Object.values(first)).size).toBe(3);
		expect(await modeOf('secrets.json')).toBe('600');
	});

	it('are closed again when somebody has opened the file', async () => {
		await loadSecrets(folder);
		await writeFile(join(folder, 'secrets.json'), await readFile(join(folder, 'secrets.json')), {
			mode: 0o644
		});
		await loadSecrets(folder);
		expect(await modeOf('secrets.json')).toBe('600');
	});

	it('that are not whole are completed, and the whole ones kept', async () => {
		const { authSecret } = await loadSecrets(folder);
		await writeFile(join(folder, 'secrets.json'), JSON.stringify({ authSecret }));
		const mended = await loadSecrets(folder);
		expect(mended.authSecret).toBe(authSecret);
		expect(mended.databasePassword.length).toBeGreaterThanOrEqual(32);
	});

	it('can stand in an SQL string as they are', async () => {
		const { databasePassword } = await loadSecrets(folder);
		expect(databasePassword).toMatch(/^[\w-]+$/);
	});
});

describe('state folders', () => {
	it('are closed to other accounts', async () => {
		await makeStateFolders(join(folder, 'own'));
		expect(await modeOf('own')).toBe('700');
		expect(await modeOf('own/mail')).toBe('700');
		expect(await modeOf('own/files')).toBe('700');
	});
});

describe('writeWhole', () => {
	it('leaves nothing behind when it fails', async () => {
		await expect(writeWhole(join(folder, 'no', 'file'), 'x')).rejects.toThrow();
		expect(await readdir(folder)).toEqual([]);
	});

	it('replaces what was there', async () => {
		await writeWhole(join(folder, 'a.json'), '1');
		await writeWhole(join(folder, 'a.json'), '2');
		expect(await readJson(join(folder, 'a.json'))).toBe(2);
		expect(await readdir(folder)).toEqual(['a.json']);
	});
});

describe('a lock', () => {
	it('is held by one at a time and free again afterwards', async () => {
		const file = join(folder, 'lock');
		const lock = await takeLock(file, sentence);
		await expect(takeLock(file, sentence)).rejects.toThrow(`held by ${process.pid}`);
		await lock.release();
		await (await takeLock(file, sentence)).release();
	});

	it.each([
		['a process that is gone', '999999999 1'],
		['a process whose number was given out again', `${process.pid} 1`],
		['a file that was never finished', '']
	])('left by %s is taken over', async (_case, words) => {
		const file = join(folder, 'lock');
		await writeFile(file, words);
		await takeLock(file, sentence);
		expect(await readFile(file, 'utf8')).toBe(`${process.pid} ${await processBeginning(process.pid)}\n`);
	});

	it('lets work wait for its turn', async () => {
		const file = join(folder, 'lock');
		const order: string[] = [];
		const work = (name: string) =>
			inTurn(file, async () => {
				order.push(`${name} begins`);
				await new Promise((resolve) => setTimeout(resolve, 20));
				order.push(`${name} ends`);
			});
		await Promise.all([work('one'), work('two')]);
		expect(order.map((line) => line.split(' ')[1])).toEqual(['begins', 'ends', 'begins', 'ends']);
	});
});

describe('initStatements', () => {
	const statements = initStatements(localConnection({ port: 21_000, password: 'pass' }))
		.trim()
		.split('\n');

	it('can be run again and again', () => {
		expect(statements.slice(0, 2).every((line) => line.includes('IF NOT EXISTS'))).toBe(true);
	});

	it('gives rights on the one database, from this machine, and never on everything', () => {
		const grants = statements.filter((line) => line.startsWith('GRANT'));
		expect(grants).toHaveLength(1);
		expect(grants[0]).toMatch(/ON `soakline`\.\* TO 'soakline'@'127\.0\.0\.1';$/);
		expect(grants[0]).not.toMatch(/\bALL\b|GRANT OPTION|SUPER|FILE/);
	});
});

describe('endsTooOften', () => {
	it.each([
		['now and then', [0, 100_000, 200_000, 300_000, 400_000, 500_000, 600_000], false],
		['five times in a minute', [1, 2, 3, 4, 5], false],
		['six times in a minute', [1, 2, 3, 4, 5, 6], true]
	])('%s', (_case, endings, expected) => {
		expect(endsTooOften(endings, Math.max(...endings))).toBe(expected);
	});
});

describe('sayTime', () => {
	it.each([
		[40, '0.0 s'],
		[1_240, '1.2 s'],
		[59_900, '59.9 s'],
		[72_000, '1 min 12 s'],
		[119_800, '2 min 0 s']
	])('%d ms is %s', (ms, words) => {
		expect(sayTime(ms)).toBe(words);
	});
});
