import { cleanup, render, screen, within } from '@testing-library/svelte';
import { createRawSnippet } from 'svelte';
import { afterEach, describe, expect, it } from 'vitest';
import { isUnder, listNavigation } from './navigation';
import PageShell from './PageShell.svelte';

afterEach(cleanup);

const children = createRawSnippet(() => ({ render: () => '<h1>Jobs</h1>' }));
const show = (current: string) =>
	render(PageShell, {
		person: { name: 'Wren', workshopName: 'Korrindal Auto Electrics' },
		nav: listNavigation('installer', false),
		current,
		children
	});

describe('the frame of a page', () => {
	it('starts with a way past itself', () => {
		const { container } = show('/jobs');
		const first = container.querySelector('a');
		expect(first?.textContent).toBe('Skip to the content');
		expect(container.querySelector(first?.getAttribute('href') ?? '')).toBe(screen.getByRole('main'));
	});

	it('marks the entry that the page stands under', () => {
		show('/jobs/412/mounts');
		const marked = screen.getAllByRole('link', { current: 'page' });
		expect(new Set(marked.map((link) => link.textContent?.trim()))).toEqual(new Set(['Jobs']));
	});

	it('folds the menu without a script', () => {
		const { container } = show('/jobs');
		const menu = container.querySelector('details');
		expect(menu?.open).toBe(false);
		const labels = within(menu as HTMLElement)
			.getAllByRole('link', { hidden: true })
			.map((link) => link.textContent?.trim());
		expect(labels).toEqual(['Jobs', 'Batteries', 'Places', 'Remedies']);
	});

	it('signs out by posting a form', () => {
		const { container } = show('/jobs');
		const forms = [...container.querySelectorAll('form')].map((form) => [
			form.method,
			form.getAttribute('action')
		]);
		expect(forms).toEqual([
			['post', '/sign-out'],
			['post', '/sign-out']
		]);
	});
});

describe('the entries', () => {
	it.each([
		['installer', false, ['Jobs', 'Batteries', 'Places', 'Remedies']],
		['engineer', false, ['Jobs', 'Batteries', 'Places', 'Remedies', 'Books', 'Accuracy', 'Traces']],
		[
			'manager',
			true,
			['Jobs', 'Batteries', 'Places', 'Remedies', 'Books', 'Accuracy', 'Traces', 'Shop', 'Review', 'Mailbox']
		]
	] as const)('of the %s (demo: %s)', (role, isDemo, labels) => {
		expect(listNavigation(role, isDemo).map((entry) => entry.label)).toEqual(labels);
	});

	it('are not mistaken for their longer neighbours', () => {
		expect(isUnder('/jobs/4', '/jobs')).toBe(true);
		expect(isUnder('/jobsheets', '/jobs')).toBe(false);
	});
});
