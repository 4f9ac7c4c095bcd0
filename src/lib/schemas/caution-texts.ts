import { z } from 'zod';
import { REGION_KEYS } from '../format/caution-regions';
import { optionalWords } from './fields';

export const cautionLineSchema = z.object({ title: z.string(), text: z.string() });
export type CautionLine = z.infer<typeof cautionLineSchema>;

const region = z.enum(REGION_KEYS, { error: 'Choose a region.' }).meta({ label: 'Region' });
/** The paper has two pages: more sentences than these would not stay on them. */
const MOST_SENTENCES = 3;
const MOST_CHARACTERS = 240;

export const cautionTextInputSchema = z.object({
	region,
	sentences: z.array(z.string().trim().min(1).max(MOST_CHARACTERS)).max(MOST_SENTENCES),
	/** The number that the person saw; 0 where nothing was added yet. */
	number: z.coerce.number().int().min(0)
});
export type CautionTextInput = z.infer<typeof cautionTextInputSchema>;

export const cautionTextSchema = z.object({
	number: z.number().int(),
	region: z.enum(REGION_KEYS),
	sentences: z.array(z.string()),
	/** Empty before the first change. */
	changedBy: z.string(),
	changedAt: z.iso.datetime().nullable()
});
export type CautionTextView = z.infer<typeof cautionTextSchema>;

export const cautionTextFormSchema = z.object({
	region,
	first: optionalWords('First sentence', MOST_CHARACTERS),
	second: optionalWords('Second sentence', MOST_CHARACTERS),
	third: optionalWords('Third sentence', MOST_CHARACTERS),
	number: z.string().default('0')
});
export type CautionTextForm = z.infer<typeof cautionTextFormSchema>;

export const toCautionTextForm = ({ region, sentences, number }: CautionTextView): CautionTextForm => {
	const [first = '', second = '', third = ''] = sentences;
	return { region, first, second, third, number: String(number) };
};

export const fromCautionTextForm = (form: CautionTextForm): CautionTextInput => ({
	region: form.region,
	sentences: [form.first, form.second, form.third].filter((sentence) => sentence !== ''),
	number: Number(form.number)
});
