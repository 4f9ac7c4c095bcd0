import type { CustomerView } from '$lib/schemas/customers';
import type { Customer } from '../db/models';

export function presentCustomer(customer: Customer): CustomerView {
	const { id, version, name, email, phone, remindersStoppedAt } = customer;
	return { id, version, name, email, phone, remindersStoppedAt: remindersStoppedAt?.toISOString() ?? null };
}
