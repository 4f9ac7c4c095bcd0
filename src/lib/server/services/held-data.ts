import { strToU8, zipSync, type Zippable } from 'fflate';
import type { CustomerPaper } from '$lib/schemas/my';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	Acknowledgement,
	Assessment,
	Customer,
	FieldNote,
	FieldNoteStrike,
	Installation,
	Job,
	OutgoingMail,
	Person,
	Session,
	Sheet,
	StoredFile,
	Trace,
	Vehicle
} from '../db/models';
import { Op } from 'sequelize';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import {
	pathOfFile,
	presentHeldData,
	textOfSheet,
	type HeldData,
	type HeldRows
} from '../presenters/held-data';
import { writeHeldIndex, type ParcelFile } from '../presenters/held-index';
import { recordBy } from './audit';
import { listCustomerDocuments } from './customer-documents';
import { getMyErasure } from './erasures';
import { readStoredContent } from './files';
import { listMyVehicles } from './my-vehicles';
import { writeMyHandover, writeMyRecommendation } from './papers';
import { readThread } from './question-threads';

async function readStruckNotes(jobIds: number[]): Promise<HeldRows['struckNotes']> {
	const installations = await Installation.findAll({ where: { jobId: jobIds }, attributes: ['id', 'jobId'] });
	const where = { installationId: installations.map(({ id }) => id) };
	const notes = await FieldNote.findAll({ where, attributes: { exclude: ['finding'] } });
	const strikes = await FieldNoteStrike.findAll({
		where: { fieldNoteId: notes.map(({ id }) => id) },
		order: [['id', 'ASC']]
	});
	return strikes.map((strike) => {
		const note = notes.find(({ id }) => id === strike.fieldNoteId)!;
		const { jobId } = installations.find(({ id }) => id === note.installationId)!;
		return { jobId, note, strike };
	});
}

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
		files: await StoredFile.findAll({ where: { jobId: jobIds, removedAt: null }, order: [['id', 'ASC']] }),
		traces: await Trace.findAll({
			where: { jobId: jobIds, removedAt: null },
			attributes: ['jobId', 'name', 'createdAt', 'span', 'isSynthetic'],
			order: [['id', 'ASC']]
		}),
		struckNotes: await readStruckNotes(jobIds),
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

/** A file of the parcel with what it holds. */
interface Content extends ParcelFile {
	bytes: Uint8Array;
}

const sheetPath = ({ id }: Sheet): string => `documents/page-${id}.txt`;

const WRITERS: Readonly<Record<CustomerPaper['kind'], typeof writeMyHandover>> = {
	handover: writeMyHandover,
	recommendation: writeMyRecommendation
};

/** The documents that are written when they are asked for. */
async function writePapers(person: SignedInPerson, jobs: readonly Job[]): Promise<Content[]> {
	const papers: Content[] = [];
	for (const { title, paper } of await listCustomerDocuments(jobs.map(({ id }) => id))) {
		if (!paper) continue;
		const { kind, id } = paper;
		// One that cannot be written any more, because its mount was taken away, holds up nothing else.
		const bytes = await WRITERS[kind](person, id).catch((error: unknown) => {
			if (error instanceof AppError) return null;
			throw error;
		});
		if (bytes) papers.push({ path: `documents/${kind}-${id}.pdf`, about: title, bytes });
	}
	return papers;
}

async function readFiles(files: readonly StoredFile[]): Promise<Content[]> {
	const contents: Content[] = [];
	for (const file of files) {
		const { bytes } = await readStoredContent(file, 'full');
		contents.push({ path: pathOfFile(file), about: file.caption || file.name, bytes });
	}
	return contents;
}

/** The same as a parcel to keep: the data for programs, a first page for people, and the documents. */
export async function packHeldData(person: SignedInPerson, madeAt = new Date()): Promise<Uint8Array> {
	const held = await readHeld(person);
	const data = presentHeldData(held);
	const contents = [...(await writePapers(person, held.jobs)), ...(await readFiles(held.files))];
	const files: ParcelFile[] = [
		{ path: 'data.json', about: 'all of it, for programs' },
		...held.sheets.map((sheet) => ({
			path: sheetPath(sheet),
			about: `the page about ${sheet.content.mountName}`
		})),
		...contents.map(({ path, about }) => ({ path, about }))
	];
	const index = writeHeldIndex(data, files, { workshopName: person.workshopName, madeAt });
	const packed = zipSync({
		'read-me-first.txt': strToU8(index),
		'data.json': strToU8(JSON.stringify(data, null, '\t')),
		...Object.fromEntries(held.sheets.map((sheet) => [sheetPath(sheet), strToU8(textOfSheet(sheet))])),
		// Photos and documents are packed already.
		...Object.fromEntries(
			contents.map(({ path, bytes }): [string, Zippable[string]] => [path, [bytes, { level: 0 }]])
		)
	});
	await note(person);
	return packed;
}
