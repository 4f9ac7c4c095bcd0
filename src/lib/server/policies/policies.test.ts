import { describe, expect, it } from 'vitest';
import { ROLES, type Role, type SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { RULES, allow, mayDo, type Action } from '.';

function someone(role: Role): SignedInPerson {
	const customerId = role === 'customer' ? 9 : null;
	return {
		id: 1,
		workshopId: 1,
		workshopName: 'Shop',
		customerId,
		name: role,
		email: `${role}@shop.example`,
		role
	};
}

/** Written out a second time on purpose: a change of a rule must be meant. i installer, e engineer, m manager, c customer. */
const EXPECTED: Record<Action, string> = {
	'jobs.read': 'iem',
	'jobs.write': 'iem',
	'customers.read': 'iem',
	'customers.write': 'iem',
	'vehicles.read': 'iem',
	'vehicles.write': 'iem',
	'mounts.write': 'iem',
	'day-plans.write': 'iem',
	'batteries.read': 'iem',
	'batteries.write': 'iem',
	'places.read': 'iem',
	'places.write': 'iem',
	'assessments.read': 'iem',
	'assessments.run': 'iem',
	'remedies.read': 'iem',
	'remedies.write': 'em',
	'recommendations.write': 'iem',
	'sheets.write': 'iem',
	'questions.answer': 'iem',
	'questions.ask': 'c',
	'held-data.read-own': 'c',
	'erasures.ask': 'c',
	'erasures.withdraw': 'c',
	'erasures.decide': 'm',
	'books.read': 'em',
	'books.write': 'em',
	'reruns.read': 'em',
	'reruns.write': 'em',
	'traces.read': 'em',
	'traces.write': 'em',
	'review.read': 'm',
	'own-zones.write': 'm',
	'mailbox.read': 'iem',
	'second-factor.own': 'iem',
	'people.read': 'm',
	'people.write': 'm',
	'shop.write': 'm',
	'audit.read': 'm',
	'documents.read-own': 'c'
};

const cases = Object.entries(EXPECTED).flatMap(([action, letters]) =>
	ROLES.map((role) => [role, letters.includes(role[0] ?? '-'), action as Action] as const)
);

describe('who may do what', () => {
	it.each(cases)('%s: %s to %s', (role, may, action) => {
		expect(mayDo(someone(role), action)).toBe(may);
	});

	it('has an expectation for every rule', () => {
		expect(Object.keys(RULES).sort()).toEqual(Object.keys(EXPECTED).sort());
	});

	it.each(Object.keys(RULES) as Action[])('nobody signed in may %s', (action) => {
		expect(() => allow(null, action)).toThrow(expect.objectContaining({ code: 'not_signed_in' }));
	});

	it('says which role is not enough', () => {
		expect(() => allow(someone('customer'), 'jobs.read')).toThrow(AppError);
		expect(() => allow(someone('customer'), 'jobs.read')).toThrow(
			'Your role (customer) does not include this.'
		);
	});
});
