import { SENSORS, SURFACES } from '../types';

/** Where a field lives in a scenario; the two BMS limits are groups of their own. */
export const FIELD_GROUPS = [
	'vehicle',
	'engine',
	'exhaust',
	'bay',
	'bonnet',
	'enclosure',
	'position',
	'shield',
	'tray',
	'battery',
	'bms',
	'bms.charge',
	'bms.discharge',
	'charger',
	'climate',
	'start',
	'legs'
] as const;
export type FieldGroup = (typeof FIELD_GROUPS)[number];

interface FieldBase {
	group: FieldGroup;
	key: string;
	/** One line that a person can read. */
	meaning: string;
}

export interface NumberField extends FieldBase {
	kind: 'number';
	unit: string;
	/** Null: there is no default, the field must be given. */
	default: number | null;
	min: number;
	max: number;
	minExclusive: boolean;
	maxExclusive: boolean;
}
export interface ChoiceField extends FieldBase {
	kind: 'choice';
	unit: '-';
	default: string;
	choices: readonly string[];
}
export interface FlagField extends FieldBase {
	kind: 'flag';
	unit: '-';
	default: boolean;
}
export type ScenarioField = NumberField | ChoiceField | FlagField;

export const ABSOLUTE_ZERO_C = -273.15;

/** Bounds that several fields share; the upper ones keep every run finite and short. */
type Range = Pick<NumberField, 'min' | 'max' | 'minExclusive' | 'maxExclusive'>;
const closed = (min: number, max: number): Range => ({ min, max, minExclusive: false, maxExclusive: false });
const above = (min: number, max: number): Range => ({ ...closed(min, max), minExclusive: true });

const FRACTION = closed(0, 1);
const POSITIVE_FRACTION = above(0, 1);
const AREA = closed(0, 100);
const CAPACITY = closed(0.1, 1e9);
const CONDUCTANCE = closed(0, 1e5);
const FILM = closed(0, 1e4);
const SMALL_TEMP = above(ABSOLUTE_ZERO_C, 1000);
const GAS_TEMP = above(ABSOLUTE_ZERO_C, 3000);
const CURRENT = closed(0, 2000);

type Row = readonly [key: string, unit: string, value: number | null, range: Range, meaning: string];

function numbers(group: FieldGroup, rows: readonly Row[]): NumberField[] {
	return rows.map(([key, unit, value, range, meaning]) => ({
		kind: 'number',
		group,
		key,
		unit,
		default: value,
		...range,
		meaning
	}));
}

const VEHICLE = numbers('vehicle', [
	['massKg', 'kg', 2900, above(0, 1e5), 'Mass of the loaded vehicle.'],
	['dragAreaM2', 'm²', 1.35, closed(0, 100), 'Drag coefficient times frontal area.'],
	['driveline', '-', 0.85, POSITIVE_FRACTION, 'Share of the brake power that reaches the wheels.'],
	['accessoryPowerW', 'W', 2000, closed(0, 1e6), 'Brake power taken by pumps, fan, air conditioning.'],
	['idleFuelPowerW', 'W', 12000, closed(0, 1e7), 'Fuel power that keeps the engine turning.'],
	['brakeEfficiency', '-', 0.4, POSITIVE_FRACTION, 'Extra brake power per extra fuel power.'],
	['ratedFuelPowerW', 'W', 375000, closed(1, 1e7), 'Fuel power at full load.'],
	['coolantShare', '-', 0.25, FRACTION, 'Share of the fuel power that heats the engine block.']
]);

const ENGINE = numbers('engine', [
	['heatCapacity', 'J/K', 180e3, CAPACITY, 'Heat capacity of block and coolant.'],
	['thermostatOpen', '°C', 82, SMALL_TEMP, 'Engine temperature at which the thermostat begins to open.'],
	['thermostatFull', '°C', 95, SMALL_TEMP, 'Engine temperature at which the thermostat is fully open.'],
	['radiatorStill', 'W/K', 300, CONDUCTANCE, 'Radiator conductance at a standstill, fan running.'],
	[
		'radiatorPerSpeed',
		'W/K per m/s',
		90,
		CONDUCTANCE,
		'What each metre per second adds to the conductance of the radiator.'
	],
	['radiatorMax', 'W/K', 2600, CONDUCTANCE, 'The most that the radiator can conduct.'],
	['underStill', 'W/K', 8, CONDUCTANCE, 'Engine to the air beneath it, at a standstill.'],
	[
		'underPerSpeed',
		'W/K per m/s',
		1.2,
		CONDUCTANCE,
		'What each metre per second adds to the conductance to the air beneath the engine.'
	],
	['filmStill', 'W/m²K', 8, FILM, 'Film between engine and bay air at a standstill.'],
	[
		'filmPerSqrtSpeed',
		'W/m²K per √(m/s)',
		5,
		FILM,
		'What the root of the speed adds to the film between engine and bay air.'
	],
	['area', 'm²', 1.3, AREA, 'Surface of the engine in the bay.'],
	['emissivity', '-', 0.9, FRACTION, 'Emissivity of the engine.']
]);

