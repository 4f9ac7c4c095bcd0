import type { BmsEvent, HourlyRow, NodeValues, Surface } from '../types';
import type { HourSpan } from '../vehicle/spans';

export type { HourSpan };

export type MountVerdict = 'rides-it-out' | 'runs-close' | 'cuts-out';

/** Where heat in the battery can come from. */
export const HEAT_SOURCES = [
	'bay-air',
	'exhaust',
	'engine',
	'bonnet',
	'enclosure-air',
	'road',
	'own-current',
	'outside-air'
] as const;
export type HeatSource = (typeof HEAT_SOURCES)[number];

/** One line of the heat ledger, at the moment when the cells are hottest. */
export interface LedgerEntry {
	source: HeatSource;
	/**
	 * Heat that it sends into case, cells and board at that moment, W (negative: it takes heat away), directly and
	 * through shield and tray. Outside air: what the case loses to it. The watts sum to what the battery stores.
	 */
	watts: number;
	/**
	 * Its share of what the cells stand above the outside air at that moment, K; the shares sum to the whole.
	 * Outside air: how far the cells still lag behind its rise (negative) or fall.
	 */
	kelvin: number;
}

/** One leg of the day as a strip along the clock. */
export interface LegSpan {
	kind?: 'drive' | 'crawl' | 'stop' | 'camp';
	fromHour: number;
	toHour: number;
	engineOn: boolean;
	speedKmh: number;
	surface: Surface;
	bonnetOpen: boolean;
}

/** What is drawn: one value a step from the start, rounded to 0.01. */
export interface AssessmentCurves {
	startHour: number;
	stepMin: number;
	ambientC: number[];
	bayC: number[];
	/** The air around the battery: of the bay in part, or of the enclosure, or over the road. */
	airC: number[];
	caseC: number[];
	cellsC: number[];
	boardC: number[];
	soc: number[];
}

/** What a lead-acid battery, which nothing switches off, needs and bears on the day. */
export interface LeadAcidFigures {
	/** Highest temperatures at which it may be used and charged, by its maker. */
	useLimitC: number;
	chargeLimitC: number;
	/** First minute on which the cells are above the limit of use; null when they never are. */
	tooHotAtHour: number | null;
	hoursAboveUseLimit: number;
	/** How long it is charged above the limit of charging, h, and the hottest that it is charged at; null without charge. */
	hoursAboveChargeLimit: number;
	peakChargingC: number | null;
	/** Whether its charger lowers its voltage as the battery warms. */
	chargerCompensates: boolean;
	/** What the charger should give at the hottest, and what it gives at 25 °C. */
	compensatedChargeV: number;
	uncompensatedChargeV: number;
	/** Fresh air that carries its hydrogen away while it is charged; each of two openings; no sparks within this of its vents. */
	freshAirM3PerH: number;
	openingCm2: number;
	sparkFreeMm: number;
}

export interface DoneAssessment {
	status: 'done';
	verdict: MountVerdict;
	/**
	 * Discharge cut − peak of what the BMS watches, K; zero or less when it cuts out at once. Without a BMS: highest
	 * temperature of use − peak of the cells.
	 */
	headroomK: number;
	/** Charge cut, or without a BMS the highest temperature of charging, − the same peak, K. */
	chargeHeadroomK: number;
	/** Clock hours run on past 24. */
	cutAtHour: number | null;
	resetAtHour: number | null;
	/** The last time it went dark it came back within the run, with nobody's help. False when it never went dark. */
	backByItself: boolean;
	darkSpans: HourSpan[];
	darkHours: number;
	/** While charging was stopped by heat. */
	chargeSpans: HourSpan[];
	/** What the battery would have taken meanwhile, Ah, and for how long before it was full (on the grid of minutes). */
	chargeMissedAh: number;
	chargeMissedHours: number;
	peakCellsC: number;
	peakAtHour: number;
	/** Peak of what the BMS watches. */
	peakSensorC: number;
	peaks: NodeValues;
	end: NodeValues;
	endSoc: number;
	endHour: number;
	events: BmsEvent[];
	ledger: LedgerEntry[];
	curves: AssessmentCurves;
	legs: LegSpan[];
	engineVersion: string;
	energyMaxRelativeImbalance: number;
	steps: number;
	evaluations: number;
	hourly: HourlyRow[];
	/** Of a lead-acid battery alone. */
	leadAcid?: LeadAcidFigures;
}

/** A run that could not be finished says why. */
export interface FailedAssessment {
	status: 'failed';
	reason: string;
}

export type Assessment = DoneAssessment | FailedAssessment;
