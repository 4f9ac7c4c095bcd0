import type { Scenario } from '../types';
import {
	ENCLOSURES,
	FLOOR_W_PER_M2K,
	GAP_AIR,
	PLATE_HEAT_J_PER_M2K,
	SHIELD_COVERAGE,
	SHIELD_EMISSIVITY
} from '../survey/judgement';
import { SCENARIO_FIELDS } from '../vehicle/scenario-fields';

/** Remedies of which only one can be had at a time; another place goes with another charge, and with nothing else. */
export type RemedyGroup = 'shield' | 'charge' | 'place';

/** Something that can be done about a mount that runs too hot. */
export interface Remedy {
	key: string;
	label: string;
	/** What the run takes it to do. */
	effect: string;
	group: RemedyGroup | null;
	/** The workshop's figures until it has its own: money in its own currency, hours of work. */
	cost: number;
	hours: number;
	/** Whether it can be done to this mount at all. */
	fits: (scenario: Scenario) => boolean;
	/** Changes a scenario that is the caller's own. */
	apply: (scenario: Scenario) => void;
}

const defaultOf = (group: string, key: string): number => {
	const field = SCENARIO_FIELDS.find((each) => each.group === group && each.key === key);
	return field?.kind === 'number' ? (field.default ?? 0) : 0;
};

const inBay = ({ position }: Scenario): boolean => position.bayAirFraction > 0.3;
const seesHeat = ({ position }: Scenario): boolean => position.exhaustView + position.engineView > 0.002;
const bare = (scenario: Scenario): boolean => scenario.shield === null && seesHeat(scenario);
const charges = ({ legs, charger }: Scenario): boolean =>
	legs.some(({ engineOn, loadA }) => engineOn && charger.maxA > loadA);

/** A shield before the sides that see exhaust and engine: the book's wrap, or a plate with air behind it. */
function addShield(scenario: Scenario, gap: number, heatPerM2K: number): void {
	const area = Math.min(defaultOf('shield', 'area'), scenario.battery.caseArea);
	const { bright } = SHIELD_EMISSIVITY;
	scenario.shield = {
		area,
		coverage: SHIELD_COVERAGE,
		emissivityOut: bright,
		emissivityIn: bright,
		gap,
		heatCapacity: heatPerM2K * area
	};
}

const WRAP_HEAT_J_PER_M2K = defaultOf('shield', 'heatCapacity') / defaultOf('shield', 'area');
const PLATE_GAP_M = 0.025;
/** 20 mm of ceramic fibre at 0.1 W/mK when hot (usual values, from memory). */
const BLANKET_GAP_W_PER_M2K = 0.1 / 0.02;
const BLANKET_HEAT_J_PER_M2K = 0.02 * 130 * 1000;
/** While the sun is high the charger rests. */
const REST_FROM_HOUR = 10;
const REST_TO_HOUR = 18;

function restCharger(scenario: Scenario): void {
	let hour = scenario.start.hour;
	for (const leg of scenario.legs) {
		const middle = (hour + leg.minutes / 120) % 24;
		if (leg.engineOn && middle > REST_FROM_HOUR && middle < REST_TO_HOUR) {
			leg.loadA = Math.max(leg.loadA, scenario.charger.maxA);
		}
		hour += leg.minutes / 60;
	}
}

function openBonnetAtStops({ legs }: Scenario): void {
	for (const leg of legs) if (!leg.engineOn) leg.bonnetOpen = true;
}

/** Of all faces of a usual battery, the one that it stands on. */
const BASE_SHARE = 0.21;
/** As the survey has a battery in the cargo area, with sun through the windows. */
function standInCargoArea(scenario: Scenario): void {
	const { solarArea, ...space } = ENCLOSURES['cargo-area'];
	const away = { bayAirFraction: 0, roadUplift: 0, airExposure: 0, guardFraction: 0 };
	const unseen = { exhaustView: 0, engineView: 0, bonnetView: 0 };
	scenario.position = { ...scenario.position, ...away, ...unseen, enclosureFraction: 1 };
	scenario.enclosure = {
		...scenario.enclosure,
		...space,
		coolGain: 0,
		solarArea: solarArea['through-windows']
	};
	scenario.tray.guardConductance = FLOOR_W_PER_M2K * BASE_SHARE * scenario.battery.caseArea;
	scenario.shield = null;
}

