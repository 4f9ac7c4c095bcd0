import { describe, expect, it } from 'vitest';
import { SCENARIO_FIELDS } from '../vehicle/scenario-fields';
import {
	CHEMISTRIES,
	CHEMISTRY_CAUTIONS,
	CHEMISTRY_KEYS,
	chargeVoltageV,
	chemistryOf,
	findChemistry,
	findGasNeeds,
	guardOf,
	heatFieldsOf,
	heatLimitsOf,
	wearOf,
	type ChemistryKey,
	type HeatFields,
	type Sourced
} from './index';

const LEAD_ACID = CHEMISTRIES.filter(({ family }) => family === 'lead-acid');
const LITHIUM = CHEMISTRIES.filter(({ family }) => family === 'lithium');

const isSourced = (value: unknown): value is Sourced =>
	typeof value === 'object' && value !== null && 'standing' in value;

/** Every number of a row, those of its wear too. */
function listSourced(value: unknown): Sourced[] {
	if (isSourced(value)) return [value];
	if (typeof value !== 'object' || value === null) return [];
	return Object.values(value).flatMap(listSourced);
}

const EMPTY: Omit<HeatFields, 'chemistry'> = {
	...{ sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null }
};
const LIMITS = { highestChargeC: 48, highestUseC: 58, ratedLifeYears: 7, compensatesCharge: false };
const CUTS: Omit<HeatFields, 'chemistry'> = {
	...{ sensor: 'board', cutDelayS: 3, autoReset: false },
	...{ chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75, dischargeResetC: 62 }
};

describe('the table of chemistries', () => {
	it('has one row for each key, under a label of its own', () => {
		expect(CHEMISTRIES.map(({ key }) => key)).toEqual([...CHEMISTRY_KEYS]);
		expect(new Set(CHEMISTRIES.map(({ label }) => label)).size).toBe(CHEMISTRY_KEYS.length);
	});

	it.each(CHEMISTRIES)('says of every number of $label where it comes from', (row) => {
		const numbers = listSourced(row);
		expect(numbers.length).toBeGreaterThanOrEqual(10);
		for (const { value, source } of numbers) {
			expect(Number.isFinite(value)).toBe(true);
			expect(source.length).toBeGreaterThan(10);
		}
	});

	it('keeps the thermal model’s own numbers for lithium iron phosphate', () => {
		const own = chemistryOf('lithium-iron-phosphate');
		const byDefault = (group: string, key: string) =>
			SCENARIO_FIELDS.find((field) => field.group === group && field.key === key)?.default;
		expect(own.activationK.value).toBe(byDefault('battery', 'activationK'));
		expect(own.taperSoc.value).toBe(byDefault('charger', 'taperSoc'));
		expect(own.caseContactRatio.value).toBe(1);
	});

	it.each(CHEMISTRIES)('makes $label up of cells whose voltages fit the battery', (row) => {
		const { cells, nominalV, chargeVPerCell } = row;
		expect(Number.isInteger(cells.value)).toBe(true);
		expect(nominalV.value).toBeGreaterThan(10);
		expect(nominalV.value).toBeLessThan(15);
		// A battery is charged above its nominal voltage, by less than a quarter.
		const ratio = (cells.value * chargeVPerCell.value) / nominalV.value;
		expect(ratio).toBeGreaterThan(1);
		expect(ratio).toBeLessThan(1.25);
	});

	it.each(CHEMISTRIES)('never lets $label be charged hotter than it may be used', (row) => {
		expect(row.highestChargeC.value).toBeLessThanOrEqual(row.highestUseC.value);
	});

	it('gives no lead-acid battery a BMS, and each of them gas, a falling voltage and a life in years', () => {
		expect(LEAD_ACID.map(({ hasBms }) => hasBms)).toEqual([false, false, false]);
		for (const { gassing, compensationMvPerKPerCell, wear } of LEAD_ACID) {
			expect(gassing).not.toBeNull();
			expect(compensationMvPerKPerCell.value).toBeLessThan(0);
			expect(wear.law).toBe('lead-acid');
		}
	});

	it('gives every lithium battery a BMS, no gas in normal use and one voltage', () => {
		expect(LITHIUM.map(({ hasBms }) => hasBms)).toEqual([true, true, true]);
		for (const { gassing, compensationMvPerKPerCell } of LITHIUM) {
			expect(gassing).toBeNull();
			expect(compensationMvPerKPerCell.value).toBe(0);
		}
	});

	it('uses every caution that it names', () => {
		const used = new Set(CHEMISTRIES.flatMap(({ cautions }) => cautions));
		expect([...CHEMISTRY_CAUTIONS].filter((caution) => !used.has(caution))).toEqual([]);
	});

	it('knows no other name', () => {
		expect(findChemistry('zinc-air')).toBeNull();
		expect(() => chemistryOf('zinc-air' as ChemistryKey)).toThrow('There is no chemistry "zinc-air"');
	});
});

