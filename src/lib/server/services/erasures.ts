import { literal, Op, type Transaction } from 'sequelize';
import type { DecideErasure, ErasureView, MyErasure } from '$lib/schemas/erasures';
import type { SignedInPerson } from '$lib/schemas/people';
import { Customer, Erasure, Job, OutgoingMail, Person, Vehicle, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { AppError, notFound } from '../errors';
import {
	writeErasureAsked,
	writeErasureGranted,
	writeErasureRefused,
	writeErasureWithdrawn
} from '../mail/erasure-letters';
import { postLetter } from '../mail/outbox';
import { allow } from '../policies';
import { presentErasure, presentMyErasure } from '../presenters/erasures';
import { recordBy } from './audit';
import { ERASED_ACTION } from './audit-erased';
import { blankTrail } from './erasing/blank-trail';
import { findPersona } from './erasing/find-persona';
import { STEPS } from './erasing/sweep';
import { saveVersioned } from './records';

const MOST_LISTED = 50;

async function present(erasure: Erasure): Promise<ErasureView> {
	const { id: erasureId, customerId } = erasure;
	const [customer, jobs, vehicles, letter] = await Promise.all([
		Customer.findByPk(customerId),
		Job.findAll({ where: { customerId }, attributes: ['number'], order: [['number', 'ASC']] }),
		Vehicle.count({ where: { customerId } }),
		OutgoingMail.findOne({ where: { erasureId }, order: [['id', 'DESC']] })
	]);
	return presentErasure(erasure, { customer, jobs, vehicles, letter });
}

/** What customers asked to have deleted: what waits first, then what was decided. */
export async function listErasures(person: SignedInPerson): Promise<ErasureView[]> {
	const { workshopId } = allow(person, 'erasures.decide');
	const waiting = await Erasure.findAll({
		where: { workshopId, state: 'asked' },
		// What a person asked for stands before what a rule put here, and of each the one that waits longest.
		order: [
			[literal('asked_by IS NULL'), 'ASC'],
			['id', 'ASC']
		],
		limit: MOST_LISTED
	});
	const decided = await Erasure.findAll({
		where: { workshopId, state: { [Op.ne]: 'asked' } },
		order: [['id', 'DESC']],
		limit: MOST_LISTED
	});
	return Promise.all([...waiting, ...decided].map(present));
}

/** A customer's newest request, if they made one. */
export async function getMyErasure(person: SignedInPerson): Promise<MyErasure | null> {
	const { customerId } = allow(person, 'erasures.ask');
	const newest = await Erasure.findOne({ where: { customerId: customerId! }, order: [['id', 'DESC']] });
	return newest && presentMyErasure(newest);
}

const TO_SHOP = { 'erasure-asked': writeErasureAsked, 'erasure-withdrawn': writeErasureWithdrawn };

async function tellShop(
	workshopId: number,
	kind: keyof typeof TO_SHOP,
	transaction: Transaction
): Promise<void> {
	const workshop = (await Workshop.findByPk(workshopId, { transaction }))!;
	const manager = await Person.findOne({ where: { workshopId, role: 'manager', active: true }, transaction });
	const recipient = workshop.email || manager?.email;
	if (!recipient) return;
	const letter = TO_SHOP[kind](workshop, `${env().ORIGIN}/erasures`);
	await postLetter({ ...letter, kind, workshopId, recipient }, transaction);
}

/** A customer asks that what is held about them be deleted; to ask again while that waits changes nothing. */
export async function askErasure(person: SignedInPerson): Promise<MyErasure> {
	const { workshopId, customerId } = allow(person, 'erasures.ask');
	return inTransaction(async (transaction) => {
		const customer = await Customer.findByPk(customerId!, { transaction, lock: true });
		if (!customer) throw notFound('customer');
		const waiting = await Erasure.findOne({
			where: { customerId: customer.id, state: 'asked' },
			transaction
		});
		if (waiting) return presentMyErasure(waiting);
		const row = { workshopId, customerId: customer.id, askedBy: person.id };
		const erasure = await Erasure.create(row, { transaction });
		await tellShop(workshopId, 'erasure-asked', transaction);
		const subject = { type: 'customer', id: customer.id };
		await recordBy(person, 'customer.erasure-asked', subject, transaction);
		return presentMyErasure(erasure);
	});
}

const NOTHING_WAITS =
	'No request of yours waits for a decision. What was granted is deleted and cannot be undone.';

/** A customer takes back their own request while it waits; the shop is told, as it was told of the request. */
export async function withdrawErasure(person: SignedInPerson): Promise<MyErasure> {
	const { workshopId, customerId } = allow(person, 'erasures.withdraw');
	return inTransaction(async (transaction) => {
		const erasure = await Erasure.findOne({
			where: { customerId: customerId!, state: 'asked', askedBy: { [Op.not]: null } },
			transaction,
			lock: transaction.LOCK.UPDATE
		});
		if (!erasure) throw new AppError('conflict', NOTHING_WAITS);
		await saveVersioned(
			erasure,
			'request',
			erasure.version,
			{ state: 'withdrawn', decidedAt: new Date() },
			transaction
		);
		await tellShop(workshopId, 'erasure-withdrawn', transaction);
		const subject = { type: 'customer', id: customerId! };
		await recordBy(person, 'customer.erasure-withdrawn', subject, transaction, { erasureId: erasure.id });
		return presentMyErasure(erasure);
	});
}

/** To whom the decision is told: the address of the sign-in, else the one that the shop knows. */
async function findAddress(
	{ askedBy }: Erasure,
	customer: Customer,
	transaction: Transaction
): Promise<string> {
	const asker = askedBy ? await Person.findByPk(askedBy, { transaction }) : null;
	return asker?.email ?? customer.email;
}

interface Decision {
	person: SignedInPerson;
	erasure: Erasure;
	customer: Customer;
	workshop: Workshop;
	recipient: string;
}

const decided = ({ id }: SignedInPerson) => ({ decidedBy: id, decidedAt: new Date() });

async function refuse(
	{ person, erasure, customer, workshop, recipient }: Decision,
	reason: string,
	transaction: Transaction
): Promise<void> {
	if (reason === '') {
		const message = 'Reason is missing: say why it is refused.';
		throw new AppError('invalid_input', message, [{ path: 'reason', message }]);
	}
	await erasure.update({ state: 'refused', reason, ...decided(person) }, { transaction });
	const { workshopId } = person;
	const letter = writeErasureRefused(customer.name, workshop, reason);
	const about = { kind: 'erasure-refused', workshopId, erasureId: erasure.id } as const;
	const posted = { ...about, recipient, replyTo: workshop.email };
	if (recipient) await postLetter({ ...letter, ...posted }, transaction);
	const subject = { type: 'customer', id: customer.id };
	await recordBy(person, 'customer.erasure-refused', subject, transaction, { erasureId: erasure.id });
}

/**
 * Takes a person out of everything that is held: names, addresses, telephone, registration, questions, sign-in, links.
 * What was measured and worked out stays. The trail stays whole; its entry says which others were emptied.
 */
async function eraseCustomer(
	{ person, erasure, customer, workshop, recipient }: Decision,
	transaction: Transaction
): Promise<void> {
	await erasure.update({ state: 'running', ...decided(person) }, { transaction });
	const persona = await findPersona(customer, transaction);
	for (const step of STEPS) await step(persona, transaction);
	const blanked = await blankTrail(persona, erasure.id, transaction);
	await erasure.reload({ transaction });
	await erasure.update({ state: 'granted' }, { transaction });
	const { workshopId } = person;
	const posted = { kind: 'erasure-granted', workshopId, erasureId: erasure.id, recipient } as const;
	if (recipient) await postLetter({ ...writeErasureGranted(workshop), ...posted }, transaction);
	const subject = { type: 'customer', id: customer.id };
	await recordBy(person, ERASED_ACTION, subject, transaction, { erasureId: erasure.id, blanked });
}

/** A manager grants a request, and it is done at once, or refuses it with a reason; the customer gets a letter. */
export async function decideErasure(
	person: SignedInPerson,
	erasureId: number,
	{ decision, reason, version }: DecideErasure
): Promise<ErasureView> {
	allow(person, 'erasures.decide');
	return inTransaction(async (transaction) => {
		const where = { id: erasureId, workshopId: person.workshopId };
		const erasure = await Erasure.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
		if (!erasure) throw notFound('request');
		if (erasure.state === 'withdrawn')
			throw new AppError('conflict', 'The customer has taken this request back.');
		if (erasure.state !== 'asked') throw new AppError('conflict', 'This request was decided already.');
		await saveVersioned(erasure, 'request', version, {}, transaction);
		const customer = (await Customer.findByPk(erasure.customerId, { transaction }))!;
		const workshop = (await Workshop.findByPk(person.workshopId, { transaction }))!;
		const recipient = await findAddress(erasure, customer, transaction);
		const made = { person, erasure, customer, workshop, recipient };
		if (decision === 'refuse') await refuse(made, reason, transaction);
		else await eraseCustomer(made, transaction);
		return present(erasure);
	});
}