/** What can be done, each with what the run takes it to do: engineering judgement where nothing else is said. */
export const REMEDIES: readonly Remedy[] = [
	{
		key: 'wrap',
		label: 'Reflective wrap',
		effect: 'A bright wrap on the sides that see exhaust and engine.',
		group: 'shield',
		cost: 60,
		hours: 0.5,
		fits: bare,
		apply: (scenario) => addShield(scenario, defaultOf('shield', 'gap'), WRAP_HEAT_J_PER_M2K)
	},
	{
		key: 'plate',
		label: 'Stand-off plate',
		effect: 'A bright aluminium plate with 25 mm of air behind it.',
		group: 'shield',
		cost: 90,
		hours: 1.5,
		fits: bare,
		apply: (scenario) =>
			addShield(
				scenario,
				Math.max(GAP_AIR.conductivityWPerMK / PLATE_GAP_M, GAP_AIR.leastWPerM2K),
				PLATE_HEAT_J_PER_M2K
			)
	},
	{
		key: 'blanket',
		label: 'Fibre blanket',
		effect: 'A faced ceramic-fibre blanket of 20 mm.',
		group: 'shield',
		cost: 130,
		hours: 1,
		fits: bare,
		apply: (scenario) => addShield(scenario, BLANKET_GAP_W_PER_M2K, BLANKET_HEAT_J_PER_M2K)
	},
	{
		key: 'duct',
		label: 'Fresh-air duct',
		effect: 'Air from the grille reaches the battery: a third less bay air, twice the wind.',
		group: null,
		cost: 110,
		hours: 2,
		fits: inBay,
		apply: ({ position }) => {
			position.bayAirFraction *= 2 / 3;
			position.airExposure = Math.min(2 * position.airExposure, 1);
		}
	},
	{
		key: 'vent',
		label: 'Vented bonnet',
		effect: 'Louvres above the hot side: the standing bay leaks two and a half times as much.',
		group: null,
		cost: 280,
		hours: 4,
		fits: inBay,
		apply: ({ bay }) => {
			bay.leakClosed *= 2.5;
			bay.leakOpen = Math.max(bay.leakOpen, bay.leakClosed);
		}
	},
	{
		key: 'fan',
		label: 'Run-on fan',
		effect: 'A fan draws 0.03 m³/s out of the standing bay (35 W/K), on a timer.',
		group: null,
		cost: 190,
		hours: 2.5,
		fits: inBay,
		apply: ({ bay }) => {
			bay.leakClosed += 35;
			bay.leakOpen += 35;
		}
	},
	{
		key: 'lowerCurrent',
		label: 'Half the charge current',
		effect: 'The charger is set to half of what it gives.',
		group: 'charge',
		cost: 0,
		hours: 0.2,
		fits: charges,
		apply: ({ charger }) => (charger.maxA /= 2)
	},
	{
		key: 'chargeLater',
		label: 'Charge in the cool hours',
		effect: 'Between ten in the morning and six in the evening the charger carries the loads only.',
		group: 'charge',
		cost: 25,
		hours: 0.5,
		fits: charges,
		apply: restCharger
	},
	{
		key: 'bonnetUp',
		label: 'Bonnet up at each stop',
		effect: 'The bonnet stands open whenever the engine is off. Somebody has to do it, every time.',
		group: null,
		cost: 0,
		hours: 0,
		fits: (scenario) =>
			inBay(scenario) && scenario.legs.some(({ engineOn, bonnetOpen }) => !engineOn && !bonnetOpen),
		apply: openBonnetAtStops
	},
	{
		key: 'trayIsolation',
		label: 'Isolated tray',
		effect: 'Rubber between tray, guard and case: a fifth of the heat through the tray.',
		group: null,
		cost: 30,
		hours: 0.7,
		fits: ({ tray }) => tray.caseConductance > 0.1,
		apply: ({ tray }) => {
			tray.guardConductance /= 5;
			tray.caseConductance /= 5;
		}
	},
	{
		key: 'widerGap',
		label: 'More distance to hot parts',
		effect: 'The battery moves away until it sees half as much of exhaust and engine.',
		group: null,
		cost: 40,
		hours: 1.5,
		fits: seesHeat,
		apply: ({ position }) => {
			position.exhaustView /= 2;
			position.engineView /= 2;
		}
	},
	{
		key: 'cargoArea',
		label: 'Cargo area instead',
		effect:
			'The battery stands on the floor of the cargo area, sun through the windows, nothing hot in view. The cable grows longer and thicker, and a chemistry that gasses needs a vent to the outside.',
		group: 'place',
		cost: 220,
		hours: 5,
		fits: inBay,
		apply: standInCargoArea
	}
];
