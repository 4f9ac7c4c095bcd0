import { describe, expect, it } from 'vitest';
import { renderTrendsSvg } from './render-trends';

const months = Array.from({ length: 24 }, (_, at) => ({
	month: `${2025 + Math.floor(at / 12)}-${String((at % 12) + 1).padStart(2, '0')}`,
	fitted: { 'rides-it-out': at, 'runs-close': 1, 'cuts-out': 0 },
	predictedDays: at / 4,
	reportedDays: at % 3
}));

describe('the picture of the months', () => {
	it.each(['phone', 'desk'] as const)('of a %s says what it shows and styles nothing inline', (size) => {
		const svg = renderTrendsSvg({ on: '2026-12-02', months }, 'Months <of> "two" years', size);
		expect(svg).toContain('aria-label="Months &lt;of&gt; &quot;two&quot; years"');
		expect(svg).not.toMatch(/style=|<style/);
		expect(svg).toContain('2025');
		expect(svg).toContain('2026');
	});
});