const EXHAUST = numbers('exhaust', [
	['heatCapacity', 'J/K', 7e3, CAPACITY, 'Heat capacity of the hot part of the exhaust.'],
	['gasIdle', '°C', 180, GAS_TEMP, 'Gas temperature at no load.'],
	['gasFull', '°C', 760, GAS_TEMP, 'Gas temperature at full load.'],
	['gasConductanceFull', 'W/K', 45, CONDUCTANCE, 'Gas to exhaust wall at full load.'],
	['area', 'm²', 0.25, AREA, 'Surface of the exhaust in the bay.'],
	['emissivity', '-', 0.8, FRACTION, 'Emissivity of the exhaust.'],
	['filmStill', 'W/m²K', 8, FILM, 'Film between exhaust and bay air at a standstill.'],
	[
		'filmPerSqrtSpeed',
		'W/m²K per √(m/s)',
		5,
		FILM,
		'What the root of the speed adds to the film between exhaust and bay air.'
	]
]);

const BAY = numbers('bay', [
	['heatCapacity', 'J/K', 9e3, CAPACITY, 'Heat capacity of bay air and thin parts.'],
	['fanFlow', 'm³/s', 0.45, closed(0, 1000), 'Air through the radiator at a standstill, fan running.'],
	[
		'flowPerSpeed',
		'm³/s per m/s',
		0.06,
		closed(0, 1000),
		'What each metre per second adds to the air through the radiator.'
	],
	['maxFlow', 'm³/s', 2.4, closed(0, 1000), 'The most air that passes the radiator.'],
	['share', '-', 0.6, FRACTION, 'Share of that air which goes on through the bay.'],
	['leakClosed', 'W/K', 20, CONDUCTANCE, 'Air exchange of the bay, bonnet closed.'],
	['leakOpen', 'W/K', 110, CONDUCTANCE, 'Air exchange of the bay, bonnet open.']
]);

const BONNET = numbers('bonnet', [
	['heatCapacity', 'J/K', 9e3, CAPACITY, 'Heat capacity of the bonnet.'],
	['area', 'm²', 1.6, AREA, 'Area of the bonnet.'],
	['absorptivity', '-', 0.7, FRACTION, 'Share of the sun that its paint takes up.'],
	['emissivity', '-', 0.9, FRACTION, 'Emissivity of the bonnet, both faces.'],
	['outStill', 'W/m²K', 8, FILM, 'Outer film at a standstill.'],
	[
		'outPerSpeed',
		'W/m²K per m/s',
		2.5,
		FILM,
		'What each metre per second adds to the outer film of the bonnet.'
	],
	['inside', 'W/m²K', 5, FILM, 'Inner film to the bay air.']
]);

const ENCLOSURE = numbers('enclosure', [
	['heatCapacity', 'J/K', 40e3, CAPACITY, 'Heat capacity of the cabin, canopy or box.'],
	['uaStill', 'W/K', 35, CONDUCTANCE, 'Walls to the outside at a standstill.'],
	[
		'uaPerSpeed',
		'W/K per m/s',
		2,
		CONDUCTANCE,
		'What each metre per second adds to the conductance of the walls.'
	],
	['solarArea', 'm²', 0.9, AREA, 'Area that turns sun into heat inside.'],
	['coolGain', 'W/K', 0, CONDUCTANCE, 'Cooling per kelvin above the setting, engine running.'],
	['coolSet', '°C', 26, SMALL_TEMP, 'Temperature that the cooling aims at.']
]);