describe('the charging voltage', () => {
	it.each(LEAD_ACID)('of $label at 25 °C is that of its cells', ({ key, chargeVPerCell }) => {
		expect(chargeVoltageV(key, 25)).toBeCloseTo(6 * chargeVPerCell.value, 12);
	});

	it('falls by the same for each kelvin, above and below', () => {
		expect(chargeVoltageV('lead-acid-flooded', 45)).toBeCloseTo(14.4 - 20 * 0.03, 12);
		expect(chargeVoltageV('lead-acid-flooded', 5)).toBeCloseTo(14.4 + 20 * 0.03, 12);
	});

	it('of lithium is the same at every temperature', () => {
		expect(chargeVoltageV('lithium-iron-phosphate', 60)).toBe(chargeVoltageV('lithium-iron-phosphate', 0));
	});

	it('refuses what is no temperature', () => {
		expect(() => chargeVoltageV('lead-acid-agm', NaN)).toThrow('tempC is NaN');
		expect(() => chargeVoltageV('lead-acid-agm', -41)).toThrow('tempC is -41');
	});
});

describe('the gas of a battery', () => {
	it('of a flooded one asks for two and a half times the air of a valve-regulated one', () => {
		const [agm, flooded] = [findGasNeeds('lead-acid-agm', 90), findGasNeeds('lead-acid-flooded', 90)];
		expect(flooded!.freshAirM3PerH / agm!.freshAirM3PerH).toBeCloseTo(20 / 8, 12);
		expect(flooded!.sparkFreeMm).toBeGreaterThan(agm!.sparkFreeMm);
	});

	it('grows with the capacity, and is nothing to speak of for lithium', () => {
		const [small, large] = [findGasNeeds('lead-acid-gel', 60), findGasNeeds('lead-acid-gel', 120)];
		expect(large!.openingCm2).toBeCloseTo(2 * small!.openingCm2, 12);
		expect(findGasNeeds('lithium-titanate', 100)).toBeNull();
	});

	it('refuses a battery without capacity', () => {
		expect(() => findGasNeeds('lead-acid-agm', 0)).toThrow('capacityAh is 0');
	});
});

describe('what guards a battery from heat', () => {
	it('is its cut-offs where it has a BMS', () => {
		const guard = guardOf({ chemistry: 'lithium-titanate', ...CUTS });
		expect(guard).toEqual({ kind: 'cut-offs', ...CUTS });
		expect(heatLimitsOf({ chemistry: 'lithium-titanate', ...CUTS })).toBeNull();
	});

	it('is the limits of its maker where it has none, whatever else stands in the record', () => {
		const guard = guardOf({ chemistry: 'lead-acid-gel', ...CUTS, ...LIMITS });
		expect(guard).toEqual({ kind: 'heat-limits', chemistry: 'lead-acid-gel', ...LIMITS });
	});

	it('says what a record lacks', () => {
		const half = { ...EMPTY, highestChargeC: 50, ratedLifeYears: 5 };
		expect(() => guardOf({ chemistry: 'lead-acid-agm', ...half })).toThrow(
			'has no highestUseC, compensatesCharge'
		);
		expect(() => guardOf({ chemistry: 'lithium-iron-phosphate', ...EMPTY })).toThrow('has no sensor');
	});

	it('asks each kind for its own fields alone', () => {
		expect(heatFieldsOf('lead-acid-flooded')).toEqual(Object.keys(LIMITS));
		expect(heatFieldsOf('lithium-iron-phosphate')).toContain('dischargeCutC');
		expect(heatFieldsOf('lithium-iron-phosphate')).not.toContain('highestUseC');
	});
});

describe('how a battery wears', () => {
	it('by the law of its chemistry', () => {
		const law = (chemistry: ChemistryKey) => wearOf({ chemistry, capacityAh: 100 }).law;
		expect(CHEMISTRY_KEYS.map(law)).toEqual([
			...['lithium-iron-phosphate', 'none', 'none'],
			...['lead-acid', 'lead-acid', 'lead-acid']
		]);
	});

	it('takes the rated life of its maker before the usual one', () => {
		const battery = { chemistry: 'lead-acid-flooded', capacityAh: 80 } as const;
		expect(wearOf({ ...battery, ratedLifeYears: 9 })).toEqual({
			...{ law: 'lead-acid', ratedLifeYears: 9, ratedLifeAh: 16_000 }
		});
		expect(wearOf({ ...battery, ratedLifeYears: null })).toMatchObject({ ratedLifeYears: 5 });
	});
});
