import { beforeAll, describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { TRUE_CONDUCTANCE } from '../../../../tests/support/fit-day';
import { makeFittable } from '../../../../tests/support/fit-traces';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { dayText, readAs, sendTrace } from '../../../../tests/support/traces';
import { fitInputSchema, type FitView } from '$lib/schemas/fits';
import type { SignedInPerson } from '$lib/schemas/people';
import { legsChangeSchema, type TraceView } from '$lib/schemas/traces';
import { ENGINE_VERSION } from '$lib/thermal';
import { AuditEntry, Fit } from '../db/models';
import { assessMount } from './assessments';
import { changeCoefficient, draftBook, moveBook } from './book-changes';
import { getBook, listBooks } from './books';
import { draftFittedBook } from './fit-books';
import { cancelFit, createFit, followFit, getFit, listChoices, listFits, prepareFit } from './fits';
import { scopeOfFit } from './fit-scope';
import { saveLegs } from './trace-views';
import { getTrace } from './traces';

useTestDatabase();

const CELL_PATH = {
	group: 'battery',
	key: 'caseCellConductance',
	prior: { law: 'lognormal', middle: 2.5, spread: 0.35 }
};
const LONG_MS = 120_000;

let crew: Crew;
let traces: TraceView[];

beforeAll(async () => {
	crew = await makeCrew();
	({ traces } = await makeFittable(crew, [1, 2]));
}, LONG_MS);

const asked = (changes: object = {}) => ({
	...{ name: 'Cells of the ridge', traces: [{ traceId: traces[0]!.id }], coefficients: [CELL_PATH] },
	...{ leaveOut: false, ...changes }
});

/** As an endpoint does it: what was asked through the schema, prepared, kept. */
async function beginAs(person: SignedInPerson, what: object): Promise<FitView> {
	const input = fitInputSchema.parse(what);
	return createFit(person, input, await prepareFit(person, input));
}

async function fitAs(person: SignedInPerson, what: object): Promise<FitView> {
	const { id } = await beginAs(person, what);
	await followFit(person, id);
	return getFit(person, id);
}

/** A book for batteries under the bonnet in which one value is another, in force beside the one for everything. */
async function putNarrowInForce({ engineer, manager }: Crew, fromBookId: number) {
	const scope = { engineLayout: 'any', positionKind: 'under-bonnet' } as const;
	const draft = await draftBook(engineer, { fromBookId, name: 'Narrow', note: '', ...scope });
	const share = { value: 0.5, origin: 'judgement', source: 'Made up for this test.' } as const;
	const at = { group: 'bay', key: 'share' };
	const { version } = await changeCoefficient(engineer, draft.id, at, { ...share, version: draft.version });
	const trial = await moveBook(engineer, draft.id, { to: 'on-trial', version });
	return moveBook(manager, draft.id, { to: 'in-force', version: trial.version });
}

describe('a fit', () => {
	it(
		'finds what is true of a vehicle from a trace of its mount, with its interval and with which engine',
		async () => {
			const fit = await fitAs(crew.engineer, asked());
			expect(fit).toMatchObject({ state: 'done', isSynthetic: false, engineVersion: ENGINE_VERSION });
			const [{ value, low, high, before }] = fit.result!.estimates as [
				NonNullable<FitView['result']>['estimates'][number]
			];
			expect(low).toBeLessThan(TRUE_CONDUCTANCE);
			expect(high).toBeGreaterThan(TRUE_CONDUCTANCE);
			expect(Math.abs(value - TRUE_CONDUCTANCE)).toBeLessThan(Math.abs(before - TRUE_CONDUCTANCE));
			const { fitted } = fit.result!.errors;
			expect(fitted.after.all.rmsK).toBeLessThan(fitted.before.all.rmsK);
			expect((await listFits(crew.manager)).map(({ id }) => id)).toContain(fit.id);
			const actions = await AuditEntry.findAll({ where: { subjectType: 'fit', subjectId: fit.id } });
			expect(actions.map(({ action }) => action)).toEqual(['fit.begun', 'fit.done']);
		},
		LONG_MS
	);

	it(
		'is tested with legs that it was not given, and with each trace in turn',
		async () => {
			const both = traces.map(({ id }, at) => ({ traceId: id, heldOutLegs: at === 0 ? [3] : [] }));
			const { result } = await fitAs(crew.engineer, asked({ traces: both, leaveOut: true }));
			const { heldOutLegs, leftOutTraces, fitted } = result!.errors;
			expect(heldOutLegs!.after.all.readings).toBeGreaterThan(100);
			expect(heldOutLegs!.after.all.rmsK).toBeLessThan(heldOutLegs!.before.all.rmsK);
			expect(leftOutTraces!.after.all.readings).toBe(fitted.after.all.readings);
			expect(result!.candidates.length).toBeGreaterThan(3);
		},
		LONG_MS
	);

	it(
		'goes on when somebody looks after it was broken off with the application',
		async () => {
			const { id } = await beginAs(crew.engineer, asked());
			expect(await Fit.findByPk(id)).toMatchObject({ state: 'running' });
			expect(await getFit(crew.manager, id)).toMatchObject({ state: 'running', result: null });
			const shares: number[] = [];
			await followFit(crew.manager, id, (share) => shares.push(share));
			expect(shares.length).toBeGreaterThan(0);
			expect(shares.every((share) => share >= 0 && share <= 1)).toBe(true);
			expect(await getFit(crew.manager, id)).toMatchObject({ state: 'done' });
		},
		LONG_MS
	);

	it('can be called off, once, and keeps nothing then', async () => {
		const { id } = await beginAs(crew.engineer, asked());
		await getFit(crew.engineer, id);
		expect(await cancelFit(crew.engineer, id)).toMatchObject({ state: 'cancelled' });
		await followFit(crew.engineer, id);
		expect(await getFit(crew.engineer, id)).toMatchObject({ state: 'cancelled', result: null });
		await expect(cancelFit(crew.engineer, id)).rejects.toMatchObject({ code: 'conflict' });
	});

	it('says why it could not be made when its trace was taken away meanwhile', async () => {
		const { id, ...input } = await beginAs(crew.engineer, asked());
		const gone = { ...(await Fit.findByPk(id))!.inputs };
		gone.traces = gone.traces.map((trace) => ({ ...trace, traceId: 999_999 }));
		await Fit.update({ inputs: gone }, { where: { id } });
		expect(input.state).toBe('running');
		await followFit(crew.engineer, id);
		expect(await getFit(crew.engineer, id)).toMatchObject({
			...{ state: 'failed', failure: 'There is no such trace here.' }
		});
	});

	it('is not made of a trace that was changed after it was asked for', async () => {
		const { id } = await beginAs(crew.engineer, asked());
		const { legs, version, name } = await getTrace(crew.engineer, traces[0]!.id);
		const sent = legs.map(({ endS, kind, meanSpeedKmh }) => ({ endS, kind, speedKmh: meanSpeedKmh }));
		await saveLegs(crew.engineer, traces[0]!.id, legsChangeSchema.parse({ legs: sent, version }));
		await followFit(crew.engineer, id);
		const { state, failure } = await getFit(crew.engineer, id);
		expect(state).toBe('failed');
		expect(failure).toContain(`“${name}” was changed after this fit was asked for`);
	});

	it('goes by the assessment that was the newest when it was asked for', async () => {
		const { id } = await beginAs(crew.engineer, asked());
		const { assessmentId } = (await Fit.findByPk(id))!.inputs.traces[0]!;
		await assessMount(crew.installer, { mountId: traces[0]!.mountId });
		await followFit(crew.engineer, id);
		const kept = (await Fit.findByPk(id))!;
		expect(kept).toMatchObject({ state: 'done', inputs: { traces: [{ assessmentId }] } });
	}, 120_000);

	it('is refused in words where it could not be begun', async () => {
		const begin = (changes: object) => beginAs(crew.engineer, asked(changes));
		const { hot } = await makeAssessableJob(crew.installer);
		const lonely = await readAs(crew.engineer, await sendTrace(crew.engineer, hot.id, dayText()));
		await expect(begin({ traces: [{ traceId: lonely.id }] })).rejects.toMatchObject({
			code: 'conflict',
			message: expect.stringContaining('its mount has not been assessed yet') as string
		});
		const { unfit } = (await listChoices(crew.engineer)).traces.find(({ id }) => id === lonely.id)!;
		expect(unfit).toBe('its mount has not been assessed yet');
		const traceId = traces[0]!.id;
		await expect(begin({ traces: [{ traceId, heldOutLegs: [1, 2, 3] }] })).rejects.toMatchObject({
			message: expect.stringContaining('every leg is kept back') as string
		});
		await expect(begin({ traces: [{ traceId, heldOutLegs: [9] }] })).rejects.toMatchObject({
			message: expect.stringContaining('has no leg 9') as string
		});
		const both = begin({
			traces: [{ traceId, heldOutLegs: [9] }],
			coefficients: [{ ...CELL_PATH, prior: { ...CELL_PATH.prior, middle: -1 } }]
		});
		await expect(both).rejects.toMatchObject({
			problems: [{ path: 'coefficients[0].prior.middle' }, { path: 'traces[0].heldOutLegs' }]
		});
		const nowhere = { ...CELL_PATH, key: 'colour' };
		await expect(begin({ coefficients: [nowhere] })).rejects.toMatchObject({ code: 'invalid_input' });
		const beyond = { ...CELL_PATH, prior: { law: 'logit-normal', middle: 2.5, spread: 0.3 } };
		await expect(begin({ coefficients: [beyond] })).rejects.toMatchObject({
			message: expect.stringContaining('prior.middle') as string
		});
	});
});

describe('a book with fitted values', () => {
	it(
		'is a draft that names the fit, its traces and the interval, and leads back to it',
		async () => {
			const fit = await fitAs(crew.engineer, asked());
			const words = { name: 'Ridge cells', note: 'One day.' };
			const book = await draftFittedBook(crew.engineer, fit.id, words);
			expect(book).toMatchObject({ ...words, state: 'draft', positionKind: 'under-bonnet' });
			const fitted = book.coefficients.filter(({ origin }) => origin === 'fitted');
			expect(fitted).toMatchObject([{ group: 'battery', key: 'caseCellConductance', fitId: fit.id }]);
			expect(fitted[0]!.value).toBeCloseTo(fit.result!.estimates[0]!.value, 2);
			expect(fitted[0]!.source).toMatch(
				new RegExp(
					`^Fit ${fit.id} to trace ${traces[0]!.id}: nine chances in ten between [\\d.]+ and [\\d.]+ W/K\\.$`
				)
			);
			const from = await getBook(crew.engineer, fit.bookId);
			const others = (coefficients: typeof book.coefficients) =>
				coefficients.filter(({ key }) => key !== 'caseCellConductance');
			expect(others(book.coefficients)).toEqual(others(from.coefficients));

			const next = await draftBook(crew.engineer, { fromBookId: book.id, name: 'Next', note: '' });
			expect(next.coefficients.find(({ origin }) => origin === 'fitted')).toMatchObject({ fitId: fit.id });
			const said = { value: 3, origin: 'judgement', source: 'Rounded.', version: book.version } as const;
			const changed = await changeCoefficient(crew.engineer, book.id, CELL_PATH, said);
			expect(changed.coefficients.find(({ key }) => key === CELL_PATH.key)).toMatchObject({ fitId: null });
		},
		LONG_MS
	);

	it(
		'begins from the book that its mounts are assessed with, and takes the place of no other',
		async () => {
			const others = await makeCrew();
			const { traces: days } = await makeFittable(others, [1]);
			const general = (await listChoices(others.engineer)).book;
			const narrow = await putNarrowInForce(others, general.id);
			expect((await listChoices(others.engineer)).book.id).toBe(general.id);
			const choices = await listChoices(others.engineer, [days[0]!.id]);
			expect(choices.book.id).toBe(narrow.id);
			const middle = choices.coefficients.find(({ group, key }) => `${group}.${key}` === 'bay.share')!;
			expect(middle.prior.middle).toBe(0.5);

			const fit = await fitAs(others.engineer, asked({ traces: [{ traceId: days[0]!.id }] }));
			expect(fit.bookId).toBe(narrow.id);
			const book = await draftFittedBook(others.engineer, fit.id, { name: 'Fitted', note: '' });
			expect(book).toMatchObject({ engineLayout: narrow.engineLayout, positionKind: 'under-bonnet' });
			expect(book.coefficients.find(({ key }) => key === 'share')!.value).toBe(0.5);
			// Also where nothing is left of what was measured.
			expect(await scopeOfFit(others.engineer, [], narrow)).toMatchObject({ positionKind: 'under-bonnet' });
		},
		LONG_MS
	);

	it(
		'is never made from what was made up',
		async () => {
			const { traces: invented } = await makeFittable(crew, [3], true);
			const before = await listBooks(crew.engineer);
			const fit = await fitAs(crew.engineer, asked({ traces: [{ traceId: invented[0]!.id }] }));
			expect(fit).toMatchObject({ state: 'done', isSynthetic: true });
			const draft = draftFittedBook(crew.engineer, fit.id, { name: 'Made up', note: '' });
			await expect(draft).rejects.toMatchObject({
				code: 'conflict',
				message: expect.stringContaining('synthetic') as string
			});
			expect(await listBooks(crew.engineer)).toEqual(before);
		},
		LONG_MS
	);

	it(
		'is not begun from a fit whose search was given up',
		async () => {
			const { id, result } = await fitAs(crew.engineer, asked());
			const before = await listBooks(crew.engineer);
			for (const stopped of ['stalled', 'evaluations used up'] as const) {
				await Fit.update({ result: { ...result!, stopped } }, { where: { id } });
				const draft = draftFittedBook(crew.engineer, id, { name: 'Given up', note: '' });
				await expect(draft).rejects.toMatchObject({
					code: 'conflict',
					message: expect.stringContaining('did not come to a best fit') as string
				});
			}
			expect(await listBooks(crew.engineer)).toEqual(before);
		},
		LONG_MS
	);

	it('is not begun from a fit that came to nothing', async () => {
		const { id } = await beginAs(crew.engineer, asked());
		await cancelFit(crew.engineer, id);
		const draft = draftFittedBook(crew.engineer, id, { name: 'None', note: '' });
		await expect(draft).rejects.toMatchObject({ code: 'conflict' });
	});
});

describe('nobody else', () => {
	it('fits or drafts: no installer, and no other workshop', async () => {
		const { id } = await beginAs(crew.engineer, asked());
		const { engineer: neighbour, installer } = await makeCrew();
		await makeAssessableJob(installer);
		const ways = (person: SignedInPerson) => [
			() => getFit(person, id),
			() => followFit(person, id),
			() => cancelFit(person, id),
			() => beginAs(person, asked()),
			() => draftFittedBook(person, id, { name: 'Theirs', note: '' })
		];
		for (const way of ways(crew.installer))
			await expect(way()).rejects.toMatchObject({ code: 'not_allowed' });
		for (const way of ways(neighbour)) await expect(way()).rejects.toMatchObject({ code: 'not_found' });
		expect(await listFits(neighbour)).toEqual([]);
		await cancelFit(crew.engineer, id);
	});
});
