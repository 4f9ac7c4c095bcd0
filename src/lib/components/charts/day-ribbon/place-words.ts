import { boxInside, boxesOverlap, growBox, lengthInside, type Box, type Point } from './geometry';
import { estimateTextWidth } from './text-width';

export type Align = 'left' | 'center' | 'right';

/** Somewhere a word could stand. */
export interface Spot {
	x: number;
	/** Middle of the letters. */
	y: number;
	align: Align;
	/** Added to its cost, for spots that are less wanted. */
	penalty?: number;
}

/** What words should keep off. */
export interface Obstacles {
	/** Lines may be crossed at a price a px. */
	lines: { line: Point[]; costPerPx: number }[];
	/** Boxes may never be touched. */
	boxes: Box[];
	bounds: Box;
}

export interface PlacedWords extends Spot {
	text: string;
	box: Box;
	cost: number;
}

const LETTER_HEIGHT = 1.06;

export function wordsBox(text: string, spot: Spot, fontPx: number, bold = false): Box {
	const width = estimateTextWidth(text, fontPx, bold);
	const left = spot.align === 'left' ? spot.x : spot.align === 'right' ? spot.x - width : spot.x - width / 2;
	const half = (fontPx * LETTER_HEIGHT) / 2;
	return { left, right: left + width, top: spot.y - half, bottom: spot.y + half };
}

/**
 * The cheapest of the spots; the first of equals, so that the same day always gives the same picture.
 * Null when every spot leaves the bounds or touches a box: then the words are left out.
 */
export function placeWords(
	text: string,
	spots: Spot[],
	obstacles: Obstacles,
	type: { fontPx: number; bold?: boolean }
): PlacedWords | null {
	let best: PlacedWords | null = null;
	for (const spot of spots) {
		const box = wordsBox(text, spot, type.fontPx, type.bold);
		const roomy = growBox(box, 2);
		if (!boxInside(box, obstacles.bounds)) continue;
		if (obstacles.boxes.some((other) => boxesOverlap(other, roomy))) continue;
		const crossed = obstacles.lines.reduce(
			(sum, { line, costPerPx }) => sum + costPerPx * lengthInside(line, roomy),
			0
		);
		const cost = crossed + (spot.penalty ?? 0);
		if (!best || cost < best.cost) best = { ...spot, text, box, cost };
	}
	return best;
}

/** Pushes words in a column apart until none touch, keeping their order; they stay inside top and bottom. */
export function spreadColumn(ys: number[], stepPx: number, top: number, bottom: number): number[] {
	const order = ys.map((y, index) => ({ y, index })).sort((a, b) => a.y - b.y || a.index - b.index);
	for (let pass = 0; pass < 2 * order.length; pass++) {
		for (let i = 1; i < order.length; i++) {
			const upper = order[i - 1] as { y: number };
			const lower = order[i] as { y: number };
			const lack = stepPx - (lower.y - upper.y);
			if (lack <= 0) continue;
			upper.y -= lack / 2;
			lower.y += lack / 2;
		}
	}
	const overTop = Math.max(0, top - (order[0]?.y ?? top));
	const overBottom = Math.max(0, (order.at(-1)?.y ?? bottom) - bottom);
	const placed = [...ys];
	for (const { y, index } of order) placed[index] = y + overTop - overBottom;
	return placed;
}
