import { Op, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { TraceMappingChange, TraceRow, TraceView } from '$lib/schemas/traces';
import { checkMapping, MOST_TRACE_BYTES, zoneOf, type TraceMapping } from '$lib/thermal/traces';
import { Job, Mount, Person, Trace, TraceLogger } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentTrace, presentTraceRow, type TraceSurroundings } from '../presenters/traces';
import { newContentId, storage } from '../storage';
import { holdFileAnew } from './accuracy/ask-to-hold';
import { recordBy, type AuditAction } from './audit';
import { describeSample, forAnotherFile, keepProposal, readSample, refuseTrace } from './describe-file';
import { cleanFileName } from './file-names';
import { findStandingMount } from './mounts';
import { saveVersioned } from './records';
import { rawKeyOf } from './trace-bins';
import { sayZone, withZone, zoneOfJob } from './trace-zones';

/** A logger's file as it came, on the disk. */
export interface IncomingTrace {
	name: string;
	path: string;
	bytes: number;
	sha256: string;
	/** It was read past, and is not on the disk. */
	isTooLarge?: boolean;
}

/** One that was looked at and put away until it is read. */
export interface PreparedTrace extends Pick<IncomingTrace, 'name' | 'bytes' | 'sha256'> {
	contentId: string;
	sample: Uint8Array;
}

export const MOST_TRACES_OF_MOUNT = 200;
const NAMELESS = 'trace.csv';
const NO_ZONE_KNOWN = 'UTC';

async function surroundingsOf(traces: readonly Trace[]): Promise<(trace: Trace) => TraceSurroundings> {
	const mounts = await Mount.findAll({ where: { id: [...new Set(traces.map(({ mountId }) => mountId))] } });
	const jobs = await Job.findAll({ where: { id: [...new Set(traces.map(({ jobId }) => jobId))] } });
	const ids = traces.flatMap(({ uploadedBy, legsBy }) => [uploadedBy, legsBy ?? 0]);
	const people = await Person.findAll({ where: { id: [...new Set(ids)] }, attributes: ['id', 'name'] });
	const names = new Map(people.map(({ id, name }) => [id, name]));
	const [mountOf, jobOf] = [new Map(mounts.map((m) => [m.id, m])), new Map(jobs.map((j) => [j.id, j]))];
	return ({ mountId, jobId }) => ({
		...{ mount: mountOf.get(mountId)!, job: jobOf.get(jobId)! },
		nameOf: (id) => names.get(id ?? 0) ?? ''
	});
}

/** The trace of the same file that was sent in first, where one stands. */
async function findSentBefore({ id, workshopId, sha256 }: Trace): Promise<TraceView['sentBefore']> {
	const earlier = await Trace.findAll({
		where: { workshopId, sha256, removedAt: null, id: { [Op.lt]: id } },
		attributes: ['id', 'name', 'jobId', 'mountId'],
		order: [['id', 'ASC']]
	});
	for (const { id: earlierId, name, jobId, mountId } of earlier) {
		const mount = await Mount.findOne({ where: { id: mountId, removedAt: null } });
		if (!mount) continue;
		const { number: jobNumber } = (await Job.findByPk(jobId, { attributes: ['number'] }))!;
		return { id: earlierId, name, jobNumber, mountLetter: mount.letter };
	}
	return null;
}

export async function showTrace(trace: Trace): Promise<TraceView> {
	const of = await surroundingsOf([trace]);
	return { ...presentTrace(trace, of(trace)), sentBefore: await findSentBefore(trace) };
}

/** A trace of a mount that stands; one that was removed is there only for who puts it back. */
export async function findTrace(
	person: SignedInPerson,
	traceId: number,
	{ removed = false, transaction }: { removed?: boolean; transaction?: Transaction } = {}
): Promise<Trace> {
	const where = { id: traceId, workshopId: person.workshopId };
	const lock = transaction ? { transaction, lock: transaction.LOCK.UPDATE } : {};
	const trace = await Trace.findOne({ where, ...lock });
	if (!trace || (!removed && (trace.removedAt ?? null) !== null)) throw notFound('trace');
	await findStandingMount(person, trace.mountId, transaction).catch(() => {
		throw notFound('trace');
	});
	return trace;
}

