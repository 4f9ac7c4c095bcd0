import {
	drynessLimitMm,
	mean,
	requireMonthlyClimate,
	splitYear,
	sum,
	type MonthlyClimate
} from './monthly-climate';

/** What the letters of a climate go by. */
interface Figures {
	yearC: number;
	yearMm: number;
	coldestC: number;
	hottestC: number;
	monthsAbove10: number;
	drynessMm: number;
	driestMm: number;
	summer: { driestMm: number; wettestMm: number; rainMm: number };
	winter: { driestMm: number; wettestMm: number; rainMm: number };
}

function figure(climate: MonthlyClimate): Figures {
	const { meanC, rainMm } = climate;
	const halves = splitYear(meanC);
	const rainOf = (months: readonly number[]) => {
		const rain = months.map((month) => rainMm[month]!);
		return { driestMm: Math.min(...rain), wettestMm: Math.max(...rain), rainMm: sum(rain) };
	};
	return {
		yearC: mean(meanC),
		yearMm: sum(rainMm),
		coldestC: Math.min(...meanC),
		hottestC: Math.max(...meanC),
		monthsAbove10: meanC.filter((tempC) => tempC > 10).length,
		drynessMm: drynessLimitMm(climate),
		driestMm: Math.min(...rainMm),
		summer: rainOf(halves.summer),
		winter: rainOf(halves.winter)
	};
}

function nameDry({ yearC, yearMm, drynessMm }: Figures): string {
	return `B${yearMm < drynessMm / 2 ? 'W' : 'S'}${yearC >= 18 ? 'h' : 'k'}`;
}

function nameTropical({ yearMm, driestMm }: Figures): string {
	if (driestMm >= 60) return 'Af';
	return driestMm >= 100 - yearMm / 25 ? 'Am' : 'Aw';
}

/** Dry in summer, dry in winter or neither; where both hold, the half with less rain is the dry one. */
function nameDrySeason({ summer, winter }: Figures): 's' | 'w' | 'f' {
	const drySummer = summer.driestMm < 40 && summer.driestMm < winter.wettestMm / 3;
	const dryWinter = winter.driestMm < summer.wettestMm / 10;
	if (drySummer && dryWinter) return summer.rainMm < winter.rainMm ? 's' : 'w';
	if (drySummer) return 's';
	return dryWinter ? 'w' : 'f';
}

function nameSummer({ hottestC, monthsAbove10, coldestC }: Figures): 'a' | 'b' | 'c' | 'd' {
	if (hottestC >= 22) return 'a';
	if (monthsAbove10 >= 4) return 'b';
	return coldestC < -38 ? 'd' : 'c';
}

/**
 * Climate class of a place after Köppen and Geiger, two or three letters.
 *
 *     B  yearly rain below the dryness limit:  W below half of it, else S;  h from 18 °C yearly mean, else k
 *     A  coldest month from 18 °C:  f driest month from 60 mm, m from 100 − yearly rain/25, else w
 *     C  coldest month above 0 °C, D not;  hottest month above 10 °C
 *        s driest summer month below 40 mm and below a third of the wettest winter month
 *        w driest winter month below a tenth of the wettest summer month, else f
 *        a hottest month from 22 °C, b four months above 10 °C, d (D alone) coldest month below −38 °C, else c
 *     E  hottest month to 10 °C:  T above 0 °C, else F
 *
 * @param climate twelve monthly means, °C, and rain, mm
 * @returns the class, such as BWh
 * @throws EngineInputError unless there are twelve months of temperatures within −80…50 °C and rain not below zero
 * Validity: averages over years; near a threshold another source of averages gives another letter.
 * Source: Peel, Finlayson, McMahon, Hydrology and Earth System Sciences 11 (2007) 1633, Table 1, with E to 10 °C as in Beck et
 *   al., Scientific Data 5 (2018) 180214; E before B as in Kottek et al., Meteorologische Zeitschrift 15 (2006) 259 (that
 *   order, and the drier half where both s and w hold, from memory).
 * @example
 * climateClass({ meanC: [27, 28, 28.5, 28.5, 28.5, 28.5, 28, 28, 28.5, 28.5, 27.5, 27], rainMm: [234, 101, 170, 185, 154, 130, 256, 193, 174, 211, 271, 324] }); // 'Af'
 */
export function climateClass(climate: MonthlyClimate): string {
	requireMonthlyClimate(climate);
	const figures = figure(climate);
	const { hottestC, coldestC, yearMm, drynessMm } = figures;
	if (hottestC <= 10) return hottestC > 0 ? 'ET' : 'EF';
	if (yearMm < drynessMm) return nameDry(figures);
	if (coldestC >= 18) return nameTropical(figures);
	return `${coldestC > 0 ? 'C' : 'D'}${nameDrySeason(figures)}${nameSummer(figures)}`;
}
