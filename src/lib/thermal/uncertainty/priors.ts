import { hasLatches } from '../chemistries/guard';
import type { Leg, Scenario } from '../types';

/** How an unknown spreads about what the scenario says: all with a standard normal number z. */
export type Spread =
	/** value · e^(σz): never changes its sign. */
	| { kind: 'factor'; sigma: number }
	/** value + σz. */
	| { kind: 'shift'; sigma: number }
	/** On the logit scale, so that a share stays between 0 and 1, and 0 and 1 stay what they are. */
	| { kind: 'share'; sigma: number };

/** One thing that is not known, and what it would take to know it better. */
export interface Prior {
	key: string;
	/** As it is said to people. */
	label: string;
	spread: Spread;
	/** Where the spread comes from. */
	basis: string;
	/** What to measure to make it smaller. */
	measure: string;
	/** Writes the changed value into a scenario of the drawer's own; `change` applies the spread to a value. */
	apply: (scenario: Scenario, change: (value: number) => number) => void;
}

const factor = (sigma: number): Spread => ({ kind: 'factor', sigma });
const shift = (sigma: number): Spread => ({ kind: 'shift', sigma });
const share = (sigma: number): Spread => ({ kind: 'share', sigma });

/** Lengthens the driving; the last leg that stands gives or takes the difference, so that the day ends when it did. */
function stretchDriving({ legs }: Scenario, by: number): void {
	let longer = 0;
	let rest: Leg | null = null;
	for (const leg of legs) {
		if (leg.engineOn) {
			longer += leg.minutes * (by - 1);
			leg.minutes *= by;
		} else rest = leg;
	}
	if (rest !== null) rest.minutes = Math.max(rest.minutes - longer, 1);
}

function changeLegs(scenario: Scenario, change: (leg: Leg) => void): void {
	for (const leg of scenario.legs) change(leg);
}

const JUDGEMENT = 'Engineering judgement, no source.';

/**
 * What is not known of a mount and its day. One standard deviation each; a factor's is of its logarithm.
 *
 * The spreads of the bay follow what little is published on bay air (driving 15 to 30 K, climbing 30 to 55 K above the
 * outside, remembered, not read); the others say what they rest on.
 */
