import type { CutOffLimits, UseLimits } from '../../../format/heat-limits';
import type { HourSpan, LegSpan } from '../../../thermal/assess/types';
import type { RibbonData, RibbonLeg } from '../day-ribbon/ribbon-data';

/*
 * An invented touring day for the tests of the pictures: three first-order lags, nothing of the engine.
 * Its shapes are those that a picture has to cope with (soak spikes, crossings, a long evening).
 */
type SampleLeg = Pick<LegSpan, 'engineOn' | 'speedKmh' | 'surface'> & {
	kind: RibbonLeg['kind'];
	minutes: number;
	bonnetOpen?: boolean;
};

const drive = (minutes: number, surface: LegSpan['surface'] = 'corrugated', speedKmh = 60): SampleLeg => ({
	kind: 'drive',
	minutes,
	engineOn: true,
	speedKmh,
	surface
});
const stop = (minutes: number): SampleLeg => ({
	kind: 'stop',
	minutes,
	engineOn: false,
	speedKmh: 0,
	surface: 'sealed'
});
const crawl = (minutes: number): SampleLeg => ({
	kind: 'crawl',
	minutes,
	engineOn: true,
	speedKmh: 8,
	surface: 'rock'
});
const camp = (minutes: number): SampleLeg => ({
	kind: 'camp',
	minutes,
	engineOn: false,
	speedKmh: 0,
	surface: 'sealed',
	bonnetOpen: true
});

export const TOURING_LEGS: SampleLeg[] = [
	drive(90, 'sealed', 90),
	drive(60),
	stop(30),
	drive(150, 'gravel'),
	stop(45),
	drive(120),
	crawl(60),
	stop(20),
	drive(90, 'sand', 40),
	stop(30),
	camp(295)
];

export interface SampleSettings {
	startHour?: number;
	legs?: SampleLeg[];
	maxC?: number;
	/** How much of the bay's heat reaches the case, 0…1. */
	exposure?: number;
	band?: boolean;
	sensor?: CutOffLimits['sensor'];
	limits?: UseLimits;
	stepMin?: number;
}

const LIMITS = { dischargeCutC: 80, dischargeResetC: 57, chargeCutC: 70, chargeResetC: 60 };

export function sampleDay(settings: SampleSettings = {}): RibbonData {
	const { startHour = 7.5, legs = TOURING_LEGS, maxC = 42, exposure = 1, stepMin = 2 } = settings;
	const spans = spanLegs(startHour, legs);
	const curves = runDay(spans, { startHour, maxC, exposure, stepMin });
	const peakCellsC = Math.max(...curves.cellsC);
	return {
		curves,
		legs: spans,
		darkSpans: settings.limits
			? []
			: latch(curves.cellsC, startHour, stepMin, LIMITS.dischargeCutC, LIMITS.dischargeResetC),
		chargeSpans: settings.limits
			? []
			: latch(curves.cellsC, startHour, stepMin, LIMITS.chargeCutC, LIMITS.chargeResetC),
		limits: settings.limits ?? { ...LIMITS, sensor: settings.sensor ?? 'cells' },
		peakCellsC,
		peakAtHour: startHour + (curves.cellsC.indexOf(peakCellsC) * stepMin) / 60,
		air: { word: 'bay air', curve: 'bayC' },
		band: settings.band
			? {
					...{ startHour, stepMin },
					lowC: curves.cellsC.map((c) => c - 2 - (c - 30) / 20),
					lowerC: curves.cellsC.map((c) => c - 1),
					upperC: curves.cellsC.map((c) => c + 1),
					highC: curves.cellsC.map((c) => c + 2 + (c - 30) / 20)
				}
			: null
	};
}

function spanLegs(startHour: number, legs: SampleLeg[]): RibbonLeg[] {
	let hour = startHour;
	return legs.map(({ minutes, bonnetOpen = false, ...leg }) => {
		const fromHour = hour;
		hour += minutes / 60;
		return { ...leg, bonnetOpen, fromHour, toHour: hour };
	});
}

function runDay(
	legs: RibbonLeg[],
	day: { startHour: number; maxC: number; exposure: number; stepMin: number }
): RibbonData['curves'] {
	const end = (legs.at(-1) as RibbonLeg).toHour;
	const count = Math.round(((end - day.startHour) * 60) / day.stepMin) + 1;
	const curves: RibbonData['curves'] = {
		startHour: day.startHour,
		stepMin: day.stepMin,
		ambientC: [],
		bayC: [],
		airC: [],
		caseC: [],
		cellsC: [],
		boardC: [],
		soc: []
	};
	let bay = day.maxC - 12;
	let metal = bay;
	let caseC = bay;
	let cells = bay;
	for (let i = 0; i < count; i++) {
		const hour = day.startHour + (i * day.stepMin) / 60;
		const ambient = day.maxC - 6 - 6 * Math.cos(((hour - 3) * Math.PI) / 12);
		const leg = legs.find((span) => hour < span.toHour) ?? (legs.at(-1) as RibbonLeg);
		curves.ambientC.push(ambient);
		curves.bayC.push(bay);
		curves.airC.push(ambient + 0.85 * (bay - ambient));
		curves.caseC.push(caseC);
		curves.cellsC.push(cells);
		curves.boardC.push(cells + 2);
		curves.soc.push(0.9);
		metal += ((leg.engineOn ? ambient + 62 : ambient) - metal) * (day.stepMin / (leg.engineOn ? 25 : 70));
		const pull = leg.speedKmh > 0 ? 0.36 : leg.bonnetOpen ? 0.2 : 0.92;
		bay += (ambient + (metal - ambient) * pull - bay) * (day.stepMin / 5);
		const felt = ambient + ((bay - ambient) * 0.55 + (metal - ambient) * 0.45) * day.exposure;
		caseC += (felt - caseC) * (day.stepMin / 28);
		cells += (caseC + (leg.engineOn ? 1.5 : 0) - cells) * (day.stepMin / 95);
	}
	return curves;
}

function latch(
	valuesC: number[],
	startHour: number,
	stepMin: number,
	cutC: number,
	resetC: number
): HourSpan[] {
	const spans: HourSpan[] = [];
	let from: number | null = null;
	valuesC.forEach((tempC, i) => {
		const hour = startHour + (i * stepMin) / 60;
		if (from === null && tempC >= cutC) from = hour;
		else if (from !== null && tempC <= resetC) {
			spans.push({ fromHour: from, toHour: hour, open: false });
			from = null;
		}
	});
	const end = startHour + ((valuesC.length - 1) * stepMin) / 60;
	if (from !== null) spans.push({ fromHour: from, toHour: end, open: true });
	return spans;
}
