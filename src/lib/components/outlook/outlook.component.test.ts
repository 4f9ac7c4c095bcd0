import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import axe from 'axe-core';
import { tick } from 'svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { SpokenStream, useSpokenStreams } from '../../../../tests/support/spoken-stream';
import { invalidateAll } from '$app/navigation';
import type { CableReport, RemedyLine, RemedyReport } from '../../schemas/outlook-reports';
import CablePart from './CablePart.svelte';
import OutlookProgress from './OutlookProgress.svelte';
import RemedyPart from './RemedyPart.svelte';
import TwentyDays from './TwentyDays.svelte';

vi.mock('$app/navigation', () => ({ invalidateAll: vi.fn(() => Promise.resolve()) }));

/** Where somebody is on the way to; null while the page stays. */
const way = vi.hoisted(() => ({ to: null as object | null }));
vi.mock('$app/state', () => ({ navigating: way }));

/** A part is no page, and jsdom lays nothing out: contrast is looked at on the pages, in a browser. */
const NOT_HERE = {
	region: { enabled: false },
	'color-contrast': { enabled: false },
	'heading-order': { enabled: false }
};

async function findViolations(container: Element): Promise<string[]> {
	const { violations } = await axe.run(container, { rules: NOT_HERE });
	return violations.map(({ id }) => id);
}

useSpokenStreams();
afterEach(() => {
	cleanup();
	vi.clearAllMocks();
});

describe('the work on an outlook', () => {
	const begin = () => {
		render(OutlookProgress, { assessmentId: 7 });
		return SpokenStream.open[0]!;
	};

	it('says which part it is at and how far, and brings the answer when it is done', async () => {
		const stream = begin();
		expect(stream.url).toBe('/assessments/7/outlook-progress');
		stream.say('progress', { share: 0.64, part: 'remedies' });
		expect(await screen.findByText(/trying what could be done/)).toBeTruthy();
		expect((screen.getByRole('progressbar') as HTMLProgressElement).value).toBe(0.64);
		expect(invalidateAll).not.toHaveBeenCalled();
		stream.say('done');
		await vi.waitFor(() => expect(invalidateAll).toHaveBeenCalledOnce());
		expect(stream.isClosed).toBe(true);
	});

	it('does not break off the way of who is leaving', async () => {
		const stream = begin();
		way.to = {};
		stream.say('done');
		await tick();
		way.to = null;
		expect(stream.isClosed).toBe(true);
		expect(invalidateAll).not.toHaveBeenCalled();
	});

	it('says when it failed, and tries again', async () => {
		const stream = begin();
		stream.say('failed');
		await fireEvent.click(await screen.findByRole('button', { name: 'Try again' }));
		expect(stream.isClosed).toBe(true);
		expect(SpokenStream.open).toHaveLength(2);
		expect(await screen.findByText(/Working it out/)).toBeTruthy();
	});

	it('stops listening when the page is left', () => {
		const stream = begin();
		cleanup();
		expect(stream.isClosed).toBe(true);
	});
});

describe('twenty days', () => {
	it('fill as many as go dark', () => {
		const { container } = render(TwentyDays, { ofTwenty: 11, label: 'Twenty days' });
		expect(container.querySelectorAll('circle')).toHaveLength(20);
		expect(container.querySelectorAll('circle.dark')).toHaveLength(11);
	});
});

const line = (label: string, gain: string): RemedyLine => ({
	...{ label, gain, effect: `What ${label} does.`, parts: '60', work: '30 min' },
	...{ verdict: 'cuts out', chance: '', isLeast: false }
});
const REMEDIES: RemedyReport = {
	sentence: 'The least is a wrap.',
	alone: ['A', 'B', 'C', 'D', 'E', 'F'].map((name) => line(name, '2.0 K cooler')),
	hotter: 'Do not do this here: F.',
	front: [{ ...line('A and B', '4.0 K cooler'), isLeast: true, chance: 'dark on about 1 of 20' }],
	notTried: ['More than 4 together.'],
	method: '398 sets of remedies were run.'
};

describe('what it would take', () => {
	it('has every remedy with its cost, the least marked, what makes it hotter, and a way to the prices', async () => {
		const { container } = render(RemedyPart, { remedies: REMEDIES });
		expect(container.querySelectorAll('li .figure')).toHaveLength(7);
		expect(screen.getByText(/A and B, the least that does it/)).toBeTruthy();
		expect(screen.getAllByText(/parts 60, work 30 min; cuts out/)).toHaveLength(7);
		expect(screen.getByText('Do not do this here: F.')).toBeTruthy();
		const prices = screen.getByRole('link', { name: 'What the workshop asks for each' });
		expect(prices.getAttribute('href')).toBe('/remedies');
		expect(await findViolations(container)).toEqual([]);
	});
});

describe('cable and fuse', () => {
	const CABLE: CableReport = {
		...{
			proposal: '16 mm²',
			sentence: 'One does not hold.',
			air: 'At 70 °C.',
			conductor: 'It is at 80 °C.',
			deference: 'Makers first.'
		},
		findings: [
			{
				label: 'The cable carries the current',
				holds: true,
				value: '40 A',
				limit: '71 A',
				source: 'A rule.'
			},
			{ label: 'The fuse holds', holds: false, value: '40 A', limit: '38 A', source: 'Another.' }
		]
	};

	it('say of each check whether it holds, its value and its limit', async () => {
		const { container } = render(CablePart, { cable: CABLE, mountId: 3 });
		const [first, second] = screen.getAllByRole('listitem');
		expect(first!.textContent).toMatch(/The cable carries the current: holds\s*40 A\s*of at most 71 A/);
		expect(second!.textContent).toContain('does not hold');
		expect(await findViolations(container)).toEqual([]);
	});

	it('invite a proposal where there is none', () => {
		render(CablePart, { cable: null, mountId: 3 });
		const invitation = screen.getByRole('link', { name: 'Propose a cable and a fuse' });
		expect(invitation.getAttribute('href')).toBe('/mounts/3/cable');
	});
});
