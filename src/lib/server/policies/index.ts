import type { Role, SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';

const WORKSHOP: readonly Role[] = ['installer', 'engineer', 'manager'];
const BENCH: readonly Role[] = ['engineer', 'manager'];
const MANAGER: readonly Role[] = ['manager'];

/**
 * Who may do what, deny by default: an action that is not in this table cannot be done.
 * That a record belongs to the person's own workshop is held by every query, not here.
 */
export const RULES = {
	'jobs.read': WORKSHOP,
	'jobs.write': WORKSHOP,
	'customers.read': WORKSHOP,
	'customers.write': WORKSHOP,
	'vehicles.read': WORKSHOP,
	'vehicles.write': WORKSHOP,
	'mounts.write': WORKSHOP,
	'day-plans.write': WORKSHOP,
	'batteries.read': WORKSHOP,
	'batteries.write': WORKSHOP,
	'places.read': WORKSHOP,
	'places.write': WORKSHOP,
	'assessments.read': WORKSHOP,
	'assessments.run': WORKSHOP,
	'remedies.read': WORKSHOP,
	'remedies.write': BENCH,
	'recommendations.write': WORKSHOP,
	'sheets.write': WORKSHOP,
	'questions.answer': WORKSHOP,
	'questions.ask': ['customer'],
	'held-data.read-own': ['customer'],
	'erasures.ask': ['customer'],
	'erasures.withdraw': ['customer'],
	'erasures.decide': ['manager'],
	'books.read': BENCH,
	'books.write': BENCH,
	'reruns.read': BENCH,
	'reruns.write': BENCH,
	'traces.read': BENCH,
	'traces.write': BENCH,
	'review.read': MANAGER,
	'own-zones.write': MANAGER,
	'mailbox.read': WORKSHOP,
	'second-factor.own': WORKSHOP,
	'people.read': MANAGER,
	'people.write': MANAGER,
	'shop.write': MANAGER,
	'audit.read': MANAGER,
	'documents.read-own': ['customer']
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof RULES;

export function mayDo(person: SignedInPerson | null, action: Action): person is SignedInPerson {
	const roles: readonly Role[] = RULES[action];
	return person !== null && roles.includes(person.role);
}

/** Gives the person back when the rule allows it, and throws a coded error otherwise. */
export function allow(person: SignedInPerson | null, action: Action): SignedInPerson {
	if (person === null) throw new AppError('not_signed_in', 'Sign in first.');
	const role = person.role;
	if (!mayDo(person, action)) {
		throw new AppError('not_allowed', `Your role (${role}) does not include this.`);
	}
	return person;
}
