import { describe, expect, it } from 'vitest';
import {
	arrheniusFactor,
	leadAcidLifeFactor,
	leadAcidRemaining,
	leadAcidWearPerYear,
	LEAD_ACID_HALVING_K,
	meanAgeingTempC,
	naumannCalendarLoss,
	naumannCycleLoss,
	naumannResistanceGain,
	SECONDS_PER_YEAR,
	swierczynskiCalendarLoss,
	wangCapacityLoss,
	wangCellAh,
	wangFactor,
	wangThroughputAh
} from '../../src/lib/thermal/ageing';
import { checkAgainst, type PublishedValue } from './support/check-against';

const percent = (share: number) => 100 * share;
const LAST_DIGIT = 'half a unit of the last digit given';

function lastDigit(decimals: number): Pick<PublishedValue, 'tolerance' | 'because'> {
	return { tolerance: { absolute: 0.501 * 10 ** -decimals }, because: LAST_DIGIT };
}

describe("Wang's cycle law", () => {
	const from = { source: 'Wang et al., J. Power Sources 196 (2011) 3942', unit: '' };
	const FACTORS: [number, number][] = [
		[0.5, 31630],
		[2, 21681],
		[6, 12934],
		[10, 15512]
	];
	for (const [cRate, expected] of FACTORS) {
		const standing = cRate === 0.5 ? 'read in the source' : 'worked from the published equation';
		const place = 'factor B, through a public implementation that prints its cubic';
		checkAgainst(
			{ ...from, name: `factor B at ${cRate} C`, place, standing, expected, ...lastDigit(0) },
			() => wangFactor(cRate)
		);
	}

	const LOSSES: [number, number, number, number][] = [
		[25, 100, 1.198, 3],
		[25, 1000, 4.252, 3],
		[25, 5000, 10.305, 3],
		[45, 100, 2.665, 3],
		[45, 1000, 9.456, 3],
		[45, 5000, 22.917, 3],
		[60, 100, 4.557, 3],
		[60, 1000, 16.17, 3],
		[60, 5000, 39.186, 3]
	];
	for (const [tempC, cellAh, expected, decimals] of LOSSES) {
		checkAgainst(
			{
				...from,
				name: `loss at C/2, ${tempC} °C, ${cellAh} Ah`,
				place: 'equation for C/2',
				standing: 'worked from the published equation',
				expected,
				unit: '%',
				...lastDigit(decimals)
			},
			() => percent(wangCapacityLoss(tempC, 0.5, cellAh))
		);
	}

	const LIVES: [number, number][] = [
		[25, 16693],
		[45, 3904],
		[60, 1472]
	];
	for (const [tempC, expected] of LIVES) {
		checkAgainst(
			{
				...from,
				name: `charge to a loss of 20 % at C/2 and ${tempC} °C`,
				place: 'equation for C/2, solved for the charge',
				standing: 'worked from the published equation',
				expected,
				unit: 'Ah',
				...lastDigit(0)
			},
			() => wangThroughputAh(tempC, 0.5, 0.2)
		);
	}

	it('gives back the charge that made a loss', () => {
		expect(wangThroughputAh(33, 1.5, wangCapacityLoss(33, 1.5, 700))).toBeCloseTo(700, 8);
	});

	it('holds the least tested rate below it, and lies between neighbours above', () => {
		expect(wangCapacityLoss(30, 0.05, 100)).toBe(wangCapacityLoss(30, 0.5, 100));
		expect(wangFactor(1)).toBeCloseTo(31630 - 9949 / 3, 9);
		expect(wangFactor(4)).toBeCloseTo((21681 + 12934) / 2, 9);
	});

	it('scales the charge of a pack to that of one cell', () => {
		expect(wangCellAh(13_000, 130)).toBeCloseTo(200, 12);
		expect(() => wangCellAh(1, 0)).toThrow('capacityAh is 0');
	});

	it('is refused where it was not tested', () => {
		expect(() => wangCapacityLoss(61, 0.5, 1)).toThrow(
			'tempC is 61: it must be within 0 to 60, where the model was tested.'
		);
		expect(() => wangCapacityLoss(25, 11, 1)).toThrow('cRate is 11');
		expect(() => wangCapacityLoss(25, 1, -1)).toThrow('cellAh is -1');
		expect(() => wangThroughputAh(-1, 1, 0.2)).toThrow('tempC is -1');
	});
});

