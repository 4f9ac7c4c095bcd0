import { describe, expect, it } from 'vitest';
import { sha256 } from '../hash';
import { bytesOf, readFormAroundFile } from './form-around-file';

const MOST_BYTES = 2 * 1024 * 1024;

function read(text: string | null) {
	const body = new FormData();
	body.set('name', 'Quiet Creek');
	body.set('file', text === null ? new File([], '') : new File([text], 'logo.png'));
	return readFormAroundFile(new Request('http://localhost/', { method: 'POST', body }), MOST_BYTES);
}

describe('a form around a file', () => {
	it('gives its words and the file, and knows the file by its hash', async () => {
		const form = await read('a picture');
		expect(Object.fromEntries(form.sent)).toEqual({ name: 'Quiet Creek', file: sha256('a picture') });
		expect(Buffer.from(bytesOf(form, MOST_BYTES)).toString()).toBe('a picture');
	});

	it('gives its words beside a file that is too large', async () => {
		const form = await read('x'.repeat(MOST_BYTES + 1));
		expect(form.sent.get('name')).toBe('Quiet Creek');
		expect(() => bytesOf(form, MOST_BYTES)).toThrow('The file is larger than 2 MB');
	});

	it.each([null, ''])('gives its words where no file was chosen, or there is nothing in it', async (text) => {
		const form = await read(text);
		expect(form.sent.get('name')).toBe('Quiet Creek');
		expect(() => bytesOf(form, MOST_BYTES)).toThrow('The file is missing, or there is nothing in it');
	});

	it('may be one that can hold no file', async () => {
		const body = new URLSearchParams({ name: 'Quiet Creek' });
		const form = await readFormAroundFile(
			new Request('http://localhost/', { method: 'POST', body }),
			MOST_BYTES
		);
		expect(form.sent.get('name')).toBe('Quiet Creek');
		expect(form.file).toBeNull();
	});
});
