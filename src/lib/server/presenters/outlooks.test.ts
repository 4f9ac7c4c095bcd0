import { describe, expect, it } from 'vitest';
import type { AssessmentInputs } from '$lib/schemas/assessments';
import type { CableInput } from '$lib/schemas/cables';
import { defaultScenario } from '$lib/thermal';
import { finishOutlook, type Outlook, type RemedySet } from '$lib/thermal/outlook';
import { limitAt } from './outlook/envelope';
import { sayWornAfter } from './outlook/life';
import { formatDays, sayOfTwenty, sayShare } from '$lib/format/outlook-words';
import { presentOutlook } from './outlooks';

const YEAR = {
	months: Array.from({ length: 12 }, (_, month) => ({ meanMaxC: month < 6 ? 38 : 24, spreadK: 4 })),
	daysOnRoad: Array.from({ length: 12 }, () => 4),
	basis: 'From the weather file hot.csv.'
};
const CABLE: CableInput = {
	...{ areaMm2: 16, insulationC: 90, laying: 'in a tube', conductorLengthM: 6, fuseRatedA: 60 }
};
const LIGHT = {
	...{ daySamples: 32, yearSamples: 2, influencePoints: 2, influenceReplicates: 2 },
	...{ remedySamples: 2, remediesTogether: 1, envelopeSamples: 2 }
};

/** A real one, of little effort: a long hot day in a bay. */
const made: Outlook = finishOutlook({
	scenario: defaultScenario([{ minutes: 240, engineOn: true, speedKmh: 60 }, { minutes: 480 }]),
	year: YEAR,
	wear: { law: 'lithium-iron-phosphate' },
	offers: [],
	moneyPerHour: 100,
	cable: { ...CABLE, continuousA: 40, nominalV: 12.8, acceptedDrop: 0.04 },
	limits: null,
	seed: 7,
	effort: LIGHT,
	mostCutOutShare: 0.05
});

const INPUTS = {
	battery: { chemistry: 'lithium-iron-phosphate' },
	place: { name: 'Salt Lake' },
	cable: CABLE
} as unknown as AssessmentInputs;

type Changes = { [Part in keyof Outlook]?: Partial<Outlook[Part]> };

function present(changes: Changes = {}, inputs: Partial<AssessmentInputs> = {}) {
	const parts = Object.entries(changes).map(([part, change]) => [
		part,
		change !== null && typeof change === 'object'
			? { ...(made[part as keyof Outlook] as object), ...(change as object) }
			: change
	]);
	const outlook = { ...made, ...Object.fromEntries(parts) } as Outlook;
	const told = presentOutlook({
		...{ outlook, year: YEAR },
		inputs: { ...INPUTS, ...inputs },
		elsewhere: [{ label: 'B: Cabin', life: made.life! }]
	});
	return JSON.parse(JSON.stringify(told).replace(/\u202F/g, ' ')) as typeof told;
}

const set = (keys: string[], gainK: number, more: Partial<RemedySet> = {}): RemedySet => ({
	...{ keys, gainK, cost: 60, hours: 0.5, headroomK: gainK, verdict: 'cuts-out', cutOutShare: null },
	...more
});

describe('the chance', () => {
	it.each([
		[0, 'fewer than 1 of 20'],
		[0.02, 'fewer than 1 of 20'],
		[0.55, 'about 11 of 20'],
		[0.99, 'nearly all']
	])('of %s is "%s"', (share, words) => {
		expect(sayOfTwenty(share)).toBe(words);
	});

	it('is a sentence with the range that the number of draws leaves', () => {
		const day = { cutOutShare: 0.55, cutOuts: 282, samples: 512, shareInterval: { low: 0.51, high: 0.59 } };
		const { chance, figures } = present({ day });
		expect(chance.sentence).toBe('On about 11 of 20 days like this the battery goes dark.');
		expect(chance.interval).toMatch(/^Between 10\.2 and 11\.8 of 20, as far as 512 drawn days can tell\./);
		expect(chance.ofTwenty).toBe(11);
		expect(figures[0]).toEqual({ label: 'Dark on days like this', value: 'about 11 of 20' });
	});

	it('shows how it settled, and from which seed', () => {
		const { chance } = present();
		expect(chance.settled.map(({ draws }) => draws)).toEqual(['16', '32']);
		expect(chance.method).toContain('32 days were drawn with the seed 7');
	});

	it('speaks of too much heat where nothing switches the battery off', () => {
		const battery = { ...INPUTS.battery, chemistry: 'lead-acid-agm' } as AssessmentInputs['battery'];
		const { chance, figures } = present({ day: { cutOutShare: 0.25 } }, { battery });
		expect(chance.sentence).toBe('On about 5 of 20 days like this the battery gets hotter than it may.');
		expect(figures.map(({ label }) => label).slice(0, 2)).toEqual([
			'Too hot on days like this',
			'Days too hot in a year'
		]);
	});
});

