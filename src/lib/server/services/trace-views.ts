import {
	dayPlanInputSchema,
	MAX_PLAN_LEGS,
	type DayPlanInput,
	type DayPlanView
} from '$lib/schemas/day-plans';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	MOST_TRACE_LEGS,
	type ChannelCurve,
	type CurveQuery,
	type CurveView,
	type LegsChange,
	type NoTraceAir,
	type TraceAir,
	type TracePlan,
	type TraceView as TraceShown
} from '$lib/schemas/traces';
import {
	ambientFromTrace,
	channelsOf,
	dayPlanFromLegs,
	endOf,
	measureLegs,
	type TraceChannel,
	type TraceCurve,
	type TraceLeg
} from '$lib/thermal/traces';
import type { Trace } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError } from '../errors';
import { allow } from '../policies';
import { startHourOf } from '../presenters/traces';
import { recordBy } from './audit';
import { saveDayPlan } from './day-plans';
import { saveVersioned } from './records';
import { holdFileAnew } from './accuracy/ask-to-hold';
import { openBins, openTrace, requireRead } from './trace-bins';
import { findTrace, showTrace } from './traces';

const plain = (values: Float32Array): (number | null)[] =>
	// What a thermometer tells, and a point of a picture can show.
	Array.from(values, (value) => (Number.isNaN(value) ? null : Math.round(value * 1000) / 1000));

function toCurve(channel: TraceChannel, { timeS, mean, min, max }: TraceCurve): ChannelCurve {
	return { channel, timeS: [...timeS], mean: plain(mean), min: plain(min), max: plain(max) };
}

function readChannels(asked: string | undefined, there: readonly TraceChannel[]): TraceChannel[] {
	if (asked === undefined) return [...there];
	return asked.split(',').map((name) => {
		const channel = there.find((each) => each === name);
		if (channel) return channel;
		const message = `The trace has no channel “${name.slice(0, 40)}”: it has ${there.join(', ')}.`;
		throw new AppError('invalid_input', message, [{ path: 'channels', message }]);
	});
}

/** What is drawn of a trace between two times: never more points than asked for, whatever was measured. */
export async function getCurve(
	person: SignedInPerson,
	traceId: number,
	{ channels: asked, fromS, toS, points }: CurveQuery
): Promise<CurveView> {
	allow(person, 'traces.read');
	const { trace, view } = await openTrace(await findTrace(person, traceId));
	const channels = readChannels(asked, channelsOf(trace));
	const from = Math.max(fromS ?? -Infinity, trace.startS);
	const to = Math.min(toS ?? Infinity, endOf(trace));
	if (!(from < to)) {
		const message = 'The trace has nothing between these times.';
		throw new AppError('invalid_input', message, [{ path: 'toS', message }]);
	}
	const curves = channels.map((channel) => ({ channel, curve: view.curve(channel, from, to, points) }));
	return {
		...{ fromS: from, toS: to, stepS: curves[0]?.curve.stepS ?? trace.stepS },
		curves: curves.map(({ channel, curve }) => toCurve(channel, curve))
	};
}

const BY_HAND = 'set by hand';
const MINUTE_S = 60;

/** Legs as they were sent, whole: each keeps the reason that it was proposed with while it is the same. */
function wholeLegs(sent: LegsChange['legs'], known: readonly TraceLeg[]): TraceLeg[] {
	const startS = known[0]!.startS;
	return sent.map(({ endS, kind, speedKmh }, at) => {
		const from = at === 0 ? startS : sent[at - 1]!.endS;
		const same = known.find((leg) => leg.startS === from && leg.endS === endS && leg.kind === kind);
		return { startS: from, endS, kind, meanSpeedKmh: speedKmh, why: same?.why ?? BY_HAND };
	});
}

function requireLegs(legs: readonly TraceLeg[], endS: number): void {
	const refuse = (path: string, message: string): never => {
		throw new AppError('invalid_input', message, [{ path, message }]);
	};
	if (legs.length > MOST_TRACE_LEGS) refuse('legs', `A trace has at most ${MOST_TRACE_LEGS} legs.`);
	legs.forEach((leg, at) => {
		if (leg.endS - leg.startS >= MINUTE_S) return;
		refuse(`legs[${at}].endS`, `Leg ${at + 1} must end at least a minute after it begins.`);
	});
	if (legs.at(-1)!.endS !== endS) {
		refuse(`legs[${legs.length - 1}].endS`, 'The last leg must end with the trace.');
	}
}

