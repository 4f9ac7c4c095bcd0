import { z } from 'zod';
import type { CapacityTrend, HeatCause, Learning } from '../thermal/field';
import { READING_PLACES } from '../thermal/field';
import { measure, words } from './fields';
import { differenceSchema, pastDay } from './fitting';

export const FIELD_NOTE_KINDS = ['capacity-test', 'inspection', 'peak-label', 'cut-out'] as const;
export type FieldNoteKind = (typeof FIELD_NOTE_KINDS)[number];

export const FIELD_NOTE_LABELS: Readonly<Record<FieldNoteKind, string>> = {
	'capacity-test': 'Capacity test',
	inspection: 'Inspection',
	'peak-label': 'Peak label read',
	'cut-out': 'Went dark'
};

const hottestDayC = measure('Hottest of that day', '°C', -20, 55);
const hour = (label: string) => measure(label, 'h', 0, 72);

export const capacityTestSchema = z.object({
	kind: z.literal('capacity-test'),
	notedOn: pastDay('Tested on'),
	capacityAh: measure('Capacity found', 'Ah', 0.5, 2000),
	currentA: measure('Current of the test', 'A', 0.1, 500),
	cutOffV: measure('Stopped at', 'V', 5, 16),
	tempC: measure('Temperature of the battery', '°C', -20, 60)
});

export const inspectionSchema = z.object({
	kind: z.literal('inspection'),
	notedOn: pastDay('Looked at on'),
	words: words('What was seen', 1000)
});

export const peakLabelSchema = z.object({
	kind: z.literal('peak-label'),
	notedOn: pastDay('Read on'),
	place: z.enum(READING_PLACES, { error: 'Choose where the label is.' }),
	turnedC: measure('Highest field that has turned', '°C', 20, 150).nullable(),
	notTurnedC: measure('Lowest field that has not', '°C', 20, 150).nullable(),
	hottestDayC
});

export const cutOutSchema = z.object({
	kind: z.literal('cut-out'),
	notedOn: pastDay('The day'),
	wentDarkHour: hour('Went dark at'),
	cameBackHour: hour('Came back by itself at').nullable(),
	withinHours: measure('Known to within', 'h', 0.05, 6),
	hottestDayC
});

export const fieldNoteInputSchema = z.discriminatedUnion('kind', [
	capacityTestSchema,
	inspectionSchema,
	peakLabelSchema,
	cutOutSchema
]);
export type FieldNoteInput = z.infer<typeof fieldNoteInputSchema>;
export type FieldNoteData = FieldNoteInput;

/** What the model made of a note. */
export interface FieldFinding {
	cause: HeatCause | null;
	learning: Learning | null;
}

export const fieldNoteSchema = z.object({
	id: z.number().int(),
	kind: z.enum(FIELD_NOTE_KINDS),
	notedOn: z.iso.date(),
	notedBy: z.string(),
	data: fieldNoteInputSchema,
	finding: z.custom<FieldFinding>().nullable().meta({ type: 'object' }),
	findingThen: z.custom<FieldFinding>().nullable().meta({
		type: 'object',
		description:
			'What was found when it was noted, where the fitting is held against another recommendation since and the finding was worked out anew'
	}),
	judgedBy: z
		.object({ battery: z.string(), otherwise: z.array(differenceSchema.extend({ label: z.string() })) })
		.meta({
			description:
				'The battery by whose limits it is judged, and what was fitted otherwise than agreed: while there is any, the finding is not of what was fitted'
		}),
	doubts: z.number().int().meta({
		description:
			'How many hot days with a dark evening the estimate does not explain, where this is one of two or more: then the estimate itself may be wrong'
	}),
	engineVersion: z.string(),
	struck: z
		.object({ by: z.string(), at: z.iso.datetime(), reason: z.string() })
		.nullable()
		.meta({ description: 'Struck out: it stays on record and counts nowhere' }),
	restsOnStruck: z
		.object({ noteId: z.number().int(), notedOn: z.iso.date(), isNotedAnew: z.boolean() })
		.nullable()
		.meta({
			description:
				'The note with which this one had learnt before that was struck out: what it learnt does not count until it is noted anew, on the same day and, of a label, at the same place'
		})
});
export type FieldNoteView = z.infer<typeof fieldNoteSchema>;

const LEAST_REASON = 5;
const MOST_REASON = 300;

/** Why a note is struck out. */
export const fieldNoteStrikeSchema = z.object({
	reason: z
		.string({ error: 'Reason is missing.' })
		.trim()
		.min(LEAST_REASON, {
			error: `Reason must be at least ${LEAST_REASON} characters: it stands beside the note for good.`
		})
		.max(MOST_REASON, { error: `Reason must be ${MOST_REASON} characters or fewer.` })
		.meta({ label: 'Reason' })
});
export type FieldNoteStrikeChange = z.infer<typeof fieldNoteStrikeSchema>;

/** The least capacity that the customer can do with, and from how much on it could be asked for. */
const namedAh = z.coerce
	.number({ error: 'Capacity must be a number of Ah, such as 70.' })
	.min(0.5, { error: 'Capacity must be at least 0.5 Ah.' })
	.max(2000, { error: 'Capacity must be at most 2000 Ah.' });
export const fieldNotesQuerySchema = z.object({
	namedAh: namedAh.optional().meta({ description: 'When does the battery come down to so many Ah?' })
});

export const fieldNotesSchema = z.object({
	rows: z.array(fieldNoteSchema),
	trend: z.custom<CapacityTrend>().nullable().meta({ type: 'object', description: 'Of the capacity tests' }),
	ratedAh: z.number(),
	namedAh: z.number().nullable(),
	expected: z
		.array(z.object({ years: z.number(), low: z.number(), middle: z.number(), high: z.number() }))
		.nullable()
		.meta({
			description: 'Share of the first capacity that the estimate expects; null before it is worked out'
		})
});
export type FieldNotesView = z.infer<typeof fieldNotesSchema>;
