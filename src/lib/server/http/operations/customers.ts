import { z } from 'zod';
import { customerInputSchema, customerSchema } from '$lib/schemas/customers';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

const params = z.object({ customerId: idSchema });

export const customerOperations = {
	get: defineOperation({
		id: 'getCustomer',
		method: 'GET',
		path: '/api/v1/customers/[customerId]',
		action: 'customers.read',
		summary: 'One customer.',
		params,
		answer: customerSchema,
		status: 200
	}),
	update: defineOperation({
		id: 'updateCustomer',
		method: 'PUT',
		path: '/api/v1/customers/[customerId]',
		action: 'customers.write',
		summary: 'Changes a customer, if nobody changed it since it was read.',
		params,
		body: customerInputSchema.extend({ version: versionSchema }),
		answer: customerSchema,
		status: 200
	})
};
