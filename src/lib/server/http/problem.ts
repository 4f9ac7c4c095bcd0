import { AppError } from '../errors';
import { logger } from '../logger';

/** An answer in the form of RFC 9457, Problem Details for HTTP APIs. */
interface Problem {
	type: 'about:blank';
	title: string;
	status: number;
	detail: string;
	code: string;
	/** Ties the answer to the log. */
	id: string;
	problems: AppError['problems'];
}

const TITLES: Record<number, string> = {
	400: 'Malformed request',
	401: 'Not signed in',
	403: 'Not allowed',
	404: 'Not found',
	405: 'Method not allowed',
	409: 'Conflict',
	410: 'Gone',
	413: 'Too large',
	422: 'Invalid input',
	429: 'Too many requests',
	500: 'Our fault',
	503: 'Not ready'
};

export function problemResponse(error: unknown, requestId: string): Response {
	const known = error instanceof AppError ? error : null;
	if (!known) logger.error({ requestId, err: error }, 'request failed');
	const status = known?.status ?? 500;
	const problem: Problem = {
		type: 'about:blank',
		title: TITLES[status] ?? 'Problem',
		status,
		detail:
			known?.message ??
			`Something went wrong on our side. Nothing was stored. Say this number when you ask: ${requestId}.`,
		code: known?.code ?? 'our_fault',
		id: requestId,
		problems: known?.problems ?? []
	};
	return new Response(JSON.stringify(problem), {
		status,
		headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store' }
	});
}
