export interface Point {
	x: number;
	y: number;
}
export interface Box {
	left: number;
	top: number;
	right: number;
	bottom: number;
}

export const widthOf = (box: Box): number => box.right - box.left;
export const heightOf = (box: Box): number => box.bottom - box.top;

export const boxesOverlap = (a: Box, b: Box): boolean =>
	a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

export const boxInside = (inner: Box, outer: Box): boolean =>
	inner.left >= outer.left &&
	inner.right <= outer.right &&
	inner.top >= outer.top &&
	inner.bottom <= outer.bottom;

export const growBox = (box: Box, by: number): Box => ({
	left: box.left - by,
	top: box.top - by,
	right: box.right + by,
	bottom: box.bottom + by
});

/** The part of a–b inside a box, as shares of its length; null when it stays outside (Liang and Barsky 1984). */
export function clipSegment(a: Point, b: Point, box: Box): [number, number] | null {
	let from = 0;
	let to = 1;
	const edges: [number, number][] = [
		[a.x - b.x, a.x - box.left],
		[b.x - a.x, box.right - a.x],
		[a.y - b.y, a.y - box.top],
		[b.y - a.y, box.bottom - a.y]
	];
	for (const [run, room] of edges) {
		if (run === 0) {
			if (room < 0) return null;
		} else if (run < 0) from = Math.max(from, room / run);
		else to = Math.min(to, room / run);
	}
	return from < to ? [from, to] : null;
}

/** How much of a polyline runs through a box, px. */
export function lengthInside(line: Point[], box: Box): number {
	let length = 0;
	for (let i = 1; i < line.length; i++) {
		const a = line[i - 1] as Point;
		const b = line[i] as Point;
		const part = clipSegment(a, b, box);
		if (part) length += (part[1] - part[0]) * Math.hypot(b.x - a.x, b.y - a.y);
	}
	return length;
}

/** A polyline with fewer points, nowhere further than `tolerance` from the first (Douglas and Peucker 1973). */
export function simplifyLine<T extends Point>(line: T[], tolerance: number): T[] {
	if (line.length < 3) return line;
	const keep = new Uint8Array(line.length);
	keep[0] = keep[line.length - 1] = 1;
	const open: [number, number][] = [[0, line.length - 1]];
	for (let span = open.pop(); span; span = open.pop()) {
		const [from, to] = span;
		const far = furthestFrom(line, from, to);
		if (far.distance <= tolerance) continue;
		keep[far.index] = 1;
		open.push([from, far.index], [far.index, to]);
	}
	return line.filter((_, i) => keep[i]);
}

function furthestFrom(line: Point[], from: number, to: number): { index: number; distance: number } {
	const a = line[from] as Point;
	const b = line[to] as Point;
	const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
	let index = from;
	let distance = 0;
	for (let i = from + 1; i < to; i++) {
		const p = line[i] as Point;
		const off = Math.abs((b.x - a.x) * (a.y - p.y) - (a.x - p.x) * (b.y - a.y)) / length;
		if (off > distance) {
			distance = off;
			index = i;
		}
	}
	return { index, distance };
}

const round = (value: number): number => Math.round(value * 10) / 10;

export const pathOf = (line: Point[]): string =>
	line.map(({ x, y }, i) => `${i ? 'L' : 'M'}${round(x)} ${round(y)}`).join('');

/** Slanting lines that fill a box and end on its edges; one phase for the whole picture. */
export function hatchPath(box: Box, stepPx: number): string {
	const lines: string[] = [];
	const first = Math.ceil((box.left + box.top) / stepPx) * stepPx;
	for (let sum = first; sum <= box.right + box.bottom; sum += stepPx) {
		const left = Math.max(box.left, sum - box.bottom);
		const right = Math.min(box.right, sum - box.top);
		if (right - left > 0.5)
			lines.push(
				pathOf([
					{ x: left, y: sum - left },
					{ x: right, y: sum - right }
				])
			);
	}
	return lines.join('');
}
