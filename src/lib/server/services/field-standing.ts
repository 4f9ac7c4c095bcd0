import type { FieldNoteStrike } from '../db/models';
import { readingOf } from './field-readings';
import type { JudgedNote } from '../presenters/field-notes';

type Note = Pick<JudgedNote, 'id' | 'installationId' | 'kind' | 'notedOn' | 'data' | 'finding' | 'learntAt'>;
type Strike = Pick<FieldNoteStrike, 'fieldNoteId' | 'createdAt'>;

/** What has become of a note since it was kept. */
export interface NoteStanding<N, S> {
	strike: S | null;
	/** The note that was struck out after this one had learnt with it. */
	restsOn: N | null;
	/** What this one read was noted once more, and weighed without the other. */
	isNotedAnew: boolean;
}

/** In queries: the note of this alias was not struck out. */
export const isUnstruck = (note: string): string =>
	`NOT EXISTS (SELECT 1 FROM field_note_strikes struck WHERE struck.field_note_id = ${note}.id)`;

/** Whether a note has something for later ones: labels, and what heat had done. What fitted nothing has not. */
function hasReading({ data, finding }: Note): boolean {
	if (data.kind === 'cut-out' && finding?.cause?.finding !== 'explained') return false;
	return finding?.learning?.fits !== false && readingOf(data) !== null;
}

const hasLearning = ({ finding }: Note): boolean => (finding?.learning ?? null) !== null;

const placeOf = ({ data }: Note): string => (data.kind === 'peak-label' ? data.place : '');

const isSameReading = (a: Note, b: Note): boolean =>
	a.installationId === b.installationId &&
	a.kind === b.kind &&
	a.notedOn === b.notedOn &&
	placeOf(a) === placeOf(b);

/**
 * How each note stands, from when it was weighed and when others were struck out; nothing of it is kept. A note learnt
 * with those before it that were good at the time: it rests on one that was struck out after that.
 */
export function standNotes<N extends Note, S extends Strike>(
	notes: readonly N[],
	strikes: readonly S[]
): ReadonlyMap<number, NoteStanding<N, S>> {
	const strikeOf = new Map(strikes.map((strike) => [strike.fieldNoteId, strike]));
	const struckAt = ({ id }: N): number => strikeOf.get(id)?.createdAt.getTime() ?? Infinity;

	function findRest(note: N, until = Infinity): N | null {
		if (!hasLearning(note)) return null;
		const learntAt = note.learntAt.getTime();
		const hadLearntWith = (other: N): boolean =>
			other.installationId === note.installationId &&
			other.id < note.id &&
			hasReading(other) &&
			struckAt(other) >= learntAt &&
			struckAt(other) < until &&
			findRest(other, learntAt) === null;
		return notes.find(hadLearntWith) ?? null;
	}

	const isAnew = (note: N, rest: N | null): boolean =>
		rest !== null &&
		notes.some(
			(other) =>
				other.id > note.id &&
				isSameReading(other, note) &&
				!strikeOf.has(other.id) &&
				hasLearning(other) &&
				findRest(other) === null
		);

	return new Map(
		notes.map((note) => {
			const restsOn = findRest(note);
			const strike = strikeOf.get(note.id) ?? null;
			return [note.id, { strike, restsOn, isNotedAnew: isAnew(note, restsOn) }];
		})
	);
}

/** The notes that later ones learn with. */
export function listTeaching<N extends Note>(notes: readonly N[], strikes: readonly Strike[]): N[] {
	const standings = standNotes(notes, strikes);
	return notes.filter((note) => {
		const { strike, restsOn } = standings.get(note.id)!;
		return strike === null && restsOn === null && hasReading(note);
	});
}
