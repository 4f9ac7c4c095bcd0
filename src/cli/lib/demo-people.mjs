import { join } from 'node:path';
import { readJson } from './files.mjs';

/** @typedef {{ name: string, email: string, password: string, role: string }} DemoPerson */

/**
 * The people of the demo workshop.
 * @param {string} project
 * @returns {Promise<DemoPerson[]>}
 */
export async function readDemoPeople(project) {
	const people = await readJson(join(project, 'seeds', 'demo-people.json'));
	return Array.isArray(people) ? people : [];
}

/**
 * Their sign-ins as lines of a table.
 * @param {DemoPerson[]} people
 */
export function demoSignIns(people) {
	const width = (/** @type {(person: DemoPerson) => string} */ pick) =>
		Math.max(0, ...people.map((person) => pick(person).length));
	const roleWidth = width(({ role }) => role);
	const emailWidth = width(({ email }) => email);
	return people.map(
		({ role, email, password, name }) =>
			`  ${role.padEnd(roleWidth)}  ${email.padEnd(emailWidth)}  ${password}  (${name})`
	);
}
