import { formatDate, formatDateTime } from '$lib/format/dates';
import type { PersonRow, StaffRole } from '$lib/schemas/people';

/** "an engineer". */
export const aRole = (role: StaffRole): string => `${role === 'manager' ? 'a' : 'an'} ${role}`;

type Known = Pick<PersonRow, 'role' | 'email' | 'lastSignedInAt' | 'leftAt'>;

/** What a person is in the shop, or was, and how they sign in. */
export function sayPerson({ role, email, lastSignedInAt, leftAt }: Known): string {
	const last = lastSignedInAt && formatDateTime(lastSignedInAt);
	if (leftAt) {
		const signedIn = last ? `Signed in as ${email}, last on ${last}.` : `The address was ${email}.`;
		return `Was ${aRole(role)} here, and left on ${formatDate(leftAt)}. ${signedIn}`;
	}
	return `Is ${aRole(role)} here. Signs in as ${email}; ${last ? `last on ${last}` : 'has not done so yet'}.`;
}
