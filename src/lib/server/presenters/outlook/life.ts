import { formatNumber, formatPercent, formatWithUnit } from '$lib/format/numbers';
import type { LifeReport } from '$lib/schemas/outlook-reports';
import type { ExpectedLife, LifeYear } from '$lib/thermal/outlook';

/** The battery's life in another mount of the job. */
export interface LifeElsewhere {
	label: string;
	life: ExpectedLife;
}

const WORN_SHARE = 0.8;
const TOLD_YEARS = [1, 2, 3, 5, 7, 10];
const HERE = 'Here';
const UNCOVERED = 'No published model of ours covers how this chemistry wears: ask its maker.';

/** The first year in which so little is left, by a straight line within the year; null when it never comes. */
function yearsTo(years: readonly LifeYear[], line: 'low' | 'middle' | 'high'): number | null {
	let before = { years: 0, share: 1 };
	for (const year of years) {
		const share = year[line];
		if (share <= WORN_SHARE) {
			const part = (before.share - WORN_SHARE) / (before.share - share);
			return before.years + part * (year.years - before.years);
		}
		before = { years: year.years, share };
	}
	return null;
}

function sayYears(low: number | null, high: number | null, longest: number): string {
	if (low === null) return `more than ${longest} years`;
	const least = formatYears(low);
	if (high === null)
		return low >= longest ? `about ${longest} years or more` : `${least} to more than ${longest} years`;
	const most = formatYears(high);
	return most === least ? `about ${most} years` : `${least} to ${most} years`;
}

const formatYears = (years: number): string => (years < 1 ? 'less than 1' : formatNumber(years));

/** How long until four fifths are left: "5 to 8 years"; empty where no model says. */
export function sayWornAfter({ years, lifeYears }: ExpectedLife): string {
	const longest = years.at(-1)?.years;
	if (longest === undefined) return '';
	if (lifeYears !== null) return sayYears(lifeYears.low, lifeYears.high, longest);
	return sayYears(yearsTo(years, 'low'), yearsTo(years, 'high'), longest);
}

const sayLeft = ({ low, middle, high }: LifeYear): string =>
	`${formatPercent(middle)} (${formatNumber(100 * low)} to ${formatNumber(100 * high)})`;

function sayHere(life: ExpectedLife): string {
	const five = life.years.find(({ years }) => years === 5) ?? life.years.at(-1);
	if (!five) return UNCOVERED;
	const worn = `It is down to four fifths of its capacity after ${sayWornAfter(life)}`;
	const source =
		life.law === 'lead-acid'
			? 'by the life that its record gives and the rule that heat halves it'
			: 'by published models of such cells, two of standing and two of use, which the band holds';
	return `${worn}, ${source}. After ${five.years} years ${sayLeft(five)} is left.`;
}

function sayElsewhere(others: readonly LifeElsewhere[]): string {
	const told = others
		.map(({ label, life }) => ({ label, worn: sayWornAfter(life) }))
		.filter(({ worn }) => worn !== '')
		.map(({ label, worn }) => `in mount ${label} after ${worn}`);
	return told.length > 0 ? ` The same ${told.join(', ')}.` : '';
}

function row(label: string, { years }: ExpectedLife): LifeReport['rows'][number] {
	const at = (told: number) => years.find((year) => year.years === told);
	return { label, cells: TOLD_YEARS.map((told) => at(told)).map((year) => (year ? sayLeft(year) : '')) };
}

const HEADS = ['Mount', ...TOLD_YEARS.map((years) => (years === 1 ? '1 year' : `${years} years`))];

/** How the battery wears, here and elsewhere. */
export function presentLife(
	life: ExpectedLife | null,
	problem: string | null,
	others: readonly LifeElsewhere[]
): LifeReport {
	if (life === null) {
		const sentence = problem
			? `The years were not worked out: a figure lies outside what the models of wear are for. ${problem}`
			: 'The planned day could not be run to its end, so its years were not worked out.';
		return { sentence, value: '', figures: [], curves: [], heads: [], rows: [], beyondTests: [] };
	}
	const all = [{ label: HERE, life }, ...others].filter((each) => each.life.years.length > 0);
	return {
		sentence: `${sayHere(life)}${sayElsewhere(others)}`,
		value: sayWornAfter(life),
		figures: [
			{ label: 'Cells above 45 °C', value: `${formatWithUnit(life.hoursAbove45C, 'h')} a year` },
			{ label: 'Taken out of it', value: `${formatWithUnit(life.takenOutAhPerYear, 'Ah')} a year` }
		],
		curves: all.map((each) => ({ label: each.label, years: each.life.years })),
		heads: HEADS,
		rows: all.map((each) => row(each.label, each.life)),
		beyondTests: life.beyondTests
	};
}
