import { z } from 'zod';

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
