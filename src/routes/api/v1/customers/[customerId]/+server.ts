import { endpoint } from '$lib/server/http/endpoint';
import { customerOperations } from '$lib/server/http/operations/customers';
import { getCustomer, updateCustomer } from '$lib/server/services/customers';

export const GET = endpoint(customerOperations.get, ({ person, params }) =>
	getCustomer(person, params.customerId)
);

export const PUT = endpoint(customerOperations.update, ({ person, params, body }) =>
	updateCustomer(person, params.customerId, body)
);
