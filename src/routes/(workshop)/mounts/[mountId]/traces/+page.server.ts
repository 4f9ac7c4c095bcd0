import { fail, redirect } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { withSentFiles } from '$lib/server/http/sent-files';
import { validate } from '$lib/server/http/validate';
import { getJob } from '$lib/server/services/jobs';
import { addTrace, listMountTraces, restoreTrace } from '$lib/server/services/traces';
import { MOST_TRACE_BYTES, MOST_TRACE_ROWS } from '$lib/thermal/traces';
import { openMount } from '../open-mount';
import type { Actions, PageServerLoad } from './$types';

const AROUND_FILE_BYTES = 64 * 1024;
const LIMITS = {
	mostFileBytes: MOST_TRACE_BYTES,
	mostFiles: 1,
	mostBytes: MOST_TRACE_BYTES + AROUND_FILE_BYTES
};

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.read');
	const mount = await openMount(person, event.params);
	const job = await orPageError(getJob(person, mount.jobId));
	const removed = event.url.searchParams.get('removed') ?? undefined;
	return {
		mount: { id: mount.id, letter: mount.letter, name: mount.name },
		job: { id: job.id, number: job.number },
		traces: await orPageError(listMountTraces(person, mount.id)),
		limits: { mostBytes: MOST_TRACE_BYTES, mostRows: MOST_TRACE_ROWS },
		removedId: idSchema.safeParse(removed).data ?? null
	};
};

/** Takes the file of a form without a script to the disk as it comes in, and says where to go on. */
async function take(person: SignedInPerson, mountId: number, request: Request): Promise<string> {
	return withSentFiles(request, LIMITS, async ({ files: [file] }) => {
		if (!file) {
			const message = 'The file is missing: choose one.';
			throw new AppError('invalid_input', message, [{ path: 'file', message }]);
		}
		const { id } = await addTrace(person, mountId, file);
		return `/traces/${id}`;
	});
}

export const actions: Actions = {
	add: async (event) => {
		const person = guard(event, 'traces.write');
		const mount = await openMount(person, event.params);
		const next = await take(person, mount.id, event.request).catch((error: unknown) => {
			if (error instanceof AppError) return error;
			throw error;
		});
		if (typeof next !== 'string') return fail(next.status, { refusal: next.message });
		redirect(303, next);
	},
	restore: async (event) => {
		const person = guard(event, 'traces.write');
		const mount = await openMount(person, event.params);
		const sent = await readPageForm(event.request);
		const named = async () => restoreTrace(person, validate(idSchema, sent.get('trace') ?? undefined));
		await orPageError(named());
		redirect(303, `/mounts/${mount.id}/traces`);
	}
};
