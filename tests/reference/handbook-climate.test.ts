import { describe } from 'vitest';
import {
	buildingMoistureLetter,
	buildingThermalZone,
	climateClass,
	degreeDaysOfMonths,
	drynessLimitMm,
	yearlyMeanC,
	type MonthlyClimate
} from '../../src/lib/thermal/correlations';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { readTable } from './support/reference-data';
import { checkCases, type Formula } from './support/report-cases';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const NO_TOLERANCE = 'a class has no tolerance: not one letter may differ';

/** In how many letters two names differ. */
function lettersOff(expected: string, found: string): number {
	const places = Array.from({ length: Math.max(expected.length, found.length) }, (_, at) => at);
	return places.filter((at) => expected[at] !== found[at]).length;
}

const CLIMATE: Record<string, Formula> = {
	class: (meanC: number[], rainMm: number[], expected: string) =>
		lettersOff(expected, climateClass({ meanC, rainMm })),
	'thermal zone': buildingThermalZone
};

const stations = new Map(
	readTable('climate/stations.csv').map((row) => [
		row.station!,
		{
			climateClass: row.climateClass!,
			climate: {
				meanC: MONTHS.map((month) => Number(row[`meanC${month}`])),
				rainMm: MONTHS.map((month) => Number(row[`rainMm${month}`]))
			}
		}
	])
);
const climateOf = (station: string): MonthlyClimate => stations.get(station)!.climate;

const PEEL: Omit<PublishedValue, 'name' | 'expected'> = {
	source:
		'Peel, Finlayson, McMahon, Updated world map of the Köppen–Geiger climate classification, Hydrology and Earth System Sciences 11 (2007) 1633',
	place: 'Table 1',
	standing: 'worked from the published equation',
	unit: 'letters off',
	tolerance: { absolute: 0.5 },
	because: NO_TOLERANCE
};

/** Yearly mean, yearly rain and the limit of dryness, worked by hand from the rows. */
const YEARS: [station: string, meanC: number, rainMm: number, drynessMm: number][] = [
	['Geneva', 11.02, 944.4, 360.3],
	['Dubai', 28.13, 34.5, 562.5],
	['New Delhi', 25.21, 767.9, 784.2],
	['Alice Springs', 21.0, 285, 699.9]
];

/** Zones of the American standards that places are listed in; degree-days from the monthly means are a floor. */
const LISTED_ZONES: [station: string, zone: string][] = [
	['Singapore', '0A'],
	['Dubai', '0B'],
	['New Delhi', '1B'],
	['Brisbane', '2A'],
	['Moscow', '6A']
];

function zoneOf(climate: MonthlyClimate): string {
	const cdd10 = degreeDaysOfMonths(climate.meanC, 10, 'above');
	const hdd18 = degreeDaysOfMonths(climate.meanC, 18, 'below');
	return `${buildingThermalZone(cdd10, hdd18)}${buildingMoistureLetter(climate, 2013)}`;
}

describe('made-up years and zones against published values', () => checkCases('climate', CLIMATE));

describe('stations against published values', () => {
	for (const [station, { climateClass: expected, climate }] of stations) {
		checkAgainst({ ...PEEL, name: `${station} is ${expected}`, expected: 0 }, () =>
			lettersOff(expected, climateClass(climate))
		);
	}

	for (const [station, meanC, rainMm, drynessMm] of YEARS) {
		const worked = { ...PEEL, because: 'worked by hand to the digits shown', unit: 'mm' };
		checkAgainst(
			{
				...worked,
				name: `yearly mean of ${station}`,
				expected: meanC,
				unit: '°C',
				tolerance: { absolute: 0.005 }
			},
			() => yearlyMeanC(climateOf(station))
		);
		checkAgainst(
			{ ...worked, name: `yearly rain of ${station}`, expected: rainMm, tolerance: { absolute: 0.05 } },
			() => climateOf(station).rainMm.reduce((sum, month) => sum + month, 0)
		);
		checkAgainst(
			{
				...worked,
				name: `limit of dryness of ${station}`,
				expected: drynessMm,
				tolerance: { absolute: 0.06 }
			},
			() => drynessLimitMm(climateOf(station))
		);
	}

	for (const [station, zone] of LISTED_ZONES) {
		const listed: PublishedValue = {
			name: `${station} is in zone ${zone}`,
			source: 'ANSI/ASHRAE Standard 169-2013, Climatic Data for Building Design Standards',
			place: 'Annex A, list of places',
			standing: 'from memory',
			expected: 0,
			unit: 'letters off',
			tolerance: { absolute: 0.5 },
			because: NO_TOLERANCE
		};
		checkAgainst(listed, () => lettersOff(zone, zoneOf(climateOf(station))));
	}
});
