import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CAUTIONS, listCautions } from '$lib/format/cautions';
import Cautions from './Cautions.svelte';
import DocumentTitle from './DocumentTitle.svelte';
import ErrorState from './ErrorState.svelte';
import SavedNote from './SavedNote.svelte';
import UndoNote from './UndoNote.svelte';
import Verdict from './Verdict.svelte';

afterEach(cleanup);

describe('the title of a page', () => {
	it('starts with "Error:" when fields are wrong', () => {
		render(DocumentTitle, { title: 'New job', hasErrors: true });
		expect(document.title).toBe('Error: New job – Soakline');
	});
});

describe('the verdict', () => {
	it.each([
		['page', 'H1', 'Cuts out'],
		['small', 'P', 'Cuts out'],
		['word', 'SPAN', 'cuts out']
	] as const)('is words in every size (%s)', (size, tag, words) => {
		const { container } = render(Verdict, { verdict: 'cuts-out', size });
		const element = container.firstElementChild;
		expect([element?.tagName, element?.textContent?.trim()]).toEqual([tag, words]);
	});

	it('has words of its own for a battery that nothing switches off', () => {
		const { container } = render(Verdict, { verdict: 'cuts-out', chemistry: 'lead-acid-agm', size: 'small' });
		expect(container.textContent.trim()).toBe('Gets too hot');
	});

	it('draws a mark of its own for each, hidden from those who listen', () => {
		const marks = (['rides-it-out', 'runs-close', 'cuts-out'] as const).map((verdict) => {
			const { container } = render(Verdict, { verdict, size: 'word' });
			expect(container.querySelector('svg')?.getAttribute('aria-hidden')).toBe('true');
			return container.querySelector('svg')?.innerHTML;
		});
		expect(new Set(marks).size).toBe(3);
	});
});

describe('what was saved', () => {
	it.each([
		[{ at: '2026-03-04T14:02:00Z', timeZone: 'UTC' }, 'Saved 14:02'],
		[{ at: '2026-03-04T14:02:00Z', timeZone: 'UTC', where: 'on this phone' }, 'Saved on this phone 14:02'],
		[{ state: 'waiting' as const }, 'Saved on this phone, waiting for signal'],
		[{ state: 'problem' as const }, 'Not saved yet. Your answers are still here.'],
		[{}, '']
	])('is said quietly (%o)', (props, words) => {
		render(SavedNote, props);
		expect(screen.getByRole('status').textContent).toBe(words);
	});

	it('can be put back, by a form where there is no script', async () => {
		const onundo = vi.fn();
		render(UndoNote, { text: 'Mount B was removed.', onundo });
		await fireEvent.click(screen.getByRole('button', { name: 'Put it back' }));
		expect(onundo).toHaveBeenCalledOnce();
		cleanup();
		const { container } = render(UndoNote, { text: 'Removed.', action: '?/restore', fields: { id: '7' } });
		expect(container.querySelector('form')?.method).toBe('post');
		expect(container.querySelector<HTMLInputElement>('input[name=id]')?.value).toBe('7');
	});
});

describe('trouble', () => {
	it('gives the number that the log has, and a way to try again', () => {
		render(ErrorState, { title: 'Something broke on our side', id: 'K7Q2', retryHref: '/jobs' });
		expect(screen.getByRole('alert').textContent).toContain('K7Q2');
		expect(screen.getByRole('link', { name: 'Try again' }).getAttribute('href')).toBe('/jobs');
	});
});

describe('the cautions', () => {
	it.each(['lithium-iron-phosphate', 'lead-acid-flooded'])('stand there in full (%s)', (chemistry) => {
		const { container } = render(Cautions, { chemistry });
		const shown = CAUTIONS.filter(({ text }) => container.textContent.includes(text)).map(({ id }) => id);
		expect(shown).toEqual(listCautions(chemistry).map(({ id }) => id));
	});
});