describe('a year', () => {
	it.each([
		[{ low: 4.2, middle: 8.6, high: 16.1 }, '9 (4 to 16)'],
		[{ low: 0, middle: 0.2, high: 3.4 }, 'fewer than 1 (0 to 3)'],
		[{ low: 0, middle: 0.01, high: 0 }, 'fewer than 1'],
		[{ low: 48, middle: 48, high: 48 }, '48']
	])('of %o is "%s"', (days, words) => {
		expect(formatDays(days)).toBe(words);
	});

	it('has a number, its months, and where they come from', () => {
		const { year } = present({ year: { year: { low: 4, middle: 9, high: 16 } } });
		expect(year.sentence).toBe(
			'On 9 (4 to 16) days a year the battery goes dark, with 48 days a year on the road around Salt Lake.'
		);
		expect(year.months).toHaveLength(12);
		expect(year.months[0]).toMatchObject({ name: 'January', warmth: '38 °C ± 4.0 K', daysOnRoad: '4' });
		expect(year.basis[0]).toBe('From the weather file hot.csv.');
		expect(year.basis[1]).toContain('4 in each month');
	});
});

describe('what to measure first', () => {
	it.each([
		[0.01, 'next to nothing'],
		[0.1, 'about a tenth'],
		[0.33, 'about a third'],
		[0.5, 'about half'],
		[0.97, 'nearly all']
	])('calls a share of %s "%s"', (share, words) => {
		expect(sayShare(share)).toBe(words);
	});

	it('tells the few that matter first, the strongest at the top, and none twice', () => {
		const ranking = made.influences.ranking.map((each, at) => ({
			...each,
			totalEffect: at < 4 ? 0.4 - at / 10 : 0.01
		}));
		const { measure } = present({ influences: { ranking } });
		expect(measure.first.map(({ words }) => words)).toEqual([
			'about a third',
			'about a third',
			'about a fifth',
			'about a tenth'
		]);
		const labels = [...measure.first, ...measure.rest].map(({ label }) => label);
		expect(new Set(labels).size).toBe(made.influences.ranking.length);
		expect(measure.sentence).toContain(measure.first[0]!.label);
	});
});

describe('what it would take', () => {
	it('says that nothing is needed where nothing is', () => {
		const asPlanned = set([], 0, { verdict: 'rides-it-out', cutOutShare: 0 });
		const { remedies } = present({ remedies: { least: asPlanned, asPlanned } });
		expect(remedies.sentence).toBe(
			'Nothing more is needed: as planned it rides the day out, dark on fewer than 1 of 20 days like this.'
		);
	});

	it('says the least, with kelvin, parts, work, money and chance', () => {
		const least = set(['wrap', 'duct'], 9.26, {
			...{ cost: 170, hours: 2.5, verdict: 'rides-it-out', cutOutShare: 0.03 }
		});
		const asPlanned = set([], 0, { verdict: 'runs-close', cutOutShare: 0.2 });
		const { remedies } = present({ remedies: { asPlanned, least, front: [set(['wrap'], 4), least] } });
		expect(remedies.sentence).toBe(
			'The least that brings it to “rides it out”, dark on at most 1 of 20 days like this: reflective wrap and fresh-air duct. That is 9.3 K cooler, parts 170, work 2 h 30 min, together about 420; dark on about 1 of 20.'
		);
		expect(remedies.front.map(({ isLeast }) => isLeast)).toEqual([false, true]);
	});

	it('says of what rides the planned day out already that it is dark too often, and of what costs nothing that it does', () => {
		const asPlanned = set([], 0, { verdict: 'rides-it-out', cutOutShare: 0.1 });
		const least = set(['bonnetUp'], 0.8, { cost: 0, hours: 0, verdict: 'rides-it-out', cutOutShare: 0.04 });
		const { remedies } = present({ remedies: { asPlanned, least } });
		expect(remedies.sentence).toMatch(
			/^As planned it rides the day out, but is dark on about 2 of 20 days like it\./
		);
		expect(remedies.sentence).toContain('That is 0.8 K cooler, and costs nothing;');
	});

	it('says when nothing suffices, and what comes nearest', () => {
		const front = [set(['wrap'], 4), set(['wrap', 'vent'], 7.5, { cutOutShare: 0.4 })];
		const { remedies } = present({ remedies: { least: null, front } });
		expect(remedies.sentence).toContain('Nothing that was tried brings it to “rides it out”');
		expect(remedies.sentence).toContain(
			'reflective wrap and vented bonnet, 7.5 K cooler; with that it still cuts out, dark on about 8 of 20.'
		);
		expect(remedies.sentence).toContain('Look at another position.');
	});

	it('says plainly what makes it hotter, and what gains nothing', () => {
		const alone = [set(['wrap'], 4.17), set(['lowerCurrent'], 0.01), set(['trayIsolation'], -0.58)];
		const { remedies } = present({ remedies: { alone } });
		expect(remedies.hotter).toBe(
			'Do not do this here, it makes the battery hotter: isolated tray (0.6 K hotter).'
		);
		expect(remedies.alone.map(({ gain }) => gain)).toEqual(['4.2 K cooler', 'no gain', '0.6 K hotter']);
		expect(present({ remedies: { alone: alone.slice(0, 2) } }).remedies.hotter).toBe('');
	});
});

