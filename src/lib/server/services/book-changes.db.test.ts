import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { Coefficient, CoefficientBook } from '../db/models';
import { assessJob } from './assessments';
import { changeCoefficient, compareBooks, draftBook, moveBook } from './book-changes';
import { bookInForce, getBook, listBooks } from './books';

useTestDatabase();

const SHARE = { group: 'bay', key: 'share' };
const SAID = { value: 0.52, origin: 'judgement', source: 'Seen on two vans of this shop.' } as const;

/** A workshop that can assess, with a draft that its engineer began. */
async function makeDraft() {
	const crew = await makeCrew();
	const { jobId } = await makeAssessableJob(crew.installer);
	const first = await bookInForce(crew.installer);
	const draft = await draftBook(crew.engineer, { fromBookId: first.id, name: 'Vans', note: 'Flat noses.' });
	return { crew, jobId, first, draft };
}

const shareOf = (book: { coefficients: { group: string; key: string }[] }) =>
	book.coefficients.find(({ group, key }) => group === SHARE.group && key === SHARE.key);

describe('a draft', () => {
	it('begins with every value of another book, its origin and source, under the next number', async () => {
		const { crew, first, draft } = await makeDraft();
		expect(draft).toMatchObject({ number: first.number + 1, state: 'draft', madeBy: crew.engineer.name });
		expect(draft.coefficients).toEqual(first.coefficients);
		expect(await bookInForce(crew.installer)).toMatchObject({ id: first.id });
	});

	it('takes a value within its limits with where it comes from, and says what was changed meanwhile', async () => {
		const { crew, first, draft } = await makeDraft();
		const changed = await changeCoefficient(crew.engineer, draft.id, SHARE, {
			...SAID,
			version: draft.version
		});
		expect(shareOf(changed)).toMatchObject(SAID);
		const stale = changeCoefficient(crew.manager, draft.id, SHARE, { ...SAID, version: draft.version });
		await expect(stale).rejects.toMatchObject({ code: 'changed_meanwhile' });
		const { version } = changed;
		const beyond = changeCoefficient(crew.engineer, draft.id, SHARE, { ...SAID, value: 40, version });
		await expect(beyond).rejects.toMatchObject({ code: 'invalid_input', problems: [{ path: 'value' }] });
		const unknown = changeCoefficient(
			crew.engineer,
			draft.id,
			{ group: 'bay', key: 'colour' },
			{ ...SAID, version }
		);
		await expect(unknown).rejects.toMatchObject({ code: 'not_found' });
		expect(shareOf(await getBook(crew.engineer, first.id))).toMatchObject({ value: 0.6 });
	});

	it('stands beside the book that it came from, with what differs alone', async () => {
		const { crew, first, draft } = await makeDraft();
		await changeCoefficient(crew.engineer, draft.id, SHARE, { ...SAID, version: draft.version });
		const { left, right, differing, same } = await compareBooks(crew.manager, first.id, draft.id);
		expect([left.number, right.number]).toEqual([first.number, draft.number]);
		expect(differing).toMatchObject([{ ...SHARE, left: { value: 0.6 }, right: { value: 0.52 } }]);
		expect(same).toBe(first.coefficients.length - 1);
	});
});

describe('a book on its way', () => {
	it('goes into force by the hands of somebody else, and the former one is withdrawn', async () => {
		const { crew, jobId, first, draft } = await makeDraft();
		const changed = await changeCoefficient(crew.engineer, draft.id, SHARE, {
			...SAID,
			version: draft.version
		});
		const early = moveBook(crew.manager, draft.id, { to: 'in-force', version: changed.version });
		await expect(early).rejects.toMatchObject({ code: 'conflict' });
		const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version: changed.version });
		const own = moveBook(crew.engineer, draft.id, { to: 'in-force', version: trial.version });
		await expect(own).rejects.toMatchObject({ code: 'conflict' });
		const inForce = await moveBook(crew.manager, draft.id, { to: 'in-force', version: trial.version });
		expect(inForce).toMatchObject({ state: 'in-force', inForceBy: crew.manager.name });
		expect((await listBooks(crew.manager)).map(({ number, state }) => [number, state])).toEqual([
			[draft.number, 'in-force'],
			[first.number, 'withdrawn']
		]);
		const [assessed] = await assessJob(crew.installer, jobId);
		expect(assessed!.inputs.scenario.bay!.share).toBe(SAID.value);
	}, 60_000);

	it('changes in nothing, neither by the service nor past it', async () => {
		const { crew, draft } = await makeDraft();
		const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version: draft.version });
		const late = changeCoefficient(crew.engineer, draft.id, SHARE, { ...SAID, version: trial.version });
		await expect(late).rejects.toMatchObject({ code: 'conflict' });
		const where = { bookId: draft.id };
		await expect(Coefficient.update({ value: 1 }, { where })).rejects.toThrow('immutable');
		await expect(Coefficient.destroy({ where })).rejects.toThrow('immutable');
		const ofBook = { where: { id: draft.id }, individualHooks: false };
		await expect(CoefficientBook.update({ name: 'Another' }, ofBook)).rejects.toThrow('immutable');
		await expect(CoefficientBook.update({ state: 'draft' }, ofBook)).rejects.toThrow('immutable');
		const byMaker = { state: 'in-force', inForceBy: crew.engineer.id } as const;
		await expect(CoefficientBook.update(byMaker, ofBook)).rejects.toThrow('immutable');
	});

	it('is not withdrawn while it is in force, and never comes back', async () => {
		const { crew, first, draft } = await makeDraft();
		const gone = moveBook(crew.manager, first.id, { to: 'withdrawn', version: first.version });
		await expect(gone).rejects.toMatchObject({ code: 'conflict' });
		const { version } = await moveBook(crew.engineer, draft.id, { to: 'withdrawn', version: draft.version });
		await expect(moveBook(crew.manager, draft.id, { to: 'on-trial', version })).rejects.toMatchObject({
			code: 'conflict'
		});
	});
});

describe('nobody else', () => {
	it('makes or moves books: no installer, and no other workshop', async () => {
		const { crew, first, draft } = await makeDraft();
		const { engineer: neighbour } = await makeCrew();
		const input = { fromBookId: first.id, name: 'Theirs', note: '' };
		await expect(draftBook(crew.installer, input)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(draftBook(neighbour, input)).rejects.toMatchObject({ code: 'not_found' });
		const move = { to: 'on-trial', version: draft.version } as const;
		await expect(moveBook(neighbour, draft.id, move)).rejects.toMatchObject({ code: 'not_found' });
		await expect(compareBooks(neighbour, first.id, draft.id)).rejects.toMatchObject({ code: 'not_found' });
	});
});
