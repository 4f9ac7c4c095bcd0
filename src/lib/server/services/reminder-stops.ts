import { Op } from 'sequelize';
import { Customer, Job, OutgoingMail, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { notFound } from '../errors';
import { isSealed, sealOf } from '../hash';
import { dropMails } from '../mail/outbox';
import { record } from './audit';

const PURPOSE = 'stop reminders';

/** Where a customer stops the reminders that they get, without signing in: whoever has the letter may. */
export const stopPathOf = (customerId: number): string =>
	`/reminders/${customerId}.${sealOf(PURPOSE, String(customerId))}`;

export const stopUrlOf = (customerId: number): string => `${env().ORIGIN}${stopPathOf(customerId)}`;

async function findSealed(stop: string): Promise<Customer> {
	const [id = '', seal = ''] = stop.split('.');
	if (!/^\d{1,15}$/.test(id) || !isSealed(PURPOSE, id, seal)) throw notFound('page');
	const customer = await Customer.findByPk(Number(id));
	if (!customer) throw notFound('page');
	return customer;
}

export interface ReminderChoice {
	workshopName: string;
	stoppedAt: string | null;
}

async function show({ workshopId, remindersStoppedAt }: Customer): Promise<ReminderChoice> {
	const workshop = await Workshop.findByPk(workshopId);
	return {
		workshopName: workshop?.name ?? '',
		stoppedAt: remindersStoppedAt?.toISOString() ?? null
	};
}

/** Whether reminders go out; to look stops nothing, for programs that scan mail look too. */
export async function openReminderChoice(stop: string): Promise<ReminderChoice> {
	return show(await findSealed(stop));
}

async function dropWaiting(customerId: number): Promise<void> {
	const jobs = await Job.findAll({ where: { customerId }, attributes: ['id'] });
	const waiting = await OutgoingMail.findAll({
		where: {
			jobId: { [Op.in]: jobs.map(({ id }) => id) },
			kind: 'reminder',
			state: ['waiting', 'failed', 'unsure']
		},
		attributes: ['id']
	});
	await dropMails(
		waiting.map(({ id }) => id),
		'Not sent: the customer stopped reminders first.'
	);
}

/** Stops the reminders of a customer, or lets them go out again; to ask twice changes nothing more. */
export async function chooseReminders(stop: string, wanted: boolean): Promise<ReminderChoice> {
	const { id } = await findSealed(stop);
	return inTransaction(async (transaction) => {
		const customer = (await Customer.findByPk(id, { transaction, lock: true }))!;
		if (wanted === ((customer.remindersStoppedAt ?? null) === null)) return show(customer);
		await customer.update({ remindersStoppedAt: wanted ? null : new Date() }, { transaction });
		if (!wanted) await dropWaiting(id);
		const action = wanted ? 'customer.reminders-wanted' : 'customer.reminders-stopped';
		const subject = { subjectType: 'customer', subjectId: id };
		await record({ workshopId: customer.workshopId, personId: null, action, ...subject }, transaction);
		return show(customer);
	});
}
