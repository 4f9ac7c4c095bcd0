import { formatSpeed } from '../../../format/numbers';
import type { Surface } from '../../../thermal/types';
import type { RibbonFrame } from './frame';
import { heightOf, pathOf, widthOf, type Box, type Point } from './geometry';
import type { Mark } from './marks';
import type { RibbonData, RibbonLeg } from './ribbon-data';
import { estimateTextWidth } from './text-width';

const PAD_PX = 5;
const GAP_PX = 1.5;
/** Nothing narrower than this can carry a texture that anybody tells apart. */
const MIN_TEXTURE_PX = 12;

/** The words of a leg, longest first; the first that fits is written. */
export function legWords(leg: RibbonLeg): string[] {
	const bonnet = leg.bonnetOpen ? [`${leg.kind}, bonnet up`] : [];
	const speed = formatSpeed(leg.speedKmh);
	switch (leg.kind) {
		case 'drive':
			return leg.surface === 'sealed' ? [speed] : [`${speed}, ${leg.surface}`, speed];
		case 'crawl':
			return [`crawl ${speed}`, 'crawl'];
		default:
			return [...bonnet, leg.kind];
	}
}

/** The legs of the day as a strip along the clock. */
export function drawStrip(frame: RibbonFrame, data: RibbonData): Mark[] {
	return data.legs.flatMap((leg) => {
		const box = legBox(frame, leg);
		return widthOf(box) < 1 ? [] : drawLeg(frame, leg, box);
	});
}

function legBox({ strip, x, fromHour, toHour }: RibbonFrame, leg: RibbonLeg): Box {
	const left = x(Math.max(leg.fromHour, fromHour));
	const right = x(Math.min(leg.toHour, toHour));
	return { left: left + GAP_PX / 2, right: right - GAP_PX / 2, top: strip.top, bottom: strip.bottom };
}

function drawLeg(frame: RibbonFrame, leg: RibbonLeg, box: Box): Mark[] {
	if (leg.kind === 'drive') return drawMoving(frame, leg, box, box.top);
	if (leg.kind === 'crawl') {
		const half = box.top + heightOf(box) * 0.56;
		return [
			outline(box),
			...drawMoving(frame, leg, { ...box, top: half }, half),
			...writeWords(frame, leg, box, 'ink', half)
		];
	}
	return [outline(box), ...writeWords(frame, leg, box, 'ink', box.bottom)];
}

function drawMoving(frame: RibbonFrame, leg: RibbonLeg, box: Box, wordsTop: number): Mark[] {
	const marks: Mark[] = [{ kind: 'box', box, fill: 'ink' }];
	const texture = surfacePath(leg.surface, box);
	const edge = texture ? box.bottom - 6 : box.bottom;
	if (texture) marks.push({ kind: 'path', d: texture, stroke: 'paper', widthPx: 1.1, round: true });
	if (leg.kind === 'drive') marks.push(...writeWords(frame, leg, { ...box, top: wordsTop }, 'paper', edge));
	return marks;
}

const outline = (box: Box): Mark => ({
	kind: 'box',
	box: {
		left: box.left + 0.6,
		right: Math.max(box.right - 0.6, box.left + 0.7),
		top: box.top + 0.6,
		bottom: box.bottom - 0.6
	},
	stroke: 'ink',
	widthPx: 1.2
});

function writeWords(
	{ spec }: RibbonFrame,
	leg: RibbonLeg,
	box: Box,
	fill: 'ink' | 'paper',
	foot: number
): Mark[] {
	const room = foot - box.top;
	const fontPx = Math.min(spec.fontPx - 1, room * 0.8);
	if (fontPx < 8.5) return [];
	const text = legWords(leg).find((words) => estimateTextWidth(words, fontPx) + 2 * PAD_PX <= widthOf(box));
	if (!text) return [];
	return [
		{ kind: 'words', text, x: box.left + PAD_PX, y: box.top + room / 2 + 0.5, align: 'left', fontPx, fill }
	];
}

type Texture = (fromX: number, toX: number, y: number) => string;

const zigzag =
	(halfWave: number, lift: number): Texture =>
	(fromX, toX, y) => {
		const points: Point[] = [];
		for (let x = fromX, i = 0; x <= toX; x += halfWave, i++) points.push({ x, y: i % 2 ? y - lift : y });
		return pathOf(points);
	};

const dashes =
	(length: number, gap: number, lifts: number[]): Texture =>
	(fromX, toX, y) => {
		const parts: string[] = [];
		for (let x = fromX, i = 0; x + length <= toX; x += length + gap, i++) {
			const level = y - (lifts[i % lifts.length] ?? 0);
			parts.push(
				pathOf([
					{ x, y: level },
					{ x: x + length, y: level }
				])
			);
		}
		return parts.join('');
	};

const waves =
	(halfWave: number, lift: number): Texture =>
	(fromX, toX, y) => {
		let path = `M${fromX.toFixed(1)} ${y.toFixed(1)}`;
		for (let x = fromX, i = 0; x + halfWave <= toX; x += halfWave, i++) {
			const level = i % 2 ? y + lift : y - lift;
			path += `Q${(x + halfWave / 2).toFixed(1)} ${level.toFixed(1)} ${(x + halfWave).toFixed(1)} ${y.toFixed(1)}`;
		}
		return path;
	};

/** The road under the wheels, drawn along the lower edge: smooth says nothing. */
const TEXTURES: Record<Surface, Texture | null> = {
	sealed: null,
	gravel: dashes(0.4, 3.4, [0, 1.6]),
	corrugated: waves(3.5, 3),
	rock: zigzag(4.5, 3.2),
	sand: dashes(7, 5, [0])
};

export function surfacePath(surface: Surface, box: Box): string | null {
	const texture = TEXTURES[surface];
	if (!texture || widthOf(box) < MIN_TEXTURE_PX) return null;
	return texture(box.left + 2, box.right - 2, box.bottom - 3.2);
}
