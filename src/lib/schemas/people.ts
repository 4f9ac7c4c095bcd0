import { z } from 'zod';
import { email } from './fields';

export const ROLES = ['installer', 'engineer', 'manager', 'customer'] as const;
export type Role = (typeof ROLES)[number];

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

const PASSWORD_MAX_LENGTH = 128;

export const signInSchema = z.object({
	email: email('E-mail'),
	password: z
		.string()
		.min(1, { error: 'Password is missing.' })
		.max(PASSWORD_MAX_LENGTH, { error: `Password must be ${PASSWORD_MAX_LENGTH} characters or fewer.` })
		.meta({ label: 'Password' })
});

export const signInLinkSchema = z.object({ mailTo: email('Your e-mail') });
