import { Readable } from 'node:stream';
import { reviewListQuerySchema } from '$lib/schemas/review';
import { guard } from '$lib/server/http/guard';
import { pageQuery } from '$lib/server/http/page-query';
import { writeReviewCsv } from '$lib/server/services/review/review-csv';
import type { RequestHandler } from './$types';

/** The list as a file, written while it goes out: nothing waits for the last row. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'review.read');
	const query = await pageQuery(reviewListQuerySchema, event.url);
	const lines = Readable.from(writeReviewCsv(person, query), { objectMode: false, encoding: 'utf8' });
	return new Response(Readable.toWeb(lines) as ReadableStream, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': 'attachment; filename="installations.csv"',
			'cache-control': 'no-store'
		}
	});
};
