import { describe, expect, it } from 'vitest';
import { readSentFile } from './file-upload';

const MOST_BYTES = 1024;

function post(body: BodyInit, contentType?: string): Request {
	const headers = contentType ? { 'content-type': contentType } : undefined;
	return new Request('http://localhost/', { method: 'POST', body, ...(headers ? { headers } : {}) });
}

function formWith(file: File): FormData {
	const form = new FormData();
	form.set('file', file);
	return form;
}

const read = (request: Request) => readSentFile(request, 'named.csv', MOST_BYTES);
const textOf = ({ bytes }: { bytes: Uint8Array }): string => new TextDecoder().decode(bytes);

describe('a file that is sent', () => {
	it('in a form brings its own name', async () => {
		const file = await read(post(formWith(new File(['1,2'], 'table.csv'))));
		expect([file.name, textOf(file)]).toEqual(['table.csv', '1,2']);
	});

	it('as the body has the name that the question gives', async () => {
		const file = await read(post('1,2', 'text/csv; charset=utf-8'));
		expect([file.name, textOf(file)]).toEqual(['named.csv', '1,2']);
	});

	it('may be as large as the limit, and not a byte more', async () => {
		expect(textOf(await read(post('x'.repeat(MOST_BYTES), 'text/plain')))).toHaveLength(MOST_BYTES);
		const larger = 'x'.repeat(MOST_BYTES + 1);
		await expect(read(post(larger, 'text/plain'))).rejects.toMatchObject({ code: 'too_large', status: 413 });
		const farLarger = 'x'.repeat(MOST_BYTES + 100_000);
		for (const text of [larger, farLarger]) {
			await expect(read(post(formWith(new File([text], 'x'))))).rejects.toMatchObject({
				...{ code: 'too_large', problems: [{ path: 'file' }] }
			});
		}
	});

	it('must be there, and must not be empty', async () => {
		for (const form of [new FormData(), formWith(new File([], 'nothing.csv'))]) {
			form.set('other', 'field');
			await expect(read(post(form))).rejects.toMatchObject({
				...{ code: 'invalid_input', problems: [{ path: 'file' }] }
			});
		}
	});

	it('must be of a kind that is read', async () => {
		await expect(read(post('{}', 'application/json'))).rejects.toMatchObject({
			...{ code: 'malformed_request', status: 400 }
		});
	});
});
