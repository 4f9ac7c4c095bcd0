import { describe, expect, it } from 'vitest';
import type { HeatFields } from '../thermal/chemistries';
import { CHEMISTRY_WORDS, sayUsualLimits } from './batteries';
import { dayLimitsOf, isUseLimits, sayHeatLimits, sayUseLimit } from './heat-limits';
import { formatVerdict, sayVerdict } from './verdict';

const THIN_SPACE = /\u202F/g;
const plain = (text: string): string => text.replace(THIN_SPACE, ' ');

const LITHIUM: HeatFields = {
	...{ chemistry: 'lithium-iron-phosphate', sensor: 'hotter', cutDelayS: 0, autoReset: true },
	...{ chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75, dischargeResetC: 62 }
};
const GEL: HeatFields = {
	...{ chemistry: 'lead-acid-gel', sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null },
	...{ highestChargeC: 45, highestUseC: 55, ratedLifeYears: 8, compensatesCharge: true }
};

describe('the limits of a battery in words', () => {
	it('are those of its BMS where it has one', () => {
		expect(plain(sayUseLimit(LITHIUM))).toBe('goes dark at 75 °C');
		expect(plain(sayHeatLimits(LITHIUM))).toBe('goes dark at 75 °C, comes back at 62 °C');
	});

	it('are those of its maker where nothing switches it off', () => {
		expect(plain(sayUseLimit(GEL))).toBe('may be used up to 55 °C');
		expect(plain(sayHeatLimits(GEL))).toBe('may be used up to 55 °C, charged up to 45 °C');
	});

	it('are told apart by what they hold', () => {
		expect(dayLimitsOf(GEL)).toEqual({ highestUseC: 55, highestChargeC: 45 });
		expect(isUseLimits(dayLimitsOf(GEL))).toBe(true);
		expect(isUseLimits(dayLimitsOf(LITHIUM))).toBe(false);
	});

	it('that are usual are said of the kinds that are asked for them', () => {
		expect(plain(sayUsualLimits('lead-acid-flooded'))).toContain(
			'charged up to 50 °C, used up to 60 °C, 5 years'
		);
		expect(sayUsualLimits('lithium-titanate')).toBe('');
		expect(sayUsualLimits('')).toBe('');
	});
});

describe('the verdict in words', () => {
	it('says of a battery that nothing switches off that it gets too hot, and else the same', () => {
		const words = (chemistry: string) =>
			(['rides-it-out', 'runs-close', 'cuts-out'] as const).map((verdict) =>
				formatVerdict(verdict, chemistry)
			);
		expect(words('lithium-titanate')).toEqual(['Rides it out', 'Runs close', 'Cuts out']);
		expect(words('lead-acid-agm')).toEqual(['Rides it out', 'Runs close', 'Gets too hot']);
		expect(sayVerdict('cuts-out', 'lead-acid-flooded')).toBe('gets too hot');
	});

	it('is that of a battery with a BMS where nobody says which it is', () => {
		expect(formatVerdict('cuts-out')).toBe('Cuts out');
	});
});

it('every chemistry has a label', () => {
	expect(Object.keys(CHEMISTRY_WORDS)).toHaveLength(6);
	expect(CHEMISTRY_WORDS['lead-acid-agm']).toBe('Lead-acid, AGM');
});
