import { literal, Op, type WhereOptions } from 'sequelize';
import { CoefficientBook, Job, type AuditEntry } from '../db/models';

/** What a workshop counts for itself and knows by that number: another one than it is kept under. */
const COUNTED = { book: 'coefficient_books', job: 'jobs' } as const;
type Counted = keyof typeof COUNTED;
const COUNTED_TYPES = Object.keys(COUNTED) as Counted[];

const isCounted = (type: string): type is Counted => type in COUNTED;
const MOST_DIGITS = /^\d{1,9}$/;

const ofCounted = (type: Counted, workshopId: number, number: number): WhereOptions => ({
	subjectType: type,
	subjectId: {
		[Op.in]: literal(
			`(SELECT id FROM ${COUNTED[type]} WHERE workshop_id = ${Number(workshopId)} AND number = ${Number(number)})`
		)
	}
});

/** Entries about what has this number for the people of the workshop; none for a word that is no number. */
export function subjectsNumbered(workshopId: number, word: string): WhereOptions[] {
	if (!MOST_DIGITS.test(word)) return [];
	const number = Number(word);
	return [
		{ subjectType: { [Op.notIn]: COUNTED_TYPES }, subjectId: number },
		...COUNTED_TYPES.map((type) => ofCounted(type, workshopId, number))
	];
}

/** "book 3" asks for that book, not for whatever has a 3 in it: the pairs out of the words of a search, and the other words. */
export function takeCounted(
	workshopId: number,
	words: readonly string[]
): { pairs: WhereOptions[]; rest: string[] } {
	const pairs: WhereOptions[] = [];
	const rest: string[] = [];
	for (let at = 0; at < words.length; at++) {
		const type = words[at]!.toLowerCase();
		const number = words[at + 1] ?? '';
		if (isCounted(type) && MOST_DIGITS.test(number)) {
			pairs.push(ofCounted(type, workshopId, Number(number)));
			at++;
		} else rest.push(words[at]!);
	}
	return { pairs, rest };
}

/** Numbers of what a workshop counts, by what they are and how they are kept. */
export type SubjectNumbers = Record<Counted, ReadonlyMap<number, number>>;

/** The number that a subject has for people. */
export const numberOf = (type: string, id: number, numbers: SubjectNumbers): number =>
	(isCounted(type) ? numbers[type].get(id) : undefined) ?? id;

/** The numbers of all that a page of the trail is about. */
export async function findNumbers(
	workshopId: number,
	entries: readonly AuditEntry[]
): Promise<SubjectNumbers> {
	const ask = (type: Counted) => {
		const ids = entries.filter(({ subjectType }) => subjectType === type).map(({ subjectId }) => subjectId);
		return { where: { id: [...new Set(ids)], workshopId }, attributes: ['id', 'number'] };
	};
	const toNumbers = (rows: readonly { id: number; number: number }[]) =>
		new Map(rows.map(({ id, number }) => [id, number]));
	return {
		book: toNumbers(await CoefficientBook.findAll(ask('book'))),
		job: toNumbers(await Job.findAll(ask('job')))
	};
}
