import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { sha256 } from '../hash';
import { allow } from '../policies';
import { readBody } from './body';
import { contentResponse, type GivenContent } from './content-response';
import { readSentFile, type SentFile } from './file-upload';
import { keepOnce, type StoredAnswer } from './idempotency';
import type { ContentOperation, FileOperation, Operation } from './operation';
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

export function jsonResponse({ status, body }: StoredAnswer): Response {
	return new Response(body, {
		status,
		headers: { 'content-type': 'application/json', 'cache-control': 'no-store' }
	});
}

/** Answers what the work gives; a repeat with the same key and the same question gets the first answer again. */
async function answer<Prepared>(
	{ request }: RequestEvent,
	{ method, status }: Pick<Operation, 'method' | 'status'>,
	{ personId, asked }: { personId: number; asked: unknown },
	{ prepare, work }: { prepare: () => Promise<Prepared>; work: (prepared: Prepared) => Promise<unknown> }
): Promise<Response> {
	const key = method === 'POST' ? request.headers.get('idempotency-key') : null;
	const keep = async (prepared: Prepared): Promise<StoredAnswer> => ({
		status,
		body: JSON.stringify(await work(prepared))
	});
	return jsonResponse(await keepOnce({ personId, key, request: JSON.stringify(asked) }, prepare, keep));
}

export const orProblem =
	(handle: (event: RequestEvent) => Promise<Response>) =>
	(event: RequestEvent): Promise<Response> =>
		handle(event).catch((error: unknown) => problemResponse(error, event.locals.requestId));

/**
 * Guard, authorise, validate, prepare, do, present: the same steps for every endpoint, from its operation. What takes
 * seconds and changes nothing is prepared, before and in no transaction.
 */
export function preparedEndpoint<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Body extends z.ZodType,
	Answer extends z.ZodType,
	Prepared
>(
	operation: Operation<Params, Query, Body, Answer>,
	prepare: (call: Call<Params, Query, Body>) => Promise<Prepared>,
	handle: (call: Call<Params, Query, Body>, prepared: Prepared) => Promise<z.input<Answer>>
): (event: RequestEvent) => Promise<Response> {
	return orProblem(async (event) => {
		const { locals, request, url } = event;
		const person = allow(locals.person, operation.action);
		const params = operation.params ? validate(operation.params, event.params, 'not_found') : undefined;
		const query = operation.query
			? validate(operation.query, Object.fromEntries(url.searchParams))
			: undefined;
		const rawBody = operation.body ? await readJson(request) : undefined;
		const body = operation.body ? validate(operation.body, rawBody) : undefined;
		const call = { person, params, query, body, event } as Call<Params, Query, Body>;
		const asked = { personId: person.id, asked: [url.pathname, rawBody ?? null] };
		return answer(event, operation, asked, {
			prepare: () => prepare(call),
			work: (made) => handle(call, made)
		});
	});
}

const NOTHING = (): Promise<void> => Promise.resolve();

/** The same where nothing is to be prepared. */
export function endpoint<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Body extends z.ZodType,
	Answer extends z.ZodType
>(
	operation: Operation<Params, Query, Body, Answer>,
	handle: (call: Call<Params, Query, Body>) => Promise<z.input<Answer>>
): (event: RequestEvent) => Promise<Response> {
	return preparedEndpoint(operation, NOTHING, handle);
}

/** The same steps for an operation that gives a file. */
export function contentEndpoint<Params extends z.ZodObject, Query extends z.ZodObject>(
	operation: ContentOperation<Params, Query>,
	handle: (call: {
		person: SignedInPerson;
		params: z.output<Params>;
		query: z.output<Query>;
	}) => Promise<GivenContent>
): (event: RequestEvent) => Promise<Response> {
	return orProblem(async ({ locals, params: given, request, url }) => {
		const person = allow(locals.person, operation.action);
		const params = validate(operation.params, given, 'not_found');
		const query = validate(operation.query, Object.fromEntries(url.searchParams));
		return contentResponse(request, await handle({ person, params, query }));
	});
}

interface FileCall<Params extends z.ZodObject, Query extends z.ZodObject> {
	person: SignedInPerson;
	params: z.output<Params>;
	query: z.output<Query>;
	file: SentFile;
}

/**
 * The same steps for an operation that takes a file. The record that it is for is looked up first: nobody's file is read
 * for a record that is not theirs, and nothing is said of what is wrong with the question.
 */
export function fileEndpoint<Params extends z.ZodObject, Query extends z.ZodObject, Answer extends z.ZodType>(
	operation: FileOperation<Params, Query, Answer>,
	steps: {
		find: (person: SignedInPerson, params: z.output<Params>) => Promise<unknown>;
		/** What a file is called that came without a form. */
		nameOf: (query: z.output<Query>) => string;
		handle: (call: FileCall<Params, Query>) => Promise<z.input<Answer>>;
	}
): (event: RequestEvent) => Promise<Response> {
	return orProblem(async (event) => {
		const { locals, request, url } = event;
		const person = allow(locals.person, operation.action);
		const params = validate(operation.params, event.params, 'not_found');
		await steps.find(person, params);
		const query = validate(operation.query, Object.fromEntries(url.searchParams));
		const file = await readSentFile(request, steps.nameOf(query), operation.mostFileBytes);
		const asked = [url.pathname, url.search, file.name, sha256(file.bytes)];
		const work = () => steps.handle({ person, params, query, file });
		return answer(event, operation, { personId: person.id, asked }, { prepare: NOTHING, work });
	});
}