const POSITION = numbers('position', [
	['bayAirFraction', '-', 0.85, FRACTION, 'How much of the bay air reaches the battery.'],
	['enclosureFraction', '-', 0, FRACTION, 'How much of the enclosure air reaches the battery.'],
	['roadUplift', 'K per 1000 W/m²', 0, closed(0, 100), 'Warming of the local air by the sunlit ground.'],
	['airExposure', '-', 0.15, FRACTION, 'Local air speed as a share of road speed.'],
	['exhaustView', 'm²', 0.01, AREA, 'Visible exhaust area times view factor to the battery.'],
	['engineView', 'm²', 0.05, AREA, 'Visible engine area times view factor to the battery.'],
	['bonnetView', '-', 0.5, FRACTION, 'View factor from the top of the battery to the bonnet.'],
	['guardFraction', '-', 0.5, FRACTION, 'Where the guard panel stands between outside and bay air.']
]);

const SHIELD = numbers('shield', [
	['area', 'm²', 0.12, AREA, 'Case area that the shield covers.'],
	['coverage', '-', 0.9, FRACTION, 'Share of the hot view that it blocks.'],
	['emissivityOut', '-', 0.1, FRACTION, 'Emissivity of its outer face.'],
	['emissivityIn', '-', 0.1, FRACTION, 'Emissivity of its inner face.'],
	['gap', 'W/m²K', 10, FILM, 'Conductance of the gap between shield and case.'],
	['heatCapacity', 'J/K', 200, CAPACITY, 'Heat capacity of the shield.']
]);

const TRAY = numbers('tray', [
	['heatCapacity', 'J/K', 1500, CAPACITY, 'Heat capacity of the tray.'],
	['guardConductance', 'W/K', 1, CONDUCTANCE, 'Tray to the guard panel.'],
	['caseConductance', 'W/K', 1, CONDUCTANCE, 'Tray to the battery case.'],
	['filmArea', 'm²', 0.25, AREA, 'Tray surface in the local air.'],
	['filmShare', '-', 0.2, FRACTION, "Tray film as a share of the battery's."]
]);

const BATTERY = numbers('battery', [
	['capacityAh', 'Ah', 100, closed(0.1, 1e5), 'Rated capacity.'],
	['caseArea', 'm²', 0.277, closed(0.001, 100), 'Surface of the case.'],
	['topArea', 'm²', 0.057, AREA, 'Top of the case, which faces the bonnet.'],
	['caseHeatCapacity', 'J/K', 2500, CAPACITY, 'Heat capacity of the case.'],
	['caseEmissivity', '-', 0.92, FRACTION, 'Emissivity of the case.'],
	['filmStill', 'W/m²K', 5, FILM, 'Film between case and local air in still air.'],
	[
		'filmPerSqrtSpeed',
		'W/m²K per √(m/s)',
		4,
		FILM,
		'What the root of the local speed adds to the film between case and local air.'
	],
	['caseCellConductance', 'W/K', 2.5, CONDUCTANCE, 'Case to cells.'],
	['cellHeatCapacity', 'J/K', 11000, CAPACITY, 'Heat capacity of the cells.'],
	['r25', 'Ω', 0.012, closed(0, 10), 'Internal resistance at 25 °C.'],
	['activationK', 'K', 1500, closed(0, 20000), 'How fast the resistance falls with temperature.'],
	['boardHeatCapacity', 'J/K', 400, CAPACITY, 'Heat capacity of the BMS board.'],
	['boardR', 'Ω', 0.001, closed(0, 10), 'Resistance of the board in the current path.'],
	['boardCellConductance', 'W/K', 0.5, CONDUCTANCE, 'Board to cells.'],
	['boardCaseConductance', 'W/K', 0.2, CONDUCTANCE, 'Board to case.']
]);

const BMS: ScenarioField[] = [
	{
		kind: 'choice',
		group: 'bms',
		key: 'sensor',
		unit: '-',
		default: 'cells',
		choices: SENSORS,
		meaning: 'What the BMS measures: the cells, its board, or the hotter of both.'
	},
	...numbers('bms', [
		['cutDelayS', 's', 0, closed(0, 86400), 'How long the sensor must stay at the cut before a latch opens.']
	]),
	{
		kind: 'flag',
		group: 'bms',
		key: 'autoReset',
		unit: '-',
		default: true,
		meaning: 'Whether an open latch closes by itself once cool enough.'
	},
	...numbers('bms.charge', [
		['cut', '°C', 60, SMALL_TEMP, 'Sensor temperature at which charging stops.'],
		['reset', '°C', 50, SMALL_TEMP, 'Sensor temperature at which charging may begin again.']
	]),
	...numbers('bms.discharge', [
		['cut', '°C', 75, SMALL_TEMP, 'Sensor temperature at which the supply goes dark.'],
		['reset', '°C', 62, SMALL_TEMP, 'Sensor temperature at which the supply comes back.']
	])
];

