import { describe, expect, it } from 'vitest';
import { pastGuard } from '../../../../tests/support/audit-guard';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { AuditEntry } from '../db/models';
import { inTransaction } from '../db/transaction';
import { findBreak, recordBy } from './audit';

useTestDatabase();

async function writeTrail(crew: Crew, length: number): Promise<void> {
	for (let index = 1; index <= length; index++) {
		await inTransaction((transaction) =>
			recordBy(crew.manager, 'place.changed', { type: 'place', id: index }, transaction, {
				heatC: 40 + index / 3
			})
		);
	}
}

describe('the audit trail', () => {
	it('is whole after many entries, also when they are written at the same time', async () => {
		const crew = await makeCrew();
		await writeTrail(crew, 3);
		await Promise.all(Array.from({ length: 10 }, () => writeTrail(crew, 1)));
		expect(await AuditEntry.count({ where: { workshopId: crew.workshopId } })).toBe(13);
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it('takes the entry of a slow change beside a busy shop', async () => {
		const crew = await makeCrew();
		await writeTrail(crew, 1);
		let isBusy = true;
		const busy = (async () => {
			while (isBusy) await writeTrail(crew, 1);
		})();
		const slow = inTransaction(async (transaction) => {
			await AuditEntry.count({ where: { workshopId: crew.workshopId }, transaction });
			await new Promise((resolve) => setTimeout(resolve, 120));
			await recordBy(crew.manager, 'place.changed', { type: 'place', id: 7 }, transaction);
		});
		await expect(slow).resolves.toBeUndefined();
		isBusy = false;
		await busy;
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it('forgets an entry together with the change that it told of', async () => {
		const crew = await makeCrew();
		const work = inTransaction(async (transaction) => {
			await recordBy(crew.manager, 'place.changed', { type: 'place', id: 1 }, transaction);
			throw new Error('the change failed');
		});
		await expect(work).rejects.toThrow('the change failed');
		expect(await AuditEntry.count({ where: { workshopId: crew.workshopId } })).toBe(0);
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it('cannot be edited or deleted by the application', async () => {
		const crew = await makeCrew();
		await writeTrail(crew, 1);
		const where = { workshopId: crew.workshopId };
		await expect(AuditEntry.update({ action: 'nothing' }, { where })).rejects.toThrow();
		await expect(AuditEntry.destroy({ where })).rejects.toThrow();
	});

	it.each([
		[
			'an edit',
			'update',
			'UPDATE audit_entries SET detail = \'{"heatC":1}\' WHERE sequence = 2 AND',
			'entry 2 was changed'
		],
		['a deletion', 'delete', 'DELETE FROM audit_entries WHERE sequence = 2 AND', 'entry 2 is missing'],
		[
			'a cut tail',
			'delete',
			'DELETE FROM audit_entries WHERE sequence = 3 AND',
			'the end of the trail is cut off'
		],
		[
			'a swap',
			'update',
			'UPDATE audit_entries SET subject_id = 4 - subject_id WHERE sequence IN (1, 3) AND',
			'entry 1 was changed'
		]
	] as const)('shows %s', async (_what, trigger, sql, found) => {
		const crew = await makeCrew();
		await writeTrail(crew, 3);
		await pastGuard(trigger, [`${sql} workshop_id = ${crew.workshopId}`]);
		expect(await findBreak(crew.workshopId)).toBe(found);
	});
});
