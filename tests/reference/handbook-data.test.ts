import { existsSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ROLLING_RESISTANCE, SCENARIO_FIELDS, type NumberField } from '../../src/lib/thermal';
import { STANDINGS } from './support/check-against';
import { readTable, readText } from './support/reference-data';
import { readPublishedCases } from './support/report-cases';

const root = new URL('../../reference-data/', import.meta.url);
const sets = readdirSync(root, { withFileTypes: true }).filter((entry) => entry.isDirectory());

describe('reference data', () => {
	it.each(sets.map(({ name }) => name))('says of the set "%s" where it comes from', (name) => {
		expect(existsSync(new URL(`${name}/SOURCE.md`, root))).toBe(true);
		expect(readText(`${name}/SOURCE.md`).length).toBeGreaterThan(100);
	});

	it('gives every published case a name of its own, a place, a standing and a reason for its tolerance', () => {
		const files = readdirSync(new URL('handbook-cases/', root)).filter((file) => file.endsWith('.json'));
		const cases = files
			.filter((file) => file !== 'sources.json')
			.flatMap((file) => readPublishedCases(file.replace('.json', '')));
		expect(new Set(cases.map(({ name }) => name)).size).toBe(cases.length);
		for (const { name, place, standing, because, tolerance } of cases) {
			expect([name, place, because].every((text) => text.length > 3)).toBe(true);
			expect(STANDINGS).toContain(standing);
			expect(Object.values(tolerance)[0]).toBeGreaterThan(0);
		}
	});

	it.each(['emissivities/emissivities.csv', 'contact-resistance/contact-resistance.csv'])(
		'gives every range of %s two ends in order and a standing',
		(path) => {
			for (const row of readTable(path)) {
				const [low, high] = Object.entries(row)
					.filter(([column]) => /^(low|high)/.test(column))
					.map(([, value]) => Number(value));
				expect(low).toBeGreaterThan(0);
				expect(high).toBeGreaterThanOrEqual(low!);
				expect(STANDINGS).toContain(row.standing);
			}
		}
	);

	it('holds the rolling resistance that the engine has', () => {
		const table = readTable('rolling-resistance/rolling-resistance.csv');
		expect(Object.fromEntries(table.map((row) => [row.surface, Number(row.coefficient)]))).toEqual(
			ROLLING_RESISTANCE
		);
	});

	it('names for every default of the engine its value, unit and source', () => {
		const table = readTable('default-coefficients/coefficients.csv');
		const written = table.map(({ group, key, value, unit }) => ({ group, key, value: Number(value), unit }));
		const fields = SCENARIO_FIELDS.filter(
			(field): field is NumberField =>
				field.kind === 'number' && field.default !== null && field.group !== 'legs'
		);
		expect(written).toEqual(
			fields.map(({ group, key, default: value, unit }) => ({ group, key, value, unit }))
		);
		expect(table.every(({ source }) => source!.length > 3)).toBe(true);
	});
});

describe('the climate stations', () => {
	const stations = readTable('climate/stations.csv');
	const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
	const series = (row: Record<string, string>, what: string) =>
		months.map((month) => Number(row[what + month]));
	const sum = (values: number[]) => values.reduce((total, value) => total + value, 0);

	it.each([
		['Geneva', 11.02, 944.4],
		['Dubai', 28.13, 34.5]
	])('%s has a yearly mean of %f °C and %f mm of rain', (name, meanC, rainMm) => {
		const row = stations.find(({ station }) => station === name)!;
		expect(sum(series(row, 'meanC')) / 12).toBeCloseTo(meanC, 1);
		expect(sum(series(row, 'rainMm'))).toBeCloseTo(rainMm, 1);
	});

	it('have twelve months of finite numbers each, and a status', () => {
		for (const row of stations) {
			expect([...series(row, 'meanC'), ...series(row, 'rainMm')].every(Number.isFinite)).toBe(true);
			expect(row.status!.length).toBeGreaterThan(5);
		}
	});
});
