import { formatTemperature } from '../../../format/numbers';
import { formatClockHour } from '../../../format/time';
import type { DrawnCurve } from './curves';
import type { RibbonFrame } from './frame';
import { growBox, type Box, type Point } from './geometry';
import type { LimitLine } from './limits';
import type { Mark } from './marks';
import {
	placeWords,
	spreadColumn,
	wordsBox,
	type Obstacles,
	type PlacedWords,
	type Spot
} from './place-words';
import type { RibbonData } from './ribbon-data';

export const sayPeak = ({ peakCellsC, peakAtHour }: Pick<RibbonData, 'peakCellsC' | 'peakAtHour'>): string =>
	`cells ${formatTemperature(peakCellsC)} at ${formatClockHour(peakAtHour)}`;

/** How much words mind a curve underneath, a px. */
const CROSSING_COST: Record<DrawnCurve['name'], number> = {
	outside: 0.5,
	air: 0.7,
	board: 1.2,
	case: 1.2,
	cells: 3
};
/** Dearer than this, the word of a curve is left out. */
const MAX_CURVE_WORD_COST = 90;

/** All words over the plot, each where it crosses least. */
export function drawWords(
	frame: RibbonFrame,
	data: RibbonData,
	curves: DrawnCurve[],
	limits: LimitLine[]
): Mark[] {
	const peak = { x: frame.x(data.peakAtHour), y: frame.y(data.peakCellsC) };
	const obstacles: Obstacles = {
		lines: [
			...curves.map(({ name, line }) => ({ line, costPerPx: CROSSING_COST[name] })),
			...limits.map(({ y }) => ({ line: acrossPlot(frame, y), costPerPx: 1.5 }))
		],
		boxes: [growBox({ left: peak.x, right: peak.x, top: peak.y, bottom: peak.y }, 6)],
		bounds: {
			left: frame.plot.left + 3,
			right: frame.plot.right - 2,
			top: frame.plot.top - 4,
			bottom: frame.plot.bottom - 3
		}
	};
	const marks: Mark[] = [];
	if (frame.spec.limitWords !== 'none') marks.push(...writeLimits(frame, limits));
	if (frame.spec.peakWords) marks.push(...writePeak(frame, data, peak, obstacles));
	if (frame.spec.curveWords) {
		const worded = curves.filter(({ name }) => name !== 'cells');
		marks.push(...worded.flatMap((curve) => writeCurveWord(frame, curve, curves, obstacles)));
	}
	return marks;
}

const acrossPlot = ({ plot }: RibbonFrame, y: number): Point[] => [
	{ x: plot.left, y },
	{ x: plot.right, y }
];

/** At the right end, outside the plot: pushed apart where two limits are close. */
function writeLimits(frame: RibbonFrame, limits: LimitLine[]): Mark[] {
	const { plot, spec } = frame;
	const lineStep = spec.fontPx * 1.2;
	const blockStep = lineStep * Math.max(...limits.map(({ words }) => words.length));
	const ys = spreadColumn(
		limits.map(({ y }) => y),
		blockStep,
		plot.top + blockStep / 2,
		plot.bottom - blockStep / 2
	);
	return limits.flatMap((limit, i) =>
		limit.words.map((text, row): Mark => ({
			kind: 'words',
			text,
			x: plot.right + 7,
			y: (ys[i] ?? limit.y) + (row - (limit.words.length - 1) / 2) * lineStep,
			align: 'left',
			fontPx: spec.fontPx,
			fill: limit.ink,
			bold: limit.ink === 'ink'
		}))
	);
}

function writePeak(frame: RibbonFrame, data: RibbonData, peak: Point, obstacles: Obstacles): Mark[] {
	const { fontPx } = frame.spec;
	const spots: Spot[] = [];
	for (const rise of [1.35, -1.35, 2.2, -2.2, 3.1, -3.1, 4.2, -4.2]) {
		const y = peak.y - rise * fontPx;
		const far = Math.abs(rise) * 9 + (rise < 0 ? 12 : 0);
		spots.push(
			{ x: peak.x, y, align: 'center', penalty: far },
			{ x: peak.x - 7, y, align: 'right', penalty: far + 2 },
			{ x: peak.x + 7, y, align: 'left', penalty: far + 3 }
		);
	}
	const placed = placeWords(sayPeak(data), spots, obstacles, { fontPx: fontPx + 0.5, bold: true });
	return place(placed, obstacles, { fontPx: fontPx + 0.5, fill: 'ink', bold: true, halo: true });
}

/** Letters lean on their own line: it must run straight under them, and no other may. */
function writeCurveWord(
	frame: RibbonFrame,
	curve: DrawnCurve,
	curves: DrawnCurve[],
	obstacles: Obstacles
): Mark[] {
	const { plot, spec } = frame;
	const others: Obstacles = {
		...obstacles,
		lines: [
			...curves.filter((other) => other !== curve).map(({ line }) => ({ line, costPerPx: 6 })),
			...obstacles.lines.slice(curves.length)
		]
	};
	const spots: Spot[] = [];
	for (let x = plot.left + 12; x < plot.right; x += spec.fontPx) {
		const y = heightAt(curve.line, x);
		const box = wordsBox(curve.word, { x, y, align: 'center' }, spec.fontPx);
		const tilt = Math.abs(heightAt(curve.line, box.left) - y) + Math.abs(heightAt(curve.line, box.right) - y);
		spots.push({ x, y, align: 'center', penalty: tilt * 4 });
		const beside = { x, align: 'center', penalty: tilt * 4 + 24 } as const;
		spots.push({ ...beside, y: y - spec.fontPx * 0.85 }, { ...beside, y: y + spec.fontPx * 0.85 });
	}
	const placed = placeWords(curve.word, spots, others, { fontPx: spec.fontPx });
	if (!placed || placed.cost > MAX_CURVE_WORD_COST) return [];
	const gap: Mark = {
		kind: 'box',
		box: { ...growBox(placed.box, -2), left: placed.box.left - 3, right: placed.box.right + 3 },
		fill: 'paper'
	};
	const onLine = Math.abs(placed.y - heightAt(curve.line, placed.x)) < 1;
	return [
		...(onLine ? [gap] : []),
		...place(placed, obstacles, { fontPx: spec.fontPx, fill: 'muted', halo: true })
	];
}

function heightAt(line: Point[], x: number): number {
	const after = line.findIndex((point) => point.x >= x);
	const b = line[after < 0 ? line.length - 1 : after] as Point;
	const a = line[after - 1] ?? b;
	return b.x === a.x ? b.y : a.y + ((b.y - a.y) * (x - a.x)) / (b.x - a.x);
}

type Lettering = Pick<Extract<Mark, { kind: 'words' }>, 'fontPx' | 'fill' | 'bold' | 'halo'>;

/** Takes the spot, so that nothing else stands there. */
function place(placed: PlacedWords | null, obstacles: { boxes: Box[] }, lettering: Lettering): Mark[] {
	if (!placed) return [];
	obstacles.boxes.push(placed.box);
	const { text, x, y, align } = placed;
	return [{ kind: 'words', text, x, y, align, ...lettering }];
}
