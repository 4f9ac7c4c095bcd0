/** A year of 365.25 days. */
export const HOURS_PER_YEAR = 8766;
export const MONTHS_PER_YEAR = 12;
export const SECONDS_PER_YEAR = HOURS_PER_YEAR * 3600;