/** Looks at a file and puts it away, in no transaction: what is no trace is refused before. */
export async function prepareTrace(incoming: IncomingTrace): Promise<PreparedTrace> {
	const { path, bytes, sha256, isTooLarge = false } = incoming;
	const name = cleanFileName(incoming.name, NAMELESS);
	if (isTooLarge) {
		const message = `“${name}” is larger than ${MOST_TRACE_BYTES / 1024 / 1024} MB, the most that is taken.`;
		throw new AppError('too_large', message, [{ path: 'file', message }]);
	}
	const sample = await readSample(path);
	describeSample(sample, NO_ZONE_KNOWN);
	const contentId = newContentId();
	await storage().putFile(rawKeyOf(contentId), path);
	return { name, bytes, sha256, contentId, sample };
}

const columnsOf = ({ time, columns }: TraceMapping): number[] => [
	time.column,
	...(time.kind === 'calendar' && time.clockColumn !== null ? [time.clockColumn] : []),
	...columns.map(({ column }) => column)
];

async function refuseTooMany(mountId: number, transaction: Transaction): Promise<void> {
	const count = await Trace.count({ where: { mountId, removedAt: null }, transaction });
	if (count < MOST_TRACES_OF_MOUNT) return;
	throw new AppError(
		'conflict',
		`This mount has ${MOST_TRACES_OF_MOUNT} traces, the most that it may have: remove one first.`
	);
}

/** Keeps a file that was prepared, with what it seems to be; of a logger that is known as it was confirmed before. */
export async function keepTrace(
	person: SignedInPerson,
	mountId: number,
	{ sample, ...prepared }: PreparedTrace
): Promise<TraceView> {
	allow(person, 'traces.write');
	const { workshopId } = person;
	return inTransaction(async (transaction) => {
		const mount = await findStandingMount(person, mountId, transaction);
		await refuseTooMany(mountId, transaction);
		const zone = await zoneOfJob(mount.jobId, transaction);
		const proposal = describeSample(sample, NO_ZONE_KNOWN);
		const { fingerprint } = proposal;
		const logger = await TraceLogger.findOne({ where: { workshopId, fingerprint }, transaction });
		const known = logger && Math.max(...columnsOf(logger.mapping)) <= proposal.columns.length ? logger : null;
		const mapping = known ? forAnotherFile(known.mapping) : withZone(proposal.mapping, zone?.clear ?? '');
		const inBox = zoneOf(mapping.time);
		if (inBox !== undefined && (proposal.time.needsZone || inBox === ''))
			proposal.notes.push(sayZone(inBox, known !== null, zone));
		const trace = await Trace.create(
			{
				...{ workshopId, jobId: mount.jobId, mountId, ...prepared, fingerprint, state: 'described' },
				proposal: keepProposal(proposal, sample, known?.updatedAt ?? null),
				mapping,
				uploadedBy: person.id
			},
			{ transaction }
		);
		const { name, bytes, sha256 } = prepared;
		const detail = { traceId: trace.id, name, bytes, sha256 };
		await recordBy(person, 'trace.added', { type: 'mount', id: mountId }, transaction, detail);
		return showTrace(trace);
	});
}

/** Prepares and keeps. */
export async function addTrace(
	person: SignedInPerson,
	mountId: number,
	incoming: IncomingTrace
): Promise<TraceView> {
	allow(person, 'traces.write');
	await findStandingMount(person, mountId);
	return keepTrace(person, mountId, await prepareTrace(incoming));
}

export async function getTrace(person: SignedInPerson, traceId: number): Promise<TraceView> {
	allow(person, 'traces.read');
	return showTrace(await findTrace(person, traceId));
}

async function listWhere(where: Record<string, unknown>): Promise<TraceRow[]> {
	const attributes = { exclude: ['proposal', 'mapping', 'legs'] };
	const traces = await Trace.findAll({
		where: { ...where, removedAt: null },
		order: [['id', 'DESC']],
		attributes
	});
	const of = await surroundingsOf(traces);
	return traces.map((trace) => presentTraceRow(trace, of(trace)));
}

