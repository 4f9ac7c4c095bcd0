import { joinWords } from '$lib/format/join-words';
import { formatMoney, formatNumber, formatTemperature } from '$lib/format/numbers';
import { hasBms } from '$lib/schemas/batteries';
import type { SheetContent } from '$lib/schemas/sheets';
import type { Outlook } from '$lib/schemas/outlooks';
import { limitAt } from './outlook/envelope';
import { sayWornAfter, type LifeElsewhere } from './outlook/life';
import { nameRemedies, sumMoney } from './outlook/remedies';
import { sayDayCount, sayDaysLikeThis, sayOfTwenty } from '$lib/format/outlook-words';
import type { CountedYear } from './outlook/year';

/** What stands beside the assessment that a sheet is written from. */
export interface SheetBeside {
	outlook: Outlook;
	year: CountedYear;
	/** The battery's life in the other positions, by their names. */
	elsewhere: readonly LifeElsewhere[];
	chemistry: string;
	placeName: string;
}

type Line = NonNullable<SheetContent['outlook']>[number];

const happensTo = (chemistry: string): string =>
	hasBms(chemistry) ? 'the fridge goes dark' : 'the battery gets hotter than its maker allows';

function sayHowOften({ outlook, year, chemistry, placeName }: SheetBeside): Line {
	const happens = happensTo(chemistry);
	const onRoad = year.daysOnRoad.reduce((sum, each) => sum + each, 0);
	const days = sayDayCount(outlook.year.year);
	return {
		label: 'How often',
		text: `${sayDaysLikeThis(outlook.day.cutOutShare)} ${happens}. For somebody with ${formatNumber(onRoad)} days a year on the road around ${placeName} that is ${days} a year.${days.includes('(') ? ' In brackets is how far that may be off.' : ''}`
	};
}

const sayDegrees = (kelvin: number): string => {
	const degrees = Math.max(Math.round(kelvin), 1);
	return degrees === 1 ? '1 degree' : `${degrees} degrees`;
};

function sayWhatHelps({ outlook: { remedies }, chemistry }: SheetBeside): Line {
	const label = 'What would make it safer';
	const { least, moneyPerHour } = remedies;
	if (least === null)
		return {
			label,
			text: 'Nothing that we tried in this position is enough. Ask us about another position.'
		};
	if (least.keys.length === 0) return { label, text: 'Nothing more is needed for a day like this.' };
	const money = sumMoney(least, moneyPerHour);
	const price =
		money > 0 ? `roughly ${formatMoney(money)} at our prices, parts and work` : 'it costs nothing';
	const event = hasBms(chemistry) ? 'it would go dark' : 'it would get too hot';
	return {
		label,
		text: `${nameRemedies(least).replace(/^./, (first) => first.toUpperCase())}: about ${sayDegrees(least.gainK)} cooler, and then ${event} on ${sayOfTwenty(least.cutOutShare ?? 0)} such days; ${price}.`
	};
}

function sayLife({ outlook: { life }, elsewhere }: SheetBeside): Line[] {
	const worn = life === null ? '' : sayWornAfter(life);
	const label = 'How long it lasts';
	if (worn === '') return [];
	const others = elsewhere.flatMap(({ label: name, life: there }) => {
		const after = sayWornAfter(there);
		return after === '' ? [] : [`in the position “${name}” after ${after}`];
	});
	const text = `Here the battery is expected to hold four fifths of what it holds when new after ${worn}${others.length > 0 ? `; ${joinWords(others)}` : ''}.`;
	return [{ label, text }];
}

function sayHowHot({ outlook: { envelope } }: SheetBeside): Line[] {
	const { points, plannedHours, triedC } = envelope;
	const limitC = limitAt(points, plannedHours)?.middleC ?? null;
	if (limitC === null || limitC >= triedC[1]) return [];
	const text = `With as much driving as planned it is well within its limits on days of up to about ${formatTemperature(limitC)}.`;
	return [{ label: 'How hot a day', text }];
}

function sayCable({ outlook: { cable, cableProblem } }: SheetBeside): Line[] {
	if (cable === null && cableProblem === null) return [];
	const holds = cable?.findings.every((finding) => finding.holds) ?? false;
	const text = holds
		? 'As proposed they suit the heat there.'
		: 'As proposed they do not suit the heat there; we will change them.';
	return [{ label: 'Cable and fuse', text }];
}

function sayMeasure({ outlook: { influences } }: SheetBeside): Line[] {
	const [first] = influences.ranking;
	return first ? [{ label: 'What would tell us more', text: `Above all ${first.label}.` }] : [];
}

/** What the estimate says beside its number, for the customer, in plain words. */
export function writeSheetOutlook(beside: SheetBeside): Line[] {
	return [
		...[sayHowOften(beside), sayWhatHelps(beside), ...sayLife(beside)],
		...[...sayHowHot(beside), ...sayCable(beside), ...sayMeasure(beside)]
	];
}
