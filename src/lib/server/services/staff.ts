import { Op, type Transaction } from 'sequelize';
import { STAFF_ROLES, type SignedInPerson } from '$lib/schemas/people';
import { Person, Workshop } from '../db/models';
import { AppError, notFound } from '../errors';

/**
 * Holds the workshop while its people change, and looks once more whether the one who changes them is its manager still:
 * of two managers who take each other's role at once, only one comes through.
 */
export async function holdStaff(manager: SignedInPerson, transaction: Transaction): Promise<Workshop> {
	const workshop = await Workshop.findByPk(manager.workshopId, { lock: true, transaction });
	const now = await Person.findByPk(manager.id, { transaction });
	if (!workshop || !now?.active || now.role !== 'manager') {
		throw new AppError('not_allowed', 'You are not a manager of this workshop any more.');
	}
	return workshop;
}

/** Somebody who works in the shop, or worked there. Customers who sign in are none of its staff. */
export async function findStaff(
	{ workshopId }: SignedInPerson,
	id: number,
	transaction?: Transaction
): Promise<Person> {
	const where = { id, workshopId, role: { [Op.in]: STAFF_ROLES } };
	const person = await Person.findOne({ where, ...(transaction ? { transaction } : {}) });
	if (!person) throw notFound('person');
	return person;
}
