import { Op, QueryTypes, col, literal, where as whereColumn, type WhereOptions } from 'sequelize';
import { z } from 'zod';
import type { AuditChoices, AuditPage, AuditQuery, AuditRow } from '$lib/schemas/audit';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { AuditEntry, Customer, OwnZone, Person } from '../db/models';
import { allow } from '../policies';
import { actionsSaying, presentAuditEntry, sayAction } from '../presenters/audit';
import { findNumbers, numberOf, subjectsNumbered, takeCounted } from './audit-numbers';
import { readCursor, writeCursor } from './cursors';
import { addDays } from './days';

const positionSchema = z.object({ before: z.number().int() });
const MOST_WORDS = 8;

const escapePattern = (word: string): string => word.replace(/[\\%_]/g, '\\$&');

/** Who of a workshop has a word in their name, as a condition on a number. */
function namedBy(table: 'people' | 'customers', workshopId: number, pattern: string) {
	const named = `SELECT id FROM ${table} WHERE workshop_id = ${Number(workshopId)} AND name LIKE ${connection().escape(pattern)}`;
	return { [Op.in]: literal(`(${named})`) };
}

/** Every word stands in what was recorded, in the action, in a name of whom it was by or about, or is a number. */
function matchAll(workshopId: number, words: string): WhereOptions[] {
	const { pairs, rest } = takeCounted(workshopId, words.split(/\s+/).filter(Boolean).slice(0, MOST_WORDS));
	return [
		...pairs,
		...rest.map((word) => {
			const pattern = `%${escapePattern(word)}%`;
			const like = { [Op.like]: pattern };
			const people = namedBy('people', workshopId, pattern);
			const customers = namedBy('customers', workshopId, pattern);
			const number = subjectsNumbered(workshopId, word);
			return {
				[Op.or]: [
					whereColumn(col('detail'), like),
					...[{ action: like }, { action: actionsSaying(word) }, { subjectType: like }, ...number],
					{ personId: people },
					{ subjectType: 'person', subjectId: people },
					{ subjectType: 'customer', subjectId: customers }
				]
			};
		})
	];
}

function filterOf(workshopId: number, query: AuditQuery): WhereOptions {
	const { person, action, subject, words, from, to } = query;
	return {
		[Op.and]: [
			{ workshopId },
			...(person === undefined ? [] : [{ personId: person }]),
			...(action === undefined ? [] : [{ action }]),
			...(subject === undefined ? [] : [{ subjectType: subject }]),
			...(from === undefined ? [] : [{ at: { [Op.gte]: new Date(from) } }]),
			// The day that was named is in.
			...(to === undefined ? [] : [{ at: { [Op.lt]: new Date(addDays(to, 1)) } }]),
			...matchAll(workshopId, words)
		]
	};
}

const subjectsOf = (entries: readonly AuditEntry[], type: string): number[] =>
	entries.filter(({ subjectType }) => subjectType === type).map(({ subjectId }) => subjectId);

const toNames = (rows: readonly { id: number; name: string }[]): Map<number, string> =>
	new Map(rows.map(({ id, name }) => [id, name]));

async function presentAll(workshopId: number, entries: readonly AuditEntry[]): Promise<AuditRow[]> {
	const people = [...entries.flatMap(({ personId }) => personId ?? []), ...subjectsOf(entries, 'person')];
	const ask = (ids: number[]) => ({ where: { id: [...new Set(ids)], workshopId } });
	const [persons, customers, zones, numbers] = await Promise.all([
		Person.findAll(ask(people)),
		Customer.findAll(ask(subjectsOf(entries, 'customer'))),
		OwnZone.findAll(ask(subjectsOf(entries, 'own-zone'))),
		findNumbers(workshopId, entries)
	]);
	const names = {
		person: toNames(persons),
		customer: toNames(customers),
		staff: new Set(persons.filter(({ role }) => role !== 'customer').map(({ id }) => id)),
		zones: new Set(zones.map(({ id }) => id)),
		numberOf: (type: string, id: number) => numberOf(type, id, numbers)
	};
	return entries.map((entry) => presentAuditEntry(entry, names));
}

function readBefore(filter: WhereOptions, before: number | null, limit: number): Promise<AuditEntry[]> {
	const where = before === null ? filter : { [Op.and]: [filter, { sequence: { [Op.lt]: before } }] };
	return AuditEntry.findAll({ where, order: [['sequence', 'DESC']], limit });
}

/** One page of the workshop's trail, the newest first. */
export async function listAudit(person: SignedInPerson, query: AuditQuery): Promise<AuditPage> {
	const { workshopId } = allow(person, 'audit.read');
	const { cursor, limit } = query;
	const scope = `audit ${workshopId}`;
	const before = cursor === undefined ? null : readCursor(scope, cursor, positionSchema).before;
	const filter = filterOf(workshopId, query);
	// One more than asked for tells whether there is a next page.
	const found = await readBefore(filter, before, limit + 1);
	const page = found.slice(0, limit);
	return {
		rows: await presentAll(workshopId, page),
		total: await AuditEntry.count({ where: filter }),
		next: found.length > limit ? writeCursor(scope, { before: page.at(-1)!.sequence }) : null
	};
}

/** What the trail holds, to choose from. */
export async function listAuditChoices(person: SignedInPerson): Promise<AuditChoices> {
	const { workshopId } = allow(person, 'audit.read');
	const [people, rows] = await Promise.all([
		Person.findAll({ where: { workshopId }, attributes: ['id', 'name'], order: [['name', 'ASC']] }),
		connection().query<{ action: string; subject: string }>(
			'SELECT DISTINCT action, subject_type AS subject FROM audit_entries WHERE workshop_id = :workshopId',
			{ replacements: { workshopId }, type: QueryTypes.SELECT }
		)
	]);
	const actions = [...new Set(rows.map(({ action }) => action))];
	return {
		people: people.map(({ id, name }) => ({ id, name })),
		actions: actions
			.map((key) => ({ key, label: sayAction(key) }))
			.sort((a, b) => a.label.localeCompare(b.label)),
		subjects: [...new Set(rows.map(({ subject }) => subject))].sort()
	};
}

const BATCH = 500;

/** All that a question finds, batch by batch, however long it is. */
export async function* readAudit(person: SignedInPerson, query: AuditQuery): AsyncGenerator<AuditRow[]> {
	const { workshopId } = allow(person, 'audit.read');
	const filter = filterOf(workshopId, query);
	let before: number | null = null;
	for (;;) {
		const batch: AuditEntry[] = await readBefore(filter, before, BATCH);
		if (batch.length > 0) yield await presentAll(workshopId, batch);
		if (batch.length < BATCH) return;
		before = batch.at(-1)!.sequence;
	}
}
