import { create as drawQr } from 'qrcode';
import { Op } from 'sequelize';
import type { PersonRow, SignedInPerson } from '$lib/schemas/people';
import {
	FACTOR_ROLES,
	type FactorReach,
	type SecondFactorSetUp,
	type SecondFactorView
} from '$lib/schemas/second-factor';
import {
	dropSecondFactor,
	keyPurpose,
	makeRecoveryCodes,
	passSecondFactor,
	useCode
} from '../auth/second-factor';
import { endSessions } from '../auth/sessions';
import { giveBack, spend } from '../auth/rate-limit';
import { keyAddress, newKey } from '../auth/totp';
import { Person, RecoveryCode, SecondFactor, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { AppError } from '../errors';
import { writeFactorReset } from '../mail/factor-reset-letter';
import { postLetter } from '../mail/outbox';
import { allow } from '../policies';
import { presentPerson } from '../presenters/people';
import { lockText, unlockText } from '../secret-box';
import { recordBy } from './audit';
import { findStaff, holdStaff } from './staff';

const QUIET_ZONE = 4;

/** The picture for the telephone as one path: a square of 1 for each dark module. */
function drawPicture(text: string): { size: number; path: string } {
	const { size, data } = drawQr(text, { errorCorrectionLevel: 'M' }).modules;
	const squares = Array.from(data).flatMap((dark, index) => {
		const [x, y] = [(index % size) + QUIET_ZONE, Math.floor(index / size) + QUIET_ZONE];
		return dark ? [`M${x} ${y}h1v1h-1z`] : [];
	});
	return { size: size + 2 * QUIET_ZONE, path: squares.join('') };
}

function presentSetUp({ lockedKey, personId }: SecondFactor, account: string): SecondFactorSetUp {
	const key = unlockText(keyPurpose(personId), lockedKey);
	const groups = key.match(/.{1,4}/g) ?? [];
	return { keyGroups: groups.join(' '), picture: drawPicture(keyAddress(key, account)) };
}

/** Whether one's own second factor is on, and what a set-up that has begun shows. */
export async function getSecondFactor(person: SignedInPerson): Promise<SecondFactorView> {
	allow(person, 'second-factor.own');
	const [factor, workshop] = await Promise.all([
		SecondFactor.findByPk(person.id),
		Workshop.findByPk(person.workshopId)
	]);
	const confirmedAt = factor?.confirmedAt ?? null;
	return {
		since: confirmedAt?.toISOString() ?? null,
		codesLeft: confirmedAt ? await RecoveryCode.count({ where: { personId: person.id } }) : 0,
		setUp: factor && !confirmedAt ? presentSetUp(factor, person.email) : null,
		isRequired: FACTOR_ROLES.includes(person.role) && (workshop?.requiresSecondFactor ?? false)
	};
}

/** Who of those that the workshop can ask for a second factor has none, by name. */
export async function findFactorReach(manager: SignedInPerson): Promise<FactorReach> {
	const { workshopId, id } = allow(manager, 'shop.write');
	const people = await Person.findAll({
		where: { workshopId, active: true, role: [...FACTOR_ROLES] },
		order: [
			['name', 'ASC'],
			['id', 'ASC']
		]
	});
	const where = { personId: people.map((each) => each.id), confirmedAt: { [Op.not]: null } };
	const having = new Set((await SecondFactor.findAll({ where })).map(({ personId }) => personId));
	return {
		isOwnOn: having.has(id),
		others: people
			.filter((each) => each.id !== id && !having.has(each.id))
			.map(({ name, role }) => ({ name, role }))
	};
}

const subjectOf = ({ id }: { id: number }) => ({ type: 'person', id });
const ON_ALREADY = 'Your second factor is on already.';

/** Makes a key for the telephone; it counts for nothing until a code has confirmed it. */
export async function beginSetUp(person: SignedInPerson): Promise<void> {
	allow(person, 'second-factor.own');
	await inTransaction(async (transaction) => {
		const factor = await SecondFactor.findByPk(person.id, { lock: true, transaction });
		if (factor?.confirmedAt) throw new AppError('conflict', ON_ALREADY);
		await factor?.destroy({ transaction });
		const lockedKey = lockText(keyPurpose(person.id), newKey());
		await SecondFactor.create({ personId: person.id, lockedKey }, { transaction });
	});
}

const WRONG_CODE =
	'This code is not right. Check that the telephone’s clock is right, and take the next code.';

function wrongCode(): AppError {
	return new AppError('invalid_input', WRONG_CODE, [{ path: 'code', message: WRONG_CODE }]);
}

/** A right code turns the second factor on, and gives the ten recovery codes, this once. */
export async function confirmSetUp(person: SignedInPerson, code: string): Promise<string[]> {
	allow(person, 'second-factor.own');
	const limit = { name: 'second factor set-up', key: String(person.id), points: 10, windowS: 15 * 60 };
	await spend(limit);
	return inTransaction(async (transaction) => {
		const factor = await SecondFactor.findByPk(person.id, { lock: true, transaction });
		if (!factor) throw new AppError('conflict', 'Begin the set-up first.');
		if (factor.confirmedAt) throw new AppError('conflict', ON_ALREADY);
		if (!(await useCode(factor, code.replace(/\s/g, '')))) throw wrongCode();
		await factor.update({ confirmedAt: new Date() }, { transaction });
		await recordBy(person, 'second-factor.turned-on', subjectOf(person), transaction);
		await giveBack(limit);
		return makeRecoveryCodes(person.id, transaction);
	});
}

async function requireCode(person: SignedInPerson, code: string): Promise<void> {
	allow(person, 'second-factor.own');
	if (!(await passSecondFactor(person.id, code))) throw wrongCode();
}

/** Ten new recovery codes; those of before open nothing any more. */
export async function renewRecoveryCodes(person: SignedInPerson, code: string): Promise<string[]> {
	await requireCode(person, code);
	return inTransaction(async (transaction) => {
		await recordBy(person, 'second-factor.codes-renewed', subjectOf(person), transaction);
		return makeRecoveryCodes(person.id, transaction);
	});
}

/** Turns one's own second factor off, unless the workshop asks for it. */
export async function turnOff(person: SignedInPerson, code: string): Promise<void> {
	const { isRequired } = await getSecondFactor(person);
	if (isRequired) throw new AppError('conflict', 'The workshop asks for a second factor: it stays on.');
	await requireCode(person, code);
	await inTransaction(async (transaction) => {
		await dropSecondFactor(person.id);
		await recordBy(person, 'second-factor.turned-off', subjectOf(person), transaction);
	});
}

/** Takes the second factor from somebody who has lost it; a letter tells them, and their sessions end. */
export async function resetFactor(manager: SignedInPerson, personId: number): Promise<PersonRow> {
	allow(manager, 'people.write');
	return inTransaction(async (transaction) => {
		const { name: workshopName } = await holdStaff(manager, transaction);
		const person = await findStaff(manager, personId, transaction);
		if (person.id === manager.id) {
			throw new AppError('conflict', 'Turn your own second factor off where you set it up.');
		}
		if (!(await dropSecondFactor(person.id))) {
			throw new AppError('conflict', `${person.name} has no second factor.`);
		}
		await endSessions(person.id, 'factor-reset', transaction);
		const about = {
			name: person.name,
			by: manager.name,
			workshopName,
			href: `${env().ORIGIN}/second-factor`
		};
		const { workshopId, email: recipient } = person;
		const letter = writeFactorReset(about);
		await postLetter({ kind: 'second-factor', workshopId, recipient, ...letter }, transaction);
		await recordBy(manager, 'second-factor.reset', subjectOf(person), transaction);
		return presentPerson(person, { readerId: manager.id, hasSecondFactor: false });
	});
}
