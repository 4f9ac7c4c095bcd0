import { MONTH_KEYS } from '../schemas/months';

/** Dates in British form, in the workshop's own time zone. */
const style = (options: Intl.DateTimeFormatOptions, timeZone?: string): Intl.DateTimeFormat =>
	new Intl.DateTimeFormat('en-GB', { ...options, ...(timeZone ? { timeZone } : {}) });

/** A day without a time is that day everywhere; a moment is a day where its reader is. */
const IS_DAY = /^\d{4}-\d{2}-\d{2}$/;
const zoneOf = (moment: Date | string | number, timeZone?: string): string | undefined =>
	typeof moment === 'string' && IS_DAY.test(moment) ? 'UTC' : timeZone;

const toDate = (moment: Date | string | number): Date => (moment instanceof Date ? moment : new Date(moment));

/** East of all others the day is fourteen hours ahead: what somebody calls today is not in the future. */
const FURTHEST_EAST_MS = 14 * 3_600_000;
export const latestToday = (now = new Date()): string =>
	new Date(now.getTime() + FURTHEST_EAST_MS).toISOString().slice(0, 10);

/** West of all others the day is twelve hours behind: nobody anywhere calls it an earlier day. */
const FURTHEST_WEST_MS = 12 * 3_600_000;
export const earliestDayOf = (moment: Date | string): string =>
	new Date(toDate(moment).getTime() - FURTHEST_WEST_MS).toISOString().slice(0, 10);

/** "4 March 2026". */
export const formatDate = (moment: Date | string | number, timeZone?: string): string =>
	style({ day: 'numeric', month: 'long', year: 'numeric' }, zoneOf(moment, timeZone)).format(toDate(moment));

/** "4 Mar 2026", for tables. */
export const formatShortDate = (moment: Date | string | number, timeZone?: string): string =>
	style({ day: 'numeric', month: 'short', year: 'numeric' }, zoneOf(moment, timeZone)).format(toDate(moment));

/** "Mar 2026", of a month such as "2026-03". */
export const sayMonth = (month: string): string =>
	`${MONTH_KEYS[Number(month.slice(5, 7)) - 1]!} ${month.slice(0, 4)}`;

/** "14:02". */
export const formatTimeOfDay = (moment: Date | string | number, timeZone?: string): string =>
	style({ hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }, timeZone).format(toDate(moment));

/** "4 March 2026, 14:02". */
export const formatDateTime = (moment: Date | string | number, timeZone?: string): string =>
	`${formatDate(moment, timeZone)}, ${formatTimeOfDay(moment, timeZone)}`;
