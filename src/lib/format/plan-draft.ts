import { z } from 'zod';
import {
	DAY_PLAN_TEMPLATES,
	LEG_KIND_LABELS,
	dayPlanFormSchema,
	parseClock,
	planOfForm
} from '../schemas/day-plan-form';
import { STILL_KINDS, type DayPlanInput, type LegKind, type PlanLeg } from '../schemas/day-plans';
import { parseForm, type FormProblem } from './form-values';
import { writeNumber } from './numbers';
import { formatClock } from './time';
import { parseMeasure } from './units';

const legDraftSchema = z.object({
	/** Ties a row to its leg while rows move. */
	id: z.number(),
	kind: z.string(),
	minutes: z.string(),
	speedKmh: z.string(),
	surface: z.string(),
	gradePercent: z.string(),
	towing: z.boolean(),
	engineOn: z.boolean(),
	bonnetOpen: z.boolean(),
	loadA: z.string()
});
export type LegDraft = z.infer<typeof legDraftSchema>;

const daySchema = z.object({
	name: z.string(),
	startAt: z.string(),
	startSocPercent: z.string(),
	chargerMaxA: z.string(),
	legs: z.array(legDraftSchema)
});

/** A day plan as it stands in its boxes, word for word, and what a press on "Put it back" brings again. */
export const planDraftSchema = daySchema.extend({
	undo: z.object({ said: z.string(), before: daySchema }).nullable()
});
export type PlanDraft = z.infer<typeof planDraftSchema>;

type Entries = Record<string, unknown>;

const TICKS = ['towing', 'engineOn', 'bonnetOpen'] as const;
const TEXTS = ['kind', 'minutes', 'speedKmh', 'surface', 'gradePercent', 'loadA'] as const;

function draftOfLeg(leg: PlanLeg, id: number): LegDraft {
	const { kind, surface, towing, engineOn, bonnetOpen } = leg;
	return {
		...{ id, kind, surface, towing, engineOn, bonnetOpen },
		minutes: writeNumber(leg.minutes),
		speedKmh: writeNumber(leg.speedKmh),
		gradePercent: writeNumber(leg.gradePercent),
		loadA: writeNumber(leg.loadA)
	};
}

export function draftOfPlan(plan: DayPlanInput): PlanDraft {
	return {
		name: plan.name,
		startAt: formatClock(plan.startHour),
		startSocPercent: writeNumber(plan.startSoc * 100),
		chargerMaxA: writeNumber(plan.chargerMaxA),
		legs: plan.legs.map(draftOfLeg),
		undo: null
	};
}

/** A day that nobody has drawn yet. */
export const blankDraft = (): PlanDraft => ({
	...{ name: 'Hot day', startAt: '07:00', startSocPercent: '60', chargerMaxA: '40', legs: [], undo: null }
});

const textOf = (value: unknown): string => (typeof value === 'string' ? value : '');

function undoOf(text: string): PlanDraft['undo'] {
	try {
		return planDraftSchema.shape.undo.safeParse(JSON.parse(text)).data ?? null;
	} catch {
		return null;
	}
}

/** Reads a posted form without judging it: what cannot be read stays as it was typed. */
export function draftOfEntries(entries: Entries): PlanDraft {
	const found = Object.keys(entries).map((name) => /^legs\.(\d{1,4})\./.exec(name)?.[1]);
	const indexes = [...new Set(found.filter((index) => index !== undefined).map(Number))].sort(
		(a, b) => a - b
	);
	const legs = indexes.map((index, id) => {
		const at = (key: string) => textOf(entries[`legs.${index}.${key}`]);
		const texts = Object.fromEntries(TEXTS.map((key) => [key, at(key)]));
		const ticks = Object.fromEntries(TICKS.map((key) => [key, at(key) === 'true']));
		return { id, ...texts, ...ticks } as LegDraft;
	});
	return {
		name: textOf(entries.name),
		startAt: textOf(entries.startAt),
		startSocPercent: textOf(entries.startSocPercent),
		chargerMaxA: textOf(entries.chargerMaxA),
		legs,
		undo: undoOf(textOf(entries.undo))
	};
}

function entriesOf({ legs, undo: _, ...top }: PlanDraft): Record<string, string | boolean> {
	const ofLegs = legs.flatMap(({ id: __, ...leg }, index) =>
		Object.entries(leg).map(([key, value]) => [`legs.${index}.${key}`, value])
	);
	return { ...top, ...Object.fromEntries(ofLegs) };
}

/** "legs.2.minutes" → "Leg 3: length is missing."; the whole day keeps its own words. */
function sayWhichLeg({ path, message }: FormProblem): FormProblem {
	const index = /^legs\.(\d+)\./.exec(path)?.[1];
	return index === undefined ? { path, message } : { path, message: `Leg ${Number(index) + 1}: ${message}` };
}

/** The day plan that is written in the boxes, or every problem with its place. */
export function parsePlan(draft: PlanDraft): { plan: DayPlanInput } | { problems: FormProblem[] } {
	const parsed = parseForm(dayPlanFormSchema, entriesOf(draft));
	if ('data' in parsed) return { plan: planOfForm(parsed.data) };
	return { problems: parsed.errors.map(sayWhichLeg) };
}

