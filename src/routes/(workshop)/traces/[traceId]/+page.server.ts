import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { readMappingDraft, toMappingDraft } from '$lib/format/trace-mapping-form';
import { listLegProblems } from '$lib/format/trace-legs';
import { listMappingProblems } from '$lib/format/trace-mapping-problems';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	curveQuerySchema,
	legsChangeSchema,
	traceMappingChangeSchema,
	tracePlanSchema,
	type TraceView
} from '$lib/schemas/traces';
import { AppError } from '$lib/server/errors';
import { loadForm, readPageForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { logger } from '$lib/server/logger';
import { mayDo } from '$lib/server/policies';
import { findTraceHold } from '$lib/server/services/accuracy/trace-hold';
import { getDayPlan } from '$lib/server/services/day-plans';
import { beginReading } from '$lib/server/services/trace-reading';
import { findAir, getCurve, saveLegs, useAsDayPlan } from '$lib/server/services/trace-views';
import { confirmMapping, getTrace, removeTrace } from '$lib/server/services/traces';
import { TRACE_CHANNELS } from '$lib/thermal/traces';
import { readLegsForm } from './leg-form';
import type { Actions, PageServerLoad } from './$types';

/** Points of the picture, and rows of the table beside it. */
const POINTS = 600;
const TABLE_ROWS = 24;
/** Of a plan that nobody has drawn yet. */
const USUAL_PLAN = { startSoc: 0.6, chargerMaxA: 40 };

const sayTrouble = (traceId: number) => (error: unknown) =>
	logger.error({ traceId, err: error }, 'reading failed');

/** What the address asks to see: a window, and some of the channels. */
function queryOf({ searchParams }: URL, { span }: TraceView) {
	const there = span?.channels ?? [];
	const asked = TRACE_CHANNELS.filter((name) => searchParams.getAll('show').includes(name));
	const shown = asked.filter((name) => there.includes(name));
	const channels = shown.length > 0 ? shown : there;
	const [fromS, toS] = ['from', 'to'].map((name) => searchParams.get(name) ?? undefined);
	const parsed = curveQuerySchema.safeParse({ fromS, toS });
	const window = parsed.success ? { fromS: parsed.data.fromS, toS: parsed.data.toS } : {};
	const isOrdered = (window.fromS ?? -Infinity) < (window.toS ?? Infinity);
	return { channels, query: { channels: channels.join(','), ...(isOrdered ? window : {}) } };
}

/** All that a trace which was read shows. */
async function loadRead(person: SignedInPerson, trace: TraceView, url: URL) {
	const { channels, query } = queryOf(url, trace);
	const curve = await getCurve(person, trace.id, { ...query, points: POINTS }).catch(() =>
		getCurve(person, trace.id, { channels: query.channels, points: POINTS })
	);
	const { fromS, toS } = curve;
	const plan = await getDayPlan(person, trace.jobId);
	const { startSoc, chargerMaxA } = plan ?? USUAL_PLAN;
	const first = { name: `As ${trace.name}`.slice(0, 80), startSoc: 100 * startSoc, chargerMaxA };
	return {
		channels,
		curve,
		figures: await getCurve(person, trace.id, { channels: query.channels, fromS, toS, points: TABLE_ROWS }),
		air: await findAir(person, trace.id),
		hold: await findTraceHold(person, trace.id),
		planForm: await loadForm(tracePlanSchema, { ...first, version: plan?.version ?? null })
	};
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.read');
	const traceId = pageId(event.params.traceId);
	const trace = await orPageError(beginReading(person, traceId, sayTrouble(traceId)));
	const { searchParams } = event.url;
	return {
		trace,
		draft: toMappingDraft(trace.mapping, trace.proposal, trace),
		read: trace.state === 'read' ? await orPageError(loadRead(person, trace, event.url)) : null,
		mayWrite: mayDo(person, 'traces.write'),
		isSaved: searchParams.has('saved')
	};
};

/** The trace of the address, before anything is said of what was sent. */
async function open(event: RequestEvent) {
	const person = guard(event, 'traces.write');
	const trace = await orPageError(getTrace(person, pageId(event.params.traceId)));
	return { person, trace };
}

export const actions: Actions = {
	read: async (event) => {
		const { person, trace } = await open(event);
		const sent = await readPageForm(event.request);
		const draft = Object.fromEntries([...sent].map(([name, value]) => [name, String(value)]));
		const problems = listMappingProblems(draft, trace.proposal);
		if (problems.length > 0) return fail(422, { draft, problems });
		try {
			const { version } = draft;
			const said = readMappingDraft(draft, trace.mapping.delimiter, trace.proposal) as object;
			await confirmMapping(person, trace.id, validate(traceMappingChangeSchema, { ...said, version }));
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			return fail(error.status, { draft, problems: [{ path: '', message: error.message }] });
		}
		await beginReading(person, trace.id, sayTrouble(trace.id));
		redirect(303, `/traces/${trace.id}`);
	},
	legs: async (event) => {
		const { person, trace } = await open(event);
		const sent = await readPageForm(event.request);
		const legsDraft = Object.fromEntries([...sent].map(([name, value]) => [name, String(value)]));
		const problems = listLegProblems(legsDraft, trace.legs);
		if (problems.length > 0) {
			return fail(422, { legsDraft, legsRefusal: problems.map(({ message }) => message).join(' ') });
		}
		try {
			await saveLegs(person, trace.id, validate(legsChangeSchema, readLegsForm(sent, trace.legs)));
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			const [first] = error.problems;
			return fail(error.status, { legsDraft, legsRefusal: first?.message ?? error.message });
		}
		const query = event.url.searchParams.get('window') ?? '';
		redirect(303, `/traces/${trace.id}?${query ? `${query}&` : ''}saved#legs`);
	},
	plan: async (event) => {
		const { trace } = await open(event);
		return saveForm(event, {
			action: 'traces.write',
			schema: tracePlanSchema,
			save: async (person, plan) => {
				await useAsDayPlan(person, trace.id, plan);
				return `/jobs/${trace.jobId}/day`;
			}
		});
	},
	remove: async (event) => {
		const { person, trace } = await open(event);
		await orPageError(removeTrace(person, trace.id));
		redirect(303, `/mounts/${trace.mountId}/traces?removed=${trace.id}`);
	}
};
