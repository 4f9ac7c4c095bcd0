import type { DayLimits } from '../../../format/heat-limits';
import type { LegKind } from '../../../schemas/day-plans';
import type { PositionKind } from '../../../schemas/survey';
import type { AssessmentCurves, DoneAssessment, HourSpan, LegSpan } from '../../../thermal/assess/types';

/** A leg that knows what it is called. */
export type RibbonLeg = LegSpan & { kind: LegKind };

/** When the values of a curve begin, and how far apart they are. */
export type RibbonHours = Pick<AssessmentCurves, 'startHour' | 'stepMin'>;

/** Where the cells may lie: half of all days between the inner two, nine in ten between the outer two. */
export interface RibbonBand extends RibbonHours {
	lowC: number[];
	lowerC: number[];
	upperC: number[];
	highC: number[];
}

/** Which air is drawn, and what it is called: under a bonnet that of the bay, elsewhere that around the battery. */
export interface RibbonAir {
	word: string;
	curve: 'bayC' | 'airC';
}

const AIR_AT: Record<PositionKind, RibbonAir> = {
	'under-bonnet': { word: 'bay air', curve: 'bayC' },
	cabin: { word: 'cabin air', curve: 'airC' },
	'cargo-area': { word: 'cargo area air', curve: 'airC' },
	'canopy-box': { word: 'box air', curve: 'airC' },
	'chassis-rail': { word: 'air at the rail', curve: 'airC' }
};

export const airAt = (position: PositionKind): RibbonAir => AIR_AT[position];

/** Everything the day ribbon draws. */
export interface RibbonData {
	curves: AssessmentCurves;
	legs: RibbonLeg[];
	darkSpans: HourSpan[];
	chargeSpans: HourSpan[];
	/** The battery's own limits, °C. */
	limits: DayLimits;
	peakCellsC: number;
	peakAtHour: number;
	air: RibbonAir;
	band: RibbonBand | null;
}

/** Above walking pace and below this a leg without a name counts as crawling. */
const CRAWL_BELOW_KMH = 25;

/** The name of a leg that carries none, from what the vehicle does. */
export function nameLeg(leg: LegSpan): LegKind {
	if (leg.kind) return leg.kind;
	if (leg.speedKmh <= 0) return leg.engineOn ? 'stop' : 'camp';
	return leg.speedKmh < CRAWL_BELOW_KMH ? 'crawl' : 'drive';
}

/** An assessment and the battery's limits as the ribbon wants them. */
export function toRibbonData(
	assessment: DoneAssessment,
	limits: DayLimits,
	position: PositionKind,
	band: RibbonBand | null = null
): RibbonData {
	return {
		curves: assessment.curves,
		legs: assessment.legs.map((leg) => ({ ...leg, kind: nameLeg(leg) })),
		darkSpans: assessment.darkSpans,
		chargeSpans: assessment.chargeSpans,
		limits,
		peakCellsC: assessment.peakCellsC,
		peakAtHour: assessment.peakAtHour,
		air: airAt(position),
		band
	};
}

export const endHourOf = ({ startHour, stepMin, cellsC }: AssessmentCurves): number =>
	startHour + ((cellsC.length - 1) * stepMin) / 60;

export const hourAt = ({ startHour, stepMin }: RibbonHours, index: number): number =>
	startHour + (index * stepMin) / 60;

/** The value of a curve at a clock hour, between steps by a straight line, held at both ends. */
export function valueAt({ startHour, stepMin }: RibbonHours, valuesC: number[], hour: number): number {
	const place = Math.min(Math.max(((hour - startHour) * 60) / stepMin, 0), valuesC.length - 1);
	const before = Math.floor(place);
	const low = valuesC[before] ?? NaN;
	const high = valuesC[before + 1] ?? low;
	return low + (high - low) * (place - before);
}
