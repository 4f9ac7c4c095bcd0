import type { HistoryEntry, MyVehicle } from '$lib/schemas/my';
import type { SignedInPerson } from '$lib/schemas/people';
import { Acknowledgement, FollowUp, Installation, Job, Sheet, Vehicle } from '../db/models';
import { allow } from '../policies';
import type { JudgedNote } from '../presenters/field-notes';
import {
	sayDue,
	tellFitting,
	tellFollowUp,
	tellNote,
	tellQuestions,
	tellSheet
} from '../presenters/my-history';
import { listHeatDifferences } from '$lib/format/fitted';
import { formatVehicle } from '$lib/format/vehicles';
import { listCustomerDocuments } from './customer-documents';
import { countDoubts } from './field-doubts';
import { listLessons } from './field-lessons';
import { readNoted } from './judged-notes';
import { readThread } from './question-threads';

async function readFitted(jobIds: number[]) {
	const installations = await Installation.findAll({ where: { jobId: jobIds } });
	const where = { installationId: installations.map(({ id }) => id) };
	const [followUps, noted] = await Promise.all([
		FollowUp.findAll({ where, order: [['dueOn', 'ASC']] }),
		readNoted(installations)
	]);
	const { notes, strikes } = noted;
	const doubts = countDoubts(noted, installations);
	const installationOf = ({ installationId }: { installationId: number }) =>
		installations.find(({ id }) => id === installationId)!;
	const aroundOf = (note: JudgedNote) => ({
		strike: strikes.find(({ fieldNoteId }) => fieldNoteId === note.id) ?? null,
		isOtherwise: listHeatDifferences(installationOf(note)).length > 0,
		doubts: doubts.get(note.id) ?? 0
	});
	const jobOf = (row: { installationId: number }): number => installationOf(row).jobId;
	return { installations, followUps, notes, aroundOf, jobOf };
}

async function tellAll(jobIds: number[]) {
	const [sheets, fitted, threads] = await Promise.all([
		Sheet.findAll({ where: { jobId: jobIds }, include: { model: Acknowledgement, as: 'acknowledgement' } }),
		readFitted(jobIds),
		Promise.all(jobIds.map(async (jobId) => tellQuestions(await readThread(jobId), jobId)))
	]);
	const { installations, followUps, notes, aroundOf, jobOf } = fitted;
	const history: HistoryEntry[] = [
		...sheets.flatMap(tellSheet),
		...installations.map(tellFitting),
		...followUps.flatMap((followUp) => tellFollowUp(followUp, jobOf(followUp))),
		...notes.map((note) => tellNote(note, jobOf(note), aroundOf(note))),
		...threads.flat()
	];
	const due = followUps
		.filter(({ doneOn }) => (doneOn ?? null) === null)
		.map((followUp) => ({ jobId: jobOf(followUp), words: sayDue(followUp) }));
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
