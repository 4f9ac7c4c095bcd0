import { cleanup, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import { ERASED } from '$lib/schemas/erasures';
import JobLetters from './JobLetters.svelte';

afterEach(cleanup);

const show = (name: string, remindersStoppedAt: string | null) =>
	render(JobLetters, {
		...{ letters: [], refusal: null },
		customer: { id: 1, version: 0, name, email: '', phone: '', remindersStoppedAt }
	});

describe('the letters of a job', () => {
	it('ask for a call where the customer has stopped reminders', () => {
		show('Ilse Tarn', '2026-03-04T12:00:00.000Z');
		expect(screen.getByRole('status').textContent).toContain('telephone');
	});

	it('ask nobody to call whoever was erased', () => {
		show(ERASED, '2026-03-04T12:00:00.000Z');
		expect(screen.getByRole('status').textContent).toContain('is erased');
		expect(screen.queryByText(/telephone/)).toBeNull();
	});

	it('say nothing of reminders while they go out', () => {
		show('Ilse Tarn', null);
		expect(screen.queryByRole('status')).toBeNull();
	});
});
