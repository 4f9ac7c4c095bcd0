import { Readable } from 'node:stream';
import { readingsQuerySchema } from '$lib/schemas/accuracy';
import { guard } from '$lib/server/http/guard';
import { pageQuery } from '$lib/server/http/page-query';
import { writeAccuracyCsv } from '$lib/server/services/accuracy/accuracy-csv';
import type { RequestHandler } from './$types';

/** The readings as a file, written while it goes out: nothing waits for the last row. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'books.read');
	const query = await pageQuery(readingsQuerySchema, event.url);
	const lines = Readable.from(writeAccuracyCsv(person, query), { objectMode: false, encoding: 'utf8' });
	return new Response(Readable.toWeb(lines) as ReadableStream, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': 'attachment; filename="readings.csv"',
			'cache-control': 'no-store'
		}
	});
};
