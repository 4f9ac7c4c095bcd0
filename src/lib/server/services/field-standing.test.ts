import { describe, expect, it } from 'vitest';
import type { FieldNoteData } from '$lib/schemas/field-notes';
import { listTeaching, standNotes } from './field-standing';

const at = (minute: number): Date => new Date(Date.UTC(2026, 1, 1, 10, minute));

const LABEL = {
	...({ kind: 'peak-label', place: 'case', turnedC: 60, notTurnedC: 65 } as const),
	...{ hottestDayC: 40, notedOn: '2026-02-01' }
};
const TEST = {
	...({ kind: 'capacity-test', notedOn: '2026-02-01', capacityAh: 90 } as const),
	...{ currentA: 5, cutOffV: 10.8, tempC: 25 }
};

/** Noted in the minute of its number; a label has learnt something, which fits unless said otherwise. */
function note(id: number, data: FieldNoteData = LABEL, { fits = true, of = 1 } = {}) {
	const finding = data.kind === 'peak-label' ? ({ cause: null, learning: { fits } } as never) : null;
	const { kind, notedOn } = data;
	return { id, installationId: of, kind, notedOn, data, finding, learntAt: at(id) };
}
const strike = (fieldNoteId: number, minute: number) => ({ fieldNoteId, createdAt: at(minute) });

/** Which note each one rests on that was struck out after it had learnt with it. */
const restsOf = (notes: ReturnType<typeof note>[], strikes: ReturnType<typeof strike>[]) =>
	[...standNotes(notes, strikes).values()].map(({ restsOn }) => restsOn?.id ?? null);
const teaching = (notes: ReturnType<typeof note>[], strikes: ReturnType<typeof strike>[]) =>
	listTeaching(notes, strikes).map(({ id }) => id);

describe('what a note learnt', () => {
	it('rests on nothing as long as nothing is struck out', () => {
		const notes = [note(1), note(2)];
		expect(restsOf(notes, [])).toEqual([null, null]);
		expect(teaching(notes, [])).toEqual([1, 2]);
	});

	it('does not count once a reading is struck out with which it had learnt', () => {
		const notes = [note(1), note(2), note(3)];
		expect(restsOf(notes, [strike(2, 9)])).toEqual([null, null, 2]);
		expect(teaching(notes, [strike(2, 9)])).toEqual([1]);
	});

	it('counts where that reading was struck out before it was noted', () => {
		const notes = [note(1), note(5)];
		expect(restsOf(notes, [strike(1, 3)])).toEqual([null, null]);
		expect(teaching(notes, [strike(1, 3)])).toEqual([5]);
	});

	it('counts where the one that was struck out taught nothing: a test, a reading that fitted nothing, another battery', () => {
		const others = [note(1, TEST), note(2, LABEL, { fits: false }), note(3, LABEL, { of: 2 })];
		const strikes = [strike(1, 9), strike(2, 9), strike(3, 9)];
		expect(restsOf([...others, note(4)], strikes)).toEqual([null, null, null, null]);
	});

	it('counts where the one that was struck out had itself been out of use when it was noted', () => {
		// The second rested on the first from minute 3 on: the third never learnt with either.
		const notes = [note(1), note(2), note(5)];
		const strikes = [strike(1, 3), strike(2, 9)];
		expect(restsOf(notes, strikes)).toEqual([null, 1, null]);
		expect(teaching(notes, strikes)).toEqual([5]);
	});

	it('does not count either where both fell in one moment', () => {
		expect(restsOf([note(1), note(2)], [strike(1, 2)])).toEqual([null, 1]);
	});
});

describe('a reading that is noted anew', () => {
	const strikes = [strike(1, 4)];
	const isAnew = (again: ReturnType<typeof note>, more = strikes) =>
		standNotes([note(1, { ...LABEL, notedOn: '2026-01-20' }), note(2), again], more).get(2)!.isNotedAnew;

	it('is one of the same kind, day and place, after the strike', () => {
		expect(isAnew(note(6))).toBe(true);
		expect(isAnew(note(3))).toBe(false);
		expect(isAnew(note(6, { ...LABEL, place: 'cells' }))).toBe(false);
		expect(isAnew(note(6, { ...LABEL, notedOn: '2026-02-02' }))).toBe(false);
		expect(isAnew(note(6, LABEL, { of: 2 }))).toBe(false);
	});

	it('is none any more when it is struck out itself', () => {
		expect(isAnew(note(6), [...strikes, strike(6, 8)])).toBe(false);
	});
});
