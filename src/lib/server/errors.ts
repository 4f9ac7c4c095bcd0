/** What can go wrong for people, each with its HTTP status. The words beside it are made where it happens. */
const STATUS = {
	invalid_input: 422,
	malformed_request: 400,
	not_signed_in: 401,
	not_allowed: 403,
	not_found: 404,
	method_not_allowed: 405,
	conflict: 409,
	changed_meanwhile: 409,
	gone: 410,
	too_large: 413,
	too_many_requests: 429,
	idempotency_key_reused: 422,
	not_ready: 503,
	simulation_failed: 422
} as const;

export type ErrorCode = keyof typeof STATUS;

export interface FieldProblem {
	path: string;
	message: string;
	code?: string;
	value?: unknown;
	limit?: string;
	/** In a file: counted from 1. */
	line?: number;
	column?: { number: number; name: string };
}

/** The one error that services throw when a request cannot be done as asked. */
export class AppError extends Error {
	readonly status: number;

	constructor(
		readonly code: ErrorCode,
		message: string,
		readonly problems: FieldProblem[] = []
	) {
		super(message);
		this.name = 'AppError';
		this.status = STATUS[code];
	}
}

export function notFound(what: string): AppError {
	return new AppError('not_found', `There is no such ${what} here.`);
}

/** Somebody else saved first: nothing was stored, the person's own text stays on their screen. */
export function changedMeanwhile(what: string): AppError {
	return new AppError(
		'changed_meanwhile',
		`Somebody changed this ${what} while you had it open. Nothing of yours was stored: load it again and repeat the change.`
	);
}
