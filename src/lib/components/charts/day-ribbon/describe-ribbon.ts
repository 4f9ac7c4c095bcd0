import { isUseLimits } from '../../../format/heat-limits';
import { formatTemperature } from '../../../format/numbers';
import { formatClock, formatClockHour } from '../../../format/time';
import { endHourOf, hourAt, valueAt, type RibbonData, type RibbonLeg } from './ribbon-data';
import { legWords } from './strip';

/** The picture in sentences, for whoever cannot see it. */
export function describeRibbon(data: RibbonData): string {
	const { curves, peakCellsC, peakAtHour } = data;
	const from = formatClock(curves.startHour);
	const until = formatClockHour(endHourOf(curves));
	const day = `Temperatures from ${from} to ${until}.`;
	const peak = `The cells are hottest at ${formatClockHour(peakAtHour)} with ${formatTemperature(peakCellsC)}.`;
	return [day, peak, describeGuard(data), ...describeBand(data)].join(' ');
}

/** How far the days lie apart where they matter: at the peak. */
function describeBand({ band, peakAtHour }: RibbonData): string[] {
	if (!band) return [];
	const at = (valuesC: number[]) => formatTemperature(valueAt(band, valuesC, peakAtHour));
	return [
		`At ${formatClockHour(peakAtHour)} half of all days lie between ${at(band.lowerC)} and ${at(band.upperC)}, nine in ten between ${at(band.lowC)} and ${at(band.highC)}.`
	];
}

function describeDark({ darkSpans }: RibbonData): string {
	if (!darkSpans.length) return 'The battery never goes dark.';
	const spans = darkSpans.map(({ fromHour, toHour, open }) =>
		open
			? `from ${formatClockHour(fromHour)} to the end of the day`
			: `from ${formatClockHour(fromHour)} to ${formatClockHour(toHour)}`
	);
	return `It is dark ${spans.join(' and ')}.`;
}

/** What its limits do: those of a BMS switch it off, those of a maker only say how hot is too hot. */
function describeGuard(data: RibbonData): string {
	const { limits } = data;
	if (isUseLimits(limits)) {
		const [use, charge] = [limits.highestUseC, limits.highestChargeC].map((tempC) =>
			formatTemperature(tempC)
		);
		return `Nothing switches this battery off. It is too hot above ${use}, and is not to be charged above ${charge}.`;
	}
	const [cut, reset] = [limits.dischargeCutC, limits.dischargeResetC].map((tempC) =>
		formatTemperature(tempC)
	);
	return `${describeDark(data)} It goes dark at ${cut} and comes back at ${reset}.`;
}

/** Everything the ribbon says at one moment. */
export interface RibbonReading {
	hour: number;
	cellsC: number;
	caseC: number;
	airC: number;
	outsideC: number;
	boardC: number;
	leg: RibbonLeg | null;
	dark: boolean;
}

export function readRibbon(data: RibbonData, hour: number): RibbonReading {
	const { curves } = data;
	const at = (valuesC: number[]) => valueAt(curves, valuesC, hour);
	return {
		hour,
		cellsC: at(curves.cellsC),
		caseC: at(curves.caseC),
		airC: at(curves[data.air.curve]),
		outsideC: at(curves.ambientC),
		boardC: at(curves.boardC),
		leg:
			data.legs.find(({ fromHour, toHour }) => hour >= fromHour && hour < toHour) ?? data.legs.at(-1) ?? null,
		dark: data.darkSpans.some(({ fromHour, toHour }) => hour >= fromHour && hour < toHour)
	};
}

/** "17:03: cells 80 °C, case 78 °C, bay air 66 °C, outside 41 °C; drive, dark". */
export function sayReading(data: RibbonData, reading: RibbonReading): string {
	const temperatures = [
		`cells ${formatTemperature(reading.cellsC)}`,
		`case ${formatTemperature(reading.caseC)}`,
		`${data.air.word} ${formatTemperature(reading.airC)}`,
		`outside ${formatTemperature(reading.outsideC)}`
	];
	const state = [reading.leg && sayLeg(reading.leg), reading.dark && 'dark'].filter(Boolean).join(', ');
	return `${formatClockHour(reading.hour)}: ${temperatures.join(', ')}${state && `; ${state}`}`;
}

export const sayLeg = (leg: RibbonLeg): string =>
	leg.kind === 'drive' ? `driving ${legWords(leg)[0]}` : (legWords(leg)[0] ?? leg.kind);

/** One reading for each whole hour, and the start and the end. */
export function hourlyReadings(data: RibbonData): RibbonReading[] {
	const last = hourAt(data.curves, data.curves.cellsC.length - 1);
	const hours = [data.curves.startHour];
	for (let hour = Math.floor(data.curves.startHour) + 1; hour < last; hour++) hours.push(hour);
	return [...hours, last].map((hour) => readRibbon(data, hour));
}
