import { describe, expect, it } from 'vitest';
import { HOT_SIDE, TOURING_LEGS } from '../../../../tests/support/hot-side';
import type { Scenario } from '../types';
import { copyScenario } from '../uncertainty/draw-scenario';
import { finishWork } from '../uncertainty/finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { expectLife } from './expected-life';
import { REMEDIES } from './remedies';
import { findSafeEnvelope } from './safe-envelope';
import { MOST_TOGETHER, priceRemedies, searchRemedies, type RemedySet } from './search-remedies';
import { judgeOutcome } from './verdict';

const HOT: Scenario = parseScenario({
	position: HOT_SIDE,
	bms: { charge: { cut: 300, reset: 299 }, discharge: { cut: 66, reset: 55 } },
	legs: TOURING_LEGS
});
const OPTIONS = { samples: 8, seed: 1, mostCutOutShare: 0.25 };
const money = ({ cost, hours }: RemedySet) => cost + 100 * hours;

describe('the remedies', () => {
	/** Where the tray is hotter than the battery; on the other hot side it carries heat away. */
	const HOT_TRAY: Scenario = parseScenario({
		position: { bayAirFraction: 0.4, exhaustView: 0, engineView: 0, guardFraction: 1, airExposure: 0.3 },
		tray: { guardConductance: 20 },
		legs: TOURING_LEGS
	});

	it.each(
		REMEDIES.map((remedy) => [remedy.key, remedy, remedy.key === 'trayIsolation' ? HOT_TRAY : HOT] as const)
	)('make a hot mount cooler, and leave a possible scenario: %s', (_key, remedy, scenario) => {
		const changed = copyScenario(scenario);
		expect(remedy.fits(scenario)).toBe(true);
		remedy.apply(changed);
		expect(() => parseScenario(changed)).not.toThrow();
		const runner = new OutcomeRunner();
		expect(runner.run(changed).peakSensorC).toBeLessThan(runner.run(scenario).peakSensorC);
	});

	it('of the engine bay are not offered to a battery in the cabin', () => {
		const cabin = parseScenario({
			position: { bayAirFraction: 0, enclosureFraction: 1, exhaustView: 0, engineView: 0 },
			legs: TOURING_LEGS
		});
		const fitting = REMEDIES.filter(({ fits }) => fits(cabin)).map(({ key }) => key);
		expect(fitting).toEqual(['lowerCurrent', 'chargeLater', 'trayIsolation']);
	});

	it('take the figures of the workshop', () => {
		const [wrap, plate] = priceRemedies([{ key: 'wrap', cost: 10, hours: 3, offered: false }]);
		expect(wrap).toMatchObject({ key: 'wrap', cost: 10, hours: 3, offered: false });
		expect(plate).toMatchObject({ key: 'plate', cost: 90, offered: true });
	});
});

describe('the search for what it would take', () => {
	const search = finishWork(searchRemedies(HOT, OPTIONS));

	it('tries every set of up to four that go together', () => {
		// Those without a group, three shields and two ways to charge of which one each can be had; the cargo area goes with the charge alone.
		const choose = (n: number, k: number): number => (k === 0 ? 1 : (choose(n - 1, k - 1) * n) / k);
		const free = REMEDIES.filter(({ group }) => group === null).length;
		const sizes = [1, 2, 3, 4].map(
			(size) => choose(free, size) + 5 * choose(free, size - 1) + (size >= 2 ? 6 * choose(free, size - 2) : 0)
		);
		const cargoAreaAloneAndWithEachCharge = 1 + 2;
		expect(search.tried).toBe(sizes.reduce((a, b) => a + b, 0) + cargoAreaAloneAndWithEachCharge);
		expect(MOST_TOGETHER).toBe(4);
	});

	it('finds a front that gets cooler as it gets dearer, with nothing below it', () => {
		const { front, alone } = search;
		for (const [at, set] of front.entries()) {
			if (at === 0) continue;
			expect(money(set)).toBeGreaterThanOrEqual(money(front[at - 1]!));
			expect(set.gainK).toBeGreaterThan(front[at - 1]!.gainK);
		}
		for (const single of alone) {
			const better = front.some((set) => money(set) <= money(single) && set.gainK >= single.gainK - 0.05);
			expect(better || single.gainK < 0.05).toBe(true);
		}
	});

	it('names the cheapest that rides the day out with the chance asked for', () => {
		const { least, front, alone } = search;
		expect(least!.verdict).toBe('rides-it-out');
		expect(least!.cutOutShare).toBeLessThanOrEqual(0.25);
		const cheaper = [...front, ...alone].filter((set) => money(set) < money(least!));
		for (const set of cheaper) expect(set.verdict !== 'rides-it-out' || set.cutOutShare! > 0.25).toBe(true);
	});

	it('asks for nothing where nothing is needed', () => {
		const cool = parseScenario({ climate: { tMax: 15 }, legs: TOURING_LEGS });
		expect(finishWork(searchRemedies(cool, OPTIONS)).least).toMatchObject({ keys: [], cost: 0, gainK: 0 });
	});

	it('finds none where none is enough, and says what it did not try', () => {
		const furnace = parseScenario({
			climate: { tMax: 59 },
			bms: { discharge: { cut: 50, reset: 40 } },
			legs: TOURING_LEGS
		});
		const offers = [{ key: 'vent', cost: 1, hours: 1, offered: false }];
		const { least, notTried } = finishWork(searchRemedies(furnace, { ...OPTIONS, offers }));
		expect(least).toBeNull();
		expect(notTried.join(' ')).toContain('Vented bonnet');
		expect(notTried.join(' ')).toContain('More than 4 together');
	});
});

