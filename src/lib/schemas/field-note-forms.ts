import { z } from 'zod';
import type { FieldNoteInput, FieldNoteKind } from './field-notes';
import { capacityTestSchema, cutOutSchema, inspectionSchema, peakLabelSchema } from './field-notes';

const CLOCK = /^([01]?\d|2[0-3])[:.]([0-5]\d)$/;
const clock = (label: string) =>
	z
		.string()
		.trim()
		.regex(CLOCK, { error: `${label} must be a time such as 17:30.` })
		.meta({ label });

const readClock = (text: string): number => {
	const [, hours = '0', minutes = '0'] = CLOCK.exec(text) ?? [];
	return Number(hours) + Number(minutes) / 60;
};

/** How exactly a time is known, in hours. */
export const WITHIN_CHOICES = [
	{ value: '0.1', label: 'To some minutes' },
	{ value: '0.5', label: 'To half an hour' },
	{ value: '1', label: 'To an hour' },
	{ value: '2', label: 'To two hours' }
] as const;

const { notedOn, hottestDayC } = cutOutSchema.shape;

/** The forms by kind, as people fill them in. */
export const FIELD_NOTE_FORMS = {
	'capacity-test': capacityTestSchema.omit({ kind: true }),
	inspection: inspectionSchema.omit({ kind: true }),
	'peak-label': peakLabelSchema.omit({ kind: true }),
	'cut-out': z.object({
		notedOn,
		wentDark: clock('Went dark at'),
		cameBack: z
			.string()
			.trim()
			.refine((text) => text === '' || CLOCK.test(text), {
				error: 'Came back by itself at must be a time such as 19:30, or empty.'
			})
			.default('')
			.meta({ label: 'Came back by itself at' }),
		within: z
			.enum(
				WITHIN_CHOICES.map(({ value }) => value),
				{ error: 'Choose how exactly the times are known.' }
			)
			.default('0.5')
			.meta({ label: 'The times are known' }),
		hottestDayC
	})
} as const satisfies Record<FieldNoteKind, z.ZodObject>;

/** From what a form holds to what is kept; a time of coming back before the other is one of the next day. */
export function fromFieldNoteForm(kind: FieldNoteKind, form: Record<string, unknown>): FieldNoteInput {
	if (kind !== 'cut-out') return { kind, ...form } as FieldNoteInput;
	const { wentDark, cameBack, within, ...rest } = form as Record<string, string>;
	const wentDarkHour = readClock(wentDark ?? '');
	const backHour = cameBack ? readClock(cameBack) : null;
	const cameBackHour = backHour !== null && backHour <= wentDarkHour ? backHour + 24 : backHour;
	return {
		kind,
		...rest,
		wentDarkHour,
		cameBackHour,
		withinHours: Number(within)
	} as unknown as FieldNoteInput;
}
