import { cleanup, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { SpokenStream, useSpokenStreams } from '../../../../../tests/support/spoken-stream';
import { invalidateAll } from '$app/navigation';
import type { Reading, TraceHold } from '$lib/schemas/accuracy';
import HeldSection from './HeldSection.svelte';

vi.mock('$app/navigation', () => ({ invalidateAll: vi.fn(() => Promise.resolve()) }));
vi.mock('$app/state', () => ({ navigating: { to: null } }));

const READING: Reading = {
	...{ id: 1, kind: 'trace', readOn: '2026-02-03', jobId: 2, jobNumber: 2, mountId: 3, mount: 'A: Guard' },
	...{ assessmentId: 12, book: 1, zone: 'BWh', position: 'under-bonnet', measured: 44.2, label: null },
	trace: { id: 7, name: 'day.csv', place: 'cells' },
	...{ predicted: 43, low: 40, high: 46, error: 1.2, deviations: 0.7, stand: 'inside', chance: null },
	...{ observedDays: null, isEnteredLater: true, leftOut: 'legs-open' }
};
const HELD: TraceHold = { state: 'held', reading: READING };

useSpokenStreams();
afterEach(() => {
	cleanup();
	vi.clearAllMocks();
});

describe('a trace beside what had been predicted of it', () => {
	it('is said to be worked out until it is there, and then stands without the page being loaded anew', async () => {
		render(HeldSection, { traceId: 7, hold: { state: 'waits', share: 0 } });
		const stream = SpokenStream.open[0]!;
		expect(stream.url).toBe('/traces/7/held-progress');
		stream.say('progress', { state: 'waits', share: 0.4 });
		expect(await screen.findByText(/is being worked out: 40/)).toBeTruthy();
		stream.say('progress', HELD);
		stream.say('done');
		expect(await screen.findByText('Measured at the cells')).toBeTruthy();
		expect(screen.queryByText(/is being worked out/)).toBeNull();
		expect(stream.isClosed).toBe(true);
		expect(invalidateAll).not.toHaveBeenCalled();
	});

	it('is worked out anew when its legs are others', async () => {
		const { rerender } = render(HeldSection, { traceId: 7, hold: HELD });
		expect(SpokenStream.open).toHaveLength(0);
		await rerender({ traceId: 7, hold: { state: 'waits', share: 0 } });
		expect(SpokenStream.open).toHaveLength(1);
		expect(screen.queryByText('Measured at the cells')).toBeNull();
	});

	it('says what was measured and predicted, whether it counts, and what it is held against', () => {
		const { container } = render(HeldSection, { traceId: 7, hold: HELD });
		const text = container.textContent.replaceAll(/\s+/g, ' ');
		expect(text).toContain('44.2 °C');
		expect(text).toContain('43.0 °C (40.0 to 46.0)');
		expect(text).toContain('It is not counted: with legs that nobody has confirmed yet.');
		expect(text).toContain('The assessment was entered after the day of the trace.');
		expect(screen.getByRole('link', { name: 'The assessment' }).getAttribute('href')).toBe('/assessments/12');
	});

	it.each([
		['no-assessment', /has not been assessed/],
		['no-hour', /at which time of day it begins/],
		['no-run', /for want of a temperature of the battery/]
	] as const)('says why there is nothing: %s', (why, words) => {
		render(HeldSection, { traceId: 7, hold: { state: 'none', why } });
		expect(screen.getByText(words)).toBeTruthy();
	});
});
