import { z } from 'zod';
import { latestToday } from '../format/dates';
import { idSchema, optionalWords, versionSchema, words } from './fields';

/** One thing that was agreed before it was fitted. */
export const agreedItemSchema = z.object({ key: z.string(), label: z.string(), agreed: z.string() });
export type AgreedItem = z.infer<typeof agreedItemSchema>;

/** Of what the shop has proposed nothing for. */
export const NOT_PROPOSED = 'not proposed';

/** Everything that may be agreed, in the order in which one would look. */
export const FITTED_KEYS = ['battery', 'position', 'shield', 'cable', 'fuse', 'charger'] as const;
export type FittedKey = (typeof FITTED_KEYS)[number];

export const MOST_FITTED_CHARACTERS = 200;

/** What was made otherwise than agreed. */
export const differenceSchema = z.object({
	key: z.enum(FITTED_KEYS),
	fitted: words('What was fitted instead', MOST_FITTED_CHARACTERS)
});
export type Difference = z.infer<typeof differenceSchema>;

/** A day, not before batteries of this kind and not in the future. */
export const pastDay = (label: string) =>
	z.iso
		.date({ error: `${label} must be a day, such as 2026-03-04.` })
		.refine((day) => day >= '2000-01-01', { error: `${label} must be 2000-01-01 or later.` })
		.refine((day) => day <= latestToday(), { error: `${label} must not be in the future.` })
		.meta({ label });

const fittingFields = {
	fittedOn: pastDay('Fitted on'),
	fittedBy: words('Fitted by', 120),
	serialNumber: optionalWords('Serial number of the battery', 80),
	note: optionalWords('Note', 1000)
};

export const fittingChangeSchema = z.object({
	...fittingFields,
	differences: z.array(differenceSchema).max(FITTED_KEYS.length),
	version: versionSchema.nullable()
});
export type FittingChange = z.infer<typeof fittingChangeSchema>;

export const followUpSchema = z.object({
	id: z.number().int(),
	afterMonths: z.number().int(),
	dueOn: z.iso.date(),
	doneOn: z.iso.date().nullable(),
	doneBy: z.string().nullable(),
	isOverdue: z.boolean(),
	isEarly: z.boolean().meta({ description: 'Not done, and due in more than a month' }),
	version: versionSchema
});
export type FollowUpView = z.infer<typeof followUpSchema>;

/** What a job's next step asks of a fitted mount. */
export interface FittedMount {
	mountId: number;
	letter: string;
	/** The first date at which nobody has looked yet; null when all looks are done. */
	nextDueOn: string | null;
	isOverdue: boolean;
	/** What is to do where another battery was fitted than agreed; null where it is the one that was agreed. */
	mismatch: Mismatch | null;
}

/** The way from another battery in the mount to papers and answers about that battery. */
export type Mismatch = 'assess' | 'recommend' | 'hold';

/** To whom reminders of the dates go: nobody where no address is known, or since they were stopped or erased. */
export type Reminded = 'customer' | 'workshop' | 'stopped' | 'erased' | 'nobody';

/** Whether somebody has looked. */
export const followUpChangeSchema = z.object({
	isDone: z.boolean({ error: 'Say whether it is done: true or false.' }),
	version: versionSchema
});
export type FollowUpChange = z.infer<typeof followUpChangeSchema>;

/** A recommendation of a mount against which a fitting may be held. */
const agreementSchema = z.object({
	id: z.number().int(),
	number: z.number().int().meta({ description: 'Which one of its job' }),
	recommendedAt: z.iso.datetime()
});
export type AgreementView = z.infer<typeof agreementSchema>;

/** The recommendation against which a fitting is to be held from now on. */
export const agreementChangeSchema = z.object({ recommendationId: idSchema, version: versionSchema });
export type AgreementChange = z.infer<typeof agreementChangeSchema>;

/** What was fitted; null where nothing has been yet. */
export const fittingSchema = z.object({
	mountId: z.number().int(),
	jobId: z.number().int(),
	assessmentId: z.number().int(),
	agreedAt: z.iso.datetime().meta({ description: 'When the first recommendation of this position was made' }),
	agreed: z.array(agreedItemSchema),
	recommendation: agreementSchema.meta({
		description: 'What it is held against, or would be if it were fitted now'
	}),
	newer: agreementSchema
		.nullable()
		.meta({ description: 'The newest recommendation of this position, where it came later' }),
	installation: z
		.object({
			id: z.number().int(),
			fittedOn: z.iso.date(),
			fittedBy: z.string(),
			serialNumber: z.string(),
			note: z.string(),
			differences: z.array(differenceSchema),
			version: versionSchema
		})
		.nullable(),
	followUps: z.array(followUpSchema)
});
export type FittingView = z.infer<typeof fittingSchema>;

/** A look at the battery is due so many months after it was fitted: common practice, no source. */
export const FOLLOW_UP_MONTHS = [1, 6, 12] as const;

const otherwise = (label: string) => optionalWords(`${label}, if otherwise`, MOST_FITTED_CHARACTERS);

/** One box an item: empty where it was fitted as agreed. */
export const fittingFormSchema = z.object({
	...fittingFields,
	battery: otherwise('Battery'),
	position: otherwise('Position'),
	shield: otherwise('Shield'),
	cable: otherwise('Cable'),
	fuse: otherwise('Fuse'),
	charger: otherwise('Charger'),
	version: z.string().default('')
});
export type FittingForm = z.infer<typeof fittingFormSchema>;

export function toFittingForm(installation: FittingView['installation']): Partial<FittingForm> {
	if (!installation) return { version: '' };
	const { fittedOn, fittedBy, serialNumber, note, differences, version } = installation;
	return {
		...{ fittedOn, fittedBy, serialNumber, note, version: String(version) },
		...Object.fromEntries(differences.map(({ key, fitted }) => [key, fitted]))
	};
}

export function fromFittingForm({ version, ...form }: FittingForm): FittingChange {
	const { fittedOn, fittedBy, serialNumber, note } = form;
	return {
		...{ fittedOn, fittedBy, serialNumber, note },
		differences: FITTED_KEYS.filter((key) => form[key] !== '').map((key) => ({ key, fitted: form[key] })),
		version: version === '' ? null : Number(version)
	};
}