/** The traces of a mount, newest first. */
export async function listMountTraces(person: SignedInPerson, mountId: number): Promise<TraceRow[]> {
	allow(person, 'traces.read');
	const { id } = await findStandingMount(person, mountId);
	return listWhere({ workshopId: person.workshopId, mountId: id });
}

/** All traces of the workshop whose mounts stand, newest first. */
export async function listTraces(person: SignedInPerson): Promise<TraceRow[]> {
	allow(person, 'traces.read');
	const { workshopId } = person;
	const standing = await Mount.findAll({ where: { workshopId, removedAt: null }, attributes: ['id'] });
	return listWhere({ workshopId, mountId: standing.map(({ id }) => id) });
}

async function rememberLogger(person: SignedInPerson, trace: Trace, transaction: Transaction): Promise<void> {
	const { workshopId, id: mappedBy } = person;
	const { fingerprint, mapping } = trace;
	const known = await TraceLogger.findOne({ where: { workshopId, fingerprint }, transaction });
	if (known) {
		known.changed('updatedAt', true);
		await known.update({ mapping, mappedBy }, { transaction });
	} else await TraceLogger.create({ workshopId, fingerprint, mapping, mappedBy }, { transaction });
}

function requireMapping(mapping: TraceMapping, columnCount: number): void {
	try {
		checkMapping(mapping);
	} catch (error) {
		refuseTrace(error, 'mapping');
	}
	const beyond = columnsOf(mapping).find((column) => column > columnCount);
	if (beyond === undefined) return;
	const message = `The file has no column ${beyond}: it has ${columnCount}.`;
	throw new AppError('invalid_input', message, [{ path: 'mapping', message }]);
}

/**
 * Takes a mapping as it was confirmed or put right, remembers it for the logger, and lets the file be read with it. The reading
 * itself begins outside, once this is kept.
 */
export async function confirmMapping(
	person: SignedInPerson,
	traceId: number,
	{ mapping, isSynthetic, startHour, version }: TraceMappingChange
): Promise<TraceView> {
	allow(person, 'traces.write');
	return inTransaction(async (transaction) => {
		const trace = await findTrace(person, traceId, { transaction });
		if (trace.state !== 'described' && trace.state !== 'failed') {
			const message = 'This file was read already and is not kept: send it again to read it another way.';
			throw new AppError('conflict', message);
		}
		requireMapping(mapping, trace.proposal.columns.length);
		const changes = { mapping, isSynthetic, startHour, mappedBy: person.id };
		await saveVersioned(
			trace,
			'trace',
			version,
			{ ...changes, state: 'reading', failure: null },
			transaction
		);
		await rememberLogger(person, trace, transaction);
		const subject = { type: 'trace', id: traceId };
		await recordBy(person, 'trace.mapped', subject, transaction, { mapping, isSynthetic, startHour });
		return showTrace(trace);
	});
}

async function setRemoved(
	person: SignedInPerson,
	traceId: number,
	{ removedAt, action }: { removedAt: Date | null; action: AuditAction }
): Promise<TraceView> {
	allow(person, 'traces.write');
	return inTransaction(async (transaction) => {
		const trace = await findTrace(person, traceId, { removed: removedAt === null, transaction });
		const wasRemoved = (trace.removedAt ?? null) !== null;
		if (wasRemoved === (removedAt !== null)) return showTrace(trace);
		if (removedAt === null) await refuseTooMany(trace.mountId, transaction);
		await trace.update({ removedAt }, { transaction });
		// The same file may have been sent in elsewhere, and count there now, or no more.
		await holdFileAnew(traceId, transaction);
		await recordBy(person, action, { type: 'trace', id: traceId }, transaction);
		return showTrace(trace);
	});
}

/** Takes a trace away; for some weeks it can be put back. */
export const removeTrace = (person: SignedInPerson, traceId: number): Promise<TraceView> =>
	setRemoved(person, traceId, { removedAt: new Date(), action: 'trace.removed' });

/** Puts a removed trace back; one that is there is left alone. */
export const restoreTrace = (person: SignedInPerson, traceId: number): Promise<TraceView> =>
	setRemoved(person, traceId, { removedAt: null, action: 'trace.restored' });
