import { randomInt } from 'node:crypto';
import { Op, QueryTypes, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { FACTOR_ROLES } from '$lib/schemas/second-factor';
import { connection } from '../db/connection';
import { RecoveryCode, SecondFactor } from '../db/models';
import { inTransaction } from '../db/transaction';
import { tokenHash } from '../hash';
import { unlockText } from '../secret-box';
import { giveBack, spend } from './rate-limit';
import { findStep } from './totp';

const TRIES = { name: 'second factor', points: 5, windowS: 15 * 60 };
/** Without letters and digits that are taken for each other. */
const ALPHABET = 'abcdefghijkmnpqrstuvwxyz23456789';
const RECOVERY_CHARS = 10;

export const keyPurpose = (personId: number): string => `second factor of person ${personId}`;

export async function hasSecondFactor(personId: number): Promise<boolean> {
	return (await SecondFactor.count({ where: { personId, confirmedAt: { [Op.not]: null } } })) > 0;
}

/** Whether the workshop asks for a second factor that this person has not set up: nothing else goes before it. */
export async function mustSetUpFactor({ id, workshopId, role }: SignedInPerson): Promise<boolean> {
	if (!FACTOR_ROLES.includes(role)) return false;
	const [row] = await connection().query<{ isMissing: number }>(
		`SELECT w.requires_second_factor AND NOT EXISTS (
			SELECT 1 FROM second_factors f WHERE f.person_id = :id AND f.confirmed_at IS NOT NULL
		) AS isMissing FROM workshops w WHERE w.id = :workshopId`,
		{ replacements: { id, workshopId }, type: QueryTypes.SELECT }
	);
	return Boolean(row?.isMissing);
}

/** A code of the telephone, used up: neither it nor an older one is taken again, also of two at once. */
export async function useCode(factor: SecondFactor, code: string): Promise<boolean> {
	const { personId } = factor;
	const step = await findStep(unlockText(keyPurpose(personId), factor.lockedKey), code);
	if (step === null) return false;
	const [changed] = await SecondFactor.update(
		{ lastStep: step },
		{ where: { personId, lastStep: { [Op.lt]: step } } }
	);
	return changed === 1;
}

const recoveryHash = (personId: number, code: string): string =>
	tokenHash(`recovery ${personId} ${code.toLowerCase().replace(/[^a-z0-9]/g, '')}`);

const writeRecoveryCode = (): string => {
	const signs = Array.from({ length: RECOVERY_CHARS }, () => ALPHABET[randomInt(ALPHABET.length)]).join('');
	return `${signs.slice(0, RECOVERY_CHARS / 2)}-${signs.slice(RECOVERY_CHARS / 2)}`;
};

const RECOVERY_CODES = 10;

/** Ten new codes in the place of those that were there; shown once, for only their hashes are kept. */
export async function makeRecoveryCodes(personId: number, transaction: Transaction): Promise<string[]> {
	const codes = Array.from({ length: RECOVERY_CODES }, writeRecoveryCode);
	await RecoveryCode.destroy({ where: { personId }, transaction });
	const rows = codes.map((code) => ({ personId, codeHash: recoveryHash(personId, code) }));
	await RecoveryCode.bulkCreate(rows, { transaction });
	return codes;
}

/** Deleting is what uses it up: of two at once only one deletes a row. */
async function useRecoveryCode(personId: number, code: string): Promise<boolean> {
	const where = { personId, codeHash: recoveryHash(personId, code) };
	return (await RecoveryCode.destroy({ where })) === 1;
}

export type Passed = 'by-code' | 'by-recovery-code';

/** Checks what a person gives as their second factor and uses it up; null when it is not right. Tries run out. */
export async function passSecondFactor(personId: number, given: string): Promise<Passed | null> {
	const limit = { ...TRIES, key: String(personId) };
	await spend(limit);
	const factor = await SecondFactor.findOne({ where: { personId, confirmedAt: { [Op.not]: null } } });
	if (!factor) return null;
	const digits = given.replace(/\s/g, '');
	const isCode = /^\d{6}$/.test(digits);
	const passed = isCode
		? (await useCode(factor, digits)) && 'by-code'
		: (await useRecoveryCode(personId, given)) && 'by-recovery-code';
	if (passed) await giveBack(limit);
	return passed || null;
}

/** No second factor any more, nor a recovery code. */
export async function dropSecondFactor(personId: number): Promise<boolean> {
	return inTransaction(async (transaction) => {
		await RecoveryCode.destroy({ where: { personId }, transaction });
		return (await SecondFactor.destroy({ where: { personId }, transaction })) > 0;
	});
}
