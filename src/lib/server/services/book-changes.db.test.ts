import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import type { BookScope, BookView, MountCase } from '$lib/schemas/books';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { Coefficient, CoefficientBook } from '../db/models';
import { assessJob } from './assessments';
import { changeCoefficient, compareBooks, draftBook, isByOwnHand, moveBook } from './book-changes';
import { bookInForce, getBook, listBooks } from './books';
import { getJob } from './jobs';

useTestDatabase();

const UNDER_BONNET = { engineLayout: 'inline', positionKind: 'under-bonnet' } as const;
const SHARE = { group: 'bay', key: 'share' };
const SAID = { value: 0.52, origin: 'judgement', source: 'Seen on two vans of this shop.' } as const;

/** A workshop that can assess, with a draft that its engineer began. */
async function makeDraft() {
	const crew = await makeCrew();
	const { jobId } = await makeAssessableJob(crew.installer);
	const first = await bookInForce(crew.installer, UNDER_BONNET);
	const draft = await draftBook(crew.engineer, { fromBookId: first.id, name: 'Vans', note: 'Flat noses.' });
	return { crew, jobId, first, draft };
}

const shareOf = (book: Pick<BookView, 'coefficients'>) =>
	book.coefficients.find(({ group, key }) => group === SHARE.group && key === SHARE.key);

describe('a draft', () => {
	it('begins with every value of another book, its origin and source, under the next number', async () => {
		const { crew, first, draft } = await makeDraft();
		expect(draft).toMatchObject({ number: first.number + 1, state: 'draft', madeBy: crew.engineer.name });
		expect(draft.coefficients).toEqual(first.coefficients);
		expect(await bookInForce(crew.installer, UNDER_BONNET)).toMatchObject({ id: first.id });
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

	it('is not put in force by who changed a value in it either, though another began it', async () => {
		const { crew, draft } = await makeDraft();
		const said = { ...SAID, version: draft.version };
		expect(await isByOwnHand(crew.manager, draft.id)).toBe(false);
		const changed = await changeCoefficient(crew.manager, draft.id, SHARE, said);
		const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version: changed.version });
		for (const person of [crew.engineer, crew.manager]) {
			expect(await isByOwnHand(person, draft.id)).toBe(true);
			const own = moveBook(person, draft.id, { to: 'in-force', version: trial.version });
			await expect(own).rejects.toMatchObject({ code: 'conflict' });
		}
	}, 60_000);

	it('is not put in force by who changed a value in it past the service either', async () => {
		const { crew, draft } = await makeDraft();
		const said = { ...SAID, version: draft.version };
		const changed = await changeCoefficient(crew.manager, draft.id, SHARE, said);
		await moveBook(crew.engineer, draft.id, { to: 'on-trial', version: changed.version });
		await CoefficientBook.update(
			{ state: 'withdrawn' },
			{ where: { workshopId: crew.workshopId, state: 'in-force' } }
		);
		const putInForceBy = (inForceBy: number) =>
			CoefficientBook.update({ state: 'in-force', inForceBy }, { where: { id: draft.id } });
		await expect(putInForceBy(crew.manager.id)).rejects.toThrow('changed a value');
		expect(await CoefficientBook.findByPk(draft.id)).toMatchObject({ state: 'on-trial' });
		await putInForceBy(crew.installer.id);
		expect(await CoefficientBook.findByPk(draft.id)).toMatchObject({ state: 'in-force' });
	});

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

describe('a book for some mounts', () => {
	const CABIN = { engineLayout: 'inline', positionKind: 'cabin' } as const;
	const VEE = { engineLayout: 'vee', positionKind: 'under-bonnet' } as const;

	/** A book in force with another share of the heat, for an engine, a position or both. */
	async function putInForce(crew: Crew, fromBookId: number, scope: Partial<BookScope>, value: number) {
		const draft = await draftBook(crew.engineer, { fromBookId, name: `For ${value}`, note: '', ...scope });
		const { version } = await changeCoefficient(crew.engineer, draft.id, SHARE, {
			...{ ...SAID, value },
			version: draft.version
		});
		const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version });
		return moveBook(crew.manager, draft.id, { to: 'in-force', version: trial.version });
	}

	it('is chosen before the one for everything: the closest, the position before the engine', async () => {
		const crew = await makeCrew();
		const { jobId } = await makeAssessableJob(crew.installer);
		const first = await bookInForce(crew.installer, UNDER_BONNET);
		await putInForce(crew, first.id, { engineLayout: 'inline' }, 0.41);
		await putInForce(crew, first.id, { positionKind: 'under-bonnet' }, 0.42);
		const shareFor = async (mount: MountCase) => shareOf(await bookInForce(crew.installer, mount))!.value;
		expect([await shareFor(UNDER_BONNET), await shareFor(CABIN), await shareFor(VEE)]).toEqual([
			0.42, 0.41, 0.42
		]);
		expect(await shareFor({ engineLayout: 'unknown', positionKind: 'cabin' })).toBe(0.6);
		await putInForce(crew, first.id, UNDER_BONNET, 0.43);
		expect([await shareFor(UNDER_BONNET), await shareFor(VEE)]).toEqual([0.43, 0.42]);
		const [hot, cool] = await assessJob(crew.installer, jobId);
		expect([hot!.inputs.book.coefficients.bay!.share, cool!.inputs.book.coefficients.bay!.share]).toEqual([
			0.43, 0.41
		]);
		expect(await getJob(crew.installer, jobId)).toMatchObject({
			standings: [{ changedSince: [] }, { changedSince: [] }]
		});
	}, 60_000);

	it('comes in the place of the one for the same alone, and can be withdrawn without another', async () => {
		const crew = await makeCrew();
		await makeAssessableJob(crew.installer);
		const first = await bookInForce(crew.installer, UNDER_BONNET);
		const one = await putInForce(crew, first.id, { positionKind: 'under-bonnet' }, 0.42);
		const two = await putInForce(crew, first.id, { positionKind: 'under-bonnet' }, 0.44);
		expect((await listBooks(crew.manager)).map(({ number, state }) => [number, state])).toEqual([
			[two.number, 'in-force'],
			[one.number, 'withdrawn'],
			[first.number, 'in-force']
		]);
		const { id, version } = two;
		await moveBook(crew.manager, id, { to: 'withdrawn', version });
		expect(await bookInForce(crew.installer, UNDER_BONNET)).toMatchObject({ id: first.id });
		const where = { id: two.id };
		await expect(CoefficientBook.update({ positionKind: 'cabin' }, { where })).rejects.toThrow('immutable');
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
