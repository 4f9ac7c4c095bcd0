import { z } from 'zod';
import { email, idSchema, versionSchema, words } from './fields';

export const ROLES = ['installer', 'engineer', 'manager', 'customer'] as const;
export type Role = (typeof ROLES)[number];

/** A session ends when it was not used for so long, and after so many hours in any case. */
export const SESSION_IDLE_MINUTES = 30;
export const SESSION_MOST_HOURS = 8;

/** Why a session is over. */
export type SessionEnd = 'role-changed' | 'left' | 'factor-reset' | 'too-old' | 'idle' | 'signed-out';

/** Those who work in the shop. */
export const STAFF_ROLES = ['installer', 'engineer', 'manager'] as const satisfies readonly Role[];
export type StaffRole = (typeof STAFF_ROLES)[number];

/** Who is asking: what guards and policies look at. */
export interface SignedInPerson {
	id: number;
	workshopId: number;
	workshopName: string;
	customerId: number | null;
	name: string;
	email: string;
	role: Role;
}

const PASSWORD_MIN_LENGTH = 15;
const PASSWORD_MAX_LENGTH = 128;
const TOO_LONG = `Password must be ${PASSWORD_MAX_LENGTH} characters or fewer.`;

export const signInSchema = z.object({
	email: email('E-mail'),
	password: z
		.string()
		.min(1, { error: 'Password is missing.' })
		.max(PASSWORD_MAX_LENGTH, { error: TOO_LONG })
		.meta({ label: 'Password' })
});

export const signInLinkSchema = z.object({ mailTo: email('Your e-mail') });

/** A password that somebody chooses. Whether it is among the commonest the server says. */
export const newPasswordSchema = z.object({
	password: z
		.string({ error: 'Password is missing.' })
		.min(PASSWORD_MIN_LENGTH, { error: `Password must be ${PASSWORD_MIN_LENGTH} characters or more.` })
		.max(PASSWORD_MAX_LENGTH, { error: TOO_LONG })
		.meta({ label: 'Password' })
});

const staffRole = z
	.enum(STAFF_ROLES, { error: 'Choose installer, engineer or manager.' })
	.meta({ label: 'Role' });

export const invitationInputSchema = z.object({
	name: words('Name', 120),
	email: email('E-mail'),
	role: staffRole
});
export type InvitationInput = z.infer<typeof invitationInputSchema>;

export const roleChangeSchema = z.object({ role: staffRole, version: versionSchema });
export type RoleChange = z.infer<typeof roleChangeSchema>;

/** Who works in the shop, or worked there. */
export const personRowSchema = z.object({
	id: z.number().int(),
	name: z.string(),
	email: z.string(),
	role: z.enum(STAFF_ROLES),
	lastSignedInAt: z.iso.datetime().nullable(),
	/** Null for those who are here. */
	leftAt: z.iso.datetime().nullable(),
	hasSecondFactor: z.boolean(),
	isYou: z.boolean(),
	version: versionSchema
});
export type PersonRow = z.infer<typeof personRowSchema>;

/** An invitation that is not accepted yet. */
export const invitationRowSchema = z.object({
	id: z.number().int(),
	name: z.string(),
	email: z.string(),
	role: z.enum(STAFF_ROLES),
	invitedBy: z.string(),
	expiresAt: z.iso.datetime(),
	/** Its link is too old: send it again, or withdraw it. */
	isTooOld: z.boolean()
});
export type InvitationRow = z.infer<typeof invitationRowSchema>;

export const peopleSchema = z.object({
	people: z.array(personRowSchema),
	invitations: z.array(invitationRowSchema)
});
export type PeopleView = z.infer<typeof peopleSchema>;

export const personParams = z.object({ personId: idSchema });
export const invitationParams = z.object({ invitationId: idSchema });

/** What the page of an invitation's link says. */
export interface InvitationView {
	workshopName: string;
	name: string;
	email: string;
	role: StaffRole;
}
