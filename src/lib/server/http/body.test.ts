import { describe, expect, it } from 'vitest';
import { readBody, readFormData } from './body';

function streamed(parts: Uint8Array[], headers: Record<string, string> = {}) {
	let pulled = 0;
	const body = new ReadableStream<Uint8Array>(
		{
			pull(controller) {
				const part = parts[pulled++];
				if (part) controller.enqueue(part);
				else controller.close();
			}
		},
		{ highWaterMark: 0 }
	);
	const request = new Request('http://localhost/', {
		...{ method: 'POST', body, headers },
		duplex: 'half'
	} as RequestInit);
	return { request, pulled: () => pulled };
}

describe('readBody', () => {
	it('reads what fits, and letters that fall between two parts', async () => {
		const bytes = new TextEncoder().encode('{"name":"Größe"}');
		const { request } = streamed([bytes.slice(0, 12), bytes.slice(12)]);
		expect(await readBody(request)).toBe('{"name":"Größe"}');
	});

	it('reads an absent body as nothing', async () => {
		expect(await readBody(new Request('http://localhost/', { method: 'POST' }))).toBe('');
	});

	it('refuses by the announced length before anything is read', async () => {
		const { request, pulled } = streamed([new Uint8Array(10)], { 'content-length': '5000' });
		await expect(readBody(request, 1024)).rejects.toMatchObject({ code: 'too_large', status: 413 });
		expect(pulled()).toBe(0);
	});

	it('stops reading at the limit where no length was announced', async () => {
		const { request, pulled } = streamed(Array.from({ length: 100 }, () => new Uint8Array(600)));
		await expect(readBody(request, 1024)).rejects.toMatchObject({ code: 'too_large' });
		expect(pulled()).toBeLessThan(5);
	});
});

describe('readFormData', () => {
	const post = (form: FormData) => new Request('http://localhost/', { method: 'POST', body: form });

	it('reads fields and files', async () => {
		const sent = new FormData();
		sent.set('version', '3');
		sent.set('file', new File(['a,b\n1,2'], 'table.csv', { type: 'text/csv' }));
		const form = await readFormData(post(sent));
		const file = form.get('file') as File;
		expect([form.get('version'), file.name, await file.text()]).toEqual(['3', 'table.csv', 'a,b\n1,2']);
	});

	it('refuses a form that is larger than a form may be', async () => {
		const sent = new FormData();
		sent.set('file', new File(['x'.repeat(3_000)], 'long.txt'));
		await expect(readFormData(post(sent), 2_048)).rejects.toMatchObject({ code: 'too_large' });
	});

	it('says that what is no form is none', async () => {
		const request = new Request('http://localhost/', { method: 'POST', body: 'hello' });
		await expect(readFormData(request)).rejects.toMatchObject({ code: 'malformed_request', status: 400 });
	});
});
