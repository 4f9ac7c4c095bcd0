import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import CheckField from './CheckField.svelte';
import MeasureField from './MeasureField.svelte';
import RadioChips from './RadioChips.svelte';
import SelectField from './SelectField.svelte';
import TextArea from './TextArea.svelte';
import TextField from './TextField.svelte';

afterEach(cleanup);

/** What a screen reader says after the name. */
function descriptionOf(element: Element): string {
	const ids = element.getAttribute('aria-describedby')?.split(' ') ?? [];
	return ids.map((id) => document.getElementById(id)?.textContent ?? '?').join(' | ');
}

const FIELD = {
	name: 'mass',
	label: 'Mass',
	hint: 'As it stands at the pump.',
	error: ['Mass is missing.', 'second']
};

describe.each([
	['TextField', () => render(TextField, FIELD), 'textbox'],
	['TextArea', () => render(TextArea, FIELD), 'textbox'],
	['SelectField', () => render(SelectField, { ...FIELD, options: [] }), 'combobox'],
	['CheckField', () => render(CheckField, FIELD), 'checkbox']
])('%s', (_name, show, role) => {
	it('ties its label, hint and first error to its box', () => {
		show();
		const box = screen.getByRole(role, { name: 'Mass' });
		expect(box.id).toBe('field-mass');
		expect(box.getAttribute('aria-invalid')).toBe('true');
		expect(descriptionOf(box)).toBe('As it stands at the pump. | Error: Mass is missing.');
	});
});

describe('MeasureField', () => {
	it('is a text box with the unit beside it, said with it', () => {
		render(MeasureField, { name: 'gap', label: 'Gap', unit: 'mm', value: '45,2' });
		const box = screen.getByRole<HTMLInputElement>('textbox', { name: 'Gap' });
		expect([box.type, box.inputMode || box.getAttribute('inputmode'), box.value]).toEqual([
			'text',
			'decimal',
			'45,2'
		]);
		expect(descriptionOf(box)).toBe('mm');
	});

	it('asks for no number pad where a minus may be needed', () => {
		render(MeasureField, { name: 't', label: 'Coldest', unit: '°C', signed: true });
		expect(screen.getByRole('textbox').getAttribute('inputmode')).toBeNull();
	});

	it('does not complain while people type or leave the box', async () => {
		render(MeasureField, { name: 'gap', label: 'Gap', unit: 'mm' });
		const box = screen.getByRole('textbox');
		await fireEvent.input(box, { target: { value: 'what' } });
		await fireEvent.blur(box);
		expect(box.getAttribute('aria-invalid')).toBeNull();
		expect(screen.getByRole<HTMLInputElement>('textbox').value).toBe('what');
	});
});

describe('RadioChips', () => {
	const options = [
		{ value: 'square', label: 'Faces it square' },
		{ value: 'unknown', label: 'I do not know', hint: 'A cautious value is used.' }
	];

	it('is a named group of radio buttons that a form sends', async () => {
		render(RadioChips, { name: 'facing', label: 'How it faces', options, error: 'How it faces is missing.' });
		const group = screen.getByRole('radiogroup', { name: 'How it faces' });
		expect(descriptionOf(group)).toBe('Error: How it faces is missing.');
		const [first, last] = screen.getAllByRole<HTMLInputElement>('radio');
		expect(first?.id).toBe('field-facing');
		await fireEvent.click(last as HTMLInputElement);
		expect([first?.checked, last?.checked, last?.name, last?.value]).toEqual([
			false,
			true,
			'facing',
			'unknown'
		]);
	});
});
