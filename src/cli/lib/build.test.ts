import { mkdir, mkdtemp, rename, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { sourceFingerprint } from './build.mjs';

let project: string;
const write = (name: string, text: string) => writeFile(join(project, name), text);
const fingerprint = () => sourceFingerprint(project);

beforeEach(async () => {
	project = await mkdtemp(join(tmpdir(), 'build-'));
	await mkdir(join(project, 'src', 'cli'), { recursive: true });
	await write('src/a.ts', 'one');
	await write('package.json', '{}');
});

afterEach(() => rm(project, { recursive: true }));

describe('sourceFingerprint', () => {
	it('stays the same when nothing changes', async () => {
		expect(await fingerprint()).toBe(await fingerprint());
	});

	it.each([
		['a changed file', () => write('src/a.ts', 'two')],
		['a new file', () => write('src/b.ts', 'one')],
		['a changed setting', () => write('package.json', '{ }')],
		['a renamed file', () => rename(join(project, 'src/a.ts'), join(project, 'src/c.ts'))]
	])('changes with %s', async (_case, change) => {
		const before = await fingerprint();
		await change();
		expect(await fingerprint()).not.toBe(before);
	});

	it.each(['src/a.test.ts', 'src/cli/start.mjs', 'notes.md'])('does not care for %s', async (name) => {
		const before = await fingerprint();
		await write(name, 'new');
		expect(await fingerprint()).toBe(before);
	});
});
