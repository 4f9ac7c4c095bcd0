import type { Chemistry, Sourced } from './types';

const fromMemory = (value: number, source: string): Sourced => ({ value, standing: 'from memory', source });
const usual = (value: number, source: string): Sourced => ({ value, standing: 'common practice', source });
const judged = (value: number, source: string): Sourced => ({
	value,
	standing: 'engineering judgement',
	source
});

/** What every lead-acid battery of the 12 V class shares in this table. */
const LEAD_ACID = {
	family: 'lead-acid',
	hasBms: false,
	cells: usual(6, 'six cells of 2.0 V'),
	nominalV: usual(12, 'six cells of 2.0 V'),
	activationK: fromMemory(1000, 'acid conducts about 1.2 % better with each kelvin near 25 °C'),
	taperSoc: usual(0.8, 'the charger reaches its voltage at about four fifths; from there the current falls'),
	highestChargeC: usual(50, 'makers’ guides; some allow less'),
	highestUseC: {
		value: 60,
		standing: 'read in the source',
		source: 'a review quoted on a secondary page: the inside should not stay above 60 °C'
	}
} as const satisfies Partial<Chemistry>;

const VALVE_REGULATED_HEAT: Sourced = fromMemory(
	780,
	'middle of 660 to 900 J/kgK for valve-regulated batteries: Pesaran and Keyser, 2001'
);

export const LEAD_ACID_CHEMISTRIES: readonly Chemistry[] = [
	{
		...LEAD_ACID,
		key: 'lead-acid-agm',
		label: 'Lead-acid, AGM',
		packSpecificHeatJPerKgK: VALVE_REGULATED_HEAT,
		caseContactRatio: judged(2, 'the pressed stack of plates and mat touches the walls'),
		wear: {
			law: 'lead-acid',
			usualLifeYears: usual(6, 'makers give 5 to 8 years at 25 °C'),
			lifeAhPerAh: usual(250, 'about 500 cycles to half charge')
		},
		chargeVPerCell: usual(2.4, '14.4 V for six cells, and the boost voltage of EN 50272-2'),
		compensationMvPerKPerCell: usual(-4, 'makers give −3 to −5 mV/K a cell'),
		gassing: 'valve-regulated lead-acid',
		cautions: ['vent-valve-regulated', 'hot-charge']
	},
	{
		...LEAD_ACID,
		key: 'lead-acid-gel',
		label: 'Lead-acid, gel',
		packSpecificHeatJPerKgK: VALVE_REGULATED_HEAT,
		caseContactRatio: judged(3, 'the gel fills the cell up to the walls'),
		wear: {
			law: 'lead-acid',
			usualLifeYears: usual(8, 'makers give 6 to 12 years at 25 °C'),
			lifeAhPerAh: usual(300, 'about 600 cycles to half charge')
		},
		chargeVPerCell: usual(2.35, '14.1 V for six cells'),
		compensationMvPerKPerCell: usual(-5, 'makers give −4 to −5 mV/K a cell'),
		gassing: 'valve-regulated lead-acid',
		cautions: ['vent-valve-regulated', 'hot-charge']
	},
	{
		...LEAD_ACID,
		key: 'lead-acid-flooded',
		label: 'Lead-acid, flooded',
		packSpecificHeatJPerKgK: fromMemory(
			1000,
			'lead 65 % at 150, acid 28 % at 2900, plastic 7 % at 1900 J/kgK come to 1040, rounded down'
		),
		caseContactRatio: judged(4, 'the acid wets the walls and turns over as it warms'),
		wear: {
			law: 'lead-acid',
			usualLifeYears: usual(5, 'makers give 3 to 7 years at 25 °C'),
			lifeAhPerAh: usual(200, 'about 400 cycles to half charge')
		},
		chargeVPerCell: usual(2.4, '14.4 V for six cells, and the boost voltage of EN 50272-2'),
		compensationMvPerKPerCell: usual(-5, 'makers give −4 to −5.5 mV/K a cell'),
		gassing: 'vented lead-acid',
		cautions: ['vent-flooded', 'hot-charge', 'acid']
	}
];
