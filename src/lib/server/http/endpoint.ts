import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { allow } from '../policies';
import { readBody } from './body';
import { answerOnce, type StoredAnswer } from './idempotency';
import type { Operation } from './operation';
import { problemResponse } from './problem';
import { validate } from './validate';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

interface Call<Params, Query, Body> {
	person: SignedInPerson;
	params: Parsed<Params>;
	query: Parsed<Query>;
	body: Parsed<Body>;
	event: RequestEvent;
}

async function readJson(request: Request): Promise<unknown> {
	const type = request.headers.get('content-type') ?? '';
	if (!/^application\/json\b/i.test(type)) {
		throw new AppError('malformed_request', 'Send the body as JSON, with content-type application/json.');
	}
	const text = await readBody(request);
	try {
		return JSON.parse(text);
	} catch {
		throw new AppError('malformed_request', 'The body is not JSON.');
	}
}

function jsonResponse({ status, body }: StoredAnswer): Response {
	return new Response(body, {
		status,
		headers: { 'content-type': 'application/json', 'cache-control': 'no-store' }
	});
}

/** Guard, authorise, validate, do, present: the same steps for every endpoint, from its operation. */
export function endpoint<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Body extends z.ZodType,
	Answer extends z.ZodType
>(
	operation: Operation<Params, Query, Body, Answer>,
	handle: (call: Call<Params, Query, Body>) => Promise<z.input<Answer>>
): (event: RequestEvent) => Promise<Response> {
	return async (event) => {
		const { locals, request, url } = event;
		try {
			const person = allow(locals.person, operation.action);
			const params = operation.params ? validate(operation.params, event.params, 'not_found') : undefined;
			const query = operation.query
				? validate(operation.query, Object.fromEntries(url.searchParams))
				: undefined;
			const rawBody = operation.body ? await readJson(request) : undefined;
			const body = operation.body ? validate(operation.body, rawBody) : undefined;
			const work = async (): Promise<StoredAnswer> => {
				const call = { person, params, query, body, event } as Call<Params, Query, Body>;
				return { status: operation.status, body: JSON.stringify(await handle(call)) };
			};
			const key = request.headers.get('idempotency-key');
			if (operation.method !== 'POST' || key === null) return jsonResponse(await work());
			const asked = JSON.stringify([url.pathname, rawBody ?? null]);
			return jsonResponse(await answerOnce({ personId: person.id, key, request: asked }, work));
		} catch (error) {
			return problemResponse(error, locals.requestId);
		}
	};
}
