import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { PROJECT } from '../../../../tests/support/source-files';
import { pastGuard } from '../../../../tests/support/audit-guard';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { auditQuerySchema, type AuditQuery } from '$lib/schemas/audit';
import { AuditEntry, Customer, Person } from '../db/models';
import { inTransaction } from '../db/transaction';
import { chainHash, GENESIS } from './audit-chain';
import { recordBy, type AuditAction } from './audit';
import { checkOwnTrail, lastCheck } from './audit-check';
import { writeAuditCsv } from './audit-csv';
import { listAudit, listAuditChoices } from './audit-list';

useTestDatabase();

async function note(crew: Crew, role: 'manager' | 'installer', action: AuditAction, id: number, detail = {}) {
	await inTransaction((transaction) =>
		recordBy(crew[role], action, { type: action.split('.')[0]!, id }, transaction, detail)
	);
}

async function makeTrail(length = 4): Promise<Crew> {
	const crew = await makeCrew();
	for (let id = 1; id <= length; id++) await note(crew, 'manager', 'place.changed', id, { heatC: 40 + id });
	return crew;
}

interface Run {
	code: number;
	stdout: string;
	stderr: string;
}

function runCommand(...args: string[]): Promise<Run> {
	const tsx = join(PROJECT, 'node_modules/.bin/tsx');
	return new Promise((resolve) => {
		execFile(tsx, ['src/cli/audit-check.ts', ...args], { cwd: PROJECT }, (error, stdout, stderr) => {
			resolve({ code: typeof error?.code === 'number' ? error.code : 0, stdout, stderr });
		});
	});
}

/** Writes the last entry anew with a right hash, and the head with it: whole by itself, and not what was there. */
async function rewriteLast({ workshopId }: Crew): Promise<string[]> {
	const last = await AuditEntry.findOne({ where: { workshopId }, order: [['sequence', 'DESC']] });
	const { sequence, at, personId, action, subjectType, subjectId, previousHash } = last!;
	const chained = { workshopId, sequence, at, personId, action, subjectType, subjectId, previousHash };
	const hash = chainHash({ ...chained, detail: { heatC: 1 } });
	return [
		`UPDATE audit_entries SET detail = '{"heatC":1}', hash = '${hash}' WHERE id = ${last!.id}`,
		`UPDATE audit_heads SET hash = '${hash}' WHERE workshop_id = ${workshopId}`
	];
}

const CASES: [string, 'update' | 'delete', (id: number) => string[], string][] = [
	[
		'an edit',
		'update',
		(id) => [`UPDATE audit_entries SET subject_id = 9 WHERE sequence = 2 AND workshop_id = ${id}`],
		'entry 2 was changed'
	],
	[
		'a deletion',
		'delete',
		(id) => [`DELETE FROM audit_entries WHERE sequence = 2 AND workshop_id = ${id}`],
		'entry 2 is missing'
	],
	[
		'a swap',
		'update',
		(id) => [
			`UPDATE audit_entries SET sequence = 99 WHERE sequence = 2 AND workshop_id = ${id}`,
			`UPDATE audit_entries SET sequence = 2 WHERE sequence = 3 AND workshop_id = ${id}`,
			`UPDATE audit_entries SET sequence = 3 WHERE sequence = 99 AND workshop_id = ${id}`
		],
		'entry 2 does not follow the one before it'
	],
	[
		'a cut tail',
		'delete',
		(id) => [`DELETE FROM audit_entries WHERE sequence > 2 AND workshop_id = ${id}`],
		'the end of the trail is cut off'
	],
	[
		'a lost head',
		'delete',
		(id) => [`DELETE FROM audit_heads WHERE workshop_id = ${id}`],
		'the head of the trail is missing'
	]
];

