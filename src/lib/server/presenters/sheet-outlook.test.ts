import { describe, expect, it } from 'vitest';
import type { Outlook } from '$lib/schemas/outlooks';
import type { ExpectedLife, RemedySet } from '$lib/thermal/outlook';
import { writeSheetOutlook, type SheetBeside } from './sheet-outlook';

const LIFE: ExpectedLife = {
	...{ law: 'lithium-iron-phosphate', takenOutAhPerYear: 900, hoursAbove45C: 300, lifeYears: null },
	years: [1, 2, 3].map((years) => ({
		...{ years, low: 0.96 - years / 10, middle: 0.97 - years / 12, high: 1 - years / 15 }
	})),
	beyondTests: []
};
const set = (changes: Partial<RemedySet>): RemedySet => ({
	...{ keys: ['wrap', 'duct'], cost: 170, hours: 2.5, gainK: 9.3, headroomK: 6 },
	...{ verdict: 'rides-it-out', cutOutShare: 0.03, ...changes }
});

function write(
	changes: {
		share?: number;
		least?: RemedySet | null;
		life?: ExpectedLife | null;
		moneyPerHour?: number;
		beside?: Partial<Outlook>;
	} = {},
	more: Partial<SheetBeside> = {}
) {
	const { share = 0.55, least = set({}), life = LIFE, moneyPerHour = 100 } = changes;
	const outlook = {
		day: { cutOutShare: share },
		year: { year: { low: 4, middle: 9, high: 16 } },
		remedies: { least, moneyPerHour },
		envelope: { points: [], plannedHours: 8, triedC: [10, 56] },
		influences: { ranking: [] },
		...{ cable: null, cableProblem: null, lifeProblem: null },
		life,
		...changes.beside
	} as unknown as Outlook;
	const year = {
		months: Array.from({ length: 12 }, () => ({ meanMaxC: 30, spreadK: 3 })),
		daysOnRoad: Array.from({ length: 12 }, () => 4),
		basis: 'Invented for this test.'
	};
	const lines = writeSheetOutlook({
		...{ outlook, year, elsewhere: [], chemistry: 'lithium-iron-phosphate', placeName: 'Salt Lake' },
		...more
	});
	return lines.map(({ text }) => text.replace(/\u202F/g, ' '));
}

describe('what the customer reads beside the answer', () => {
	it('is how often, of days like this and in a year like theirs', () => {
		expect(write()[0]).toBe(
			'On about 11 of 20 days like this the fridge goes dark. For somebody with 48 days a year on the road around Salt Lake that is 9 (4 to 16) days a year. In brackets is how far that may be off.'
		);
		const [rarely] = write({ beside: { year: { year: { low: 0, middle: 0.1, high: 0.3 } } as never } });
		expect(rarely).not.toContain('brackets');
		expect(write({ share: 0 })[0]).toMatch(/^On fewer than 1 of 20 days like this/);
	});

	it('is what would help and roughly what it costs', () => {
		expect(write()[1]).toBe(
			'Reflective wrap and fresh-air duct: about 9 degrees cooler, and then it would go dark on about 1 of 20 such days; roughly 420 at our prices, parts and work.'
		);
		expect(write({ least: set({ cost: 0, hours: 0, gainK: 0.4 }) })[1]).toMatch(
			/about 1 degree cooler, .*; it costs nothing\.$/
		);
	});

	it('says when nothing is needed, and when nothing here is enough', () => {
		expect(write({ least: set({ keys: [] }) })[1]).toBe('Nothing more is needed for a day like this.');
		expect(write({ least: null })[1]).toContain('Ask us about another position.');
	});

	it('is how hot a day it bears, whether cable and fuse suit, and what would tell more', () => {
		const point = { driveHours: 8, lowC: 36, middleC: 39, highC: 42 };
		const finding = { check: 'fuse holds the current', holds: false, value: 40, limit: 30, unit: 'A' };
		const beside = {
			envelope: { points: [point], plannedHours: 8, triedC: [10, 56] },
			cable: { findings: [finding] },
			influences: { ranking: [{ label: 'how hot the exhaust gets' }] }
		} as unknown as Partial<Outlook>;
		expect(write({ beside }).slice(3)).toEqual([
			'With as much driving as planned it is well within its limits on days of up to about 39 °C.',
			'As proposed they do not suit the heat there; we will change them.',
			'Above all how hot the exhaust gets.'
		]);
		const tooHot = { cableProblem: 'airC is 130: it must be within -40 to 125.' } as Partial<Outlook>;
		expect(write({ beside: tooHot })[3]).toContain('do not suit');
	});

	it('is how long the battery lasts, here and elsewhere', () => {
		const slower = { ...LIFE, years: LIFE.years.map((year) => ({ ...year, low: 0.9, high: 0.95 })) };
		const [, , life] = write({}, { elsewhere: [{ label: 'Behind the seat', life: slower }] });
		expect(life).toBe(
			'Here the battery is expected to hold four fifths of what it holds when new after 2 to 3 years; in the position “Behind the seat” after more than 3 years.'
		);
		expect(write({ life: { ...LIFE, years: [] } })).toHaveLength(2);
	});

	it('speaks of heat where nothing switches the battery off', () => {
		const [often, helps] = write({}, { chemistry: 'lead-acid-agm' });
		expect(often).toContain('days like this the battery gets hotter than its maker allows.');
		expect(helps).toContain('it would get too hot on about 1 of 20');
	});

	it.each([0, 0.5, 1])('uses no word of the trade (share %s)', (share) => {
		const all = [...write({ share }), ...write({ least: null }), ...write({ least: set({ keys: [] }) })];
		expect(all.join(' ')).not.toMatch(/\bBMS\b|headroom|\bcells?\b|\breset\b|\bK\b|\bAh\b|verdict|assess/i);
	});
});
