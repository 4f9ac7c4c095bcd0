import { describe } from 'vitest';
import { airProperties, pressureAtAltitude, type AirProperties } from '../../src/lib/thermal/correlations';
import { SCENARIO_FIELDS } from '../../src/lib/thermal';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { readTable } from './support/reference-data';

interface Column {
	key: keyof AirProperties;
	what: string;
	unit: string;
}

const COLUMNS: readonly Column[] = [
	{ key: 'densityKgPerM3', what: 'density', unit: 'kg/m³' },
	{ key: 'kinematicViscosityM2PerS', what: 'kinematic viscosity', unit: 'm²/s' },
	{ key: 'conductivityWPerMK', what: 'conductivity', unit: 'W/mK' },
	{ key: 'prandtl', what: 'Prandtl number', unit: '' }
];

/** The two tables, and how near the formula comes to each, with the reason. */
const TABLES: Record<string, { source: string; place: string; tolerances: [number, string][] }> = {
	'Incropera 6th ed., Table A.4': {
		source: 'Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed.',
		place: 'Table A.4',
		tolerances: [
			[0.001, 'printed to four digits, for 1 bar'],
			[0.01, 'Sutherland’s formula lies 1 % below the table at 177 °C'],
			[0.005, 'printed to three digits'],
			[0.02, 'the specific heat is held at 1006 J/kgK, 1.5 % below the table at 177 °C']
		]
	},
	'Cengel, Table A-15': {
		source: 'Cengel, Heat and Mass Transfer',
		place: 'Table A-15',
		tolerances: [
			[0.001, 'printed to four digits'],
			[0.01, 'the two handbooks differ from one another by as much'],
			[0.027, 'the two handbooks differ by 2.5 %, and the formula lies with the other one'],
			[0.037, 'as the conductivity, and the specific heat is held at 1006 J/kgK']
		]
	}
};

describe('air against two handbooks', () => {
	for (const row of readTable('air-properties/air.csv')) {
		const { source, place, tolerances } = TABLES[row.source!]!;
		COLUMNS.forEach(({ key, what, unit }, at) => {
			const [relative, because] = tolerances[at]!;
			const published: PublishedValue = {
				name: `${what} of air at ${row.tempC} °C, ${place}`,
				source,
				place,
				standing: row.fromMemory!.includes(key) ? 'from memory' : 'read in the source',
				expected: Number(row[key]),
				unit,
				tolerance: { relative },
				because
			};
			checkAgainst(published, () => airProperties(Number(row.tempC), Number(row.pressurePa))[key]);
		});
	}
});

/** Altitude in m and pressure in Pa. */
const ISO_PRESSURES = [
	[0, 101_325],
	[1000, 89_874.6],
	[2000, 79_495.2],
	[5000, 54_019.9],
	[11_000, 22_632]
] as const;
const LIBRARY_PRESSURES = [
	[-100, 102_532.073],
	[0, 101_324.999],
	[1000, 89_874.75],
	[8000, 35_600.496]
] as const;

describe('the standard atmosphere against published values', () => {
	const tables = [
		{
			rows: ISO_PRESSURES,
			source: 'ISO 2533:1975, Standard Atmosphere',
			place: 'table',
			standing: 'from memory' as const,
			because: 'printed to six digits and, at 11 km, to five'
		},
		{
			rows: LIBRARY_PRESSURES,
			source: 'pvlib python, its tests (BSD-3 licence)',
			place: 'alt2pres',
			standing: 'read in the source' as const,
			because: 'the library has the same law with rounded constants, 3e-5 off at 8 km'
		}
	];
	for (const { rows, ...table } of tables) {
		for (const [altitudeM, pressurePa] of rows) {
			checkAgainst(
				{
					...table,
					name: `pressure at ${altitudeM} m, ${table.place}`,
					expected: pressurePa,
					unit: 'Pa',
					tolerance: { relative: 1e-4 }
				},
				() => pressureAtAltitude(altitudeM)
			);
		}
	}
});

/** Defaults of the model that a published range of emissivities stands behind. */
const EMISSIVITIES: [group: string, key: string, surface: string][] = [
	['exhaust', 'emissivity', 'steel, oxidised'],
	['battery', 'caseEmissivity', 'plastic, black PP or ABS'],
	['bonnet', 'emissivity', 'paint, white']
];

describe('emissivities of the model within published ranges', () => {
	const table = new Map(readTable('emissivities/emissivities.csv').map((row) => [row.surface!, row]));
	const defaultOf = (group: string, key: string) =>
		Number(SCENARIO_FIELDS.find((field) => field.group === group && field.key === key)?.default);
	for (const [group, key, surface] of EMISSIVITIES) {
		const { low, high, standing } = table.get(surface)!;
		checkAgainst(
			{
				name: `${group}.${key} as ${surface}`,
				source:
					'Emissivity tables of instrument makers (after Bramson, Wolfe, Madding) and of Thome, EPFL 2008',
				place: surface!,
				standing: standing as PublishedValue['standing'],
				expected: (Number(low) + Number(high)) / 2,
				unit: '',
				tolerance: { absolute: (Number(high) - Number(low)) / 2 + 1e-9 },
				because: 'the published range itself, about its middle'
			},
			() => defaultOf(group, key)
		);
	}
});
