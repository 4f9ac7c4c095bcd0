import { MOST_FIT_NAME, type FitState, type FitView } from '../schemas/fits';
import type { DoneCoefficientFit, Misfit } from '../thermal/fit';
import type { TraceLeg } from '../thermal/traces';
import { formatKelvin, formatNumber, formatWithUnit, THIN_SPACE } from './numbers';
import { formatHours } from './time';
import { CHANNEL_WORDS, SYNTHETIC, sayTraceTime, type TraceClock } from './traces';

export const FIT_STATE_WORDS: Readonly<Record<FitState, string>> = {
	running: 'being worked out',
	done: 'done',
	failed: 'could not be made',
	cancelled: 'called off'
};

export const LAW_WORDS = {
	lognormal: 'by a factor',
	'logit-normal': 'as a share of 0 to 1',
	normal: 'by an amount'
} as const;

export const LOSS_WORDS = {
	'soft-l1': 'less and less, gradually',
	huber: 'less from 1.3 standard deviations on',
	squares: 'in full'
} as const;

const SIGNIFICANT = 4;
/** From here on figures are grouped whole numbers. */
const LARGE = 10_000;

/** A fitted figure: four digits that mean something, no more. */
export function formatFitted(value: number, unit = '-'): string {
	const rounded = Number(value.toPrecision(SIGNIFICANT));
	const digits = SIGNIFICANT - 1 - Math.floor(Math.log10(Math.abs(rounded) || 1));
	const plain = formatNumber(rounded, Math.min(Math.max(digits, 0), 8));
	const short = plain.includes('.') ? plain.replace(/\.?0+$/, '') : plain;
	const text = Math.abs(rounded) >= LARGE ? rounded.toLocaleString('en-GB') : short;
	return unit === '-' ? text : `${text}${THIN_SPACE}${unit}`;
}

/** Whether the data narrowed what was held before by more than rounding. */
export const isLearnt = (spreadLeft: number): boolean => Math.round(spreadLeft * 100) < 98;

/** How much narrower what is held of a coefficient has become. */
export function sayLearnt(spreadLeft: number): string {
	if (!isLearnt(spreadLeft)) return 'nothing was learnt';
	return `${Math.round(spreadLeft * 100)}${THIN_SPACE}% of the spread is left`;
}

/** Why no book is made from a fit that was worked out; empty where one may be. */
export function sayNoBook({ stopped }: Pick<DoneCoefficientFit, 'stopped'>): string {
	if (stopped === 'converged') return '';
	return 'This fit did not come to a best fit: its values are only where the search was given up, so no coefficient book is made from it. Begin another fit, with fewer coefficients or with less spread held of them before.';
}

/** Which channel of a trace the model does not follow, and by how much. */
export function sayMisfit({ channel, residualK, measure, noiseK }: Misfit, traceName: string): string {
	const times = formatNumber(residualK / noiseK, 0);
	const by = measure === 'rms' ? 'root mean square of all its readings' : 'by the middle of its readings';
	return `The model does not follow ${traceName}: ${CHANNEL_WORDS[channel].toLowerCase()} off by ${formatKelvin(residualK)} (${by}), ${times} times what the readings stray by (${formatKelvin(noiseK)}).`;
}

/** "2, 4" → [2, 4]; null for what is no list of whole numbers. */
export function readLegNumbers(text: string): number[] | null {
	const parts = text.split(/[\s,;]+/).filter(Boolean);
	const numbers = parts.map(Number);
	return numbers.every((each) => Number.isInteger(each) && each > 0) ? [...new Set(numbers)] : null;
}

/** Why legs of a trace cannot be kept back; empty where they can. */
export function sayWrongLegs(traceName: string, legCount: number, heldOut: readonly number[]): string {
	const beyond = heldOut.filter((leg) => leg > legCount);
	if (beyond.length > 0) return `“${traceName}” has no leg ${beyond.join(', ')}: it has ${legCount}.`;
	if (new Set(heldOut).size < legCount) return '';
	return `Of “${traceName}” every leg is kept back, so that nothing is left to fit to.`;
}

const HOUR_S = 3600;

/** A leg of a trace in a few words: "2: 09:00, driving at 80 km/h for 2 h 30 min". */
export function sayLegOf(
	{ startS, endS, kind, meanSpeedKmh }: TraceLeg,
	at: number,
	clock: TraceClock
): string {
	const from = clock.startHour === null ? '' : `${sayTraceTime(clock, startS)}, `;
	const speed = meanSpeedKmh ? ` at ${formatWithUnit(meanSpeedKmh, 'km/h', 0)}` : '';
	return `${at + 1}: ${from}${kind}${speed} for ${formatHours((endS - startS) / HOUR_S)}`;
}

/** Where and when a trace of a fit was measured, and what was kept back of it: "Farrow Drover 2019, job 3, mount A: behind the lamp; 3 February 2026". */
export function sayFittedTrace({ mount, day, isSynthetic, heldOutLegs }: FitView['traces'][number]): string {
	const parts = [
		mount ? `${mount.vehicle}, job ${mount.jobNumber}, mount ${mount.letter}: ${mount.name}` : '',
		mount ? day || 'a day that the file does not say' : '',
		isSynthetic ? SYNTHETIC.toLowerCase() : '',
		heldOutLegs.length > 0 ? `kept back: leg ${heldOutLegs.join(', ')}` : ''
	];
	return parts.filter(Boolean).join('; ');
}

/** What a fit is called unless somebody says otherwise: as many of its coefficients as there is room for. */
export function nameFit(meanings: readonly string[]): string {
	for (let count = meanings.length; count > 0; count--) {
		const more = meanings.length - count;
		const name = meanings.slice(0, count).join(', ') + (more > 0 ? ` and ${more} more` : '');
		if (name.length <= MOST_FIT_NAME) return name;
	}
	return `${meanings.length} coefficients`;
}
