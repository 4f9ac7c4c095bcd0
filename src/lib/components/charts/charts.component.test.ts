import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import axe from 'axe-core';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { drawRibbonPictures } from './day-ribbon/render-day-ribbon';
import DayRibbon from './DayRibbon.svelte';
import HeatLedger from './HeatLedger.svelte';
import RibbonComparison from './RibbonComparison.svelte';
import { sampleDay } from './testing/sample-day';

const data = sampleDay();
const pictures = drawRibbonPictures(data, ['phone', 'desk'], 'day');

/** A part is no page, and jsdom lays nothing out: contrast is looked at on the pages, in a browser. */
const NOT_HERE = { region: { enabled: false }, 'color-contrast': { enabled: false } };
/* Drawing and scanning are slow where everything runs at once. */
vi.setConfig({ testTimeout: 60_000 });

async function findViolations(container: Element): Promise<string[]> {
	const { violations } = await axe.run(container, { rules: NOT_HERE });
	return violations.map(({ id }) => id);
}

beforeEach(() => {
	vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(360);
	vi.stubGlobal(
		'ResizeObserver',
		class {
			observe() {}
			unobserve() {}
			disconnect() {}
		}
	);
});
afterEach(() => {
	cleanup();
	vi.restoreAllMocks();
	vi.unstubAllGlobals();
});

describe('the day ribbon', () => {
	it('shows the pictures that came with the page', () => {
		render(DayRibbon, { data, pictures });
		expect(screen.getAllByRole('img', { name: /^Temperatures from 07:30/ })).toHaveLength(2);
		expect(screen.queryByRole('slider')).toBeNull();
	});

	it('has a table of the hours', () => {
		const { container } = render(DayRibbon, { data, pictures, table: true });
		expect(container.querySelectorAll('tbody tr').length).toBeGreaterThan(16);
	});

	it('reads the values under a hairline that keys move', async () => {
		render(DayRibbon, { data, live: true });
		const slider = await screen.findByRole('slider');
		await fireEvent.keyDown(slider, { key: 'Home' });
		expect(slider.getAttribute('aria-valuetext')).toMatch(/^07:30: cells 30/);
		await fireEvent.keyDown(slider, { key: 'ArrowRight' });
		expect(slider.getAttribute('aria-valuetext')).toMatch(/^07:35: cells/);
	});

	it('draws anew when its day changes', async () => {
		const { rerender } = render(DayRibbon, { data, live: true });
		await screen.findByRole('slider');
		expect(screen.getByRole('img').getAttribute('aria-label')).toContain('It is dark from');
		await rerender({ data: sampleDay({ exposure: 0.5 }) });
		expect(screen.getByRole('img').getAttribute('aria-label')).toContain('never goes dark');
	});

	it('has no accessibility violations, still or live', async () => {
		const still = render(DayRibbon, { data, pictures, table: true, caption: 'Still' });
		const live = render(DayRibbon, { data, live: true, caption: 'Live' });
		await screen.findByRole('slider');
		expect(await findViolations(still.container)).toEqual([]);
		expect(await findViolations(live.container)).toEqual([]);
	});
});

describe('the heat ledger', () => {
	it('says the same in a bar and in a table, without violations', async () => {
		const ledger = [
			{ source: 'bay-air', watts: 20, kelvin: 30 },
			{ source: 'exhaust', watts: 12, kelvin: 8 }
		] as const;
		const { container } = render(HeatLedger, { ledger });
		expect(screen.getByRole('img').getAttribute('aria-label')).toContain('bay air +30.0');
		expect(screen.getByRole('row', { name: /Exhaust 12.W \+8\.0.K/ })).toBeTruthy();
		expect(await findViolations(container)).toEqual([]);
	});
});

describe('ribbons side by side', () => {
	it('say each mount, its verdict and its figures', () => {
		const mounts = [
			{
				letter: 'A',
				name: 'Front corner',
				verdict: 'rides-it-out',
				headroomK: 12.3,
				ribbon: sampleDay({ exposure: 0.5 })
			},
			{ letter: 'B', name: 'Firewall', verdict: 'cuts-out', headroomK: -3, ribbon: data }
		] as const;
		render(RibbonComparison, { mounts });
		expect(screen.getAllByRole('heading').map((heading) => heading.textContent)).toEqual([
			'A: Front corner',
			'B: Firewall'
		]);
		expect(screen.getByText('Cuts out')).toBeTruthy();
		expect(screen.getByText(/12\.3.K of headroom/)).toBeTruthy();
	});
});
