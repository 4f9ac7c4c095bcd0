import { Op, type Transaction } from 'sequelize';
import {
	STAFF_ROLES,
	type InvitationRow,
	type PeopleView,
	type PersonRow,
	type RoleChange,
	type SignedInPerson
} from '$lib/schemas/people';
import { endSessions } from '../auth/sessions';
import { Invitation, Person, SecondFactor } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError } from '../errors';
import { allow } from '../policies';
import { presentInvitation, presentPerson } from '../presenters/people';
import { recordBy } from './audit';
import { saveVersioned } from './records';
import { findStaff, holdStaff } from './staff';

async function listInvitations({ workshopId }: SignedInPerson): Promise<InvitationRow[]> {
	const open = await Invitation.findAll({
		where: { workshopId, acceptedAt: null, withdrawnAt: null },
		order: [['id', 'ASC']]
	});
	const inviters = await Person.findAll({ where: { id: open.map(({ invitedBy }) => invitedBy) } });
	const nameOf = new Map(inviters.map(({ id, name }) => [id, name]));
	const now = new Date();
	return open.map((each) => presentInvitation(each, nameOf.get(each.invitedBy) ?? '', now));
}

async function showPeople({ id: readerId }: SignedInPerson, people: readonly Person[]): Promise<PersonRow[]> {
	const where = { personId: people.map(({ id }) => id), confirmedAt: { [Op.not]: null } };
	const having = new Set((await SecondFactor.findAll({ where })).map(({ personId }) => personId));
	return people.map((each) => presentPerson(each, { readerId, hasSecondFactor: having.has(each.id) }));
}

async function showPerson(reader: SignedInPerson, person: Person): Promise<PersonRow> {
	const [row] = await showPeople(reader, [person]);
	return row!;
}

/** Who works in the shop, who worked there, and who was asked to join. */
export async function listPeople(manager: SignedInPerson): Promise<PeopleView> {
	allow(manager, 'people.read');
	const people = await Person.findAll({
		where: { workshopId: manager.workshopId, role: { [Op.in]: STAFF_ROLES } },
		order: [
			['active', 'DESC'],
			['name', 'ASC'],
			['id', 'ASC']
		]
	});
	return {
		people: await showPeople(manager, people),
		invitations: await listInvitations(manager)
	};
}

export async function getPerson(manager: SignedInPerson, personId: number): Promise<PersonRow> {
	allow(manager, 'people.read');
	return showPerson(manager, await findStaff(manager, personId));
}

/** One change of one person, with the shop's people held meanwhile. */
async function changePerson(
	manager: SignedInPerson,
	personId: number,
	work: (person: Person, transaction: Transaction) => Promise<void>
): Promise<PersonRow> {
	allow(manager, 'people.write');
	return inTransaction(async (transaction) => {
		await holdStaff(manager, transaction);
		const person = await findStaff(manager, personId, transaction);
		await work(person, transaction);
		return showPerson(manager, person);
	});
}

const subjectOf = ({ id }: Person) => ({ type: 'person', id });

/** Gives a person another role. Their sessions end, so that nothing opened under the old one goes on. */
export function changeRole(
	manager: SignedInPerson,
	personId: number,
	{ role, version }: RoleChange
): Promise<PersonRow> {
	return changePerson(manager, personId, async (person, transaction) => {
		if (person.id === manager.id) throw new AppError('conflict', 'Nobody changes their own role.');
		if (!person.active) throw new AppError('conflict', `${person.name} has left: bring them back first.`);
		const before = person.role;
		if (before === role && person.version === version) return;
		await saveVersioned(person, 'person', version, { role }, transaction);
		await endSessions(person.id, 'role-changed', transaction);
		await recordBy(manager, 'person.role-changed', subjectOf(person), transaction, { before, role });
	});
}

async function requireAnotherManager({ id, workshopId }: Person, transaction: Transaction): Promise<void> {
	const where = { workshopId, role: 'manager' as const, active: true, id: { [Op.ne]: id } };
	if ((await Person.count({ where, transaction })) > 0) return;
	throw new AppError('conflict', 'The last manager cannot leave: make somebody else a manager first.');
}

/** Somebody leaves: no way in any more, at once, on any device. What they did keeps their name. */
export function leave(manager: SignedInPerson, personId: number, version: number): Promise<PersonRow> {
	return changePerson(manager, personId, async (person, transaction) => {
		if (!person.active) return;
		if (person.role === 'manager') await requireAnotherManager(person, transaction);
		const left = { active: false, leftAt: new Date() };
		await saveVersioned(person, 'person', version, left, transaction);
		await endSessions(person.id, 'left', transaction);
		await recordBy(manager, 'person.left', subjectOf(person), transaction);
	});
}

/** Somebody who had left is here again, as what they were. */
export function comeBack(manager: SignedInPerson, personId: number, version: number): Promise<PersonRow> {
	return changePerson(manager, personId, async (person, transaction) => {
		if (person.active) return;
		await saveVersioned(person, 'person', version, { active: true, leftAt: null }, transaction);
		await recordBy(manager, 'person.came-back', subjectOf(person), transaction);
	});
}
