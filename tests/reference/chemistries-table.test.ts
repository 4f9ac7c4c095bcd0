import { describe } from 'vitest';
import { leadAcidBand } from '../../src/lib/thermal/ageing';
import { chemistryOf, findGasNeeds, wearOf, type ChemistryKey } from '../../src/lib/thermal/chemistries';
import { checkAgainst, type PublishedValue } from './support/check-against';

const GAS_CONSTANT_J_PER_MOL_K = 8.314;

type Check = Pick<PublishedValue, 'name' | 'expected' | 'tolerance' | 'because'>;

describe('heat capacities of batteries against published values', () => {
	const read = { standing: 'read in the source', unit: 'J/kgK' } as const;
	checkAgainst(
		{
			...read,
			name: 'specific heat of a lithium iron phosphate pack',
			source: 'Lin, Chu, Howey et al., arXiv 2112.09768 (2021)',
			place: '20 Ah pouch cell, full',
			expected: 1106,
			tolerance: { relative: 0.06 },
			because: 'the same cell half charged has 6 % less, and a pack is not cells alone'
		},
		() => chemistryOf('lithium-iron-phosphate').packSpecificHeatJPerKgK.value
	);
	checkAgainst(
		{
			...read,
			name: 'specific heat of a lithium nickel manganese cobalt pack',
			source: 'a battery design reference page',
			place: 'cells at 30 to 40 °C, half charged',
			expected: 1040,
			tolerance: { absolute: 1 },
			because: 'the value is taken as it stands'
		},
		() => chemistryOf('lithium-nickel-manganese-cobalt').packSpecificHeatJPerKgK.value
	);
	for (const key of ['lead-acid-agm', 'lead-acid-gel'] as const) {
		checkAgainst(
			{
				name: `specific heat of a valve-regulated battery, ${key}`,
				source: 'Pesaran and Keyser (2001)',
				place: 'valve-regulated batteries, 660 to 900 J/kgK',
				standing: 'from memory',
				unit: 'J/kgK',
				expected: 780,
				tolerance: { absolute: 120 },
				because: 'a range was given, and this is its half width'
			},
			() => chemistryOf(key).packSpecificHeatJPerKgK.value
		);
	}
});

describe('resistance of lithium cells against published values', () => {
	for (const key of ['lithium-nickel-manganese-cobalt', 'lithium-titanate'] as const) {
		checkAgainst(
			{
				name: `activation energy of the resistance, ${key}`,
				source: 'lithium cells in general',
				place: '20 to 30 kJ/mol',
				standing: 'from memory',
				unit: 'kJ/mol',
				expected: 25,
				tolerance: { absolute: 5 },
				because: 'a range was given, and this is its half width'
			},
			() => (chemistryOf(key).activationK.value * GAS_CONSTANT_J_PER_MOL_K) / 1000
		);
	}
});

describe('limits of heat against published values', () => {
	const limit = {
		standing: 'read in the source',
		unit: '°C',
		because: 'a limit is taken as it stands'
	} as const;
	for (const key of ['lithium-iron-phosphate', 'lithium-nickel-manganese-cobalt'] as const) {
		checkAgainst(
			{
				...limit,
				name: `highest temperature of full charging, ${key}`,
				source: 'JEITA and BAJ scheme of 2007, in a semiconductor maker’s note',
				place: 'full charge from 10 to 45 °C',
				expected: 45,
				tolerance: { absolute: 0 }
			},
			() => chemistryOf(key).highestChargeC.value
		);
	}
	checkAgainst(
		{
			...limit,
			name: 'highest temperature inside a lead-acid battery',
			source: 'a review quoted on a secondary page',
			place: 'should not stay above 60 °C',
			expected: 60,
			tolerance: { absolute: 0 }
		},
		() => chemistryOf('lead-acid-agm').highestUseC.value
	);
});

describe('fresh air for whole batteries against published values', () => {
	const standard = {
		source: 'EN 50272-2:2001 / IEC 62485-2:2010',
		standing: 'worked from the published equation'
	} as const;
	const BOOST: [ChemistryKey, number, number, number][] = [
		['lead-acid-agm', 100, 0.24, 6.72],
		['lead-acid-flooded', 100, 0.6, 16.8],
		['lead-acid-agm', 120, 0.288, 8.06],
		['lead-acid-flooded', 120, 0.72, 20.16]
	];
	for (const [key, capacityAh, airM3PerH, openingCm2] of BOOST) {
		const battery = `${key} of ${capacityAh} Ah on boost charge`;
		const rounding: Pick<Check, 'because'> = { because: 'half of the last digit given' };
		checkAgainst(
			{
				...{ ...standard, ...rounding, place: 'ventilation', unit: 'm³/h' },
				...{ name: `fresh air for ${battery}`, expected: airM3PerH, tolerance: { absolute: 5e-4 } }
			},
			() => findGasNeeds(key, capacityAh)!.freshAirM3PerH
		);
		checkAgainst(
			{
				...{ ...standard, ...rounding, place: 'natural ventilation', unit: 'cm²' },
				...{ name: `openings for ${battery}`, expected: openingCm2, tolerance: { absolute: 6e-3 } }
			},
			() => findGasNeeds(key, capacityAh)!.openingCm2
		);
	}
});

describe('life of lead-acid in the warm against published values', () => {
	/** Years of a battery of ten that stands at one temperature and is never used. */
	function lifeYears(tempC: number, custom: 'low' | 'high'): number {
		const wear = wearOf({ chemistry: 'lead-acid-agm', capacityAh: 100, ratedLifeYears: 10 });
		if (wear.law !== 'lead-acid') throw new Error('AGM wears by another law.');
		const year = [{ tempC, hours: 8766 }];
		return leadAcidBand({ ...wear, year, takenOutAhPerYear: 0 }, 1).lifeYears[custom];
	}
	const CUSTOMS: [number, 'low' | 'high', number][] = [
		[33.3, 'low', 5.01],
		[41.6, 'low', 2.51],
		[35, 'high', 5],
		[45, 'high', 2.5]
	];
	for (const [tempC, custom, years] of CUSTOMS) {
		checkAgainst(
			{
				name: `life of a battery of ten years at ${tempC} °C, ${custom === 'low' ? '8.3' : '10'} K halve it`,
				source: 'IEEE 450 and IEEE 1188 practice, makers’ guides',
				place: 'halving of life above 25 °C',
				standing: 'worked from the published equation',
				unit: 'a',
				expected: years,
				tolerance: { relative: 3e-3 },
				because: 'factors given to three digits, and 8.3 for 25/3'
			},
			() => lifeYears(tempC, custom)
		);
	}
});
