import type { NetworkDescription, NetworkLink, NetworkNode, NetworkSource } from '../network/description';
import type { Leg, Scenario } from '../types';
import type { Drive, LegConstants } from './leg-drive';

type Reader = (drive: Drive, scenario: Scenario) => number;

/**
 * The parts of the network that the clock drives: the description is filled from these tables, and while a leg runs
 * only these are brought up to date.
 */
export const DRIVEN = {
	/** Temperatures of fixed nodes, °C. */
	temps: {
		outside: (drive) => drive.ambientC,
		sky: (drive) => drive.skyC,
		'exhaust gas': (drive) => drive.gasTempC
	},
	/** Conductances of links, W/K. */
	links: {
		'gas to exhaust': (drive) => drive.gasWPerK,
		'air from radiator to bay': (drive, { bay }) => bay.share * drive.airWPerK
	},
	/** Heats of sources, W. */
	sources: {
		'fuel heat in engine': (drive, { vehicle }) => vehicle.coolantShare * drive.fuelPowerW,
		'sun on bonnet': (drive, { bonnet }) => bonnet.absorptivity * bonnet.area * drive.sunWPerM2,
		'sun into enclosure': (drive, { enclosure }) => enclosure.solarArea * drive.sunWPerM2
	},
	/** What is added to mixed air, K. */
	mixes: {
		'local air': (drive, { position }) => (position.roadUplift * drive.sunWPerM2) / 1000
	}
} satisfies Record<string, Record<string, Reader>>;

/** One row a link: name, from, to, and conductance in W/K or exchange area in m². */
type Row = readonly [name: string, from: string, to: string, value: number];

const conduct = ([name, from, to, value]: Row): NetworkLink => ({
	kind: 'conductance',
	name,
	from,
	to,
	conductanceWPerK: value
});
const radiate = ([name, from, to, value]: Row): NetworkLink => ({
	kind: 'radiation',
	name,
	from,
	to,
	exchangeAreaM2: value
});
const flow = ([name, from, to, value]: Row): NetworkLink => ({
	kind: 'flow',
	name,
	from,
	to,
	conductanceWPerK: value
});

function describeNodes(scenario: Scenario, drive: Drive): NetworkNode[] {
	const { position, battery, shield } = scenario;
	const stored = (name: string, heatCapacityJPerK: number): NetworkNode => ({
		kind: 'stored',
		name,
		heatCapacityJPerK
	});
	const fixed = (name: string, tempC: number): NetworkNode => ({ kind: 'fixed', name, tempC });
	const { bayAirFraction, enclosureFraction, guardFraction } = position;
	return [
		stored('engine', scenario.engine.heatCapacity),
		stored('exhaust', scenario.exhaust.heatCapacity),
		stored('bay', scenario.bay.heatCapacity),
		stored('bonnet', scenario.bonnet.heatCapacity),
		stored('enclosure', scenario.enclosure.heatCapacity),
		...(shield ? [stored('shield', shield.heatCapacity)] : []),
		stored('tray', scenario.tray.heatCapacity),
		stored('case', battery.caseHeatCapacity),
		stored('cells', battery.cellHeatCapacity),
		stored('board', battery.boardHeatCapacity),
		fixed('outside', DRIVEN.temps.outside(drive)),
		fixed('sky', DRIVEN.temps.sky(drive)),
		fixed('exhaust gas', DRIVEN.temps['exhaust gas'](drive)),
		fixed('cooling', scenario.enclosure.coolSet),
		{
			kind: 'mixed',
			name: 'local air',
			offsetK: DRIVEN.mixes['local air'](drive, scenario),
			parts: [
				{ node: 'outside', weight: 1 - bayAirFraction - enclosureFraction },
				{ node: 'bay', weight: bayAirFraction },
				{ node: 'enclosure', weight: enclosureFraction }
			]
		},
		{
			kind: 'mixed',
			name: 'guard panel',
			offsetK: 0,
			parts: [
				{ node: 'outside', weight: 1 - guardFraction },
				{ node: 'bay', weight: guardFraction }
			]
		}
	];
}

function describeBay(scenario: Scenario, leg: Leg, constants: LegConstants, drive: Drive): NetworkLink[] {
	const { engine, exhaust, bay, bonnet, enclosure, position } = scenario;
	const { speedMPerS } = constants;
	const freeExhaustM2 = Math.max(exhaust.area - position.exhaustView, 0);
	return [
		...(
			[
				['engine to bay', 'engine', 'bay', constants.engineFilmWPerK],
				['engine to air beneath', 'engine', 'outside', constants.underWPerK],
				['exhaust to bay', 'exhaust', 'bay', constants.exhaustFilmWPerK],
				['bay to outside', 'outside', 'bay', leg.bonnetOpen ? bay.leakOpen : bay.leakClosed],
				['bonnet to bay', 'bonnet', 'bay', bonnet.inside * bonnet.area],
				[
					'bonnet to outside',
					'bonnet',
					'outside',
					(bonnet.outStill + bonnet.outPerSpeed * speedMPerS) * bonnet.area
				],
				[
					'enclosure to outside',
					'outside',
					'enclosure',
					enclosure.uaStill + enclosure.uaPerSpeed * speedMPerS
				]
			] as const
		).map(conduct),
		...(
			[
				['gas to exhaust', 'exhaust gas', 'exhaust', DRIVEN.links['gas to exhaust'](drive)],
				[
					'air from radiator to bay',
					'outside',
					'bay',
					DRIVEN.links['air from radiator to bay'](drive, scenario)
				]
			] as const
		).map(flow),
		...(
			[
				['exhaust radiation to bay', 'exhaust', 'bay', exhaust.emissivity * freeExhaustM2],
				['bonnet radiation to sky', 'bonnet', 'sky', bonnet.emissivity * bonnet.area]
			] as const
		).map(radiate),
		{
			kind: 'gate',
			name: 'radiator',
			from: 'engine',
			to: 'outside',
			conductanceWPerK: constants.radiatorWPerK,
			openC: engine.thermostatOpen,
			fullC: engine.thermostatFull,
			carryTo: 'bay',
			carryShare: bay.share
		},
		{
			kind: 'excess',
			name: 'enclosure cooling',
			from: 'enclosure',
			to: 'cooling',
			conductanceWPerK: leg.engineOn ? enclosure.coolGain : 0
		}
	];
}

