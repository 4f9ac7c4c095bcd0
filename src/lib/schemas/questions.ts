import { z } from 'zod';
import { idSchema, words } from './fields';

/** What a customer asks on their page. */
export const askSchema = z.object({
	askedBy: words('Your name', 120),
	question: words('Your question', 1_000)
});
export type Ask = z.infer<typeof askSchema>;

export const answerSchema = z.object({ answer: words('Your answer', 2_000) });
export type Answer = z.infer<typeof answerSchema>;

/** The same on the job’s page, where the question stands beside it. */
export const answerFormSchema = answerSchema.extend({ questionId: idSchema });

const messageFields = {
	id: z.number().int(),
	name: z.string(),
	at: z.iso.datetime(),
	words: z.string()
};

/** A question with what the shop answered, oldest first. */
export const questionSchema = z.object({
	...messageFields,
	answers: z.array(z.object(messageFields)),
	takesAnswers: z.boolean().meta({ description: 'No once the customer’s data was deleted' })
});
export type Question = z.infer<typeof questionSchema>;
