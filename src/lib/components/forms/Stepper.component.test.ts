import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import Stepper from './Stepper.svelte';

afterEach(cleanup);

const GAP = { name: 'exhaustGapMm', label: 'Gap', unit: 'mm', step: 10, min: 0, max: 200 };

const box = () => screen.getByRole<HTMLInputElement>('textbox', { name: 'Gap' });
const more = () => screen.getByRole('button', { name: 'More: Gap' });
const less = () => screen.getByRole('button', { name: 'Less: Gap' });

describe('a stepper', () => {
	it('steps up and down, says the new value, and tells the page', async () => {
		const oninput = vi.fn();
		render(Stepper, { ...GAP, value: '180', oninput });
		await fireEvent.click(more());
		expect(box().value).toBe('190');
		expect(screen.getByRole('status').textContent).toBe('190 mm');
		await fireEvent.click(less());
		await fireEvent.click(less());
		expect(box().value).toBe('170');
		expect(oninput.mock.calls).toEqual([['190'], ['180'], ['170']]);
	});

	it('stays within its range, and marks the end', async () => {
		render(Stepper, { ...GAP, value: '195' });
		await fireEvent.click(more());
		expect(box().value).toBe('200');
		expect(more().getAttribute('aria-disabled')).toBe('true');
		await fireEvent.click(more());
		expect(box().value).toBe('200');
	});

	it('goes below zero with a true minus where that is allowed', async () => {
		render(Stepper, { ...GAP, value: '5', min: -20, signed: true });
		await fireEvent.click(less());
		expect(box().value).toBe('−5');
		expect(box().getAttribute('inputmode')).toBeNull();
	});

	it('starts an empty box at its lower end', async () => {
		render(Stepper, { ...GAP, min: 20 });
		await fireEvent.click(more());
		expect(box().value).toBe('20');
	});

	it('leaves alone what it cannot read', async () => {
		render(Stepper, { ...GAP, value: 'a hand' });
		await fireEvent.click(more());
		expect(box().value).toBe('a hand');
	});

	it('is a plain box with a unit to those without a script', () => {
		render(Stepper, { ...GAP, value: '180' });
		expect(box().type).toBe('text');
		expect(box().name).toBe('exhaustGapMm');
		expect(box().getAttribute('inputmode')).toBe('decimal');
		[more(), less()].forEach((button) => expect(button.classList).toContain('needs-script'));
	});
});