function describeBattery(scenario: Scenario, leg: Leg, constants: LegConstants): NetworkLink[] {
	const { engine, exhaust, bonnet, position, shield, tray, battery } = scenario;
	const film = constants.caseFilmWPerM2K;
	const bareM2 = Math.max(battery.caseArea - (shield?.area ?? 0), 0);
	const seen = 1 - (shield?.coverage ?? 0);
	const topM2 = leg.bonnetOpen ? 0 : battery.topArea * position.bonnetView;
	return [
		...(
			[
				['local air to case', 'local air', 'case', film * bareM2],
				['local air to tray', 'local air', 'tray', tray.filmShare * film * tray.filmArea],
				['guard panel to tray', 'guard panel', 'tray', tray.guardConductance],
				['tray to case', 'tray', 'case', tray.caseConductance],
				['case to cells', 'case', 'cells', battery.caseCellConductance],
				['board to cells', 'board', 'cells', battery.boardCellConductance],
				['board to case', 'board', 'case', battery.boardCaseConductance]
			] as const
		).map(conduct),
		...(
			[
				['surroundings radiation to case', 'local air', 'case', battery.caseEmissivity * bareM2],
				[
					'exhaust radiation to case',
					'exhaust',
					'case',
					exhaust.emissivity * battery.caseEmissivity * position.exhaustView * seen
				],
				[
					'engine radiation to case',
					'engine',
					'case',
					engine.emissivity * battery.caseEmissivity * position.engineView * seen
				],
				['bonnet radiation to case', 'bonnet', 'case', bonnet.emissivity * battery.caseEmissivity * topM2]
			] as const
		).map(radiate)
	];
}

function describeShield(scenario: Scenario, constants: LegConstants): NetworkLink[] {
	const { engine, exhaust, position, shield, battery } = scenario;
	if (!shield) return [];
	const gapFactor = 1 / (1 / shield.emissivityIn + 1 / battery.caseEmissivity - 1);
	return [
		...(
			[
				['local air to shield', 'local air', 'shield', constants.caseFilmWPerM2K * shield.area],
				['shield to case', 'shield', 'case', shield.gap * shield.area]
			] as const
		).map(conduct),
		...(
			[
				[
					'exhaust radiation to shield',
					'exhaust',
					'shield',
					exhaust.emissivity * shield.emissivityOut * position.exhaustView * shield.coverage
				],
				[
					'engine radiation to shield',
					'engine',
					'shield',
					engine.emissivity * shield.emissivityOut * position.engineView * shield.coverage
				],
				['surroundings radiation to shield', 'local air', 'shield', shield.emissivityOut * shield.area],
				['shield radiation to case', 'shield', 'case', shield.area * gapFactor]
			] as const
		).map(radiate)
	];
}

function describeSources(scenario: Scenario, drive: Drive, currentA: number): NetworkSource[] {
	const { battery } = scenario;
	return [
		{
			kind: 'heat',
			name: 'fuel heat in engine',
			node: 'engine',
			heatW: DRIVEN.sources['fuel heat in engine'](drive, scenario)
		},
		{
			kind: 'heat',
			name: 'sun on bonnet',
			node: 'bonnet',
			heatW: DRIVEN.sources['sun on bonnet'](drive, scenario)
		},
		{
			kind: 'heat',
			name: 'sun into enclosure',
			node: 'enclosure',
			heatW: DRIVEN.sources['sun into enclosure'](drive, scenario)
		},
		{
			kind: 'joule',
			name: 'current in cells',
			node: 'cells',
			currentA,
			r25Ohm: battery.r25,
			activationK: battery.activationK
		},
		{
			kind: 'joule',
			name: 'current in board',
			node: 'board',
			currentA,
			r25Ohm: battery.boardR,
			activationK: 0
		}
	];
}

/**
 * The under-bonnet network of one leg at one instant: ten stored nodes (nine without a shield), the outside air, the
 * sky, the exhaust gas, the air around the battery and the guard panel, and what passes between them.
 *
 * @param scenario whole scenario
 * @param leg the leg that runs
 * @param constants what its speed sets, from findLegConstants
 * @param drive what the clock sets, from findDrive
 * @param currentA battery current, A
 * @returns the network, whose names the heat ledger shows
 */
export function describeVehicle(
	scenario: Scenario,
	leg: Leg,
	constants: LegConstants,
	drive: Drive,
	currentA: number
): NetworkDescription {
	return {
		nodes: describeNodes(scenario, drive),
		links: [
			...describeBay(scenario, leg, constants, drive),
			...describeBattery(scenario, leg, constants),
			...describeShield(scenario, constants)
		],
		sources: describeSources(scenario, drive, currentA)
	};
}