describe("Naumann's laws", () => {
	const calendar = {
		source: 'Naumann et al., J. Energy Storage 17 (2018) 153',
		standing: 'worked from the published equation' as const,
		unit: '%'
	};
	const NAUMANN = {
		tolerance: { relative: 3e-4 },
		because:
			'the last digit, and a gas constant that was rounded to 8.314 for one law and 8.3144 for the other'
	};
	const CAPACITY: [number, number, number][] = [
		[25, 0.5, 4.253],
		[35, 0.5, 5.322],
		[45, 0.5, 6.566],
		[60, 0.5, 8.789],
		[25, 1, 6.775],
		[35, 1, 8.478],
		[45, 1, 10.461],
		[60, 1, 14.001],
		[25, 0.3, 4.092],
		[35, 0.3, 5.12],
		[45, 0.3, 6.317],
		[60, 0.3, 8.455]
	];
	for (const [tempC, soc, expected] of CAPACITY) {
		const name = `capacity lost in a year at ${tempC} °C and ${percent(soc)} % (Naumann)`;
		checkAgainst({ ...calendar, name, place: 'calendar law of the capacity', expected, ...NAUMANN }, () =>
			percent(naumannCalendarLoss(tempC, soc, SECONDS_PER_YEAR))
		);
	}
	const RESISTANCE: [number, number][] = [
		[25, 1.684],
		[45, 10.407],
		[60, 35.343]
	];
	for (const [tempC, expected] of RESISTANCE) {
		const name = `resistance gained in a year at ${tempC} °C and half charge`;
		checkAgainst({ ...calendar, name, place: 'calendar law of the resistance', expected, ...NAUMANN }, () =>
			percent(naumannResistanceGain(tempC, 0.5, SECONDS_PER_YEAR))
		);
	}

	const CYCLES: [number, number, number, number][] = [
		[1, 1, 1000, 6.8344],
		[0.5, 0.6, 100, 1.4047],
		[0.2, 0.2, 400, 1.8313]
	];
	for (const [cRate, depth, cycles, expected] of CYCLES) {
		checkAgainst(
			{
				name: `capacity lost in ${cycles} cycles at ${cRate} C and a depth of ${depth}`,
				source: 'Naumann et al., J. Power Sources 451 (2020) 227666',
				place: 'cycle law of the capacity; its 0.6 from memory',
				standing: 'from memory',
				expected,
				unit: '%',
				...lastDigit(4)
			},
			() => percent(naumannCycleLoss(cRate, depth, cycles))
		);
	}

	it('lose with the root of time and cycles, and gain resistance with time', () => {
		expect(naumannCalendarLoss(40, 0.7, 4e7) / naumannCalendarLoss(40, 0.7, 1e7)).toBeCloseTo(2, 12);
		expect(naumannCycleLoss(1, 0.5, 900) / naumannCycleLoss(1, 0.5, 100)).toBeCloseTo(3, 12);
		expect(naumannResistanceGain(40, 0.7, 3e7) / naumannResistanceGain(40, 0.7, 1e7)).toBeCloseTo(3, 12);
	});

	it('are refused where they were not tested', () => {
		expect(() => naumannCalendarLoss(65, 0.5, 1)).toThrow('tempC is 65');
		expect(() => naumannCalendarLoss(25, 1.1, 1)).toThrow('soc is 1.1');
		expect(() => naumannCalendarLoss(25, 0.5, -1)).toThrow('seconds is -1');
		expect(() => naumannResistanceGain(NaN, 0.5, 1)).toThrow('tempC is NaN');
		expect(() => naumannCycleLoss(0.1, 0.5, 1)).toThrow('cRate is 0.1');
		expect(() => naumannCycleLoss(1, 1.5, 1)).toThrow('depthOfDischarge is 1.5');
	});
});

describe("Swierczynski's calendar law", () => {
	const from = {
		source: 'Swierczynski et al., IEEE Trans. Ind. Appl. 51 (2015) 3453',
		place: 'calendar law',
		standing: 'worked from the published equation' as const,
		unit: '%'
	};
	const LOSSES: [number, number, number, number][] = [
		[25, 12, 2.448, 3],
		[40, 12, 5.482, 3],
		[47.5, 12, 10.148, 3],
		[55, 12, 19.019, 3],
		[25, 166, 20.03, 2]
	];
	for (const [tempC, months, expected, decimals] of LOSSES) {
		const name = `capacity lost in ${months} months at ${tempC} °C and half charge (Swierczynski)`;
		checkAgainst({ ...from, name, expected, ...lastDigit(decimals) }, () =>
			percent(swierczynskiCalendarLoss(tempC, 0.5, months))
		);
	}

	it('is steeper in the heat than the other', () => {
		const both = (tempC: number) =>
			swierczynskiCalendarLoss(tempC, 0.5, 12) / naumannCalendarLoss(tempC, 0.5, SECONDS_PER_YEAR);
		expect(both(25)).toBeLessThan(1);
		expect(both(55)).toBeGreaterThan(2);
	});

	it('is refused where it was not tested', () => {
		expect(() => swierczynskiCalendarLoss(24, 0.5, 1)).toThrow('tempC is 24');
		expect(() => swierczynskiCalendarLoss(30, 0.95, 1)).toThrow('soc is 0.95');
	});
});

