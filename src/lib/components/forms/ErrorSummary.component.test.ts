import { cleanup, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import ErrorSummary from './ErrorSummary.svelte';

afterEach(cleanup);

const MAKE = { path: 'make', message: 'Make is missing.' };
const MINUTES = { path: 'legs.0.minutes', message: 'Length must be at least 1 min.' };

const summary = () => screen.getByRole('region', { name: 'Something here needs another look' });

describe('the summary of errors', () => {
	it('takes the focus when the page comes back with errors', () => {
		render(ErrorSummary, { errors: [MAKE] });
		expect(document.activeElement).toBe(summary());
	});

	it("repeats each field's words as a link to its box", () => {
		render(ErrorSummary, { errors: [MAKE, MINUTES] });
		const links = screen
			.getAllByRole('link')
			.map((link) => [link.textContent?.trim(), link.getAttribute('href')]);
		expect(links).toEqual([
			['Make is missing.', '#field-make'],
			['Length must be at least 1 min.', '#field-legs-0-minutes']
		]);
	});

	it('says what concerns the whole form without a link', () => {
		render(ErrorSummary, { errors: [{ path: '', message: 'Somebody else changed this job.' }] });
		expect(screen.queryByRole('link')).toBeNull();
		expect(summary().textContent).toContain('Somebody else changed this job.');
	});

	it('shows nothing while nothing is wrong', () => {
		render(ErrorSummary, { errors: [] });
		expect(screen.queryByRole('region')).toBeNull();
	});

	it('leaves the cursor alone while people put one field right after the other', async () => {
		const { rerender } = render(ErrorSummary, { errors: [MAKE, MINUTES] });
		summary().blur();
		await rerender({ errors: [MINUTES] });
		expect(document.activeElement).not.toBe(summary());
	});

	it('takes the focus again with a new error, and with a new try', async () => {
		const { rerender } = render(ErrorSummary, { errors: [MAKE], attempt: 1 });
		summary().blur();
		await rerender({ errors: [MAKE, MINUTES], attempt: 1 });
		expect(document.activeElement).toBe(summary());
		summary().blur();
		await rerender({ errors: [MAKE, MINUTES], attempt: 2 });
		expect(document.activeElement).toBe(summary());
	});
});
