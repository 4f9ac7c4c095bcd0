import { render, screen } from '@testing-library/svelte';
import { describe, expect, it } from 'vitest';
import SelectField from './SelectField.svelte';

const options = [
	{ value: 'a', label: 'First' },
	{ value: 'b', label: 'Second' }
];
const props = { name: 'place', label: 'Place', value: 'a', options };
const box = () => screen.getByLabelText<HTMLSelectElement>('Place');

describe('a box to choose from', () => {
	it('keeps what was chosen before the script had come', () => {
		const early = document.createElement('select');
		early.id = 'field-place';
		early.innerHTML = '<option value="a">First</option><option value="b" selected>Second</option>';
		document.body.append(early);
		render(SelectField, props);
		early.remove();
		expect(box().value).toBe('b');
	});

	it('takes its own value where another page’s box of that name still stands', () => {
		const { unmount } = render(SelectField, { ...props, value: 'b' });
		const before = box();
		document.body.append(before);
		unmount();
		document.body.append(before);
		render(SelectField, props);
		before.remove();
		expect(box().value).toBe('a');
	});
});
