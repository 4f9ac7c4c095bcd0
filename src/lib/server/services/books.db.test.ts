import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { SCENARIO_FIELDS, parseScenario } from '$lib/thermal';
import { inTransaction } from '../db/transaction';
import { bookInForce, coefficientsOf, createFirstBook, getBook, listBooks } from './books';

useTestDatabase();

const UNDER_BONNET = { engineLayout: 'inline', positionKind: 'under-bonnet' } as const;

async function makeShop() {
	const crew = await makeCrew();
	const book = await inTransaction((transaction) => createFirstBook(crew.workshopId, transaction));
	return { crew, book };
}

describe('a workshop’s first book', () => {
	it('is in force and holds the thermal model’s own values, each with its unit and a source', async () => {
		const { crew } = await makeShop();
		const book = await bookInForce(crew.installer, UNDER_BONNET);
		const defaults = new Map(SCENARIO_FIELDS.map((field) => [`${field.group}.${field.key}`, field]));
		expect(book).toMatchObject({ number: 1, state: 'in-force' });
		for (const { group, key, value, unit, meaning, source } of book.coefficients) {
			expect({ value, unit }).toMatchObject({
				value: defaults.get(`${group}.${key}`)?.default,
				unit: defaults.get(`${group}.${key}`)?.unit
			});
			expect(meaning).not.toBe('');
			expect(source).toMatch(/\.$/);
		}
	});

	it('holds the values of thermal model section 7 that nobody surveys, and none that somebody does', async () => {
		const { book } = await makeShop();
		const values = new Map(book.coefficients.map(({ group, key, value }) => [`${group}.${key}`, value]));
		expect(values.get('engine.thermostatOpen')).toBe(82);
		expect(values.get('exhaust.gasFull')).toBe(760);
		expect(values.get('bay.share')).toBe(0.6);
		expect(values.get('vehicle.coolantShare')).toBe(0.25);
		expect(values.get('battery.caseCellConductance')).toBe(2.5);
		for (const surveyed of ['vehicle.massKg', 'position.exhaustView', 'battery.r25', 'climate.tMax']) {
			expect(values.has(surveyed)).toBe(false);
		}
	});

	it('gives the engine nothing that it does not know', async () => {
		const { book } = await makeShop();
		const scenario = parseScenario({ ...coefficientsOf(book), legs: [{ minutes: 60 }] });
		expect(scenario.engine.thermostatFull).toBe(95);
	});

	it('cannot be joined by a second one in force', async () => {
		const { crew } = await makeShop();
		await expect(
			inTransaction((transaction) => createFirstBook(crew.workshopId, transaction))
		).rejects.toThrow();
		expect(await listBooks(crew.manager)).toHaveLength(1);
	});
});

describe('who may read books', () => {
	it('engineers and managers read them all; an installer only works with the one in force', async () => {
		const { crew, book } = await makeShop();
		expect((await getBook(crew.engineer, book.id)).coefficients.length).toBeGreaterThan(60);
		expect(await listBooks(crew.manager)).toMatchObject([{ id: book.id }]);
		await expect(listBooks(crew.installer)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(getBook(crew.installer, book.id)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(bookInForce(crew.customer, UNDER_BONNET)).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('nobody sees another workshop’s', async () => {
		const { book } = await makeShop();
		const other = await makeCrew();
		await expect(getBook(other.engineer, book.id)).rejects.toMatchObject({ code: 'not_found' });
		await expect(bookInForce(other.engineer, UNDER_BONNET)).rejects.toMatchObject({ code: 'not_ready' });
	});
});
