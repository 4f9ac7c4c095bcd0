import { requireNotBelow, requirePositive, requireWithin } from '../correlations/require';
import { requireWhole } from '../statistics/require-whole';
import { findExtrapolations, type Extrapolation } from './extrapolation';
import { shareYear, type HoursAtTemperature } from './histogram';
import { naumannCalendarRate, naumannResistanceRate } from './naumann-calendar';
import { NAUMANN_CYCLE_TESTED, naumannCycleRate } from './naumann-cycle';
import { SWIERCZYNSKI_EXPONENT, swierczynskiRate } from './swierczynski-calendar';
import { MONTHS_PER_YEAR, SECONDS_PER_YEAR } from './time';
import { WANG_EXPONENT, wangCellAh, wangRate } from './wang-cycle';

/** Cells differ, and a capacity test on a pack repeats itself, to about this share of the capacity. */
const SCATTER = 0.01;
const LONGEST_YEARS = 10;

/** How a lithium iron phosphate battery is used in a year. */
export interface LfpDuty {
	/** Hours at each cell temperature, adding up to a year. */
	year: readonly HoursAtTemperature[];
	/** Mean state of charge, 0…1. */
	soc: number;
	capacityAh: number;
	takenOutAhPerYear: number;
	/** Usual discharge current over capacity, 1/h. */
	cRate: number;
	/** How deep the cycles usually go, above 0 and at most 1. */
	depthOfDischarge: number;
}

/** One of the ways in which the models can be put together. */
export interface AgeingWay {
	calendar: 'Naumann 2018' | 'Swierczynski 2015';
	cycle: 'Naumann 2020' | 'Wang 2011';
	/** Both losses in full, or both as growth of one and the same film. */
	together: 'sum' | 'one film';
	loss: number;
}

export interface LfpYear {
	years: number;
	/** Remaining shares of the first capacity. */
	remainingLow: number;
	remainingMiddle: number;
	remainingHigh: number;
	/** Growth of the resistance by standing, as a share of the first (Naumann 2018). */
	resistanceGain: number;
	ways: AgeingWay[];
	extrapolations: Extrapolation[];
}

type Share = ReturnType<typeof shareYear>[number];

/** Mean rate of a law that grows with the power z of time, over changing temperatures. */
function meanRate(shares: readonly Share[], z: number, rate: (tempC: number) => number): number {
	return shares.reduce((sum, { tempC, share }) => sum + share * rate(tempC) ** (1 / z), 0) ** z;
}

/** Losses after one year of the kind; after n years they are n^z times as large. */
interface FirstYear<Name> {
	name: Name;
	loss: number;
	exponent: number;
}

function calendarLosses(shares: readonly Share[], soc: number): FirstYear<AgeingWay['calendar']>[] {
	const naumann = meanRate(shares, 0.5, (tempC) => naumannCalendarRate(tempC, soc));
	const swierczynski = meanRate(shares, SWIERCZYNSKI_EXPONENT, (tempC) => swierczynskiRate(tempC, soc));
	return [
		{ name: 'Naumann 2018', loss: naumann * Math.sqrt(SECONDS_PER_YEAR), exponent: 0.5 },
		{
			name: 'Swierczynski 2015',
			loss: swierczynski * MONTHS_PER_YEAR ** SWIERCZYNSKI_EXPONENT,
			exponent: SWIERCZYNSKI_EXPONENT
		}
	];
}

function cycleLosses(shares: readonly Share[], duty: LfpDuty): FirstYear<AgeingWay['cycle']>[] {
	const { capacityAh, takenOutAhPerYear, depthOfDischarge } = duty;
	const gentlest = NAUMANN_CYCLE_TESTED.cRate![0];
	const naumann = naumannCycleRate(Math.max(duty.cRate, gentlest), depthOfDischarge);
	const wang = meanRate(shares, WANG_EXPONENT, (tempC) => wangRate(tempC, duty.cRate));
	return [
		{ name: 'Naumann 2020', loss: naumann * Math.sqrt(takenOutAhPerYear / capacityAh), exponent: 0.5 },
		{
			name: 'Wang 2011',
			loss: wang * wangCellAh(takenOutAhPerYear, capacityAh) ** WANG_EXPONENT,
			exponent: WANG_EXPONENT
		}
	];
}

