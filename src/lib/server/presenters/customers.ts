import type { CustomerView } from '$lib/schemas/customers';
import type { Customer } from '../db/models';

export function presentCustomer({ id, version, name, email, phone }: Customer): CustomerView {
	return { id, version, name, email, phone };
}
