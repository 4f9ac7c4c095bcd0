import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { boundaryOf, splitForm } from './multipart';

interface Part {
	field: string;
	fileName: string | null;
	content: Buffer;
}

async function* inPieces(whole: Buffer, sizes: readonly number[]): AsyncGenerator<Uint8Array> {
	for (let at = 0, turn = 0; at < whole.length; turn++) {
		const size = sizes[turn % sizes.length]!;
		yield whole.subarray(at, at + size);
		at += size;
	}
}

async function split(whole: Buffer, boundary: string, sizes: readonly number[] = [7]): Promise<Part[]> {
	const parts: Part[] = [];
	for await (const event of splitForm(inPieces(whole, sizes), boundary)) {
		if (event.kind === 'begin') {
			parts.push({ field: event.field, fileName: event.fileName, content: Buffer.alloc(0) });
		}
		const last = parts.at(-1);
		if (event.kind === 'bytes' && last) last.content = Buffer.concat([last.content, event.bytes]);
	}
	return parts;
}

/** As the platform itself writes a form. */
async function write(form: FormData): Promise<{ whole: Buffer; boundary: string }> {
	const response = new Response(form);
	const boundary = boundaryOf(response.headers.get('content-type') ?? '') ?? '';
	return { whole: Buffer.from(await response.arrayBuffer()), boundary };
}

describe('a form with files, taken apart as it comes in', () => {
	it('gives what was put in, in whatever pieces it comes', async () => {
		await fc.assert(
			fc.asyncProperty(
				fc.array(fc.uint8Array({ maxLength: 300 }), { maxLength: 4 }),
				fc.array(fc.integer({ min: 1, max: 90 }), { minLength: 1, maxLength: 5 }),
				async (contents, sizes) => {
					const form = new FormData();
					form.set('caption', 'Bracket, left');
					contents.forEach((bytes, index) =>
						form.append('file', new File([new Uint8Array(bytes)], `${index}.jpg`))
					);
					const { whole, boundary } = await write(form);
					const [caption, ...files] = await split(whole, boundary, sizes);
					expect(caption).toMatchObject({ field: 'caption', fileName: null });
					expect(caption!.content.toString()).toBe('Bracket, left');
					expect(files.map(({ content }) => [...content])).toEqual(contents.map((bytes) => [...bytes]));
				}
			),
			{ numRuns: 200 }
		);
	});

	it('keeps names with quotes, and content that looks like a boundary', async () => {
		const form = new FormData();
		const { boundary: other } = await write(form);
		form.append('file', new File([`\r\n--${other}x\r\n--`], 'a "b" ü.jpg'));
		const { whole, boundary } = await write(form);
		const [file] = await split(whole, boundary, [1]);
		expect(file).toMatchObject({ field: 'file', fileName: 'a "b" ü.jpg' });
		expect(file!.content.toString()).toBe(`\r\n--${other}x\r\n--`);
	});

	it.each([
		['breaks off', (whole: Buffer) => whole.subarray(0, whole.length - 12), 'breaks off'],
		[
			'has a part without a name',
			(whole: Buffer) => Buffer.from(whole.toString().replace('name="a"', '')),
			'no name'
		],
		[
			'has an endless head',
			(whole: Buffer) => Buffer.from(whole.toString().replace('name="a"', `name="${'a'.repeat(9_000)}"`)),
			'too long'
		]
	])('is refused when it %s', async (_how, spoil, words) => {
		const form = new FormData();
		form.set('a', 'b');
		const { whole, boundary } = await write(form);
		await expect(split(spoil(whole), boundary)).rejects.toThrow(words);
	});

	it('is known by its content type', () => {
		expect(boundaryOf('multipart/form-data; boundary=abc')).toBe('abc');
		expect(boundaryOf('multipart/form-data; boundary="a b"')).toBe('a b');
		expect(boundaryOf('application/json')).toBeNull();
		expect(boundaryOf('multipart/form-data')).toBeNull();
	});
});
