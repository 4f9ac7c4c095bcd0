import type { Transaction } from 'sequelize';
import {
	Acknowledgement,
	AuditEntry,
	Customer,
	CustomerMessage,
	Installation,
	Job,
	Mount,
	Person,
	Recommendation,
	Sheet,
	Vehicle,
	Workshop
} from '../../db/models';
import { makeScrubber, type Scrubber } from './scrub';

/** A customer with every row that is about them, and every word by which they are known. */
export interface Persona {
	workshopId: number;
	customer: Customer;
	people: Person[];
	vehicles: Vehicle[];
	jobs: Job[];
	sheets: Sheet[];
	ids: { people: number[]; vehicles: number[]; jobs: number[]; sheets: number[]; mounts: number[] };
	installationIds: number[];
	recommendationIds: number[];
	terms: string[];
	scrub: Scrubber;
}

const idsOf = (rows: readonly { id: number }[]): number[] => rows.map(({ id }) => id);

/** What the customer was called before somebody changed it. */
async function listFormer(workshopId: number, customerId: number, transaction: Transaction) {
	const where = { workshopId, subjectType: 'customer', subjectId: customerId };
	const entries = await AuditEntry.findAll({ where, transaction });
	const textAt = (detail: Record<string, unknown>, key: string): string =>
		typeof detail[key] === 'string' ? detail[key] : '';
	return entries.map(({ detail }) => ({
		name: textAt(detail, 'name'),
		others: [textAt(detail, 'email'), textAt(detail, 'phone')]
	}));
}

/** The shop's own names and addresses stay, even where a customer used one of them. */
async function listShopsOwn(workshopId: number, transaction: Transaction): Promise<Set<string>> {
	const workshop = await Workshop.findByPk(workshopId, { transaction });
	const staff = await Person.findAll({ where: { workshopId, customerId: null }, transaction });
	const own = [
		workshop?.name,
		workshop?.email,
		workshop?.phone,
		...staff.flatMap(({ name, email }) => [name, email])
	];
	return new Set(own.flatMap((each) => (each ? [each.toLowerCase()] : [])));
}

export async function findPersona(customer: Customer, transaction: Transaction): Promise<Persona> {
	const { id: customerId, workshopId } = customer;
	const where = { workshopId, customerId };
	const people = await Person.findAll({ where, transaction });
	const vehicles = await Vehicle.findAll({ where, transaction });
	const jobs = await Job.findAll({ where, transaction });
	const ofJobs = { where: { jobId: idsOf(jobs) }, transaction };
	const sheets = await Sheet.findAll(ofJobs);
	const mounts = await Mount.findAll(ofJobs);
	const installations = await Installation.findAll(ofJobs);
	const acknowledgements = await Acknowledgement.findAll({ where: { sheetId: idsOf(sheets) }, transaction });
	const questions = await CustomerMessage.findAll({
		where: { ...ofJobs.where, questionId: null },
		transaction
	});
	const former = await listFormer(workshopId, customerId, transaction);
	const shops = await listShopsOwn(workshopId, transaction);
	const isTheirs = (term: string): boolean => term.trim() !== '' && !shops.has(term.toLowerCase());
	const names = [
		...[customer.name, ...people.map(({ name }) => name), ...former.map(({ name }) => name)],
		...[...acknowledgements.map(({ name }) => name), ...questions.map(({ authorName }) => authorName)]
	].filter(isTheirs);
	const terms = [
		...[...names, customer.email, customer.phone, ...people.map(({ email }) => email)],
		...[...former.flatMap(({ others }) => others), ...sheets.map(({ sentTo }) => sentTo)],
		...vehicles.map(({ registration }) => registration)
	].filter(isTheirs);
	return {
		...{ workshopId, customer, people, vehicles, jobs, sheets },
		ids: {
			...{ people: idsOf(people), vehicles: idsOf(vehicles), jobs: idsOf(jobs) },
			...{ sheets: idsOf(sheets), mounts: idsOf(mounts) }
		},
		installationIds: idsOf(installations),
		recommendationIds: idsOf(await Recommendation.findAll(ofJobs)),
		terms: [...new Set(terms)],
		scrub: makeScrubber(terms, names)
	};
}
