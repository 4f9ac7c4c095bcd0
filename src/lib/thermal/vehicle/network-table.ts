import type { NetworkLink, NetworkSource } from '../network/description';
import type { Leg, Scenario } from '../types';
import type { Drive, LegConstants } from './leg-drive';

/** What the values of the network follow from while a leg runs. */
export interface Setting {
	scenario: Scenario;
	leg: Leg;
	/** What the speed of the leg sets, from findLegConstants. */
	constants: LegConstants;
}

type Read = (setting: Setting) => number;
type ReadDrive = (drive: Drive, scenario: Scenario) => number;

/**
 * The parts of the network that the clock drives, by the names that they have in the tables below: these are brought up
 * to date while a leg runs, all else holds for the leg. Those that the sun alone moves stand last.
 */
export const DRIVEN: Readonly<Record<string, ReadDrive>> = {
	/** Temperatures of fixed nodes, °C. */
	outside: (drive) => drive.ambientC,
	sky: (drive) => drive.skyC,
	'exhaust gas': (drive) => drive.gasTempC,
	/** Conductances of links, W/K. */
	'gas to exhaust': (drive) => drive.gasWPerK,
	'air from radiator to bay': (drive, { bay }) => bay.share * drive.airWPerK,
	/** Heats of sources, W. */
	'fuel heat in engine': (drive, { vehicle }) => vehicle.coolantShare * drive.fuelPowerW,
	'sun on bonnet': (drive, { bonnet }) => bonnet.absorptivity * bonnet.area * drive.sunWPerM2,
	'sun into enclosure': (drive, { enclosure }) => enclosure.solarArea * drive.sunWPerM2,
	/** What is added to mixed air, K. */
	'local air': (drive, { position }) => (position.roadUplift * drive.sunWPerM2) / 1000
};

/** Nodes that store heat, with their heat capacity in J/K. Without a shield its node is left out. */
export const STORED: Readonly<Record<string, (scenario: Scenario) => number>> = {
	engine: ({ engine }) => engine.heatCapacity,
	exhaust: ({ exhaust }) => exhaust.heatCapacity,
	bay: ({ bay }) => bay.heatCapacity,
	bonnet: ({ bonnet }) => bonnet.heatCapacity,
	enclosure: ({ enclosure }) => enclosure.heatCapacity,
	shield: ({ shield }) => shield?.heatCapacity ?? 0,
	tray: ({ tray }) => tray.heatCapacity,
	case: ({ battery }) => battery.caseHeatCapacity,
	cells: ({ battery }) => battery.cellHeatCapacity,
	board: ({ battery }) => battery.boardHeatCapacity
};

/** Nodes whose temperature is prescribed, °C. */
export const FIXED: Readonly<Record<string, Read | 'driven'>> = {
	outside: 'driven',
	sky: 'driven',
	'exhaust gas': 'driven',
	cooling: ({ scenario }) => scenario.enclosure.coolSet
};

/** Air mixed from others: what each weighs, and what is added, K. */
export const MIXED: Readonly<
	Record<string, { offset: Read | 'driven'; parts: Readonly<Record<string, Read>> }>
> = {
	'local air': {
		offset: 'driven',
		parts: {
			outside: ({ scenario: { position } }) => 1 - position.bayAirFraction - position.enclosureFraction,
			bay: ({ scenario }) => scenario.position.bayAirFraction,
			enclosure: ({ scenario }) => scenario.position.enclosureFraction
		}
	},
	'guard panel': {
		offset: () => 0,
		parts: {
			outside: ({ scenario }) => 1 - scenario.position.guardFraction,
			bay: ({ scenario }) => scenario.position.guardFraction
		}
	}
};

/** What a thermostat has beside its conductance. */
export interface GateRow {
	openC: Read;
	fullC: Read;
	carryTo: string;
	carryShare: Read;
}

