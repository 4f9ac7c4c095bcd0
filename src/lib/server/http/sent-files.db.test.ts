import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { env } from '../env';
import { sha256 } from '../hash';
import { withSentFiles, type SentForm } from './sent-files';

const LIMITS = { mostFileBytes: 1_000, mostFiles: 3, mostBytes: 5_000 };

function formOf(...files: [string, string][]): FormData {
	const form = new FormData();
	form.set('question', 'fuse');
	for (const [name, text] of files) form.append('file', new File([text], name));
	return form;
}

const post = (body: BodyInit, headers: Record<string, string> = {}): Request =>
	new Request('http://localhost/', { method: 'POST', body, headers });

/** Without a length that is said beforehand. */
async function chunked(form: FormData): Promise<Request> {
	const whole = new Response(form);
	const headers = { 'content-type': whole.headers.get('content-type')! };
	return new Request('http://localhost/', {
		...{ method: 'POST', body: whole.body, headers },
		duplex: 'half'
	} as RequestInit);
}

const waiting = (): Promise<string[]> =>
	readdir(join(env().SOAKLINE_FILES_DIR, 'incoming')).catch(() => [] as string[]);
const told = ({ files }: SentForm) => Promise.resolve(files.map(({ name, bytes }) => [name, bytes]));

describe('files that are sent', () => {
	it('wait on the disk while something is done with them, and are gone after', async () => {
		const before = await waiting();
		const texts = await withSentFiles(
			post(formOf(['a.jpg', 'one'], ['b.jpg', 'two'])),
			LIMITS,
			async (form) => {
				expect(form.fields.get('question')).toBe('fuse');
				expect(form.files.map((file) => file.sha256)).toEqual([sha256('one'), sha256('two')]);
				return Promise.all(form.files.map(({ path }) => readFile(path, 'utf8')));
			}
		);
		expect(texts).toEqual(['one', 'two']);
		expect(await waiting()).toEqual(before);
	});

	it('are gone, too, when something fails', async () => {
		const before = await waiting();
		const work = () => Promise.reject(new Error('on purpose'));
		await expect(withSentFiles(post(formOf(['a.jpg', 'one'])), LIMITS, work)).rejects.toThrow('on purpose');
		expect(await waiting()).toEqual(before);
	});

	it('are passed over one by one when they are too large: the others come in', async () => {
		const request = post(formOf(['a.jpg', 'x'.repeat(1_001)], ['b.jpg', 'x'.repeat(1_000)]));
		const large = await withSentFiles(request, LIMITS, ({ files }) =>
			Promise.resolve(files.map(({ isTooLarge }) => isTooLarge))
		);
		expect(large).toEqual([true, false]);
	});

	it.each(['announced', 'chunked'])('are refused when they are too much together: %s', async (how) => {
		const form = formOf(['a.jpg', 'x'.repeat(3_000)], ['b.jpg', 'x'.repeat(3_000)]);
		const whole = await new Response(form).arrayBuffer();
		const headers: Record<string, string> =
			how === 'announced' ? { 'content-length': String(whole.byteLength) } : {};
		const plain = await chunked(form);
		const request = new Request(plain, { headers: { ...Object.fromEntries(plain.headers), ...headers } });
		const before = await waiting();
		await expect(withSentFiles(request, LIMITS, told)).rejects.toMatchObject({
			code: 'too_large',
			status: 413
		});
		expect(await waiting()).toEqual(before);
	});

	it('are refused when they are too many', async () => {
		const many = formOf(...['a', 'b', 'c', 'd'].map((name): [string, string] => [name, name]));
		await expect(withSentFiles(post(many), LIMITS, told)).rejects.toThrow('3 files are the most');
	});

	it('may be the body itself, of a kind that is taken', async () => {
		const body = { media: ['image/jpeg'], name: 'sent.jpg' };
		const one = { mostFileBytes: 100, mostFiles: 1, mostBytes: 120 };
		const sent = post('photo', { 'content-type': 'image/jpeg' });
		expect(await withSentFiles(sent, one, told, body)).toEqual([['sent.jpg', 5]]);
		const json = post('{}', { 'content-type': 'application/json' });
		await expect(withSentFiles(json, one, told, body)).rejects.toMatchObject({ status: 400 });
		const large = post('x'.repeat(200), { 'content-type': 'image/jpeg' });
		await expect(withSentFiles(large, one, told, body)).rejects.toMatchObject({ status: 413 });
	});

	it('are none when no box was filled', async () => {
		const empty = formOf(['', '']);
		expect(await withSentFiles(post(empty), LIMITS, told)).toEqual([]);
	});
});
