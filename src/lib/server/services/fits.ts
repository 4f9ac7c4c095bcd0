import type { FitChoice, FitInput, FitRow, FitView } from '$lib/schemas/fits';
import type { BookRow } from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import type { TraceRow } from '$lib/schemas/traces';
import { ENGINE_VERSION } from '$lib/thermal';
import { fitCoefficients, type CoefficientFit, type CoefficientFitInput } from '$lib/thermal/fit';
import type { TraceLeg } from '$lib/thermal/traces';
import { CoefficientBook, Fit, Job, Mount, Person, Trace, Vehicle } from '../db/models';
import { inTransaction, outsideTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import type { NameOf } from '../presenters/books';
import { presentFit, presentFitRow, type FittedTrace } from '../presenters/fits';
import { record, recordBy } from './audit';
import { coefficientsOf, withCoefficients } from './books';
import {
	asFitError,
	gatherAgain,
	gatherFit,
	type GatheredFit,
	newestAssessments,
	sayUnfit
} from './fit-inputs';
import { listFitChoices } from './fit-priors';
import { bookForAll } from './fit-scope';
import { afterOthers, workInSlices } from './slices';
import { listTraces } from './traces';

async function namesOf(fits: readonly Fit[]): Promise<NameOf> {
	const ids = [...new Set(fits.map(({ madeBy }) => madeBy))];
	const people = await Person.findAll({ where: { id: ids }, attributes: ['id', 'name'] });
	const names = new Map(people.map(({ id, name }) => [id, name]));
	return (id) => names.get(id ?? 0) ?? '';
}

/** The traces that stand, with where they were measured. */
async function findFitted(ids: readonly number[]): Promise<FittedTrace[]> {
	const traces = await Trace.findAll({
		where: { id: [...ids], removedAt: null },
		attributes: ['id', 'name', 'isSynthetic', 'span', 'mountId', 'jobId']
	});
	return Promise.all(
		traces.map(async (trace) => {
			const job = (await Job.findByPk(trace.jobId))!;
			const [mount, vehicle] = [await Mount.findByPk(trace.mountId), await Vehicle.findByPk(job.vehicleId)];
			return { trace, job, mount: mount!, vehicle: vehicle! };
		})
	);
}

async function showFit(fit: Fit): Promise<FitView> {
	const traces = await findFitted(fit.inputs.traces.map(({ traceId }) => traceId));
	return presentFit(fit, traces, await namesOf([fit]));
}

export async function findFit({ workshopId }: SignedInPerson, fitId: number): Promise<Fit> {
	const fit = await Fit.findOne({ where: { id: fitId, workshopId } });
	if (!fit) throw notFound('fit');
	return fit;
}

/** The fits of the workshop, newest first. */
export async function listFits(person: SignedInPerson): Promise<FitRow[]> {
	const { workshopId } = allow(person, 'traces.read');
	const attributes = { exclude: ['result'] };
	const fits = await Fit.findAll({ where: { workshopId }, order: [['id', 'DESC']], attributes });
	const nameOf = await namesOf(fits);
	return fits.map((fit) => presentFitRow(fit, nameOf));
}

export interface FitChoices {
	book: Pick<BookRow, 'id' | 'number' | 'name'>;
	coefficients: FitChoice[];
	/** Why a trace cannot be fitted to; empty where it can. */
	traces: (TraceRow & { unfit: string; legs: TraceLeg[] })[];
}

/** What can be fitted to what, beginning from the book of the traces that are chosen. */
export async function listChoices(
	person: SignedInPerson,
	chosenIds: readonly number[] = []
): Promise<FitChoices> {
	allow(person, 'traces.write');
	const book = await withCoefficients(await bookForAll(person, chosenIds));
	const shown = await listTraces(person);
	const rows = await Trace.findAll({ where: { id: shown.map(({ id }) => id) } });
	const assessments = await newestAssessments(rows.map(({ mountId }) => mountId));
	const rowOf = new Map(rows.map((row) => [row.id, row]));
	return {
		book: { id: book.id, number: book.number, name: book.name },
		coefficients: listFitChoices(book),
		traces: shown.map((trace) => {
			const row = rowOf.get(trace.id)!;
			const unfit = sayUnfit(row, assessments.get(row.mountId) ?? null);
			return { ...trace, unfit, legs: row.legs ?? [] };
		})
	};
}

/** Refuses before anything is kept what no fit could be begun with. */
function requireFittable(input: CoefficientFitInput): void {
	const work = fitCoefficients(input);
	try {
		work.next();
	} catch (error) {
		throw asFitError(error);
	} finally {
		work.return(undefined as never);
	}
}

function requireInBook({ coefficients }: FitInput, choices: readonly FitChoice[]): void {
	coefficients.forEach(({ group, key }, at) => {
		if (choices.some((choice) => choice.group === group && choice.key === key)) return;
		const message = `The book has no coefficient ${group}.${key} that can be fitted.`;
		throw new AppError('invalid_input', message, [{ path: `coefficients[${at}]`, message }]);
	});
}

/** A fit that could be begun. */
export interface PreparedFit extends Omit<GatheredFit, 'engineInput'> {
	book: CoefficientBook;
}

/** Looks whether a fit can be begun, in no transaction: the vehicle is run for it. */
export async function prepareFit(person: SignedInPerson, input: FitInput): Promise<PreparedFit> {
	allow(person, 'traces.write');
	const traceIds = input.traces.map(({ traceId }) => traceId);
	const row = await bookForAll(person, traceIds);
	const book = await withCoefficients(row);
	requireInBook(input, listFitChoices(book));
	const { engineInput, ...gathered } = await gatherFit(person, input, coefficientsOf(book));
	requireFittable(engineInput);
	return { ...gathered, book: row };
}

/** Keeps what is to be fitted; the work begins when somebody looks, once this is kept. */
export async function createFit(
	person: SignedInPerson,
	{ name, coefficients, loss, leaveOut }: FitInput,
	{ book: row, traces, isSynthetic }: PreparedFit
): Promise<FitView> {
	const { workshopId } = allow(person, 'traces.write');
	return inTransaction(async (transaction) => {
		const fit = await Fit.create(
			{
				...{ workshopId, name, state: 'running', isSynthetic, bookId: row.id },
				inputs: { traces, coefficients, loss, leaveOut, bookNumber: row.number },
				...{ engineVersion: ENGINE_VERSION, madeBy: person.id }
			},
			{ transaction }
		);
		const detail = { name, traces: traces.map(({ traceId }) => traceId), isSynthetic };
		await recordBy(person, 'fit.begun', { type: 'fit', id: fit.id }, transaction, detail);
		return showFit(fit);
	});
}

interface Running {
	done: Promise<void>;
	share: number;
	listeners: Set<(share: number) => void>;
	stop: AbortController;
}

/** What is being fitted now. */
const running = new Map<number, Running>();

class CalledOff extends Error {}

/** The same work, until it is called off. */
function* untilStopped(
	work: Generator<number, CoefficientFit>,
	signal: AbortSignal
): Generator<number, CoefficientFit> {
	for (let step = work.next(); ; step = work.next()) {
		if (step.done) return step.value;
		if (signal.aborted) throw new CalledOff();
		yield step.value;
	}
}

const LONGEST_FAILURE = 500;

async function settle(
	{ id }: Fit,
	changes: { state: 'done' | 'failed'; result?: Fit['result']; failure?: string }
): Promise<void> {
	await inTransaction(async (transaction) => {
		const fit = await Fit.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
		if (fit?.state !== 'running') return;
		await fit.update({ ...changes, finishedAt: new Date() }, { transaction });
		const { workshopId, madeBy: personId } = fit;
		const action = changes.state === 'done' ? 'fit.done' : 'fit.failed';
		const { failure = '' } = changes;
		await record(
			{ workshopId, personId, action, subjectType: 'fit', subjectId: id, detail: { failure } },
			transaction
		);
	});
}

async function personOf({ madeBy, workshopId }: Fit): Promise<SignedInPerson> {
	const { id, name, email, role } = (await Person.findByPk(madeBy))!;
	return { id, name, email, role, workshopId, workshopName: '', customerId: null };
}

async function work(fit: Fit, tell: (share: number) => void, signal: AbortSignal): Promise<void> {
	try {
		const book = await withCoefficients((await CoefficientBook.findByPk(fit.bookId))!);
		const engineInput = await gatherAgain(await personOf(fit), fit.inputs, coefficientsOf(book));
		const fitted = await workInSlices(untilStopped(fitCoefficients(engineInput), signal), tell);
		if (fitted.status === 'done') return await settle(fit, { state: 'done', result: fitted });
		await settle(fit, { state: 'failed', failure: fitted.reason });
	} catch (error) {
		if (error instanceof CalledOff) return;
		const said = asFitError(error);
		if (!(said instanceof AppError)) throw error;
		await settle(fit, { state: 'failed', failure: said.message.slice(0, LONGEST_FAILURE) });
	}
}

function begin(fit: Fit): Running {
	const now: Running = {
		done: Promise.resolve(),
		share: 0,
		listeners: new Set(),
		stop: new AbortController()
	};
	const tell = (share: number): void => {
		now.share = share;
		for (const listener of now.listeners) listener(share);
	};
	now.done = outsideTransaction(() => afterOthers(() => work(fit, tell, now.stop.signal))).finally(() =>
		running.delete(fit.id)
	);
	running.set(fit.id, now);
	return now;
}

/** A fit as it stands; one that waits for its work, or was broken off with the application, begins. */
export async function getFit(
	person: SignedInPerson,
	fitId: number,
	sayTrouble: (error: unknown) => void = () => {}
): Promise<FitView> {
	allow(person, 'traces.read');
	const fit = await findFit(person, fitId);
	if (fit.state === 'running' && !running.has(fitId)) begin(fit).done.catch(sayTrouble);
	return showFit(fit);
}

/** Follows a fit to its end. */
export async function followFit(
	person: SignedInPerson,
	fitId: number,
	tell: (share: number) => void = () => {}
): Promise<void> {
	allow(person, 'traces.read');
	const fit = await findFit(person, fitId);
	if (fit.state !== 'running') return;
	const now = running.get(fitId) ?? begin(fit);
	tell(now.share);
	now.listeners.add(tell);
	try {
		await now.done;
	} finally {
		now.listeners.delete(tell);
	}
}

/** Calls a fit off that is still being worked out; nothing of it is kept but that it was begun. */
export async function cancelFit(person: SignedInPerson, fitId: number): Promise<FitView> {
	allow(person, 'traces.write');
	await findFit(person, fitId);
	const fit = await inTransaction(async (transaction) => {
		const where = { id: fitId, workshopId: person.workshopId };
		const held = (await Fit.findOne({ where, transaction, lock: transaction.LOCK.UPDATE }))!;
		if (held.state !== 'running') {
			throw new AppError('conflict', 'This fit has come to its end already: there is nothing to call off.');
		}
		await held.update({ state: 'cancelled', finishedAt: new Date() }, { transaction });
		await recordBy(person, 'fit.cancelled', { type: 'fit', id: fitId }, transaction);
		return held;
	});
	running.get(fitId)?.stop.abort();
	return showFit(fit);
}