/** One link: its kind and ends, and its conductance in W/K or exchange area in m². */
export interface LinkRow {
	name: string;
	kind: NetworkLink['kind'];
	from: string;
	to: string;
	size: Read | 'driven';
	gate?: GateRow;
}

const row =
	(kind: NetworkLink['kind']) =>
	(name: string, from: string, to: string, size: Read | 'driven', gate?: GateRow): LinkRow => ({
		kind,
		name,
		from,
		to,
		size,
		...(gate ? { gate } : {})
	});
const conduct = row('conductance');
const radiate = row('radiation');
const flow = row('flow');

const bareM2 = ({ scenario: { battery, shield } }: Setting): number =>
	Math.max(battery.caseArea - (shield?.area ?? 0), 0);
const uncovered = ({ scenario }: Setting): number => 1 - (scenario.shield?.coverage ?? 0);
const shieldM2 = ({ scenario }: Setting): number => scenario.shield?.area ?? 0;
/** Emissivity and view of the hot body times what of the battery's side is covered. */
const onShieldM2 = (setting: Setting, emissivity: number, viewM2: number): number => {
	const { shield } = setting.scenario;
	return shield ? emissivity * shield.emissivityOut * viewM2 * shield.coverage : 0;
};

/** Everything that passes heat, the links of the shield last. */
export const LINKS: readonly LinkRow[] = [
	conduct('engine to bay', 'engine', 'bay', ({ constants }) => constants.engineFilmWPerK),
	conduct('engine to air beneath', 'engine', 'outside', ({ constants }) => constants.underWPerK),
	conduct('exhaust to bay', 'exhaust', 'bay', ({ constants }) => constants.exhaustFilmWPerK),
	conduct('bay to outside', 'outside', 'bay', ({ scenario: { bay }, leg }) =>
		leg.bonnetOpen ? bay.leakOpen : bay.leakClosed
	),
	conduct('bonnet to bay', 'bonnet', 'bay', ({ scenario: { bonnet } }) => bonnet.inside * bonnet.area),
	conduct(
		'bonnet to outside',
		'bonnet',
		'outside',
		({ scenario: { bonnet }, constants }) =>
			(bonnet.outStill + bonnet.outPerSpeed * constants.speedMPerS) * bonnet.area
	),
	conduct(
		'enclosure to outside',
		'outside',
		'enclosure',
		({ scenario: { enclosure }, constants }) =>
			enclosure.uaStill + enclosure.uaPerSpeed * constants.speedMPerS
	),
	flow('gas to exhaust', 'exhaust gas', 'exhaust', 'driven'),
	flow('air from radiator to bay', 'outside', 'bay', 'driven'),
	radiate(
		'exhaust radiation to bay',
		'exhaust',
		'bay',
		({ scenario: { exhaust, position } }) =>
			exhaust.emissivity * Math.max(exhaust.area - position.exhaustView, 0)
	),
	radiate(
		'bonnet radiation to sky',
		'bonnet',
		'sky',
		({ scenario: { bonnet } }) => bonnet.emissivity * bonnet.area
	),
	row('gate')('radiator', 'engine', 'outside', ({ constants }) => constants.radiatorWPerK, {
		openC: ({ scenario }) => scenario.engine.thermostatOpen,
		fullC: ({ scenario }) => scenario.engine.thermostatFull,
		carryTo: 'bay',
		carryShare: ({ scenario }) => scenario.bay.share
	}),
	row('excess')('enclosure cooling', 'enclosure', 'cooling', ({ scenario, leg }) =>
		leg.engineOn ? scenario.enclosure.coolGain : 0
	),
	conduct(
		'local air to case',
		'local air',
		'case',
		(setting) => setting.constants.caseFilmWPerM2K * bareM2(setting)
	),
	conduct(
		'local air to tray',
		'local air',
		'tray',
		({ scenario: { tray }, constants }) => tray.filmShare * constants.caseFilmWPerM2K * tray.filmArea
	),
	conduct('guard panel to tray', 'guard panel', 'tray', ({ scenario }) => scenario.tray.guardConductance),
	conduct('tray to case', 'tray', 'case', ({ scenario }) => scenario.tray.caseConductance),
	conduct('case to cells', 'case', 'cells', ({ scenario }) => scenario.battery.caseCellConductance),
	conduct('board to cells', 'board', 'cells', ({ scenario }) => scenario.battery.boardCellConductance),
	conduct('board to case', 'board', 'case', ({ scenario }) => scenario.battery.boardCaseConductance),
	radiate(
		'surroundings radiation to case',
		'local air',
		'case',
		(setting) => setting.scenario.battery.caseEmissivity * bareM2(setting)
	),
	radiate('exhaust radiation to case', 'exhaust', 'case', (setting) => {
		const { exhaust, battery, position } = setting.scenario;
		return exhaust.emissivity * battery.caseEmissivity * position.exhaustView * uncovered(setting);
	}),
	radiate('engine radiation to case', 'engine', 'case', (setting) => {
		const { engine, battery, position } = setting.scenario;
		return engine.emissivity * battery.caseEmissivity * position.engineView * uncovered(setting);
	}),
	radiate(
		'bonnet radiation to case',
		'bonnet',
		'case',
		({ scenario: { bonnet, battery, position }, leg }) =>
			bonnet.emissivity *
			battery.caseEmissivity *
			(leg.bonnetOpen ? 0 : battery.topArea * position.bonnetView)
	),
	conduct(
		'local air to shield',
		'local air',
		'shield',
		(setting) => setting.constants.caseFilmWPerM2K * shieldM2(setting)
	),
	conduct(
		'shield to case',
		'shield',
		'case',
		(setting) => (setting.scenario.shield?.gap ?? 0) * shieldM2(setting)
	),
	radiate('exhaust radiation to shield', 'exhaust', 'shield', (setting) =>
		onShieldM2(setting, setting.scenario.exhaust.emissivity, setting.scenario.position.exhaustView)
	),
	radiate('engine radiation to shield', 'engine', 'shield', (setting) =>
		onShieldM2(setting, setting.scenario.engine.emissivity, setting.scenario.position.engineView)
	),
	radiate(
		'surroundings radiation to shield',
		'local air',
		'shield',
		(setting) => (setting.scenario.shield?.emissivityOut ?? 0) * shieldM2(setting)
	),
	radiate('shield radiation to case', 'shield', 'case', (setting) => {
		const { shield, battery } = setting.scenario;
		return shield ? shield.area / (1 / shield.emissivityIn + 1 / battery.caseEmissivity - 1) : 0;
	})
];

/** One source: a heat that the clock drives, or i²R with its resistance at 25 °C in ohm and its activation in K. */
export interface SourceRow {
	name: string;
	kind: NetworkSource['kind'];
	node: string;
	r25Ohm?: Read;
	activationK?: Read;
}

export const SOURCES: readonly SourceRow[] = [
	{ kind: 'heat', name: 'fuel heat in engine', node: 'engine' },
	{ kind: 'heat', name: 'sun on bonnet', node: 'bonnet' },
	{ kind: 'heat', name: 'sun into enclosure', node: 'enclosure' },
	{
		kind: 'joule',
		name: 'current in cells',
		node: 'cells',
		r25Ohm: ({ scenario }) => scenario.battery.r25,
		activationK: ({ scenario }) => scenario.battery.activationK
	},
	{
		kind: 'joule',
		name: 'current in board',
		node: 'board',
		r25Ohm: ({ scenario }) => scenario.battery.boardR,
		activationK: () => 0
	}
];

/** The driven values that the sun alone moves, in proportion; the others bend little within an hour. */
export const SUNLIT: ReadonlySet<string> = new Set(['sun on bonnet', 'sun into enclosure', 'local air']);
