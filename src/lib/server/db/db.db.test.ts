import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { connection } from './connection';
import { requireDurableSettings } from './durability';
import { migrate } from './migrate';
import { Place, Workshop } from './models';
import { inTransaction } from './transaction';

useTestDatabase();

describe('the tables', () => {
	it('are brought up to date once, however many processes start together', async () => {
		const counts = await Promise.all([migrate(connection()), migrate(connection()), migrate(connection())]);
		expect(counts).toEqual([0, 0, 0]);
	});

	it('have a column of its own for each field of each model', async () => {
		for (const model of Object.values(connection().models)) {
			const columns = Object.values(model.getAttributes()).map(({ field }) => field);
			expect(new Set(columns).size, model.name).toBe(columns.length);
			const described = await connection().getQueryInterface().describeTable(model.getTableName());
			expect(Object.keys(described), model.name).toEqual(expect.arrayContaining(columns));
		}
	});
});

describe('durable settings', () => {
	const set = (value: string) => connection().query(`SET GLOBAL innodb_flush_log_at_trx_commit = ${value}`);

	it('hold on the server that we start', async () => {
		await expect(requireDurableSettings(connection())).resolves.toBeUndefined();
	});

	it('are refused in one sentence when they do not hold', async () => {
		const [row] = await connection().query<{ grants: string }>('SELECT CURRENT_USER() AS grants', {
			type: QueryTypes.SELECT
		});
		expect(row?.grants).toContain('soakline');
		const lax = { query: () => Promise.resolve([{ Variable_name: 'sync_binlog', Value: '0' }]) };
		await expect(requireDurableSettings(lax as never)).rejects.toThrow(
			/^The database has innodb_flush_log_at_trx_commit=unset, Soakline needs 1: else a commit can be lost/
		);
		await expect(set('2')).rejects.toThrow();
	});
});

describe('a transaction', () => {
	const PLACE = {
		...{ region: '', latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0, climateZone: 'BWh' },
		...{ hotDayMaxC: 40, dailyRangeK: 15, sunPeakWPerM2: 1000, source: 'Invented for this test' }
	};

	it('keeps all or nothing, also of work that began one of its own', async () => {
		const { workshopId } = await makeCrew();
		const create = (name: string) => inTransaction(() => Place.create({ ...PLACE, name, workshopId }));
		const both = inTransaction(async () => {
			await create('first');
			await create('second');
			throw new Error('stop');
		});
		await expect(both).rejects.toThrow('stop');
		expect(await Place.count({ where: { workshopId } })).toBe(0);
	});

	it('sees its own rows before they are kept', async () => {
		const { workshopId } = await makeCrew();
		const seen = await inTransaction(async () => {
			await Place.create({ ...PLACE, name: 'new', workshopId });
			return Place.count({ where: { workshopId } });
		});
		expect(seen).toBe(1);
	});

	it('loses no update of 60 that read, add and write at the same time', async () => {
		const { workshopId } = await makeCrew();
		const addOne = () =>
			inTransaction(async (transaction) => {
				const shop = await Workshop.findByPk(workshopId, { transaction });
				await connection().query('UPDATE workshops SET next_job_number = :next WHERE id = :workshopId', {
					replacements: { next: (shop?.nextJobNumber ?? 0) + 1, workshopId },
					transaction
				});
			});
		const tries = await Promise.allSettled(Array.from({ length: 60 }, addOne));
		const kept = tries.filter(({ status }) => status === 'fulfilled').length;
		const shop = await Workshop.findByPk(workshopId);
		expect(shop?.nextJobNumber).toBe(1 + kept);
		expect(kept).toBeGreaterThan(0);
	});
});
