import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DAY_PLAN_TEMPLATES } from '../schemas/day-plan-form';
import { dayPlanInputSchema } from '../schemas/day-plans';
import {
	blankDraft,
	changePlan,
	draftOfEntries,
	draftOfPlan,
	hoursOf,
	minutesOf,
	moveBoundary,
	moveLeg,
	parsePlan,
	settleKind,
	type PlanDraft
} from './plan-draft';

const LEG = {
	...{ surface: 'sealed', gradePercent: 0, towing: false, engineOn: false, bonnetOpen: false },
	...{ speedKmh: 0, loadA: 4 }
} as const;
const TOW = { ...LEG, kind: 'drive', speedKmh: 95, towing: true, engineOn: true } as const;
const TOWING = dayPlanInputSchema.parse({
	name: 'Towing all day',
	startHour: 7,
	startSoc: 0.55,
	chargerMaxA: 40,
	legs: [
		{ ...TOW, minutes: 150 },
		{ ...LEG, kind: 'stop', minutes: 20 },
		{ ...TOW, minutes: 150, gradePercent: -1.5, surface: 'gravel' },
		{ ...LEG, kind: 'stop', minutes: 45, engineOn: true },
		{ ...LEG, kind: 'camp', minutes: 790, bonnetOpen: true, loadA: 6.5 }
	]
});
const draft = (): PlanDraft => draftOfPlan(TOWING);
const kindsOf = ({ legs }: PlanDraft): string => legs.map((leg) => leg.kind[0]).join('');
const totalOf = ({ legs }: PlanDraft): number => legs.reduce((sum, leg) => sum + minutesOf(leg), 0);

/** A form as the browser posts it: a box that is not ticked is not there. */
function postedOf({ legs, undo, ...top }: PlanDraft): Record<string, string> {
	const entries: Record<string, string> = { ...top, undo: undo ? JSON.stringify(undo) : '' };
	legs.forEach(({ id: _, ...leg }, index) => {
		for (const [key, value] of Object.entries(leg)) {
			if (value !== false) entries[`legs.${index}.${key}`] = String(value);
		}
	});
	return entries;
}

describe('a day plan in boxes', () => {
	it.each(DAY_PLAN_TEMPLATES.map(({ id, plan }) => [id, plan] as const))(
		'says the same as the plan it came from: %s',
		(_, plan) => {
			const known = dayPlanInputSchema.parse(plan);
			expect(parsePlan(draftOfPlan(known))).toEqual({ plan: known });
		}
	);

	it('comes back from a posted form word for word', () => {
		const typed = changePlan(draft(), 'remove.1');
		typed.legs[0]!.minutes = 'two hours or so';
		const back = draftOfEntries(postedOf(typed));
		expect(back.legs.map(({ id: _, ...leg }) => leg)).toEqual(typed.legs.map(({ id: _, ...leg }) => leg));
		expect({ ...back, legs: [] }).toEqual({ ...typed, legs: [] });
	});

	it('takes lengths, clocks and charges as people write them', () => {
		const typed = { ...draft(), startAt: '7.30', startSocPercent: '62,5' };
		typed.legs[0]!.minutes = '2.5 h';
		const answer = parsePlan(typed);
		expect('plan' in answer && answer.plan).toMatchObject({ startHour: 7.5, startSoc: 0.625 });
		expect('plan' in answer && answer.plan.legs[0]!.minutes).toBeCloseTo(150, 9);
	});

	it('says in which leg a word is no number, and which leg contradicts itself', () => {
		const typed = draft();
		typed.legs[2]!.minutes = 'long';
		expect(parsePlan(typed)).toEqual({
			problems: [{ path: 'legs.2.minutes', message: 'Leg 3: Length must be a number of min from 1 to 1440.' }]
		});
		const speeding = draft();
		speeding.legs[1]!.speedKmh = '30';
		expect(parsePlan(speeding)).toEqual({
			problems: [{ path: 'legs.1.speedKmh', message: 'Leg 2: Speed must be 0 km/h at a stop.' }]
		});
	});

	it('asks for legs where there are none, and for a time that is one', () => {
		expect(parsePlan({ ...blankDraft(), startAt: '25:00' })).toEqual({
			problems: [
				{ path: 'startAt', message: 'Starts at must be a time such as 07:30.' },
				{ path: 'legs', message: 'A day needs at least one leg.' }
			]
		});
	});

	it('knows at what hour each leg begins', () => {
		expect(hoursOf(draft()).slice(0, 4)).toEqual([7, 9.5, 9.5 + 20 / 60, 12 + 20 / 60]);
	});
});

