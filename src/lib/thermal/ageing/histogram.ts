import { EngineInputError, requireNotBelow } from '../correlations/require';
import { HOURS_PER_YEAR } from './time';

/** How long a battery is at a temperature. */
export interface HoursAtTemperature {
	tempC: number;
	hours: number;
}

/** A year may be counted as 365 days, 366, or with a few hours lost to rounding. */
const FEWEST_HOURS = 8700;
const MOST_HOURS = 8800;

/** The share of a year at each temperature, adding up to 1; refuses hours that are not those of a year. */
export function shareYear(year: readonly HoursAtTemperature[]): { tempC: number; share: number }[] {
	for (const { tempC, hours } of year) {
		requireNotBelow(0, { hours });
		requireNotBelow(-60, { tempC });
	}
	const total = year.reduce((sum, { hours }) => sum + hours, 0);
	if (!(total >= FEWEST_HOURS && total <= MOST_HOURS)) {
		throw new EngineInputError(
			'hoursOfYear',
			total,
			`about ${HOURS_PER_YEAR}, within ${FEWEST_HOURS} to ${MOST_HOURS}`
		);
	}
	return year.map(({ tempC, hours }) => ({ tempC, share: hours / total }));
}
