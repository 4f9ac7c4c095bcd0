import { setError, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { describe, expect, it } from 'vitest';
import { vehicleInputSchema } from '../schemas/vehicles';
import { formShape, parseForm, toFormValues } from './form-values';

const shape = zod4(formShape(vehicleInputSchema));

function typed(entries: Record<string, string>): FormData {
	const data = new FormData();
	Object.entries(entries).forEach(([name, value]) => data.set(name, value));
	return data;
}

describe('a form held by superforms', () => {
	it('takes whatever was typed, and shows every error beside it', async () => {
		const form = await superValidate(
			typed({ make: 'Marl', massKg: '2,9 t', dragAreaM2: 'like a barn' }),
			shape
		);
		const answer = parseForm(vehicleInputSchema, form.data);
		const errors = 'errors' in answer ? answer.errors : [];
		errors.forEach(({ path, message }) => setError(form, path as keyof typeof form.data, message));
		expect(form.data).toMatchObject({ make: 'Marl', massKg: '2,9 t', dragAreaM2: 'like a barn', model: '' });
		expect(form.errors).toMatchObject({
			model: ['Model is missing.'],
			dragAreaM2: ['Drag area must be a number of m² from 0.3 to 6.']
		});
		expect(form.errors.massKg).toBeUndefined();
	});

	it('starts from a record as text', async () => {
		const form = await superValidate(
			toFormValues(vehicleInputSchema, { make: 'Marl', massKg: 2900.5 }),
			shape
		);
		expect(form.data).toMatchObject({ make: 'Marl', massKg: '2900.5', modelYear: '' });
	});
});
