import type { TraceRow, TraceView } from '$lib/schemas/traces';
import { clockHourAt } from '$lib/thermal/traces';
import type { Job, Mount, Trace } from '../db/models';
import type { NameOf } from './books';

/** What a trace is shown with. */
export interface TraceSurroundings {
	job: Pick<Job, 'id' | 'number'>;
	mount: Pick<Mount, 'id' | 'letter' | 'name'>;
	nameOf: NameOf;
}

/** The clock hour at which a trace begins: as its times say, or as somebody said; null where nobody knows. */
export function startHourOf({ span, startHour }: Pick<Trace, 'span' | 'startHour'>): number | null {
	const told = span ? clockHourAt(span, span.startS) : null;
	return told ?? startHour ?? null;
}

export function presentTraceRow(trace: Trace, { job, mount, nameOf }: TraceSurroundings): TraceRow {
	const { id, name, isSynthetic, state, bytes, sha256, uploadedBy, createdAt, readAt, version } = trace;
	return {
		...{ id, name, state, bytes, sha256, version },
		...{ jobId: job.id, jobNumber: job.number },
		...{ mountId: mount.id, mountLetter: mount.letter, mountName: mount.name },
		isSynthetic: Boolean(isSynthetic),
		uploadedBy: nameOf(uploadedBy),
		uploadedAt: createdAt.toISOString(),
		readAt: readAt?.toISOString() ?? null,
		span: trace.span ?? null,
		rowsKept: trace.report?.rows.kept ?? null,
		startHour: startHourOf(trace)
	};
}

export function presentTrace(trace: Trace, surroundings: TraceSurroundings): Omit<TraceView, 'sentBefore'> {
	const { mapping, proposal, legs, legsBy } = trace;
	return {
		...presentTraceRow(trace, surroundings),
		proposal,
		mapping: {
			...mapping,
			columns: mapping.columns.map((column) => ({ ...column, reversed: column.reversed ?? false }))
		},
		failure: trace.failure ?? null,
		report: trace.report ?? null,
		legs: legs ?? [],
		legsBy: surroundings.nameOf(legsBy)
	};
}
