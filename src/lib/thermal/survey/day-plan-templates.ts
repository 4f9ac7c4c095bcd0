import type { PlannedDay, PlannedLeg } from './types';

/** A hot touring day to start from. */
export interface DayPlanTemplate {
	id: string;
	/** One sentence on whose day this is. */
	about: string;
	plan: PlannedDay;
}

type Choices = Partial<Omit<PlannedLeg, 'kind' | 'minutes'>>;

/** Fridge and a few small things. */
const FRIDGE_A = 3;
/** And the lights at camp. */
const CAMP_A = 4;

function leg(kind: PlannedLeg['kind'], minutes: number, choices: Choices): PlannedLeg {
	const moving = kind === 'drive' || kind === 'crawl';
	return {
		kind,
		minutes,
		speedKmh: 0,
		surface: 'sealed',
		gradePercent: 0,
		towing: false,
		engineOn: moving,
		bonnetOpen: false,
		loadA: FRIDGE_A,
		...choices
	};
}

const drive = (minutes: number, speedKmh: number, choices: Choices = {}) =>
	leg('drive', minutes, { speedKmh, ...choices });
const crawl = (minutes: number, speedKmh: number, choices: Choices = {}) =>
	leg('crawl', minutes, { speedKmh, ...choices });
const stop = (minutes: number, choices: Choices = {}) => leg('stop', minutes, choices);
const camp = (minutes: number, choices: Choices = {}) => leg('camp', minutes, { loadA: CAMP_A, ...choices });

const tow = { towing: true } as const;
const corrugated = { surface: 'corrugated' } as const;
const gravel = { surface: 'gravel' } as const;
const sand = { surface: 'sand' } as const;

/**
 * Hot touring days to start from; all invented, all to be changed.
 *
 * @example
 * DAY_PLAN_TEMPLATES.map((template) => template.id) // ['long-tow', 'corrugated-track', 'short-hops', 'two-days']
 */
export const DAY_PLAN_TEMPLATES: readonly DayPlanTemplate[] = [
	{
		id: 'long-tow',
		about: 'A long day on the highway with a trailer behind, and camp at dusk.',
		plan: {
			name: 'Long highway day, towing',
			startHour: 7,
			startSoc: 0.55,
			chargerMaxA: 40,
			legs: [
				drive(150, 90, tow),
				stop(20),
				drive(150, 90, tow),
				stop(45),
				drive(140, 90, tow),
				stop(15),
				drive(90, 90, tow),
				drive(40, 60, { ...tow, gradePercent: 3 }),
				crawl(20, 15, { ...tow, ...gravel }),
				camp(770)
			]
		}
	},
	{
		id: 'corrugated-track',
		about: 'A day on corrugations and sand: slow, hard work, little air through the bay.',
		plan: {
			name: 'Corrugated track day',
			startHour: 7,
			startSoc: 0.6,
			chargerMaxA: 40,
			legs: [
				drive(60, 80, gravel),
				drive(120, 65, corrugated),
				stop(20),
				drive(120, 65, corrugated),
				stop(45),
				drive(120, 60, corrugated),
				crawl(60, 20, sand),
				crawl(45, 15, { surface: 'rock', gradePercent: 2 }),
				camp(850)
			]
		}
	},
	{
		id: 'short-hops',
		about: 'Errands and sights: short drives with stops in the sun between them.',
		plan: {
			name: 'Short hops with stops',
			startHour: 8,
			startSoc: 0.7,
			chargerMaxA: 25,
			legs: [
				drive(40, 70),
				stop(60),
				drive(30, 60),
				stop(90),
				drive(45, 80),
				stop(60),
				crawl(25, 20),
				stop(45),
				drive(50, 80),
				camp(900)
			]
		}
	},
	{
		id: 'two-days',
		about: 'Two driving days with a hot night between: the second day starts warm.',
		plan: {
			name: 'Two days on the road',
			startHour: 7,
			startSoc: 0.55,
			chargerMaxA: 40,
			legs: [
				drive(180, 100),
				stop(45),
				drive(180, 100),
				stop(20),
				drive(120, 80, gravel),
				camp(895),
				drive(180, 100),
				stop(45),
				drive(180, 80, gravel),
				crawl(30, 15, gravel),
				camp(780)
			]
		}
	}
];
