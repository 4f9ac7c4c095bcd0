import type { HeatFields } from '../chemistries/guard';
import type { ScenarioInput, Surface } from '../types';

/** Where a battery can be proposed. */
export const POSITION_KINDS = ['under-bonnet', 'cabin', 'cargo-area', 'canopy-box', 'chassis-rail'] as const;
export type PositionKind = (typeof POSITION_KINDS)[number];

export const POSITION_LABELS: Record<PositionKind, string> = {
	'under-bonnet': 'Under the bonnet',
	cabin: 'In the cabin',
	'cargo-area': 'In the cargo area',
	'canopy-box': 'In a canopy or tray box',
	'chassis-rail': 'On the chassis rail'
};

/** What somebody answers who does not know; the scenario then takes a cautious value and says so. */
export const UNKNOWN = 'unknown';
export type Unknown = typeof UNKNOWN;

export const FACINGS = ['square-on', 'at-an-angle', 'hidden'] as const;
export const BATTERY_SIDES = ['long-side', 'end', 'top', 'base'] as const;
export const BAY_PLACES = ['front-corner', 'middle', 'firewall', 'firewall-exhaust'] as const;
export const AIR_PATHS = ['closed-corner', 'some-through-flow', 'in-the-airstream'] as const;
export const BONNET_LININGS = ['bare', 'lined'] as const;
export const TRAY_MATERIALS = ['steel', 'aluminium', 'plastic'] as const;
export const TRAY_MATS = ['none', 'rubber', 'foam'] as const;
export const TRAY_UNDERSIDES = ['open-air', 'inner-guard', 'bay-air'] as const;
export const SHIELD_KINDS = ['none', 'reflective-wrap', 'stand-off-plate'] as const;
export const SHIELD_PLACES = [
	'exhaust-side',
	'engine-side',
	'both-hot-sides',
	'all-round',
	'cool-side'
] as const;
export const SHIELD_FINISHES = ['bright', 'dull'] as const;
export const COOLINGS = ['cooled', 'not-cooled'] as const;
export const SUN_LOADS = ['shaded', 'through-windows', 'full-sun'] as const;
export const ENCLOSURE_AIRS = ['sealed', 'vented', 'open'] as const;
export const ROAD_HEATS = ['shielded', 'open-to-track', 'open-to-bitumen'] as const;

export type Facing = (typeof FACINGS)[number];
export type BatterySide = (typeof BATTERY_SIDES)[number];
export type BayPlace = (typeof BAY_PLACES)[number];
export type AirPath = (typeof AIR_PATHS)[number];
export type BonnetLining = (typeof BONNET_LININGS)[number];
export type TrayMaterial = (typeof TRAY_MATERIALS)[number];
export type TrayMat = (typeof TRAY_MATS)[number];
export type TrayUnderside = (typeof TRAY_UNDERSIDES)[number];
export type ShieldKind = (typeof SHIELD_KINDS)[number];
export type ShieldPlace = (typeof SHIELD_PLACES)[number];
export type ShieldFinish = (typeof SHIELD_FINISHES)[number];
export type Cooling = (typeof COOLINGS)[number];
export type SunLoad = (typeof SUN_LOADS)[number];
export type EnclosureAir = (typeof ENCLOSURE_AIRS)[number];
export type RoadHeat = (typeof ROAD_HEATS)[number];

type Answer<T> = T | Unknown;

/** A survey as it stands: an answer that is absent was not asked or not yet given. */
export interface SurveyAnswers {
	positionKind: PositionKind;

	bayPlace?: Answer<BayPlace>;

	exhaustFacing?: Answer<Facing>;
	exhaustGapMm?: Answer<number>;
	exhaustSeenWidthMm?: Answer<number>;
	exhaustSeenHeightMm?: Answer<number>;
	exhaustBatterySide?: Answer<BatterySide>;

	engineFacing?: Answer<Facing>;
	engineGapMm?: Answer<number>;
	engineSeenWidthMm?: Answer<number>;
	engineSeenHeightMm?: Answer<number>;
	engineBatterySide?: Answer<BatterySide>;

	bonnetGapMm?: Answer<number>;
	bonnetLining?: Answer<BonnetLining>;

	airPath?: Answer<AirPath>;

	trayMaterial?: Answer<TrayMaterial>;
	trayLengthMm?: Answer<number>;
	trayWidthMm?: Answer<number>;
	trayThicknessMm?: Answer<number>;
	trayMat?: Answer<TrayMat>;
	trayUnderside?: Answer<TrayUnderside>;

	shieldKind?: Answer<ShieldKind>;
	shieldPlace?: Answer<ShieldPlace>;
	shieldFinish?: Answer<ShieldFinish>;
	shieldStandOffMm?: Answer<number>;

	enclosureCooling?: Answer<Cooling>;
	enclosureSun?: Answer<SunLoad>;
	enclosureAir?: Answer<EnclosureAir>;

	roadHeat?: Answer<RoadHeat>;
}

export type SurveyKey = Exclude<keyof SurveyAnswers, 'positionKind'>;

/** How one coefficient came to be, in words. */
export interface Derivation {
	/** Where it went in the scenario, `position.exhaustView`. */
	path: string;
	label: string;
	value: number | string;
	unit: string;
	/** The formula with its numbers, and where it comes from. */
	basis: string;
}

/** What the survey needs to know of the vehicle, the battery, the day and the place. */
export interface SurveyedVehicle {
	massKg: number;
	dragAreaM2: number;
	towMassKg: number;
	towDragAreaM2: number;
}

export interface SurveyedBattery extends HeatFields {
	capacityAh: number;
	lengthMm: number;
	widthMm: number;
	heightMm: number;
	massKg: number;
	internalResistanceMohm: number;
	maxChargeA: number;
}

export type PlannedLegKind = 'drive' | 'crawl' | 'stop' | 'camp';

export interface PlannedLeg {
	kind: PlannedLegKind;
	minutes: number;
	speedKmh: number;
	surface: Surface;
	gradePercent: number;
	towing: boolean;
	engineOn: boolean;
	bonnetOpen: boolean;
	loadA: number;
}

export interface PlannedDay {
	name: string;
	startHour: number;
	/** 0…1. */
	startSoc: number;
	chargerMaxA: number;
	legs: PlannedLeg[];
}

export interface HotDay {
	hotDayMaxC: number;
	dailyRangeK: number;
	sunPeakWPerM2: number;
}

/** The coefficient book in force: group (as in the scenario) → key → value. */
export type CoefficientBook = Record<string, Record<string, number>>;

export interface SurveyInputs {
	vehicle: SurveyedVehicle;
	battery: SurveyedBattery;
	survey: SurveyAnswers;
	dayPlan: PlannedDay;
	hotDay: HotDay;
	altitudeM: number;
	coefficients: CoefficientBook;
}

export interface BuiltScenario {
	scenario: ScenarioInput;
	derivations: Derivation[];
	/** One plain sentence for each thing that nobody measured. */
	assumptions: string[];
}