const CHARGER = numbers('charger', [
	['maxA', 'A', 40, CURRENT, 'The most that the charger gives.'],
	[
		'taperSoc',
		'-',
		0.95,
		{ ...closed(0, 1), maxExclusive: true },
		'State of charge from which the current tapers.'
	]
]);

const CLIMATE = numbers('climate', [
	['tMax', '°C', 42, closed(-100, 150), 'Hottest hour of the design day.'],
	['dailyRange', 'K', 15, closed(0, 100), 'From the coolest hour to the hottest.'],
	['sunPeak', 'W/m²', 1000, closed(0, 5000), 'Sun on the bonnet at noon.'],
	['pressurePa', 'Pa', 101325, closed(1000, 200000), 'Air pressure, which falls with altitude.'],
	['skyDropK', 'K', 10, closed(0, 150), 'How much colder than the air the sky radiates.']
]);

const START = numbers('start', [
	['hour', 'h', 6, closed(0, 24), 'Local solar time at which the day plan starts.'],
	['soc', '-', 0.55, FRACTION, 'State of charge at the start.']
]);

const LEGS: ScenarioField[] = [
	...numbers('legs', [['minutes', 'min', null, above(0, 86400), 'Length of the leg.']]),
	{ kind: 'flag', group: 'legs', key: 'engineOn', unit: '-', default: false, meaning: 'Engine running.' },
	...numbers('legs', [['speedKmh', 'km/h', 0, closed(0, 400), 'Road speed.']]),
	{
		kind: 'choice',
		group: 'legs',
		key: 'surface',
		unit: '-',
		default: 'sealed',
		choices: SURFACES,
		meaning: 'What is driven on.'
	},
	...numbers('legs', [
		['gradePercent', '%', 0, closed(-100, 100), 'Average climb, negative downhill.'],
		['towMassKg', 'kg', 0, closed(0, 1e5), 'Mass of the trailer.'],
		['towDragAreaM2', 'm²', 0, closed(0, 100), 'Drag area that the trailer adds.']
	]),
	{
		kind: 'flag',
		group: 'legs',
		key: 'bonnetOpen',
		unit: '-',
		default: false,
		meaning: 'Bonnet open, while stopped.'
	},
	...numbers('legs', [['loadA', 'A', 0, CURRENT, 'Current drawn by accessories from the auxiliary side.']])
];

/**
 * Every field of a scenario: where, unit, default, what it can be, and what it means.
 *
 * Defaults are those of the thermal model, engineering judgement unless reference-data names a source.
 *
 * @example
 * SCENARIO_FIELDS.find((field) => field.group === 'charger' && field.key === 'maxA').default; // 40
 */
export const SCENARIO_FIELDS: readonly ScenarioField[] = [
	...VEHICLE,
	...ENGINE,
	...EXHAUST,
	...BAY,
	...BONNET,
	...ENCLOSURE,
	...POSITION,
	...SHIELD,
	...TRAY,
	...BATTERY,
	...BMS,
	...CHARGER,
	...CLIMATE,
	...START,
	...LEGS
];

/** The most that one day plan may hold. */
export const MOST_LEGS = 1000;
export const LONGEST_PLAN_MINUTES = 60 * 24 * 60;

/** Groups whose numbers an engineer tunes and a coefficient book holds. */
export const COEFFICIENT_GROUPS = [
	'vehicle',
	'engine',
	'exhaust',
	'bay',
	'bonnet',
	'enclosure',
	'tray',
	'shield'
] as const;
export type CoefficientGroup = (typeof COEFFICIENT_GROUPS)[number];

/**
 * The defaults of the groups that an engineer tunes, by group and field; a fresh copy each time.
 *
 * @returns values in the units of SCENARIO_FIELDS
 * Validity: the default vehicle.
 * Source: the thermal model; engineering judgement unless reference-data names a source.
 * @example
 * coefficientDefaults().bay.leakClosed; // 20
 */
export function coefficientDefaults(): Record<CoefficientGroup, Record<string, number>> {
	const defaults = COEFFICIENT_GROUPS.map((group) => {
		const fields = SCENARIO_FIELDS.filter((field): field is NumberField => field.group === group);
		return [group, Object.fromEntries(fields.map(({ key, default: value }) => [key, value]))];
	});
	return Object.fromEntries(defaults) as Record<CoefficientGroup, Record<string, number>>;
}
