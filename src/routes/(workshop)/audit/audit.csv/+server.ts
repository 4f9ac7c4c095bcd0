import { error } from '@sveltejs/kit';
import { guard } from '$lib/server/http/guard';
import { writeAuditCsv } from '$lib/server/services/audit-csv';
import { parseAsked, readAuditAsked } from '../audit-query';
import type { RequestHandler } from './$types';

/** The same question as the page's, as a table and without an end. */
export const GET: RequestHandler = (event) => {
	const person = guard(event, 'audit.read');
	const { cursor: _page, ...asked } = readAuditAsked(event.url.searchParams);
	const parsed = parseAsked(asked);
	if ('problems' in parsed) {
		const message = parsed.problems.map((problem) => problem.message).join(' ');
		error(422, { message, code: 'invalid_input' });
	}
	const parts = writeAuditCsv(person, parsed.query);
	const encoder = new TextEncoder();
	const body = new ReadableStream<Uint8Array>({
		async pull(controller) {
			const part = await parts.next();
			if (part.done) controller.close();
			else controller.enqueue(encoder.encode(part.value));
		},
		async cancel() {
			await parts.return(undefined);
		}
	});
	return new Response(body, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': 'attachment; filename="audit.csv"',
			'cache-control': 'no-store'
		}
	});
};
