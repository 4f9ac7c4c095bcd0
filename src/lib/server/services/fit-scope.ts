import { closestBook, holdsFor, isGeneral, type BookScope, type MountCase } from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import { Job, Mount, Trace, type CoefficientBook } from '../db/models';
import { listInForce, noBookInForce } from './books';

/** What the mounts of traces are, as far as a book is chosen by it. */
async function casesOf({ workshopId }: SignedInPerson, traceIds: readonly number[]): Promise<MountCase[]> {
	const traces = await Trace.findAll({
		where: { id: [...traceIds], workshopId },
		attributes: ['jobId', 'mountId']
	});
	const [mounts, jobs] = await Promise.all([
		Mount.findAll({ where: { id: traces.map(({ mountId }) => mountId) } }),
		Job.findAll({ where: { id: traces.map(({ jobId }) => jobId) }, include: ['vehicle'] })
	]);
	return mounts.map(({ jobId, positionKind }) => {
		const { engineLayout } = jobs.find(({ id }) => id === jobId)!.vehicle!;
		return { engineLayout, positionKind };
	});
}

/** The book that a fit begins from: of those in force the closest that holds for every one of its mounts. */
export async function bookForAll(
	person: SignedInPerson,
	traceIds: readonly number[]
): Promise<CoefficientBook> {
	const cases = await casesOf(person, traceIds);
	const inForce = await listInForce(person.workshopId);
	const forEach = inForce.filter((book) => cases.every((mount) => holdsFor(book, mount)));
	const book = cases[0] ? closestBook(forEach, cases[0]) : inForce.find(isGeneral);
	if (!book) throw noBookInForce();
	return book;
}

/**
 * What a book with the values of a fit is for: what the book was for that the fit began from, and no wider
 * in its positions than what was measured. So it takes the place of no book but that one, or comes beside it.
 */
export async function scopeOfFit(
	person: SignedInPerson,
	traceIds: readonly number[],
	{ engineLayout, positionKind }: BookScope
): Promise<BookScope> {
	if (positionKind !== 'any') return { engineLayout, positionKind };
	const kinds = new Set((await casesOf(person, traceIds)).map((mount) => mount.positionKind));
	return { engineLayout, positionKind: kinds.size === 1 ? [...kinds][0]! : 'any' };
}
