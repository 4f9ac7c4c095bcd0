import { sayDoubtInShort, sayOtherwise } from '$lib/format/field-doubt-words';
import { fieldNotesQuerySchema, type FieldNoteView } from '$lib/schemas/field-notes';
import { guard, orPageError } from '$lib/server/http/guard';
import { mayDo } from '$lib/server/policies';
import { presentTrend, presentNote } from '$lib/server/presenters/field-reports';
import { listFieldNotes } from '$lib/server/services/field-notes';
import { getJob } from '$lib/server/services/jobs';
import { openMount } from '../open-mount';
import type { PageServerLoad } from './$types';

/** The capacity that was asked for, as people write it; without one, or with a wrong one, nothing is worked out. */
function readNamed(url: URL): { namedAh: number | null; problem: string } {
	const text = (url.searchParams.get('capacity') ?? '').trim();
	if (text === '') return { namedAh: null, problem: '' };
	const read = fieldNotesQuerySchema.safeParse({ namedAh: text.replace(',', '.').replace(/\s*Ah$/i, '') });
	return read.success
		? { namedAh: read.data.namedAh ?? null, problem: '' }
		: { namedAh: null, problem: read.error.issues[0]!.message };
}

/** What holds for every answer on the page, before the first of them. */
function warnOf(rows: readonly FieldNoteView[]): string[] {
	const otherwise = rows[0]?.judgedBy.otherwise ?? [];
	const doubts = Math.max(0, ...rows.map((row) => row.doubts));
	return [
		...(otherwise.length > 0 ? [sayOtherwise(otherwise)] : []),
		...(doubts > 0 ? [sayDoubtInShort(doubts)] : [])
	];
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const mount = await openMount(person, event.params);
	const { namedAh, problem } = readNamed(event.url);
	const notes = await orPageError(listFieldNotes(person, mount.id, namedAh));
	const job = await orPageError(getJob(person, mount.jobId));
	return {
		mount,
		job: { id: job.id, number: job.number },
		notes: notes.rows.map(presentNote),
		warnings: warnOf(notes.rows),
		trend: presentTrend(notes),
		asked: { text: event.url.searchParams.get('capacity') ?? '', problem },
		mayStrike: mayDo(person, 'mounts.write'),
		isStruck: event.url.searchParams.has('struck'),
		isAdded: event.url.searchParams.has('added')
	};
};
