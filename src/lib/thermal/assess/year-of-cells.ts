import type { HoursAtTemperature } from '../ageing';
import type { Scenario } from '../types';
import { copyScenario } from '../uncertainty/draw-scenario';
import type { TouringYear } from '../uncertainty/cut-out-days';
import { countMinutes } from '../vehicle/minute-record';
import { OutcomeRunner } from '../vehicle/outcome-run';

const HOURS_A_DAY = 24;
const DAYS_IN_MONTH = [31, 28.25, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
const EVERY_MIN = 30;
/** Temperatures are counted in bins of this width, K. */
const BIN_K = 2;

/** A day on which the vehicle stands, unused, from midnight to midnight. */
function standStill(scenario: Scenario): Scenario {
	const standing = copyScenario(scenario);
	const [leg] = standing.legs;
	standing.start.hour = 0;
	standing.legs = [
		{ ...leg!, minutes: HOURS_A_DAY * 60, engineOn: false, speedKmh: 0, bonnetOpen: false, loadA: 0 }
	];
	return standing;
}

class Histogram {
	private readonly hours = new Map<number, number>();

	/** Counts a run's temperatures so that together they make as many hours. */
	add(cells: Float64Array, hours: number): void {
		for (const tempC of cells) {
			const bin = Math.round(tempC / BIN_K) * BIN_K;
			this.hours.set(bin, (this.hours.get(bin) ?? 0) + hours / cells.length);
		}
	}

	list(): HoursAtTemperature[] {
		return [...this.hours].map(([tempC, hours]) => ({ tempC, hours })).sort((a, b) => a.tempC - b.tempC);
	}
}

/**
 * How many hours of a year the cells spend at which temperature.
 *
 * In each month the days on the road go as the planned day at the month's mean daily maximum, on the others, and in what a
 * shorter plan leaves of its day, the vehicle stands in that air as from midnight to midnight.
 *
 * @param scenario the planned day
 * @param year mean daily maxima and days on the road, month by month
 * @returns hours at each temperature, in steps of 2 K, adding up to a year
 * Validity: as the engine; the mean day of a month stands for all of them, which is a little kind to hot spells.
 */
export function findYearOfCells(
	scenario: Scenario,
	{ months, daysOnRoad }: TouringYear
): HoursAtTemperature[] {
	const runner = new OutcomeRunner();
	const histogram = new Histogram();
	const count = (day: Scenario, meanMaxC: number, hours: number): void => {
		if (hours <= 0) return;
		day.climate.tMax = meanMaxC;
		const cells = new Float64Array(Math.floor((countMinutes(day) - 1) / EVERY_MIN) + 1);
		runner.run(day, cells, EVERY_MIN);
		histogram.add(cells, hours);
	};
	const touring = copyScenario(scenario);
	const plannedHours = Math.min((countMinutes(scenario) - 1) / 60, HOURS_A_DAY);
	const standing = standStill(scenario);
	months.forEach(({ meanMaxC }, month) => {
		const onRoad = Math.min(daysOnRoad[month]!, DAYS_IN_MONTH[month]!);
		const touringHours = onRoad * plannedHours;
		count(touring, meanMaxC, touringHours);
		count(standing, meanMaxC, DAYS_IN_MONTH[month]! * HOURS_A_DAY - touringHours);
	});
	return histogram.list();
}
