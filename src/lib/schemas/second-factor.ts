import { z } from 'zod';
import type { Role } from './people';

/** Whom a workshop can ask for a second factor. */
export const FACTOR_ROLES: readonly Role[] = ['engineer', 'manager'];

export const secondFactorCodeSchema = z.object({
	code: z
		.string({ error: 'Code is missing.' })
		.trim()
		.min(1, { error: 'Code is missing.' })
		.max(40, { error: 'Code must be 40 characters or fewer.' })
		.meta({ label: 'Code' })
});

/** What the telephone takes up: a picture, or the key in groups of four. */
export interface SecondFactorSetUp {
	keyGroups: string;
	picture: { size: number; path: string };
}

export interface SecondFactorView {
	/** Null while it is off. */
	since: string | null;
	codesLeft: number;
	setUp: SecondFactorSetUp | null;
	/** The workshop asks managers and engineers for it. */
	isRequired: boolean;
}

/** Whom a rule that asks for a second factor would reach: those named can open nothing else until they have one. */
export interface FactorReach {
	isOwnOn: boolean;
	/** Managers and engineers who have none, but for who asks. */
	others: { name: string; role: Role }[];
}
