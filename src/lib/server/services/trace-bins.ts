import { decodeTrace, TraceView, type BinnedTrace } from '$lib/thermal/traces';
import type { Trace } from '../db/models';
import { AppError, notFound } from '../errors';
import { storage } from '../storage';

/** The file as it came, kept until it is read; and what is kept of it for good. */
export const rawKeyOf = (contentId: string): string => `${contentId}.raw`;
export const binsKeyOf = (contentId: string): string => `${contentId}.bins`;

export async function removeTraceContents(contentId: string): Promise<void> {
	await storage().remove(rawKeyOf(contentId));
	await storage().remove(binsKeyOf(contentId));
}

export interface OpenedTrace {
	trace: BinnedTrace;
	view: TraceView;
}

/** The traces looked at last: whoever zooms asks for the same one again and again. */
const opened = new Map<string, OpenedTrace>();
const MOST_OPENED = 3;

function remember(contentId: string, made: OpenedTrace): OpenedTrace {
	opened.delete(contentId);
	opened.set(contentId, made);
	for (const key of opened.keys()) {
		if (opened.size <= MOST_OPENED) break;
		opened.delete(key);
	}
	return made;
}

export function requireRead({ state }: Trace): void {
	if (state === 'read') return;
	throw new AppError('conflict', 'This trace has not been read yet: confirm its columns first.');
}

export async function openTrace(row: Trace): Promise<OpenedTrace> {
	requireRead(row);
	const { contentId } = row;
	const known = opened.get(contentId);
	if (known) return remember(contentId, known);
	const bytes = await storage().read(binsKeyOf(contentId));
	if (!bytes) throw notFound('trace');
	const trace = decodeTrace(Uint8Array.from(bytes).buffer);
	return remember(contentId, { trace, view: new TraceView(trace) });
}

/** The bins of a trace; for services that know already who may see it. */
export const openBins = async (row: Trace): Promise<BinnedTrace> => (await openTrace(row)).trace;
