import { THIN_SPACE } from './numbers';

const MINUTES_A_DAY = 1440;
const SMALL_NUMBERS = [
	'no',
	'one',
	'two',
	'three',
	'four',
	'five',
	'six',
	'seven',
	'eight',
	'nine',
	'ten',
	'eleven',
	'twelve'
];

const twoDigits = (value: number): string => String(value).padStart(2, '0');

/** Bare clock of an hour that may run past 24: 25.5 → "01:30". */
export function formatClock(hour: number): string {
	const minutes = ((Math.round(hour * 60) % MINUTES_A_DAY) + MINUTES_A_DAY) % MINUTES_A_DAY;
	return `${twoDigits(Math.floor(minutes / 60))}:${twoDigits(minutes % 60)}`;
}

/** The clock as people say it: 16.85 → "16:51", 25.5 → "01:30 next day", 50 → "02:00 on day 3". */
export function formatClockHour(hour: number): string {
	const day = Math.floor(Math.round(hour * 60) / MINUTES_A_DAY);
	if (day <= 0) return formatClock(hour);
	return day === 1 ? `${formatClock(hour)} next day` : `${formatClock(hour)} on day ${day + 1}`;
}

/** The word under a tick: "08", "noon", "midnight"; whole hours only. */
export function formatHourTick(hour: number): string {
	const ofDay = ((Math.round(hour) % 24) + 24) % 24;
	if (ofDay === 12) return 'noon';
	return ofDay === 0 ? 'midnight' : twoDigits(ofDay);
}

/** 4.02 → "4 h 1 min", 0.5 → "30 min", 2 → "2 h". */
export function formatHours(hours: number): string {
	const minutes = Math.round(hours * 60);
	const whole = Math.floor(minutes / 60);
	const rest = minutes % 60;
	const hourText = `${whole}${THIN_SPACE}h`;
	const minuteText = `${rest}${THIN_SPACE}min`;
	if (whole === 0) return minuteText;
	return rest === 0 ? hourText : `${hourText} ${minuteText}`;
}

export const formatMinutes = (minutes: number): string => formatHours(minutes / 60);

/** A length of time inside a sentence: "half an hour", "two hours", "about 20 minutes". */
export function sayHours(hours: number): string {
	const minutes = Math.round(hours * 60);
	if (minutes < 8) return 'a few minutes';
	if (minutes < 25) return `about ${Math.round(minutes / 5) * 5} minutes`;
	const halves = Math.round(hours * 2);
	if (halves === 1) return 'half an hour';
	const whole = Math.floor(halves / 2);
	const word = SMALL_NUMBERS[whole] ?? String(whole);
	if (halves % 2 === 0) return whole === 1 ? 'an hour' : `${word} hours`;
	return whole === 1 ? 'an hour and a half' : `${word} and a half hours`;
}

/** Shorter than this is as good as at once. */
export const A_MOMENT_H = 8 / 60;

/** "two hours before camp", "just as camp is reached", "half an hour after reaching camp". */
export function sayAgainstCamp(hour: number, campHour: number): string {
	const hoursAfter = hour - campHour;
	if (Math.abs(hoursAfter) < A_MOMENT_H) return 'just as camp is reached';
	return hoursAfter < 0
		? `${sayHours(-hoursAfter)} before camp`
		: `${sayHours(hoursAfter)} after reaching camp`;
}
