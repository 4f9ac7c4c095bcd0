import { strToU8, zipSync } from 'fflate';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	Acknowledgement,
	Assessment,
	Customer,
	Job,
	OutgoingMail,
	Person,
	Session,
	Sheet,
	Vehicle
} from '../db/models';
import { Op } from 'sequelize';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { presentHeldData, textOfSheet, type HeldData, type HeldRows } from '../presenters/held-data';
import { writeHeldIndex, type ParcelFile } from '../presenters/held-index';
import { recordBy } from './audit';
import { getMyErasure } from './erasures';
import { listMyVehicles } from './my-vehicles';
import { readThread } from './question-threads';

async function readHeld(person: SignedInPerson): Promise<HeldRows> {
	const { workshopId, customerId } = allow(person, 'held-data.read-own');
	const customer = await Customer.findOne({ where: { id: customerId!, workshopId } });
	if (!customer) throw notFound('customer');
	const where = { workshopId, customerId: customer.id };
	const people = await Person.findAll({ where });
	const jobs = await Job.findAll({ where, order: [['number', 'ASC']] });
	const jobIds = jobs.map(({ id }) => id);
	const addresses = [...people.map(({ email }) => email), customer.email].filter((each) => each !== '');
	return {
		...{ customer, people, jobs },
		sessions: await Session.findAll({ where: { personId: people.map(({ id }) => id) } }),
		vehicles: await Vehicle.findAll({ where }),
		assessments: await Assessment.findAll({ where: { jobId: jobIds }, attributes: { exclude: ['result'] } }),
		sheets: await Sheet.findAll({
			where: { jobId: jobIds },
			include: { model: Acknowledgement, as: 'acknowledgement' }
		}),
		questions: await Promise.all(jobIds.map(async (jobId) => ({ jobId, thread: await readThread(jobId) }))),
		letters: await OutgoingMail.findAll({
			where: { workshopId, [Op.or]: [{ jobId: jobIds }, { recipient: addresses }] },
			order: [['id', 'ASC']]
		}),
		story: await listMyVehicles(person),
		erasure: await getMyErasure(person)
	};
}

async function note(person: SignedInPerson): Promise<void> {
	const subject = { type: 'customer', id: person.customerId! };
	await inTransaction((transaction) => recordBy(person, 'customer.data-taken', subject, transaction));
}

/** Everything that is held about a signed-in customer; that they took it is on record. */
export async function getHeldData(person: SignedInPerson): Promise<HeldData> {
	const held = await readHeld(person);
	await note(person);
	return presentHeldData(held);
}

const sheetPath = ({ id }: Sheet): string => `documents/page-${id}.txt`;

/** The same as a parcel to keep: the data for programs, a first page for people, and the documents. */
export async function packHeldData(person: SignedInPerson, madeAt = new Date()): Promise<Uint8Array> {
	const held = await readHeld(person);
	const data = presentHeldData(held);
	const files: ParcelFile[] = [
		{ path: 'data.json', about: 'all of it, for programs' },
		...held.sheets.map((sheet) => ({
			path: sheetPath(sheet),
			about: `the page about ${sheet.content.mountName}`
		}))
	];
	const index = writeHeldIndex(data, files, { workshopName: person.workshopName, madeAt });
	const packed = zipSync({
		'read-me-first.txt': strToU8(index),
		'data.json': strToU8(JSON.stringify(data, null, '\t')),
		...Object.fromEntries(held.sheets.map((sheet) => [sheetPath(sheet), strToU8(textOfSheet(sheet))]))
	});
	await note(person);
	return packed;
}