export async function getLegs(
	person: SignedInPerson,
	traceId: number
): Promise<Pick<TraceShown, 'legs' | 'legsBy' | 'version' | 'startHour'>> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	requireRead(trace);
	const { legs, legsBy, version, startHour } = await showTrace(trace);
	return { legs, legsBy, version, startHour };
}

/** Keeps the legs as somebody put them right, if nobody did since they were read; their speeds are read anew. */
export async function saveLegs(
	person: SignedInPerson,
	traceId: number,
	{ legs: sent, startHour, version }: LegsChange
): Promise<TraceShown> {
	allow(person, 'traces.write');
	const before = await findTrace(person, traceId);
	const bins = await openBins(before);
	return inTransaction(async (transaction) => {
		const trace = await findTrace(person, traceId, { transaction });
		const whole = wholeLegs(sent, trace.legs);
		requireLegs(whole, trace.legs.at(-1)!.endS);
		const legs = bins.channels.speedKmh ? measureLegs(bins, whole) : whole;
		const changes = { legs, legsBy: person.id, ...(startHour === undefined ? {} : { startHour }) };
		await saveVersioned(trace, 'trace', version, changes, transaction);
		const told = legs.map(({ startS, endS, kind, meanSpeedKmh }) => ({ startS, endS, kind, meanSpeedKmh }));
		const detail = { legs: told, startHour: trace.startHour ?? null };
		await recordBy(person, 'trace.legs-set', { type: 'trace', id: traceId }, transaction, detail);
		await holdFileAnew(traceId, transaction);
		return showTrace(trace);
	});
}

/** The design day that is nearest to the air outside as it was measured, or why there is none. */
export async function findAir(person: SignedInPerson, traceId: number): Promise<TraceAir | NoTraceAir> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	const measured = ambientFromTrace(await openBins(trace), startHourOf(trace) ?? undefined);
	if (!measured) return { whyNone: 'no-air' };
	const { climate, whyNone, offByK } = measured;
	if (!climate) return { whyNone: whyNone! };
	return { tMaxC: climate.tMax, dailyRangeK: climate.dailyRange, offByK };
}

const LONGEST_PLAN_MINUTES = 3 * 24 * 60;

function requirePlannable(trace: Trace, startHour: number | null): asserts startHour is number {
	const refuse = (message: string): never => {
		throw new AppError('conflict', message);
	};
	if (startHour === null)
		refuse('The trace does not tell the time of day: say at which hour it starts first.');
	const minutes = (trace.legs.at(-1)!.endS - trace.legs[0]!.startS) / MINUTE_S;
	if (minutes > LONGEST_PLAN_MINUTES)
		refuse('A day plan covers at most three days, and this trace is longer.');
	if (trace.legs.length > MAX_PLAN_LEGS) refuse(`A day has at most ${MAX_PLAN_LEGS} legs: join some first.`);
}

const toRoundFigures = (plan: DayPlanInput): DayPlanInput =>
	dayPlanInputSchema.parse({
		...plan,
		legs: plan.legs.map((leg) => ({
			...leg,
			speedKmh: Math.round(leg.speedKmh * 10) / 10,
			loadA: Math.round(leg.loadA * 10) / 10
		}))
	});

/** The day plan that the legs of a trace make. */
export async function planOfTrace(
	person: SignedInPerson,
	traceId: number,
	{ name, startSoc, chargerMaxA }: Omit<TracePlan, 'version'>
): Promise<DayPlanInput> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	const bins = await openBins(trace);
	const startHour = startHourOf(trace);
	requirePlannable(trace, startHour);
	const choices = { name, startSoc: startSoc / 100, chargerMaxA, startHour: Math.min(startHour, 23.99) };
	return toRoundFigures(dayPlanFromLegs(bins, trace.legs, choices));
}

/** Lets the job of a trace's mount have its legs as day plan. */
export async function useAsDayPlan(
	person: SignedInPerson,
	traceId: number,
	{ version, ...choices }: TracePlan
): Promise<DayPlanView> {
	const plan = await planOfTrace(person, traceId, choices);
	const { jobId } = await findTrace(person, traceId);
	return saveDayPlan(person, jobId, { ...plan, version });
}
