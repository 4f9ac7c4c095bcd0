import type { Chemistry, Sourced } from './types';

const fromMemory = (value: number, source: string): Sourced => ({ value, standing: 'from memory', source });
const usual = (value: number, source: string): Sourced => ({ value, standing: 'common practice', source });

const MODEL_DEFAULT = 'default of the thermal model, section 7';
const NO_COMPENSATION = usual(
	0,
	'lithium chargers hold one voltage at every temperature that they charge at'
);

/** What every lithium battery of the 12 V class shares in this table. */
const LITHIUM = {
	family: 'lithium',
	hasBms: true,
	caseContactRatio: { value: 1, standing: 'engineering judgement', source: MODEL_DEFAULT },
	taperSoc: { value: 0.95, standing: 'engineering judgement', source: MODEL_DEFAULT },
	compensationMvPerKPerCell: NO_COMPENSATION,
	gassing: null
} as const satisfies Partial<Chemistry>;

export const LITHIUM_CHEMISTRIES: readonly Chemistry[] = [
	{
		...LITHIUM,
		key: 'lithium-iron-phosphate',
		label: 'Lithium iron phosphate',
		cells: usual(4, 'four cells of 3.2 V'),
		nominalV: {
			value: 12.8,
			standing: 'read in the source',
			source: 'three unbranded data sheets of 100 Ah packs'
		},
		packSpecificHeatJPerKgK: {
			value: 1100,
			standing: 'read in the source',
			source: 'cells measured at 1040 to 1106 J/kgK: Lin, Chu, Howey et al., arXiv 2112.09768'
		},
		activationK: { value: 1500, standing: 'engineering judgement', source: MODEL_DEFAULT },
		wear: { law: 'lithium-iron-phosphate' },
		chargeVPerCell: usual(3.6, '14.4 V for four cells'),
		highestChargeC: {
			value: 45,
			standing: 'read in the source',
			source: 'three unbranded data sheets: 45, 50 and 55 °C, the lowest of them'
		},
		highestUseC: {
			value: 60,
			standing: 'read in the source',
			source: 'three unbranded data sheets: 50, 55 and 60 °C, the highest of them'
		},
		cautions: ['failing-lithium']
	},
	{
		...LITHIUM,
		key: 'lithium-nickel-manganese-cobalt',
		label: 'Lithium nickel manganese cobalt',
		cells: usual(3, 'three cells of 3.7 V'),
		nominalV: usual(11.1, 'three cells of 3.7 V'),
		packSpecificHeatJPerKgK: {
			value: 1040,
			standing: 'read in the source',
			source: 'cells at 30 to 40 °C and half charge, on a battery design reference page'
		},
		activationK: fromMemory(2406, '20 kJ/mol, the low end of 20 to 30 kJ/mol for lithium cells'),
		wear: { law: 'none' },
		chargeVPerCell: usual(4.2, '12.6 V for three cells'),
		highestChargeC: usual(45, 'upper end of the standard charging range of cells'),
		highestUseC: usual(60, 'upper end of the discharging range of cells'),
		cautions: ['failing-lithium', 'fierce-fire']
	},
	{
		...LITHIUM,
		key: 'lithium-titanate',
		label: 'Lithium titanate',
		cells: usual(5, 'five cells of 2.4 V'),
		nominalV: usual(12, 'five cells of 2.4 V'),
		packSpecificHeatJPerKgK: fromMemory(1000, 'cells of this kind, within the 800 to 1130 J/kgK of others'),
		activationK: fromMemory(2406, '20 kJ/mol, the low end of 20 to 30 kJ/mol for lithium cells'),
		wear: { law: 'none' },
		chargeVPerCell: usual(2.8, '14.0 V for five cells'),
		highestChargeC: usual(55, 'data sheets of cells of this kind'),
		highestUseC: usual(60, 'data sheets of cells of this kind'),
		cautions: ['failing-lithium']
	}
];
