import { describe, expect, it } from 'vitest';
import type { ReviewPlace } from '$lib/schemas/review';
import { drawReviewMap } from './review-map';

const place = (
	placeId: number,
	latitudeDeg: number,
	longitudeDeg: number,
	installations: number
): ReviewPlace => ({
	...{ placeId, latitudeDeg, longitudeDeg, installations, name: `Place ${placeId}`, zone: 'BWh' },
	...{ verdicts: { 'rides-it-out': installations, 'runs-close': 0, 'cuts-out': 0 }, goneDark: placeId % 2 }
});

describe.each(['phone', 'desk'] as const)('the map of the review on a %s', (size) => {
	it('puts places where they are to each other, north up and east right', () => {
		const { marks, land } = drawReviewMap([place(1, -23.7, 133.9, 40), place(2, -12.5, 130.8, 10)], size);
		const [south, north] = marks;
		expect(north!.y).toBeLessThan(south!.y);
		expect(north!.x).toBeLessThan(south!.x);
		expect(land).toMatch(/^M/);
	});

	it('lets the area of a mark tell the count, and its filling that some went dark', () => {
		const [many, few] = drawReviewMap([place(1, -23.7, 133.9, 40), place(2, -12.5, 130.8, 10)], size).marks;
		expect(many!.radius / few!.radius).toBeCloseTo(2, 1);
		expect([many!.isFilled, few!.isFilled]).toEqual([true, false]);
		expect(many!.label).toBe('Place 1: 40 installations, 1 reported dark');
	});

	it('writes no name over another mark or name, and leaves out those without room', () => {
		const crowd = Array.from({ length: 12 }, (_, at) =>
			place(at + 1, -20 + at * 0.05, 130 + at * 0.05, 12 - at)
		);
		const named = drawReviewMap(crowd, size).marks.filter(({ nameX }) => nameX !== null);
		expect(named.length).toBeGreaterThan(0);
		expect(named.length).toBeLessThan(12);
		/** Six pixels a letter is less than any name takes. */
		const boxes = named.map(({ label, nameX, isNameLeft, y }) => {
			const width = label.split(':')[0]!.length * 6;
			const left = isNameLeft ? nameX! - width : nameX!;
			return { left, right: left + width, y };
		});
		for (const [at, box] of boxes.entries())
			for (const other of boxes.slice(at + 1)) {
				const isBeside = box.right <= other.left || other.right <= box.left;
				expect(isBeside || Math.abs(box.y - other.y) >= 12).toBe(true);
			}
	});

	it('stays on the paper wherever the places are, and with none at all', () => {
		const far = [place(1, 64, -22, 1), place(2, -54, 168, 1), place(3, 0, 179, 1), place(4, 10, -179, 1)];
		const { marks, width, height } = drawReviewMap(far, size);
		for (const { x, y } of marks) {
			expect(x).toBeGreaterThanOrEqual(0);
			expect(x).toBeLessThanOrEqual(width);
			expect(y).toBeGreaterThanOrEqual(0);
			expect(y).toBeLessThanOrEqual(height);
		}
		expect(drawReviewMap([], size).marks).toEqual([]);
	});
});