export const PRIORS: readonly Prior[] = [
	{
		key: 'bayAir',
		label: 'how much of the air around the battery is bay air',
		spread: share(0.7),
		basis: JUDGEMENT,
		measure: 'Tape a thermometer beside the battery and one in the middle of the bay for one drive.',
		apply: ({ position }, change) => (position.bayAirFraction = change(position.bayAirFraction))
	},
	{
		key: 'airExposure',
		label: 'how much of the wind reaches the battery',
		spread: factor(0.5),
		basis: JUDGEMENT,
		measure: 'Hold a strip of paper at the place with the fan running; better, an anemometer.',
		apply: ({ position }, change) => (position.airExposure = Math.min(change(position.airExposure), 1))
	},
	{
		key: 'exhaustView',
		label: 'how much hot exhaust the battery sees',
		spread: factor(0.35),
		basis: 'The view-factor formula takes discs for what are pipes and boxes: engineering judgement.',
		measure: 'Measure the gap and the size of the hot patch again, at the nearest point.',
		apply: ({ position }, change) => (position.exhaustView = change(position.exhaustView))
	},
	{
		key: 'engineView',
		label: 'how much engine the battery sees',
		spread: factor(0.35),
		basis: 'As for the exhaust.',
		measure: 'Measure the gap to the engine again, at the nearest point.',
		apply: ({ position }, change) => (position.engineView = change(position.engineView))
	},
	{
		key: 'bonnetView',
		label: 'how much of the bonnet the battery sees',
		spread: share(0.5),
		basis: JUDGEMENT,
		measure: 'Look from above: how much of the top is free.',
		apply: ({ position }, change) => (position.bonnetView = change(position.bonnetView))
	},
	{
		key: 'tray',
		label: 'how well the tray carries heat',
		spread: factor(0.6),
		basis:
			'Contact conductances of bolted sheet differ by a factor of three (Incropera et al., 6th ed., Table 3.1).',
		measure: 'Thermometers on tray and case during one drive.',
		apply: ({ tray }, change) => {
			const by = change(1);
			tray.guardConductance *= by;
			tray.caseConductance *= by;
		}
	},
	{
		key: 'throughFlow',
		label: 'how much air goes through the bay',
		spread: factor(0.3),
		basis: JUDGEMENT,
		measure: 'A thermometer in the bay during one drive of an hour.',
		apply: ({ bay }, change) => {
			const by = change(1);
			bay.fanFlow *= by;
			bay.flowPerSpeed *= by;
			bay.maxFlow *= by;
		}
	},
	{
		key: 'leak',
		label: 'how fast the closed bay cools when it stands',
		spread: factor(0.4),
		basis: 'Bays lose half their heat in one to two hours (remembered, not read).',
		measure: 'A thermometer in the bay for two hours after a stop.',
		apply: ({ bay }, change) => (bay.leakClosed = change(bay.leakClosed))
	},
	{
		key: 'engineHeat',
		label: 'how much heat the engine holds',
		spread: factor(0.2),
		basis: 'Mass of iron, coolant and oil of engines of 2 to 4.5 litres, estimated.',
		measure: "The engine's own coolant gauge after a stop.",
		apply: ({ engine }, change) => (engine.heatCapacity = change(engine.heatCapacity))
	},
	{
		key: 'exhaustGas',
		label: 'how hot the exhaust gets',
		spread: factor(0.25),
		basis: JUDGEMENT,
		measure: 'A thermometer gun on the hot patch after ten minutes of driving.',
		apply: ({ exhaust }, change) => (exhaust.gasConductanceFull = change(exhaust.gasConductanceFull))
	},
	{
		key: 'fuel',
		label: 'how much fuel the engine burns',
		spread: factor(0.12),
		basis: 'Tyres, load and wind change consumption by about this much: common practice, no source.',
		measure: 'The fuel that one touring day takes.',
		apply: ({ vehicle }, change) => {
			const by = change(1);
			vehicle.dragAreaM2 *= by;
			vehicle.massKg *= by;
		}
	},
	{
		key: 'paint',
		label: 'how much sun the bonnet takes in',
		spread: share(0.5),
		basis: 'Solar absorptance: white 0.2–0.3, silver 0.4–0.5, dark 0.9–0.97 (remembered, not read).',
		measure: 'The colour of the bonnet.',
		apply: ({ bonnet }, change) => (bonnet.absorptivity = change(bonnet.absorptivity))
	},
	{
		key: 'caseFilm',
		label: 'how well the case gives heat to air',
		spread: factor(0.3),
		basis:
			'Correlations of natural and forced convection hold to about 25 % (Incropera et al., 6th ed., ch. 7 and 9).',
		measure: 'Thermometers on the case and beside it.',
		apply: ({ battery }, change) => {
			const by = change(1);
			battery.filmStill *= by;
			battery.filmPerSqrtSpeed *= by;
		}
	},
	{
		key: 'cellPath',
		label: 'how fast heat gets from the case into the cells',
		spread: factor(0.35),
		basis:
			'Through-plane conductivity 0.5 W/mK of a measured cell (Lin et al., arXiv 2112.09768), packing unknown.',
		measure: 'A cell thermometer that the BMS shows, for one drive.',
		apply: ({ battery }, change) => (battery.caseCellConductance = change(battery.caseCellConductance))
	},
	{
		key: 'cellHeat',
		label: 'how much heat the cells hold',
		spread: factor(0.1),
		basis:
			'Heat capacities of cells of one chemistry differ by about 10 % (830–1130 J/kgK between chemistries).',
		measure: 'The mass of the battery on a scale.',
		apply: ({ battery }, change) => (battery.cellHeatCapacity = change(battery.cellHeatCapacity))
	},
	{
		key: 'resistance',
		label: "the battery's inner resistance",
		spread: factor(0.3),
		basis: 'Data sheets give a highest value; packs of one size have 5 to 12 mΩ (remembered, not read).',
		measure: 'Voltage with and without a known load.',
		apply: ({ battery }, change) => (battery.r25 = change(battery.r25))
	},
	{
		key: 'shieldFinish',
		label: 'how bright the shield stays',
		spread: factor(0.6),
		basis: 'Aluminium: polished 0.04–0.06, heavily oxidised 0.20–0.33 (published emissivity tables).',
		measure: 'Look at it once a year; wipe it.',
		apply: ({ shield }, change) => {
			if (!shield) return;
			shield.emissivityOut = Math.min(change(shield.emissivityOut), 1);
			shield.emissivityIn = Math.min(change(shield.emissivityIn), 1);
		}
	},
	{
		key: 'sensor',
		label: 'how exactly the BMS measures and switches',
		spread: shift(1.5),
		basis: 'Thermistors and thresholds of such units: 1 to 2 K, engineering judgement.',
		measure: 'The BMS readout beside a thermometer in a warm room.',
		apply: ({ bms }, change) => {
			if (!hasLatches(bms)) return;
			const by = change(0);
			for (const limits of [bms.charge, bms.discharge]) {
				limits.cut += by;
				limits.reset += by;
			}
		}
	},
	{
		key: 'dayMax',
		label: 'how hot the day really gets',
		spread: shift(1.5),
		basis: 'The hottest days of a hot spell differ by about this much: engineering judgement.',
		measure: 'The forecast of the day before.',
		apply: ({ climate }, change) => (climate.tMax = change(climate.tMax))
	},
	{
		key: 'dayRange',
		label: 'how far the night cools down',
		spread: factor(0.15),
		basis: 'Daily ranges inland 13 to 17 K (remembered, not read).',
		measure: 'The forecast of the day before.',
		apply: ({ climate }, change) => (climate.dailyRange = change(climate.dailyRange))
	},
	{
		key: 'driveLength',
		label: 'how long the driving takes',
		spread: factor(0.12),
		basis: JUDGEMENT,
		measure: 'The day plan, leg by leg.',
		apply: (scenario, change) => {
			stretchDriving(scenario, change(1));
		}
	},
	{
		key: 'loads',
		label: 'how much the accessories draw',
		spread: factor(0.2),
		basis: JUDGEMENT,
		measure: 'A clamp meter on the cable to the accessories.',
		apply: (scenario, change) => {
			const by = change(1);
			changeLegs(scenario, (leg) => (leg.loadA *= by));
		}
	},
	{
		key: 'startCharge',
		label: 'how full the battery is in the morning',
		spread: share(0.6),
		basis: JUDGEMENT,
		measure: 'The battery monitor in the morning.',
		apply: ({ start }, change) => (start.soc = change(start.soc))
	}
];
