import type { HistoryEntry, MyVehicle } from '$lib/schemas/my';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	Acknowledgement,
	FieldNote,
	FieldNoteStrike,
	FollowUp,
	Installation,
	Job,
	Sheet,
	Vehicle
} from '../db/models';
import { allow } from '../policies';
import {
	sayDue,
	tellFitting,
	tellFollowUp,
	tellNote,
	tellQuestions,
	tellSheet
} from '../presenters/my-history';
import { formatVehicle } from '$lib/format/vehicles';
import { listCustomerDocuments } from './customer-documents';
import { listLessons } from './field-lessons';
import { readThread } from './question-threads';

async function readFitted(jobIds: number[]) {
	const installations = await Installation.findAll({ where: { jobId: jobIds } });
	const where = { installationId: installations.map(({ id }) => id) };
	const [followUps, notes] = await Promise.all([
		FollowUp.findAll({ where, order: [['dueOn', 'ASC']] }),
		FieldNote.findAll({ where })
	]);
	const strikes = await FieldNoteStrike.findAll({ where: { fieldNoteId: notes.map(({ id }) => id) } });
	const strikeOf = ({ id }: FieldNote) => strikes.find(({ fieldNoteId }) => fieldNoteId === id) ?? null;
	const jobOf = (installationId: number): number =>
		installations.find(({ id }) => id === installationId)!.jobId;
	return { installations, followUps, notes, strikeOf, jobOf };
}

async function tellAll(jobIds: number[]) {
	const [sheets, fitted, threads] = await Promise.all([
		Sheet.findAll({ where: { jobId: jobIds }, include: { model: Acknowledgement, as: 'acknowledgement' } }),
		readFitted(jobIds),
		Promise.all(jobIds.map(async (jobId) => tellQuestions(await readThread(jobId), jobId)))
	]);
	const { installations, followUps, notes, strikeOf, jobOf } = fitted;
	const history: HistoryEntry[] = [
		...sheets.flatMap(tellSheet),
		...installations.map(tellFitting),
		...followUps.flatMap((followUp) => tellFollowUp(followUp, jobOf(followUp.installationId))),
		...notes.map((note) => tellNote(note, jobOf(note.installationId), strikeOf(note))),
		...threads.flat()
	];
	const due = followUps
		.filter(({ doneOn }) => (doneOn ?? null) === null)
		.map((followUp) => ({ jobId: jobOf(followUp.installationId), words: sayDue(followUp) }));
	return { history: history.sort((a, b) => (a.at < b.at ? 1 : a.at > b.at ? -1 : 0)), due };
}

/** All vehicles of a signed-in customer, with their documents, what happened, and what the field has taught. */
export async function listMyVehicles(person: SignedInPerson): Promise<MyVehicle[]> {
	const { workshopId, customerId } = allow(person, 'documents.read-own');
	const where = { workshopId, customerId: customerId! };
	const [vehicles, jobs] = await Promise.all([
		Vehicle.findAll({ where, order: [['id', 'DESC']] }),
		Job.findAll({ where, attributes: ['id', 'vehicleId'] })
	]);
	const jobIds = jobs.map(({ id }) => id);
	const [documents, lessons, { history, due }] = await Promise.all([
		listCustomerDocuments(jobIds),
		listLessons(jobIds),
		tellAll(jobIds)
	]);
	return vehicles.map((vehicle) => {
		const own = new Set(jobs.filter(({ vehicleId }) => vehicleId === vehicle.id).map(({ id }) => id));
		const ofVehicle = <T extends { jobId: number }>(rows: T[]): T[] =>
			rows.filter(({ jobId }) => own.has(jobId));
		return {
			...{ id: vehicle.id, name: formatVehicle(vehicle), registration: vehicle.registration },
			documents: ofVehicle(documents),
			lessons: ofVehicle(lessons),
			history: ofVehicle(history),
			due: ofVehicle(due).map(({ words }) => words)
		};
	});
}