describe('the safe envelope', () => {
	const envelope = finishWork(findSafeEnvelope(HOT, { samples: 4, seed: 1 }));

	it('bears a hotter day with a short drive than with a long one', () => {
		const limits = envelope.points.map(({ middleC }) => middleC ?? -Infinity);
		expect(limits[0]!).toBeGreaterThan(limits[3]! + 5);
		expect(limits[0]!).toBeGreaterThan(limits.at(-1)! + 5);
	});

	it('is where the verdict changes', () => {
		const { driveHours, middleC } = envelope.points.find((point) => point.driveHours === 6)!;
		const runner = new OutcomeRunner();
		const verdictAt = (tMax: number) => {
			const day = copyScenario(HOT);
			for (const leg of day.legs) if (leg.engineOn) leg.minutes *= driveHours / envelope.plannedHours;
			day.climate.tMax = tMax;
			return judgeOutcome(day, runner.run(day), null);
		};
		expect(verdictAt(middleC! - 0.6)).toBe('rides-it-out');
		expect(verdictAt(middleC! + 0.6)).not.toBe('rides-it-out');
	});

	it('has a band around its line, and no points without driving', () => {
		for (const { lowC, highC } of envelope.points) expect(lowC ?? -99).toBeLessThanOrEqual(highC ?? -99);
		const parked = parseScenario({ legs: [{ minutes: 600 }] });
		expect(finishWork(findSafeEnvelope(parked, { samples: 0, seed: 1 })).points).toEqual([]);
	});
});

describe('the life that is expected', () => {
	const year = (meanMaxC: number) => ({
		months: Array.from({ length: 12 }, () => ({ meanMaxC, spreadK: 3 })),
		daysOnRoad: Array(12).fill(5) as number[]
	});
	const LFP = { law: 'lithium-iron-phosphate' } as const;
	const LEAD = { law: 'lead-acid', ratedLifeYears: 8, ratedLifeAh: null } as const;

	it('is shorter on the hot side than in a shaded cabin, and shorter the hotter the place', () => {
		const cabin = parseScenario({
			position: { bayAirFraction: 0, enclosureFraction: 1, exhaustView: 0, engineView: 0, bonnetView: 0 },
			enclosure: { solarArea: 0 },
			legs: TOURING_LEGS
		});
		const left = (scenario: Scenario, meanMaxC: number) =>
			expectLife(scenario, year(meanMaxC), LFP)!.years[9]!.middle;
		expect(left(HOT, 30)).toBeLessThan(left(cabin, 30));
		expect(left(HOT, 35)).toBeLessThan(left(HOT, 25));
	});

	it('is a band that widens, of what a battery of that chemistry does', () => {
		const { years, lifeYears } = expectLife(HOT, year(30), LFP)!;
		expect(years.map((each) => each.years)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
		expect(years[9]!.high - years[9]!.low).toBeGreaterThan(years[0]!.high - years[0]!.low);
		expect(lifeYears).toBeNull();
	});

	it('goes by halving for lead-acid, and is silent where no model covers the chemistry', () => {
		const lead = expectLife(HOT, year(30), LEAD)!;
		expect(lead.lifeYears!.low).toBeLessThan(lead.lifeYears!.high);
		expect(lead.lifeYears!.high).toBeLessThan(10);
		expect(expectLife(HOT, year(30), { law: 'none' })).toMatchObject({ years: [], lifeYears: null });
	});

	it('counts what the days on the road take out', () => {
		const cool = parseScenario({ climate: { tMax: 20 }, legs: TOURING_LEGS });
		const life = expectLife(cool, year(20), LFP)!;
		// Eight ampere for ten hours and six for one, on each of sixty days.
		expect(life.takenOutAhPerYear).toBeCloseTo((8 * 10 + 6) * 60, 0);
	});
});