describe('the check of the trail', () => {
	it.each(CASES)('finds %s, on the page and by the command', async (_what, guards, statements, found) => {
		const crew = await makeTrail();
		await pastGuard(guards, statements(crew.workshopId));
		expect(await checkOwnTrail(crew.manager)).toMatchObject({ finding: found });
		const { code, stdout } = await runCommand(String(crew.workshopId));
		expect(stdout).toContain(
			`NOT WHOLE  workshop ${crew.workshopId}, ${crew.manager.workshopName}: ${found}`
		);
		expect(code).toBe(1);
	});

	it('finds a tail that was cut together with its head, once it was seen whole before', async () => {
		const crew = await makeTrail();
		expect(await checkOwnTrail(crew.manager)).toMatchObject({ entries: 4, finding: null });
		const where = `workshop_id = ${crew.workshopId}`;
		const [third] = await AuditEntry.findAll({ where: { workshopId: crew.workshopId, sequence: 3 } });
		await pastGuard('delete', [
			`DELETE FROM audit_entries WHERE sequence = 4 AND ${where}`,
			`UPDATE audit_heads SET sequence = 3, hash = '${third!.hash}' WHERE ${where}`
		]);
		const found = 'entry 4 is not the one that was there when the trail was last found whole';
		expect(await checkOwnTrail(crew.manager)).toMatchObject({ finding: found });
		expect(await checkOwnTrail(crew.manager)).toMatchObject({ finding: found });
	});

	it('finds an end that was written anew with right hashes, once it was seen whole before', async () => {
		const crew = await makeTrail();
		await checkOwnTrail(crew.manager);
		await pastGuard('update', await rewriteLast(crew));
		const check = await checkOwnTrail(crew.manager);
		expect(check.finding).toBe('entry 4 is not the one that was there when the trail was last found whole');
	});

	it('finds a trail whole that only grew, and says so by the command too', async () => {
		const crew = await makeTrail();
		expect(await lastCheck(crew.manager)).toBeNull();
		await checkOwnTrail(crew.manager);
		await note(crew, 'manager', 'place.changed', 5);
		const { code, stdout } = await runCommand(String(crew.workshopId));
		const [, entries, hash] = /: (\d+) entries, ([0-9a-f]{64})/.exec(stdout) ?? [];
		expect([code, entries]).toEqual([0, '5']);
		const last = await AuditEntry.findOne({ where: { workshopId: crew.workshopId, sequence: 5 } });
		expect(hash).toBe(last!.hash);
		expect(hash).not.toBe(GENESIS);
		expect(await lastCheck(crew.manager)).toMatchObject({ entries: 5, finding: null });
	});

	it('is not said to be done when it was not', async () => {
		const { code, stderr } = await runCommand('one');
		expect(code).toBe(2);
		expect(stderr).toContain('"one" is not the number of a workshop.');
	});
});

const ask = (changes: Partial<AuditQuery> = {}): AuditQuery => ({
	...auditQuerySchema.parse({}),
	...changes
});

async function makeMixed(): Promise<Crew> {
	const crew = await makeCrew();
	Object.assign(crew.manager, { name: 'Bea Quill' });
	Object.assign(crew.installer, { name: 'Otto Sedge' });
	for (const { id, name } of [crew.manager, crew.installer]) await Person.update({ name }, { where: { id } });
	await note(crew, 'manager', 'place.changed', 7, { heatC: 44 });
	await note(crew, 'installer', 'mount.surveyed', 7, { name: 'Behind the battery' });
	await note(crew, 'installer', 'customer.changed', 8, { '=1+1': '-Ida' });
	return crew;
}