describe('the buttons of the day editor', () => {
	it('add a stop after a drive, and a drive after a stop', () => {
		const first = changePlan(blankDraft(), 'add');
		expect(kindsOf(first)).toBe('d');
		expect(kindsOf(changePlan(changePlan(first, 'add'), 'add'))).toBe('dsd');
	});

	it('give each leg a sign of its own, however they are added and removed', () => {
		const many = ['add', 'remove.0', 'add', 'add', 'remove.3', 'add'].reduce(changePlan, draft());
		expect(new Set(many.legs.map(({ id }) => id)).size).toBe(many.legs.length);
	});

	it('move legs up and down, and not beyond the ends', () => {
		const before = draft();
		expect(kindsOf(changePlan(before, 'down.0'))).toBe('s' + 'd' + kindsOf(before).slice(2));
		expect(changePlan(before, 'up.0').legs).toEqual(before.legs);
		const last = before.legs.length - 1;
		expect(changePlan(before, `down.${last}`).legs).toEqual(before.legs);
		expect(moveLeg(before, 0, last).legs[last]).toEqual(before.legs[0]);
	});

	it('remove a leg and put it back where it was', () => {
		const before = draft();
		const removed = changePlan(before, 'remove.1');
		expect(removed.undo?.said).toBe('Leg 2, stop, was removed.');
		expect(removed.legs).toHaveLength(before.legs.length - 1);
		expect(changePlan(removed, 'undo')).toEqual(before);
	});

	it('replace the day by a template and put the old one back', () => {
		const before = draft();
		const replaced = changePlan(before, 'template.short-hops');
		expect(replaced.name).toBe('Short hops with stops');
		expect(replaced.undo?.said).toBe('Your legs were replaced by “Short hops with stops”.');
		expect(changePlan(replaced, 'undo')).toEqual(before);
	});

	it('have nothing to put back where a template fills an empty day', () => {
		expect(changePlan(blankDraft(), 'template.long-tow').undo).toBeNull();
	});

	it.each(['', 'remove.99', 'remove.x', 'up.99', 'template.no-such', 'undo', 'something'])(
		'leave the day alone when what they say is unknown: "%s"',
		(change) => {
			expect(changePlan(draft(), change)).toEqual(draft());
		}
	);
});

describe('a leg that becomes another kind', () => {
	const [towed] = draft().legs;

	it('stands still when it becomes a stop, and drives again when it becomes a drive', () => {
		const stopped = settleKind(towed!, 'stop');
		expect(stopped).toMatchObject({ kind: 'stop', speedKmh: '0', engineOn: false, minutes: '150' });
		const driving = settleKind({ ...stopped, bonnetOpen: true }, 'drive');
		expect(driving).toMatchObject({ speedKmh: '80', engineOn: true, bonnetOpen: false, towing: true });
	});

	it('keeps its speed from drive to crawl, and its bonnet from stop to camp', () => {
		expect(settleKind(towed!, 'crawl').speedKmh).toBe('95');
		expect(settleKind({ ...settleKind(towed!, 'stop'), bonnetOpen: true }, 'camp').bonnetOpen).toBe(true);
	});
});

describe('a boundary that is dragged along the strip', () => {
	it('gives one leg what it takes from the other', () => {
		const moved = moveBoundary(draft(), 1, 133);
		expect(moved.legs.slice(0, 2).map(minutesOf)).toEqual([135, 35]);
	});

	it('changes the last leg alone at the end of the day', () => {
		const before = draft();
		const last = before.legs.length;
		const moved = moveBoundary(before, last, 600);
		expect(moved.legs[last - 1]!.minutes).toBe('600');
		expect(moved.legs.slice(0, -1)).toEqual(before.legs.slice(0, -1));
	});

	it('never loses time, and never makes a leg shorter than five minutes', () => {
		const before = draft();
		fc.assert(
			fc.property(
				fc.integer({ min: 1, max: before.legs.length - 1 }),
				fc.double({ min: -2000, max: 4000, noNaN: true }),
				(index, minutes) => {
					const moved = moveBoundary(before, index, minutes);
					expect(totalOf(moved)).toBe(totalOf(before));
					expect(Math.min(...moved.legs.map(minutesOf))).toBeGreaterThanOrEqual(5);
				}
			)
		);
	});

	it('leaves alone what has no room or is not there', () => {
		const before = draft();
		expect(moveBoundary(before, 0, 60)).toEqual(before);
		before.legs[0]!.minutes = '3';
		before.legs[1]!.minutes = '4';
		expect(moveBoundary(before, 1, 5)).toEqual(before);
	});
});
