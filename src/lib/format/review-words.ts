import type { Chance, Ratio, ReviewFigures, ReviewInstallation, ReviewList } from '../schemas/review';
import type { Verdict } from '../schemas/verdicts';
import { formatShortDate } from './dates';
import { formatNumber } from './numbers';
import { nameAgainst } from './recommendations';
import { sayVerdict } from './verdict';

const OF_MANY: Record<Verdict, string> = {
	'rides-it-out': 'ride it out',
	'runs-close': 'run close',
	'cuts-out': 'cut out'
};

/** "1 cuts out", "3 cut out". */
export const countVerdict = (verdict: Verdict, count: number): string =>
	`${count} ${count === 1 ? sayVerdict(verdict) : OF_MANY[verdict]}`;

/** Days as a manager counts them: one decimal below ten, none above. */
export const formatDays = (days: number): string => formatNumber(days, days < 9.95 ? 1 : 0);

/** Of which installations nothing can be held against a prediction, and why: "not known for 2, no BMS for 1". */
export function sayUncounted({ chance }: Pick<ReviewFigures, 'chance'>): string {
	return [
		...(chance.unknown > 0 ? [`not known for ${chance.unknown}`] : []),
		...(chance.never > 0 ? [`no BMS for ${chance.never}`] : [])
	].join(', ');
}

/** Predicted and reported days side by side; where no chance is known there is no figure, not a zero. */
export function sayDarkDays(
	figures: Pick<ReviewFigures, 'chance' | 'predictedDays' | 'reportedDays'>
): string {
	const { chance, predictedDays, reportedDays } = figures;
	if (chance.known > 0) return `${formatDays(predictedDays)}, ${reportedDays}`;
	return CHANCE_WORDS[chance.unknown > 0 ? 'unknown' : 'never'];
}

const formatRatio = (value: number): string => formatNumber(value, value < 9.95 ? 2 : 0);

/** "0.82 (0.40 to 1.51)". */
export const formatRatioRange = ({ value, low, high }: Ratio): string =>
	`${formatRatio(value)} (${formatRatio(low)} to ${formatRatio(high)})`;

/** What the ratio allows to say: the range holds the true one 19 times in 20. */
export function sayRatio(ratio: Ratio | null): string {
	if (ratio === null) return 'nothing to hold it against';
	if (ratio.low > 1) return 'more went dark than was predicted';
	if (ratio.high < 1) return 'fewer went dark than was predicted, or not all was reported';
	return 'no difference that could be told from chance';
}

const plural = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

interface MonthSums {
	fitted: number;
	predicted: number;
	reported: number;
	/** Part of what is fitted, not all of it. */
	isNarrowed: boolean;
}

/** The months in a sentence, which holds of part of the stock too. */
export function sayMonths({ fitted, predicted, reported, isNarrowed }: MonthSums): string {
	const like = isNarrowed ? ' like that' : '';
	const were = plural(fitted, `installation${like} was`, `installations${like} were`);
	const stock = isNarrowed ? 'installations like that' : 'that is fitted';
	return `In these 24 months ${were} fitted; of all ${stock}, ${formatDays(predicted)} dark days were predicted and ${reported} reported.`;
}

/** What stands apart from the ratio, each in a sentence; nothing where nothing does. */
export function sayApart({ chance, reportedElsewhere, notHeatDays }: ReviewFigures): string[] {
	return [
		...(chance.unknown > 0
			? [
					`Of ${plural(chance.unknown, 'installation', 'installations')} the chance is not known, as the outlook of the assessment has not been worked out: left out of the prediction and of the ratio.`
				]
			: []),
		...(chance.never > 0
			? [
					`${plural(chance.never, 'installation has', 'installations have')} a battery that nothing switches off: it does not go dark, and is left out.`
				]
			: []),
		...(reportedElsewhere > 0
			? [
					`${plural(reportedElsewhere, 'dark day was', 'dark days were')} reported of those, and not counted above.`
				]
			: []),
		...(notHeatDays > 0
			? [
					`Of the dark days counted, ${formatNumber(notHeatDays)} ${notHeatDays === 1 ? 'is one' : 'are ones'} that heat hardly explains; they are in the ratio, since nobody sorts out the others either.`
				]
			: [])
	];
}

/** What somebody should look at, each shortly: "2 overdue", "1 override", "3 sheets not acknowledged". */
export const listToSeeTo = ({
	overdue,
	overrides,
	sheetsWaiting
}: Pick<ReviewFigures, 'overdue' | 'overrides' | 'sheetsWaiting'>): string[] => [
	...(overdue > 0 ? [`${overdue} overdue`] : []),
	...(overrides > 0 ? [plural(overrides, 'override', 'overrides')] : []),
	...(sheetsWaiting > 0 ? [`${plural(sheetsWaiting, 'sheet', 'sheets')} not acknowledged`] : [])
];

export const LIST_TITLES: Record<ReviewList | 'all', string> = {
	all: 'Installations',
	overdue: 'Overdue follow-ups',
	overrides: 'Gone ahead against the verdict or the maker',
	waiting: 'Sheets not acknowledged',
	missing: 'Without a sheet',
	'gone-dark': 'Reported dark'
};

/** "due 4 days ago". */
export const sayOverdue = ({ overdueDays }: ReviewInstallation): string =>
	overdueDays === 1 ? '1 day late' : `${overdueDays} days late`;

/** Who went ahead, and why: of the recommendation under which it was fitted. */
export const sayOverride = ({ override }: Pick<ReviewInstallation, 'override'>): string =>
	override
		? `Against ${nameAgainst(override)}, ${override.decidedBy}: ${override.reason}${override.enteredBy ? ` (entered by ${override.enteredBy})` : ''}`
		: '';

/** What was recommended after the fitting changes nothing until the fitting is held against it. */
export const sayLater = ({ number, on, recommendedBy }: NonNullable<ReviewInstallation['later']>): string =>
	`Recommended again after the fitting: recommendation ${number}, ${formatShortDate(on)}, by ${recommendedBy}.`;

/** Whether a prediction can be held against an installation, and if not, why. */
export const CHANCE_WORDS: Record<Chance, string> = {
	known: 'known',
	unknown: 'not known',
	never: 'no BMS'
};

/** Dark days predicted of one installation; where there is no figure, why. */
export const sayPredicted = ({
	predictedDays,
	chance
}: Pick<ReviewInstallation, 'predictedDays' | 'chance'>): string =>
	predictedDays === null ? CHANCE_WORDS[chance] : formatDays(predictedDays);

export const SHEET_WORDS = {
	acknowledged: 'acknowledged',
	waiting: 'not acknowledged',
	missing: 'no sheet'
} as const;