describe('the list of the trail', () => {
	it('is searched by person, action, subject, words and number', async () => {
		const crew = await makeMixed();
		const found = async (changes: Partial<AuditQuery>) =>
			(await listAudit(crew.manager, ask(changes))).rows.map(({ sequence }) => sequence);
		expect(await found({})).toEqual([3, 2, 1]);
		expect(await found({ person: crew.installer.id })).toEqual([3, 2]);
		expect(await found({ action: 'place.changed' })).toEqual([1]);
		expect(await found({ subject: 'mount' })).toEqual([2]);
		expect(await found({ words: 'BEHIND battery' })).toEqual([2]);
		expect(await found({ words: '7' })).toEqual([2, 1]);
		expect(await found({ words: '100%' })).toEqual([]);
	});

	it('is searched by names, of whom an entry is by and of whom it is about, and by its plain words', async () => {
		const [crew, other] = [await makeMixed(), await makeCrew()];
		const { id } = await Customer.create({ workshopId: crew.workshopId, name: 'Ida 100% Fenn' });
		await note(crew, 'manager', 'customer.changed', id);
		await note(crew, 'manager', 'person.left', crew.installer.id);
		const stranger = await Customer.create({ workshopId: other.workshopId, name: 'Otto Fenn' });
		await note(crew, 'manager', 'customer.changed', stranger.id);
		const found = async (words: string) =>
			(await listAudit(crew.manager, ask({ words }))).rows.map(({ sequence }) => sequence);
		expect(await found('otto')).toEqual([5, 3, 2]);
		expect(await found('Sedge Quill')).toEqual([5]);
		expect(await found('fenn 100%')).toEqual([4]);
		expect(await found('Fenn Sedge')).toEqual([]);
		expect(await found('ended access')).toEqual([5]);
		const { rows } = await listAudit(crew.manager, ask());
		const nameAt = (at: number) => rows.find(({ sequence }) => sequence === at)?.subjectName;
		expect([6, 5, 4, 1].map(nameAt)).toEqual([null, 'Otto Sedge', 'Ida 100% Fenn', null]);
	});

	it('is searched by days, both of them in', async () => {
		const crew = await makeMixed();
		const day = new Date().toISOString().slice(0, 10);
		expect((await listAudit(crew.manager, ask({ from: day, to: day }))).total).toBe(3);
		expect((await listAudit(crew.manager, ask({ from: '2999-01-01' }))).total).toBe(0);
		expect((await listAudit(crew.manager, ask({ to: '2001-01-01' }))).total).toBe(0);
	});

	it('goes on where a page ended, also when entries came meanwhile', async () => {
		const crew = await makeTrail(5);
		const first = await listAudit(crew.manager, ask({ limit: 2 }));
		await note(crew, 'manager', 'place.changed', 6);
		const second = await listAudit(crew.manager, ask({ limit: 2, cursor: first.next! }));
		const third = await listAudit(crew.manager, ask({ limit: 2, cursor: second.next! }));
		const all = [first, second, third].flatMap(({ rows }) => rows.map(({ sequence }) => sequence));
		expect(all).toEqual([5, 4, 3, 2, 1]);
		expect(third.next).toBeNull();
		await expect(listAudit(crew.manager, ask({ cursor: 'made.up' }))).rejects.toMatchObject({
			code: 'invalid_input'
		});
	});

	it('says each entry in plain words', async () => {
		const crew = await makeMixed();
		const { rows } = await listAudit(crew.manager, ask({ action: 'place.changed' }));
		expect(rows[0]).toMatchObject({
			...{
				who: crew.manager.name,
				did: 'changed a place',
				subject: 'place',
				subjectId: 7,
				href: '/places/7'
			},
			detail: [{ label: 'heat C', value: '44' }]
		});
		const { actions, subjects } = await listAuditChoices(crew.manager);
		expect(actions.map(({ label }) => label)).toContain('surveyed a mount');
		expect(subjects).toEqual(['customer', 'mount', 'place']);
	});

	it('is the manager’s alone, and of their workshop', async () => {
		const [crew, other] = [await makeMixed(), await makeCrew()];
		await expect(listAudit(crew.engineer, ask())).rejects.toMatchObject({ code: 'not_allowed' });
		expect((await listAudit(other.manager, ask())).total).toBe(0);
	});

	it('goes out as a table in which no cell runs as a formula', async () => {
		const crew = await makeMixed();
		let text = '';
		for await (const part of writeAuditCsv(crew.manager, ask())) text += part;
		const lines = text.trim().split('\n');
		expect(lines).toHaveLength(4);
		expect(lines[0]).toBe('number,at (UTC),who,action,in words,subject,subject number,recorded');
		expect(lines[1]).toMatch(/^3,.*,'=1\+1: -Ida$/);
		expect(text.split(/[,\n]/).filter((cell) => /^"?[=+\-@]/.test(cell))).toEqual([]);
	});
});
