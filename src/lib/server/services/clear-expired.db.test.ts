import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { spend } from '../auth/rate-limit';
import { openSession } from '../auth/sessions';
import { connection } from '../db/connection';
import { Session, SignInLink } from '../db/models';
import { sha256 } from '../hash';
import { clearExpired } from './clear-expired';

useTestDatabase();

const DAY_MS = 24 * 60 * 60_000;
const ago = (ms: number): Date => new Date(Date.now() - ms);

async function keepKey(personId: number, key: string, createdAt: Date): Promise<void> {
	await connection().query(
		`INSERT INTO idempotency_keys (person_id, idempotency_key, request_sha256, status, response, created_at)
		 VALUES (:personId, :key, :hash, 200, '{}', :createdAt)`,
		{ replacements: { personId, key, hash: sha256(key), createdAt } }
	);
}

async function listKeys(personId: number): Promise<string[]> {
	const rows = await connection().query<{ name: string }>(
		'SELECT idempotency_key AS name FROM idempotency_keys WHERE person_id = :personId ORDER BY name',
		{ replacements: { personId }, type: QueryTypes.SELECT }
	);
	return rows.map(({ name }) => name);
}

describe('what is past its time', () => {
	it('is cleared, and nothing else', async () => {
		const { installer } = await makeCrew();
		const personId = installer.id;
		await keepKey(personId, 'new', ago(DAY_MS - 60_000));
		await keepKey(personId, 'old', ago(DAY_MS + 60_000));
		await SignInLink.create({ tokenHash: sha256(`new ${personId}`), personId, expiresAt: ago(-60_000) });
		await SignInLink.create({ tokenHash: sha256(`old ${personId}`), personId, expiresAt: ago(60_000) });
		const [fresh, stale] = await Promise.all([openSession(personId), openSession(personId)]);
		await Session.update({ createdAt: ago(31 * DAY_MS) }, { where: { id: sha256(stale) }, silent: true });
		await spend({ name: 'clearing', key: installer.email, points: 1, windowS: 600 });

		expect(await clearExpired()).toBeGreaterThanOrEqual(3);

		expect(await listKeys(personId)).toEqual(['new']);
		const links = await SignInLink.findAll({ where: { personId } });
		expect(links.map(({ tokenHash }) => tokenHash)).toEqual([sha256(`new ${personId}`)]);
		expect(await Session.findByPk(sha256(fresh))).not.toBeNull();
		expect(await Session.findByPk(sha256(stale))).toBeNull();
		const again = spend({ name: 'clearing', key: installer.email, points: 1, windowS: 600 });
		await expect(again).rejects.toMatchObject({ code: 'too_many_requests' });
	});
});
