import { describe, expect, it } from 'vitest';
import {
	Trouble,
	mostTellingLine,
	programTrouble,
	requireFreeSpace,
	requireNode,
	sentenceFor
} from './trouble.mjs';

const coded = (code: string, path?: string) => Object.assign(new Error('raw words'), { code, path });

describe('sentenceFor', () => {
	it.each([
		['a trouble keeps its sentence', new Trouble('The pump is dry.'), /^The pump is dry\.$/],
		['a full disk', coded('ENOSPC'), /^The disk is full: free some space/],
		[
			'a full disk told only in words',
			new Error('write failed, no space left on device'),
			/^The disk is full/
		],
		['a folder of another account', coded('EACCES', '/srv/shop'), /may not write \/srv\/shop/],
		['a read-only disk', coded('EROFS', '/srv/shop'), /read-only/],
		['anything else keeps its words', new Error('odd'), /stopped it: odd$/],
		['something thrown that is no error', 'odd', /stopped it: odd$/]
	])('%s', (_case, error, sentence) => {
		expect(sentenceFor(error)).toMatch(sentence);
	});
});

describe('programTrouble', () => {
	it('names the last telling line and the log', () => {
		const { message } = programTrouble(
			'The build failed',
			'a\nnpm error code 1\nError: no such file\nb',
			'build.log'
		);
		expect(message).toBe('The build failed: Error: no such file (the whole story is in build.log).');
	});

	it('says that the disk is full when that is what the program met', () => {
		expect(programTrouble('The build failed', 'npm error ENOSPC', 'x').message).toMatch(/^The disk is full/);
	});
});

describe('mostTellingLine', () => {
	it.each([
		[
			'skips headings without content',
			'error during build:\n\u001b[31mError: bad tag\u001b[39m\nat x',
			'Error: bad tag'
		],
		['takes the last line when none speaks of an error', 'one\ntwo.\n', 'two'],
		['is empty for silence', '\n\n', '']
	])('%s', (_case, words, line) => {
		expect(mostTellingLine(words)).toBe(line);
	});
});

describe('what is refused beforehand', () => {
	it.each(['18.20.1', '20.18.0', '22.1.0'])('Node %s', (version) => {
		expect(() => requireNode(version)).toThrow(version);
	});

	it.each(['20.19.0', '20.20.2'])('but not Node %s', (version) => {
		expect(() => requireNode(version)).not.toThrow();
	});

	it('a disk with less room than is needed', async () => {
		await expect(requireFreeSpace('.', Number.MAX_SAFE_INTEGER)).rejects.toThrow(/MB free, \d+ MB needed/);
	});

	it('but not one with enough', async () => {
		await expect(requireFreeSpace('.', 0)).resolves.toBeUndefined();
	});
});