export const minutesOf = (leg: LegDraft): number => Math.max(parseMeasure(leg.minutes, 'min') ?? 0, 0);
export const isStill = (leg: LegDraft): boolean => (STILL_KINDS as readonly string[]).includes(leg.kind);

/** Clock hours at which each leg begins, and the end of the last. */
export function hoursOf(draft: PlanDraft): number[] {
	const hours = [parseClock(draft.startAt) ?? 0];
	for (const leg of draft.legs) hours.push(hours[hours.length - 1]! + minutesOf(leg) / 60);
	return hours;
}

const USUAL_SPEED: Record<string, string> = { drive: '80', crawl: '15' };

/** A leg of another kind: what would contradict it is set right, the rest stays. */
export function settleKind(leg: LegDraft, kind: string): LegDraft {
	const changed = { ...leg, kind };
	if (isStill(changed)) return isStill(leg) ? changed : { ...changed, speedKmh: '0', engineOn: false };
	const speedKmh = isStill(leg) ? (USUAL_SPEED[kind] ?? leg.speedKmh) : leg.speedKmh;
	return { ...changed, speedKmh, engineOn: true, bonnetOpen: false };
}

/** A new leg follows the last one: after a drive comes a stop, after anything else a drive. */
function nextLeg({ legs }: PlanDraft): LegDraft {
	const last = legs[legs.length - 1];
	const kind = last && !isStill(last) ? 'stop' : 'drive';
	return {
		id: Math.max(-1, ...legs.map(({ id }) => id)) + 1,
		kind,
		minutes: kind === 'stop' ? '20' : '120',
		speedKmh: kind === 'stop' ? '0' : '80',
		surface: last?.surface ?? 'sealed',
		gradePercent: '0',
		towing: last?.towing ?? false,
		engineOn: kind === 'drive',
		bonnetOpen: false,
		loadA: last?.loadA ?? '4'
	};
}

function withUndo(draft: PlanDraft, said: string, changed: Partial<PlanDraft>): PlanDraft {
	const { undo: _, ...before } = draft;
	return { ...draft, ...changed, undo: { said, before } };
}

export function moveLeg(draft: PlanDraft, from: number, to: number): PlanDraft {
	const legs = [...draft.legs];
	const [leg] = legs.splice(from, 1);
	if (!leg || to < 0 || to > legs.length) return draft;
	legs.splice(to, 0, leg);
	return { ...draft, legs };
}

function removeLeg(draft: PlanDraft, index: number): PlanDraft {
	const leg = draft.legs[index];
	if (!leg) return draft;
	const word = (LEG_KIND_LABELS[leg.kind as LegKind] ?? 'leg').toLowerCase();
	const legs = draft.legs.filter((_, at) => at !== index);
	return withUndo(draft, `Leg ${index + 1}, ${word}, was removed.`, { legs });
}

function useTemplate(draft: PlanDraft, id: string): PlanDraft {
	const template = DAY_PLAN_TEMPLATES.find((candidate) => candidate.id === id);
	if (!template) return draft;
	const { undo: _, ...changed } = draftOfPlan(template.plan as DayPlanInput);
	return draft.legs.length === 0
		? { ...draft, ...changed }
		: withUndo(draft, `Your legs were replaced by “${template.plan.name}”.`, changed);
}

/** What a button of the editor does, by its value: "add", "remove.2", "up.2", "down.2", "template.long-tow", "undo". */
export function changePlan(draft: PlanDraft, change: string): PlanDraft {
	const [verb, what = ''] = change.split('.');
	const index = Number(what);
	switch (verb) {
		case 'add':
			return { ...draft, legs: [...draft.legs, nextLeg(draft)] };
		case 'remove':
			return removeLeg(draft, index);
		case 'up':
			return moveLeg(draft, index, index - 1);
		case 'down':
			return moveLeg(draft, index, index + 1);
		case 'template':
			return useTemplate(draft, what);
		case 'undo':
			return draft.undo ? { ...draft.undo.before, undo: null } : draft;
		default:
			return draft;
	}
}

/** Legs are drawn in steps of five minutes, and none shorter than one step. */
export const STRIP_STEP_MIN = 5;

/**
 * Moves the boundary before leg `index`: what one leg gains the other gives. The boundary after the last leg
 * changes that leg alone. Snaps the leg before it to five minutes.
 */
export function moveBoundary(draft: PlanDraft, index: number, toMinutes: number): PlanDraft {
	const before = draft.legs[index - 1];
	if (!before) return draft;
	const after = draft.legs[index];
	const was = minutesOf(before);
	const room = after ? was + minutesOf(after) : 24 * 60 + STRIP_STEP_MIN;
	const snapped = Math.round(toMinutes / STRIP_STEP_MIN) * STRIP_STEP_MIN;
	const minutes = Math.max(STRIP_STEP_MIN, Math.min(snapped, room - STRIP_STEP_MIN));
	if (room < 2 * STRIP_STEP_MIN || minutes === was) return draft;
	const legs = draft.legs.map((leg, at) => {
		if (at === index - 1) return { ...leg, minutes: writeNumber(minutes) };
		return at === index ? { ...leg, minutes: writeNumber(room - minutes) } : leg;
	});
	return { ...draft, legs };
}
