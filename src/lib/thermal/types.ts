/**
 * The shapes that pass over the engine's edge. Units are SI with °C for temperatures;
 * every name carries its unit in the table of scenario fields (vehicle/scenario-fields.ts).
 */

export const NODE_NAMES = [
	'engine',
	'exhaust',
	'bay',
	'bonnet',
	'enclosure',
	'shield',
	'tray',
	'case',
	'cells',
	'board'
] as const;
export type NodeName = (typeof NODE_NAMES)[number];

export const SURFACES = ['sealed', 'gravel', 'corrugated', 'rock', 'sand'] as const;
export type Surface = (typeof SURFACES)[number];

export const SENSORS = ['cells', 'board', 'hotter'] as const;
export type Sensor = (typeof SENSORS)[number];

/** A piece of the day over which nothing that people choose changes. */
export interface Leg {
	minutes: number;
	engineOn: boolean;
	speedKmh: number;
	surface: Surface;
	gradePercent: number;
	towMassKg: number;
	towDragAreaM2: number;
	bonnetOpen: boolean;
	loadA: number;
}

/** A BMS limit: opens at `cut` °C, closes again at `reset` °C. */
export interface LimitPair {
	cut: number;
	reset: number;
}

export interface BmsSettings {
	sensor: Sensor;
	charge: LimitPair;
	discharge: LimitPair;
	cutDelayS: number;
	autoReset: boolean;
}

export interface VehicleGroup {
	massKg: number;
	dragAreaM2: number;
	driveline: number;
	accessoryPowerW: number;
	idleFuelPowerW: number;
	brakeEfficiency: number;
	ratedFuelPowerW: number;
	coolantShare: number;
}
export interface EngineGroup {
	heatCapacity: number;
	thermostatOpen: number;
	thermostatFull: number;
	radiatorStill: number;
	radiatorPerSpeed: number;
	radiatorMax: number;
	underStill: number;
	underPerSpeed: number;
	filmStill: number;
	filmPerSqrtSpeed: number;
	area: number;
	emissivity: number;
}
export interface ExhaustGroup {
	heatCapacity: number;
	gasIdle: number;
	gasFull: number;
	gasConductanceFull: number;
	area: number;
	emissivity: number;
	filmStill: number;
	filmPerSqrtSpeed: number;
}
export interface BayGroup {
	heatCapacity: number;
	fanFlow: number;
	flowPerSpeed: number;
	maxFlow: number;
	share: number;
	leakClosed: number;
	leakOpen: number;
}
export interface BonnetGroup {
	heatCapacity: number;
	area: number;
	absorptivity: number;
	emissivity: number;
	outStill: number;
	outPerSpeed: number;
	inside: number;
}
export interface EnclosureGroup {
	heatCapacity: number;
	uaStill: number;
	uaPerSpeed: number;
	solarArea: number;
	coolGain: number;
	coolSet: number;
}
export interface PositionGroup {
	bayAirFraction: number;
	enclosureFraction: number;
	roadUplift: number;
	airExposure: number;
	exhaustView: number;
	engineView: number;
	bonnetView: number;
	guardFraction: number;
}
export interface ShieldGroup {
	area: number;
	coverage: number;
	emissivityOut: number;
	emissivityIn: number;
	gap: number;
	heatCapacity: number;
}
export interface TrayGroup {
	heatCapacity: number;
	guardConductance: number;
	caseConductance: number;
	filmArea: number;
	filmShare: number;
}
export interface BatteryGroup {
	capacityAh: number;
	caseArea: number;
	topArea: number;
	caseHeatCapacity: number;
	caseEmissivity: number;
	filmStill: number;
	filmPerSqrtSpeed: number;
	caseCellConductance: number;
	cellHeatCapacity: number;
	r25: number;
	activationK: number;
	boardHeatCapacity: number;
	boardR: number;
	boardCellConductance: number;
	boardCaseConductance: number;
}
export interface ChargerGroup {
	maxA: number;
	taperSoc: number;
}
export interface ClimateGroup {
	tMax: number;
	dailyRange: number;
	sunPeak: number;
	pressurePa: number;
	skyDropK: number;
}
export interface StartGroup {
	hour: number;
	soc: number;
}