function combine(
	calendars: ReturnType<typeof calendarLosses>,
	cycles: ReturnType<typeof cycleLosses>,
	years: number
): AgeingWay[] {
	return calendars.flatMap((standing) =>
		cycles.flatMap((cycling) => {
			const losses = [standing, cycling].map(({ loss, exponent }) => loss * years ** exponent) as [
				number,
				number
			];
			const names = { calendar: standing.name, cycle: cycling.name };
			return [
				{ ...names, together: 'sum' as const, loss: losses[0] + losses[1] },
				{ ...names, together: 'one film' as const, loss: Math.hypot(...losses) }
			];
		})
	);
}

function requireDuty({ soc, capacityAh, takenOutAhPerYear, cRate, depthOfDischarge }: LfpDuty): void {
	requireWithin(0, 1, { soc });
	requirePositive({ capacityAh, depthOfDischarge });
	requireWithin(0, 1, { depthOfDischarge });
	requireNotBelow(0, { takenOutAhPerYear });
	requireWithin(0, 10, { cRate });
}

const remaining = (loss: number): number => Math.min(1, Math.max(0, 1 - loss));

/**
 * Expected remaining capacity of a lithium iron phosphate battery after each of its first years, as a band, because the
 * published models disagree: two calendar laws, two cycle laws, and two views of what they do together.
 *
 * Changing temperatures are put together by equivalent time. A law q = k tᶻ says dq/dt = z k^(1/z) q^(1−1/z), so that
 * q^(1/z) grows by k(T)^(1/z) dt whatever came before, and the order of hot and cold does not matter:
 *
 *     q(n years) = [ Σ sₖ k(Tₖ)^(1/z) ]ᶻ (n year)ᶻ      (sₖ: share of the year at Tₖ; likewise with Ah in place of t)
 *
 * The charge is taken to come out evenly over the hours of the year. Standing and cycling together either cost both losses in
 * full (sum), or thicken one film whose square grows evenly (one film: q² = q₁² + q₂²).
 *
 *     low = 1 − greatest loss − 0.01,  high = 1 − least loss + 0.01,  middle = 1 − mean of the eight losses
 *
 * @param duty year of temperatures, state of charge, capacity, charge taken out, rate and depth
 * @param years how many years ahead, a whole number within 1 to 10
 * @returns for each year the band, growth of resistance, each way's loss, and where models were used outside their tests
 * @throws EngineInputError when the hours are not those of a year or a figure is outside what it can be
 * Validity: as each model; outside its tests a model is followed all the same and this is said in `extrapolations`. Below 0.2 C
 * Naumann's cycle law is held there. The knee of old cells, charging below 0 °C and calendar loss above 60 °C are in none.
 * Source: Wang 2011, Naumann 2018 and 2020, Swierczynski 2015 (see each); equivalent time after Schmalstieg, Käbitz, Ecker,
 * Sauer, J. Power Sources 257 (2014) 325 (from memory); the hundredth of scatter is common practice.
 * @example
 * const year = [{ tempC: 25, hours: 8766 }];
 * const duty = { year, soc: 0.5, capacityAh: 100, takenOutAhPerYear: 0, cRate: 0.5, depthOfDischarge: 0.5 };
 * lfpAgeingBand(duty, 1)[0].ways[0].loss; // 0.04253
 */
export function lfpAgeingBand(duty: LfpDuty, years: number): LfpYear[] {
	requireDuty(duty);
	requireWhole(1, LONGEST_YEARS, { years });
	const shares = shareYear(duty.year);
	const calendars = calendarLosses(shares, duty.soc);
	const cycles = cycleLosses(shares, duty);
	const resistancePerYear =
		meanRate(shares, 1, (tempC) => naumannResistanceRate(tempC, duty.soc)) * SECONDS_PER_YEAR;
	return Array.from({ length: years }, (_, k): LfpYear => {
		const ways = combine(calendars, cycles, k + 1);
		const losses = ways.map(({ loss }) => loss);
		return {
			years: k + 1,
			remainingLow: remaining(Math.max(...losses) + SCATTER),
			remainingMiddle: remaining(losses.reduce((sum, loss) => sum + loss, 0) / losses.length),
			remainingHigh: remaining(Math.min(...losses) - SCATTER),
			resistanceGain: resistancePerYear * (k + 1),
			ways,
			extrapolations: findExtrapolations({ ...duty, years: k + 1 })
		};
	});
}
