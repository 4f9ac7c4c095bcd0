import { cleanup, render, screen } from '@testing-library/svelte';
import { tick } from 'svelte';
import { afterEach, describe, expect, it } from 'vitest';
import Notice from './Notice.svelte';

afterEach(cleanup);

describe('a notice', () => {
	it('takes the focus where it answers the button that led to it', async () => {
		render(Notice, { kind: 'done', title: 'Signed.', isAnswer: true });
		await tick();
		expect(document.activeElement).toBe(screen.getByRole('status'));
	});

	it('leaves the focus alone otherwise', async () => {
		render(Notice, { kind: 'done', title: 'Signed.' });
		await tick();
		expect(document.activeElement).toBe(document.body);
	});
});