describe('lead-acid batteries in the warm', () => {
	const FACTORS: [number, number, number][] = [
		[33.3, 0.501, 0.563],
		[35, 0.435, 0.5],
		[41.6, 0.251, 0.316],
		[45, 0.189, 0.25],
		[50, 0.125, 0.177]
	];
	for (const [tempC, short, long] of FACTORS) {
		const from = { standing: 'worked from the published equation' as const, unit: '', ...lastDigit(3) };
		checkAgainst(
			{
				...from,
				name: `life at ${tempC} °C when 15 °F halve it`,
				source: 'IEEE 450 and 1188 practice',
				place: 'halving per 8.3 K above 25 °C',
				expected: short
			},
			() => leadAcidLifeFactor(tempC, LEAD_ACID_HALVING_K.short)
		);
		checkAgainst(
			{
				...from,
				name: `life at ${tempC} °C when 10 K halve it`,
				source: "battery makers' guides in Europe",
				place: 'halving per 10 K above 25 °C',
				expected: long
			},
			() => leadAcidLifeFactor(tempC, LEAD_ACID_HALVING_K.long)
		);
	}

	const lifeYears = (tempC: number) =>
		1 /
		leadAcidWearPerYear(
			{ year: [{ tempC, hours: 8766 }], ratedLifeYears: 10, ratedLifeAh: null, takenOutAhPerYear: 0 },
			LEAD_ACID_HALVING_K.short
		);
	const LIVES: [number, number][] = [
		[25, 10],
		[33, 5],
		[41, 2.5]
	];
	for (const [tempC, expected] of LIVES) {
		checkAgainst(
			{
				name: `life of a ten-year battery at ${tempC} °C`,
				source: 'pages that tell of IEEE practice',
				place: '10 years at 25 °C, 5 at 33 °C, 30 months at 41 °C',
				standing: 'read in the source',
				expected,
				unit: 'years',
				tolerance: { relative: 0.06 },
				because: '8.3 K rounded to 8 K in whole degrees'
			},
			() => lifeYears(tempC)
		);
	}

	it('gain nothing below 25 °C', () => {
		expect([leadAcidLifeFactor(25, 10), leadAcidLifeFactor(-10, 10)]).toEqual([1, 1]);
	});

	it('wear by standing and by giving charge, added up', () => {
		const duty = { year: [{ tempC: 25, hours: 8760 }], ratedLifeYears: 8, takenOutAhPerYear: 500 };
		expect(leadAcidWearPerYear({ ...duty, ratedLifeAh: null }, 10)).toBeCloseTo(0.125, 12);
		expect(leadAcidWearPerYear({ ...duty, ratedLifeAh: 4000 }, 10)).toBeCloseTo(0.25, 12);
	});

	it('have 80 % left at the end of their life, and never less than nothing', () => {
		expect([0, 1, 7].map(leadAcidRemaining)).toEqual([1, 0.8, 0]);
	});

	it('are refused beyond the rule', () => {
		expect(() => leadAcidLifeFactor(61, 10)).toThrow('tempC is 61');
		expect(() => leadAcidLifeFactor(30, 0)).toThrow('halvingK is 0');
		const duty = {
			year: [{ tempC: 25, hours: 8760 }],
			ratedLifeYears: 8,
			ratedLifeAh: 0,
			takenOutAhPerYear: 0
		};
		expect(() => leadAcidWearPerYear(duty, 10)).toThrow('ratedLifeAh is 0');
		expect(() => leadAcidRemaining(-1)).toThrow('used is -1');
	});
});

describe('Arrhenius', () => {
	const from = {
		source: 'Wang et al., J. Power Sources 196 (2011) 3942',
		place: 'activation energy 31.7 kJ/mol, exponent 0.55',
		standing: 'worked from the published equation' as const,
		unit: ''
	};
	checkAgainst({ ...from, name: 'rate at 60 °C over that at 25 °C', expected: 3.832, ...lastDigit(3) }, () =>
		arrheniusFactor(31_700, 60, 25)
	);
	checkAgainst(
		{ ...from, name: 'charge of a life at 25 °C over that at 60 °C', expected: 11.5, ...lastDigit(2) },
		() => arrheniusFactor(31_700, 60, 25) ** (1 / 0.55)
	);

	it('means half the year hot and half cold as the rate does, not as the thermometer', () => {
		const year = [
			{ tempC: 20, hours: 4383 },
			{ tempC: 60, hours: 4383 }
		];
		const mean = meanAgeingTempC(year, 31_700);
		const rates = (arrheniusFactor(31_700, 20, 25) + arrheniusFactor(31_700, 60, 25)) / 2;
		expect(arrheniusFactor(31_700, mean, 25)).toBeCloseTo(rates, 10);
		expect(mean).toBeGreaterThan(40);
	});

	it('leaves a steady temperature as it is', () => {
		expect(meanAgeingTempC([{ tempC: 31, hours: 8760 }], 17_126)).toBeCloseTo(31, 10);
	});

	it('refuses hours that are not a year, and cold below reason', () => {
		expect(() => meanAgeingTempC([{ tempC: 20, hours: 100 }], 1)).toThrow('hoursOfYear is 100');
		expect(() => meanAgeingTempC([{ tempC: 20, hours: -1 }], 1)).toThrow('hours is -1');
		expect(() => meanAgeingTempC([], 1)).toThrow('hoursOfYear is 0');
		expect(() => arrheniusFactor(0, 20, 25)).toThrow('activationJPerMol is 0');
		expect(() => arrheniusFactor(1, -101, 25)).toThrow('tempC is -101');
	});
});