/** What was measured of a day and takes the place of what the scenario says; times count in s from its start. */
export interface MeasuredCourse {
	/** Outside air, °C, each `everyS`: straight between two readings, level before the first and after the last. */
	air?: { everyS: number; valuesC: Float64Array };
	/** Battery current, A, positive charging: one value for each `everyS`; NaN where what is planned flows. */
	current?: { everyS: number; valuesA: Float64Array };
	/** What nodes start at, °C; those not named start at the outside air's temperature. */
	startC?: Partial<Record<NodeName, number>>;
}

/** A whole scenario, every field filled in. */
export interface Scenario {
	vehicle: VehicleGroup;
	engine: EngineGroup;
	exhaust: ExhaustGroup;
	bay: BayGroup;
	bonnet: BonnetGroup;
	enclosure: EnclosureGroup;
	position: PositionGroup;
	shield: ShieldGroup | null;
	tray: TrayGroup;
	battery: BatteryGroup;
	bms: BmsSettings;
	charger: ChargerGroup;
	climate: ClimateGroup;
	start: StartGroup;
	legs: Leg[];
	/** Only where a day is run again that was measured; no part of what people and programs write. */
	measured?: MeasuredCourse;
}

type PartialGroup<T> = T extends LimitPair
	? Partial<T>
	: { [K in keyof T]?: T[K] extends object ? Partial<T[K]> : T[K] };

/** What people and programs write: absent groups and fields take the defaults. */
export type ScenarioInput = {
	[K in Exclude<keyof Scenario, 'legs' | 'shield' | 'measured'>]?: PartialGroup<Scenario[K]>;
} & {
	shield?: Partial<ShieldGroup> | null;
	legs: (Partial<Leg> & { minutes: number })[];
};

export interface BmsEvent {
	side: 'charge' | 'discharge';
	kind: 'cut' | 'reset';
	/** Clock hour since midnight of the first day; runs on past 24. */
	hour: number;
}

/** One temperature in °C a node; a shield that is not there is null. */
export type NodeValues = Record<Exclude<NodeName, 'shield'>, number> & { shield: number | null };

export interface HourlyRow extends NodeValues {
	hour: number;
	soc: number;
}

/** The answer of the command line and of POST /api/v1/simulations. */
export interface SimulationReport {
	peakCellsC: number;
	peakAtHour: number;
	peaks: NodeValues;
	end: NodeValues & { soc: number };
	events: BmsEvent[];
	hourly: HourlyRow[];
	energy: { maxRelativeImbalance: number };
	steps: number;
	evaluations: number;
}

/** One minute grid, one flat array a node: index = minutes since the start. */
export interface MinuteSeries {
	startHour: number;
	/** Number of grid points (whole minutes, and the start). */
	count: number;
	/** °C; without a shield its node stays as it started. */
	nodes: Record<NodeName, Float64Array>;
	ambient: Float64Array;
	soc: Float64Array;
	/** Battery current right after each grid point, A, positive charging. */
	currentA: Float64Array;
	/** 1 while the latch is open (supply cut), right after each grid point. */
	chargeOpen: Uint8Array;
	dischargeOpen: Uint8Array;
}

/** A run that could not be finished is returned, not thrown. */
export type SimulationResult =
	| {
			status: 'done';
			report: SimulationReport;
			minutes: MinuteSeries;
			/** What the charger would have put in while the charge latch was open, Ah. */
			chargeRefusedAh: number;
			/** As much of it as the battery would have had room for, tapering as it fills, Ah. */
			chargeMissedAh: number;
	  }
	| { status: 'failed'; reason: string; atHour: number; steps: number; evaluations: number };
