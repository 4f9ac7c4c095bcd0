import { z } from 'zod';
import { editedSchema, optionalEmail, optionalPhone, words } from './fields';

export const customerInputSchema = z.object({
	name: words('Customer name', 120),
	email: optionalEmail('Customer e-mail'),
	phone: optionalPhone('Customer phone')
});
export type CustomerInput = z.infer<typeof customerInputSchema>;

export const customerSchema = editedSchema.extend({
	...customerInputSchema.shape,
	remindersStoppedAt: z.iso
		.datetime()
		.nullable()
		.meta({ description: 'When the customer stopped reminders; null while they get them' })
});
export type CustomerView = z.infer<typeof customerSchema>;
