import { cleanup, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';
import DataTable, { type Column } from './DataTable.svelte';

afterEach(cleanup);

interface Job {
	id: number;
	customer: string;
	headroom: string;
}

const columns: Column<Job>[] = [
	{
		key: 'customer',
		label: 'Customer',
		text: (job) => job.customer,
		sortHref: '?sort=customer',
		sorted: 'down'
	},
	{ key: 'headroom', label: 'Headroom', text: (job) => job.headroom, isFigure: true, phoneLabel: 'Headroom ' }
];
const rows: Job[] = [
	{ id: 1, customer: 'I. Tervala', headroom: '−0.5 K' },
	{ id: 2, customer: 'S. Qadir', headroom: '2.1 K' }
];

const show = () =>
	render(DataTable<Job>, {
		caption: 'Jobs',
		columns,
		rows,
		rowKey: (job: Job) => job.id,
		rowHref: (job: Job) => `/jobs/${job.id}`
	});

describe('a table', () => {
	it('leads from each row by one link, on the cell that names it', () => {
		show();
		const [, first] = screen.getAllByRole('row');
		const links = within(first as HTMLElement).getAllByRole('link');
		expect(links.map((link) => [link.textContent?.trim(), link.getAttribute('href')])).toEqual([
			['I. Tervala', '/jobs/1']
		]);
	});

	it('says which way it is sorted, and sorts by a link', () => {
		show();
		const heading = screen.getByRole('columnheader', { name: /Customer/ });
		expect(heading.getAttribute('aria-sort')).toBe('descending');
		expect(within(heading).getByRole('link').getAttribute('href')).toBe('?sort=customer');
	});

	it('sets figures right', () => {
		show();
		const cells = screen.getAllByRole('cell');
		expect(cells).toHaveLength(2);
		cells.forEach((cell) => expect(cell.classList).toContain('number'));
	});
});
