import { randomUUID } from 'node:crypto';
import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { fileChangeSchema, readPlace, writePlace, type FileChange } from '$lib/schemas/files';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { mayDo } from '$lib/server/policies';
import { changeFile, listMountFiles, removeFile, restoreFile } from '$lib/server/services/files';
import { getJob } from '$lib/server/services/jobs';
import { listPreDrillQuestions } from '$lib/server/services/pre-drill';
import { openMount } from '../open-mount';
import { takeFiles, type Taken } from './take-files';
import type { Actions, PageServerLoad } from './$types';

/** The place that the address asks for. */
function placeOf({ searchParams }: URL): string {
	const question = searchParams.get('question');
	return writePlace(readPlace(question ? `question:${question}` : `note:${searchParams.get('note') ?? ''}`));
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const mount = await openMount(person, event.params);
	const job = await orPageError(getJob(person, mount.jobId));
	const files = await orPageError(listMountFiles(person, mount.id));
	const questions = await orPageError(listPreDrillQuestions(person, mount.id));
	const { searchParams } = event.url;
	return {
		...{ mount, files },
		job: { id: job.id, number: job.number },
		questions: questions.map(({ key, label, photo }) => ({ key, label, photo })),
		mayChange: mayDo(person, 'mounts.write'),
		onceKey: randomUUID(),
		place: placeOf(event.url),
		added: Number(searchParams.get('added')) || 0,
		isSaved: searchParams.has('saved'),
		removedId: idSchema.safeParse(searchParams.get('removed') ?? undefined).data ?? null
	};
};

/** Does it, or says on the page why not. */
async function orRefusal<T>(work: Promise<T>, typed: Taken['typed'] = null) {
	try {
		return { done: await work };
	} catch (error) {
		if (!(error instanceof AppError)) throw error;
		const taken: Taken = { kept: 0, refused: [error.message], place: '', typed };
		return { refusal: fail(error.status, { taken }) };
	}
}

/** Changes the file that a form names. */
async function change(event: RequestEvent, what: (sent: FormData) => Omit<Partial<FileChange>, 'version'>) {
	const person = guard(event, 'mounts.write');
	const { id: mountId } = await openMount(person, { mountId: event.params.mountId ?? '' });
	const sent = await readPageForm(event.request);
	const work = async () => {
		const fileId = validate(idSchema, sent.get('file') ?? undefined);
		const version = sent.get('version') ?? undefined;
		await changeFile(person, fileId, validate(fileChangeSchema, { ...what(sent), version }));
	};
	const typed = { fileId: Number(sent.get('file')), caption: String(sent.get('caption') ?? '') };
	const { refusal } = await orRefusal(work(), typed);
	if (refusal) return refusal;
	redirect(303, `/mounts/${mountId}/photos?saved`);
}

/** Takes away, or puts back, the file that a form names. */
async function withNamed(event: RequestEvent, work: typeof removeFile) {
	const person = guard(event, 'mounts.write');
	const { id: mountId } = await openMount(person, { mountId: event.params.mountId ?? '' });
	const sent = await readPageForm(event.request);
	const named = async () => work(person, validate(idSchema, sent.get('file') ?? undefined));
	const { id: fileId } = await orPageError(named());
	return { mountId, fileId };
}

export const actions: Actions = {
	add: async (event) => {
		const person = guard(event, 'mounts.write');
		const { id: mountId } = await openMount(person, event.params);
		const { done: taken, refusal } = await orRefusal(takeFiles(person, mountId, event.request));
		if (refusal) return refusal;
		if (taken.refused.length > 0) return fail(422, { taken });
		const [kind, of] = taken.place.split(':');
		redirect(303, `/mounts/${mountId}/photos?added=${taken.kept}${of ? `&${kind}=${of}` : ''}`);
	},
	caption: (event) => change(event, (sent) => ({ caption: String(sent.get('caption') ?? '') })),
	// With the caption as it stands in its box: what was typed is not lost.
	picture: (event) =>
		change(event, (sent) => ({ caption: String(sent.get('caption') ?? ''), isMountPicture: true })),
	remove: async (event) => {
		const { mountId, fileId } = await withNamed(event, removeFile);
		redirect(303, `/mounts/${mountId}/photos?removed=${fileId}`);
	},
	restore: async (event) => {
		const { mountId } = await withNamed(event, restoreFile);
		redirect(303, `/mounts/${mountId}/photos`);
	}
};