describe('the envelope', () => {
	const points = [
		{ driveHours: 4, lowC: 40, middleC: 44, highC: 48 },
		{ driveHours: 8, lowC: null, middleC: 36, highC: 40 }
	];

	it('lies on straight lines between what was tried, and is held at its ends', () => {
		expect(limitAt(points, 5)?.middleC).toBe(42);
		expect(limitAt(points, 1)?.middleC).toBe(44);
		expect(limitAt(points, 11)?.middleC).toBe(36);
		expect(limitAt(points, 6)?.lowC).toBeNull();
		expect(limitAt([], 6)).toBeNull();
	});

	it('says how far the planned day lies from it', () => {
		const planned = { points, plannedHours: 4, triedC: [10, 56] as [number, number] };
		const { envelope } = present({ envelope: { ...planned, plannedMaxC: 46 } });
		expect(envelope.sentence).toBe(
			'With 4 h of driving it rides out, not even close and charging as it should, days of up to about 44 °C (40 °C to 48 °C). The planned day has 46 °C, 2 K above it.'
		);
		expect(envelope.rows[1]).toEqual({ drive: '8 h', limit: 'about 36 °C', range: 'below 10 °C to 40 °C' });
	});

	it('never says more than was tried', () => {
		const all = { lowC: 56, middleC: 56, highC: 56 };
		const far = {
			points: [{ driveHours: 4, ...all }],
			plannedHours: 4,
			triedC: [10, 56] as [number, number]
		};
		expect(present({ envelope: far }).envelope.sentence).toContain('days of up to 56 °C or more');
		const none = { lowC: null, middleC: null, highC: null };
		const { envelope } = present({ envelope: { ...far, points: [{ driveHours: 4, ...none }] } });
		expect(envelope.sentence).toContain('even a day of 10 °C, the coolest that was tried, is too hot');
	});

	it('has no picture where the plan has no driving', () => {
		expect(present({ envelope: { points: [] } }).envelope.picture).toBeNull();
	});
});

describe('the life', () => {
	const years = [0.9, 0.85, 0.75].map((middle, at) => ({
		...{ years: at + 1, low: middle - 0.05, middle, high: middle + 0.1 }
	}));

	it('runs from the first to the last of the models to four fifths', () => {
		const life = { ...made.life!, years };
		expect(sayWornAfter(life)).toBe('2 to more than 3 years');
		expect(sayWornAfter({ ...life, lifeYears: { low: 2.2, middle: 3, high: 4.4 } })).toBe('2 to 4 years');
		expect(sayWornAfter({ ...life, years: [] })).toBe('');
	});

	it('stands beside that in the other mounts', () => {
		const { life } = present();
		expect(life.curves.map(({ label }) => label)).toEqual(['Here', 'B: Cabin']);
		expect(life.rows[0]!.cells).toHaveLength(life.heads.length - 1);
		expect(life.sentence).toContain('in mount B: Cabin after');
	});

	it('says that no model covers it, where none does', () => {
		const { life, figures } = present({ life: { law: 'none', years: [] } });
		expect(life.sentence).toContain('No published model of ours covers');
		expect(figures.map(({ label }) => label)).not.toContain('80 % of its capacity after');
	});
});

describe('cable and fuse', () => {
	it('are told finding by finding, with rule, source and how far that can be trusted', () => {
		const { cable } = present();
		expect(cable!.findings).toHaveLength(5);
		expect(cable!.findings[0]).toMatchObject({ value: '40.0 A', holds: true });
		expect(cable!.findings[0]!.source).toMatch(/Current ≤ .*IEC 60364-5-52.*\(from memory\)/);
		expect(cable!.air).toMatch(/^Held against \d+ °C, the hottest air/);
		expect(cable!.deference).toContain('makers’ own curves');
	});

	it('do not belong where the air gets hotter than the formulas are for', () => {
		const told = present({
			cable: null as never,
			cableProblem: 'airC is 130: it must be within -40 to 125.' as never
		});
		expect(told.cable).toMatchObject({ findings: [], air: expect.stringContaining('130') });
		expect(told.cable!.sentence).toContain('do not belong there');
	});

	it('say what follows when a check does not hold', () => {
		const findings = made.cable!.findings.map((each) => ({
			...each,
			holds: each.check !== 'fuse holds the current'
		}));
		const { cable } = present({ cable: { findings, protectsCable: true, opensWithoutFault: true } });
		expect(cable!.sentence).toBe('1 of 5 checks do not hold: the fuse may open although nothing is wrong.');
	});

	it('are left out where nobody has proposed any', () => {
		expect(present({}, { cable: undefined }).cable).toBeNull();
	});
});
