import { leadAcidBand, lfpAgeingBand, type Extrapolation, type HoursAtTemperature } from '../ageing';
import type { Scenario } from '../types';
import type { TouringYear } from '../uncertainty/cut-out-days';
import { runScenario } from '../vehicle/simulate';
import { findYearOfCells } from './year-of-cells';

/** By which law a battery wears: a fact of its chemistry. */
export type Wear =
	| { law: 'lithium-iron-phosphate' }
	| { law: 'lead-acid'; ratedLifeYears: number; ratedLifeAh: number | null }
	/** No published model of ours covers it. */
	| { law: 'none' };

/** Remaining share of the first capacity after some years: the models' band. */
export interface LifeYear {
	years: number;
	low: number;
	middle: number;
	high: number;
}

export interface ExpectedLife {
	law: Wear['law'];
	takenOutAhPerYear: number;
	/** Hours of the year with cells above 45 °C. */
	hoursAbove45C: number;
	/** Empty where no model covers the chemistry. */
	years: LifeYear[];
	/** Years to 80 % of the capacity; null where the model does not say. */
	lifeYears: { low: number; middle: number; high: number } | null;
	/** Where models were used outside what their tests covered, in sentences. */
	beyondTests: string[];
}

const LONGEST_YEARS = 10;
const HOT_C = 45;
const HOURS_A_DAY = 24;
const LEAST_DEPTH = 0.05;

interface Use {
	takenOutAhPerYear: number;
	meanSoc: number;
	cRate: number;
	depthOfDischarge: number;
}

/** What the planned day takes out of the battery, on all days on the road. */
function findUse(scenario: Scenario, daysOnRoad: number): Use | null {
	const run = runScenario(scenario);
	if (run.status === 'failed') return null;
	const { soc, currentA, count } = run.minutes;
	let outAh = 0;
	let outMinutes = 0;
	let socSum = 0;
	let lowest = 1;
	let highest = 0;
	for (let minute = 0; minute < count; minute++) {
		// The last grid point has no minute after it.
		if (currentA[minute]! < 0 && minute + 1 < count) {
			outAh -= currentA[minute]! / 60;
			outMinutes++;
		}
		socSum += soc[minute]!;
		lowest = Math.min(lowest, soc[minute]!);
		highest = Math.max(highest, soc[minute]!);
	}
	// A plan shorter than a day is a day on the road all the same.
	const planDays = Math.max((count - 1) / 60 / HOURS_A_DAY, 1);
	const meanA = outMinutes > 0 ? (60 * outAh) / outMinutes : 0;
	return {
		takenOutAhPerYear: (outAh / planDays) * daysOnRoad,
		meanSoc: socSum / count,
		cRate: meanA / scenario.battery.capacityAh,
		depthOfDischarge: Math.max(highest - lowest, LEAST_DEPTH)
	};
}

const INPUT_WORDS: Record<Extrapolation['input'], { name: string; unit: string }> = {
	tempC: { name: 'temperature', unit: ' °C' },
	soc: { name: 'mean state of charge', unit: '' },
	depthOfDischarge: { name: 'depth of discharge', unit: '' },
	cRate: { name: 'current by capacity', unit: ' 1/h' },
	years: { name: 'time', unit: ' years' }
};

const threeDigits = (value: number): number => Number(value.toPrecision(3));

function sayExtrapolation({ model, input, value, tested, hoursPerYear }: Extrapolation): string {
	const { name, unit } = INPUT_WORDS[input];
	const [low, high] = tested.map(threeDigits);
	const where = hoursPerYear === null ? '' : `, ${Math.round(hoursPerYear)} h a year`;
	const far = `${value < tested[0] ? 'down' : 'up'} to ${threeDigits(value)}${unit}${where}`;
	return `${model}: ${name} ${far}; tested from ${low} to ${high}${unit}.`;
}

function lifeOfLithium(year: HoursAtTemperature[], use: Use, capacityAh: number) {
	const band = lfpAgeingBand({ year, soc: use.meanSoc, capacityAh, ...use }, LONGEST_YEARS);
	return {
		years: band.map(({ years, remainingLow: low, remainingMiddle: middle, remainingHigh: high }) => ({
			...{ years, low, middle, high }
		})),
		lifeYears: null,
		beyondTests: band.at(-1)!.extrapolations.map(sayExtrapolation)
	};
}

function lifeOfLeadAcid(year: HoursAtTemperature[], use: Use, wear: Extract<Wear, { law: 'lead-acid' }>) {
	const { ratedLifeYears, ratedLifeAh } = wear;
	const { takenOutAhPerYear } = use;
	const band = leadAcidBand({ year, ratedLifeYears, ratedLifeAh, takenOutAhPerYear }, LONGEST_YEARS);
	return {
		years: band.years.map(({ years, remainingLow: low, remainingMiddle: middle, remainingHigh: high }) => ({
			...{ years, low, middle, high }
		})),
		lifeYears: band.lifeYears,
		beyondTests:
			band.hoursBeyondRule > 0
				? [`The rule of halving is not meant for above 60 °C: ${Math.round(band.hoursBeyondRule)} h a year.`]
				: []
	};
}

/**
 * What is left of the battery's capacity after one to ten years in this place.
 *
 * @param scenario the planned day
 * @param year mean daily maxima and days on the road, month by month
 * @param wear by which law it wears
 * @returns the band of the models year by year, hours in the heat, charge taken out, and where models were stretched; null
 *   when the planned day cannot be run to its end
 * Validity: as the models of ageing; each day on the road as the planned one.
 * Source: as lfpAgeingBand and leadAcidBand.
 * @example
 * const months = Array(12).fill({ meanMaxC: 20, spreadK: 3 });
 * const year = { months, daysOnRoad: Array(12).fill(0) };
 * expectLife(defaultScenario([{ minutes: 60 }]), year, { law: 'lithium-iron-phosphate' }).years.length; // 10
 */
export function expectLife(scenario: Scenario, year: TouringYear, wear: Wear): ExpectedLife | null {
	const daysOnRoad = year.daysOnRoad.reduce((sum, days) => sum + days, 0);
	const use = findUse(scenario, daysOnRoad);
	if (use === null) return null;
	const cells = findYearOfCells(scenario, year);
	const common = {
		law: wear.law,
		takenOutAhPerYear: use.takenOutAhPerYear,
		hoursAbove45C: cells.reduce((sum, { tempC, hours }) => sum + (tempC > HOT_C ? hours : 0), 0)
	};
	if (wear.law === 'none') return { ...common, years: [], lifeYears: null, beyondTests: [] };
	const life =
		wear.law === 'lead-acid'
			? lifeOfLeadAcid(cells, use, wear)
			: lifeOfLithium(cells, use, scenario.battery.capacityAh);
	return { ...common, ...life };
}
