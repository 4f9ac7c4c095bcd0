import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { allow } from '../policies';
import { jsonResponse, orProblem } from './endpoint';
import { FILE_FIELD } from './file-upload';
import { keepOnce } from './idempotency';
import type { FileOperation } from './operation';
import { withSentFiles, type IncomingUpload } from './sent-files';
import { validate } from './validate';

const AROUND_FILE_BYTES = 64 * 1024;

interface UploadSteps<Params, Query, Prepared, Answer> {
	/** The record that the file is for: nobody's file is read for a record that is not theirs. */
	find: (person: SignedInPerson, params: Params) => Promise<unknown>;
	/** What a file is called that came without a form. */
	nameOf: (query: Query) => string;
	/** Looks at the file and makes of it what is kept; slow, and in no transaction. */
	prepare: (file: IncomingUpload) => Promise<Prepared>;
	keep: (call: {
		person: SignedInPerson;
		params: Params;
		query: Query;
		prepared: Prepared;
	}) => Promise<Answer>;
}

function theOne(files: readonly IncomingUpload[]): IncomingUpload {
	const [file] = files;
	if (file) return file;
	const message = 'The file is missing: choose one.';
	throw new AppError('invalid_input', message, [{ path: FILE_FIELD, message }]);
}

/** An endpoint that takes one file of any size that its operation allows, by way of the disk. */
export function uploadEndpoint<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Answer extends z.ZodType,
	P
>(
	operation: FileOperation<Params, Query, Answer>,
	steps: UploadSteps<z.output<Params>, z.output<Query>, P, z.input<Answer>>
): (event: RequestEvent) => Promise<Response> {
	const { mostFileBytes, fileMedia = [], status } = operation;
	const limits = { mostFileBytes, mostFiles: 1, mostBytes: mostFileBytes + AROUND_FILE_BYTES };
	return orProblem(async ({ locals, params: given, request, url }) => {
		const person = allow(locals.person, operation.action);
		const params = validate(operation.params, given, 'not_found');
		await steps.find(person, params);
		const query = validate(operation.query, Object.fromEntries(url.searchParams));
		const take = async ({ files }: { files: IncomingUpload[] }): Promise<Response> => {
			const file = theOne(files);
			const asked = JSON.stringify([url.pathname, url.search, file.name, file.sha256]);
			const key = request.headers.get('idempotency-key');
			const answer = await keepOnce(
				{ personId: person.id, key, request: asked },
				() => steps.prepare(file),
				async (prepared) => ({
					status,
					body: JSON.stringify(await steps.keep({ person, params, query, prepared }))
				})
			);
			return jsonResponse(answer);
		};
		return withSentFiles(request, limits, take, { media: fileMedia, name: steps.nameOf(query) });
	});
}
