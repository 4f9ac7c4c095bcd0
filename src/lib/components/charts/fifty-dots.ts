/** Fifty equally likely days, each by how hot it gets, against a limit: all in the units of the drawing. */
export interface DotDrawing {
	width: number;
	height: number;
	radius: number;
	/** The foot of the dots. */
	baseY: number;
	dots: { x: number; y: number; isBeyond: boolean }[];
	/** Where the limit stands. */
	limitX: number;
	limitTop: number;
	ticks: { x: number; tempC: number }[];
}

export const DOT_COUNT = 50;
const WIDTH = 340;
const SIDE = 16;
const TOP = 30;
const FOOT = 34;
const MOST_HEIGHT = 150;
/** From large to small: the largest whose highest pile has room. */
const DIAMETERS = [14, 12, 10, 9, 8, 7, 6, 5, 4, 3];
const TICK_STEPS = [1, 2, 5, 10, 20, 50];
const MOST_TICKS = 6;
const LEAST_SPAN_K = 4;

const round = (px: number): number => Math.round(px * 10) / 10;

interface Pile {
	x: number;
	count: number;
	isBeyond: boolean;
}

/** Piles as in a dot plot of Wilkinson, from the limit outwards: a pile takes all that lie within one dot of its first. */
function pileUp(xs: readonly number[], limitX: number, isBeyond: boolean, diameter: number): Pile[] {
	const away = isBeyond ? 1 : -1;
	const distances = xs.map((x) => (x - limitX) * away).sort((a, b) => a - b);
	const piles: { first: number; count: number }[] = [];
	for (const distance of distances) {
		const open = piles.at(-1);
		if (open && distance < open.first + diameter) open.count++;
		else piles.push({ first: distance, count: 1 });
	}
	return piles.map(({ first, count }) => ({
		...{ count, isBeyond, x: limitX + away * (first + diameter / 2) }
	}));
}

function listTicks(low: number, high: number, x: (tempC: number) => number): DotDrawing['ticks'] {
	const step = TICK_STEPS.find((each) => (high - low) / each <= MOST_TICKS) ?? TICK_STEPS.at(-1)!;
	const ticks: DotDrawing['ticks'] = [];
	for (let tempC = Math.ceil(low / step) * step; tempC <= high; tempC += step)
		ticks.push({ x: round(x(tempC)), tempC });
	return ticks;
}

/**
 * A quantile dot plot: each dot is one of fifty equally likely days. What lies beyond the limit is piled apart from what
 * does not, so that no pile stands on both sides of it.
 */
export function drawFiftyDots(valuesC: readonly number[], limitC: number): DotDrawing {
	const sorted = [...valuesC].sort((a, b) => a - b);
	const [least, most] = [Math.min(sorted[0]!, limitC), Math.max(sorted.at(-1)!, limitC)];
	const pad = Math.max((LEAST_SPAN_K - (most - least)) / 2, (most - least) * 0.04, 0.5);
	const [low, high] = [least - pad, most + pad];
	const x = (tempC: number): number => SIDE + ((tempC - low) / (high - low)) * (WIDTH - 2 * SIDE);
	const limitX = x(limitC);
	const xsOf = (isBeyond: boolean): number[] => sorted.filter((tempC) => tempC >= limitC === isBeyond).map(x);
	const pilesOf = (diameter: number): Pile[] =>
		[false, true].flatMap((isBeyond) => pileUp(xsOf(isBeyond), limitX, isBeyond, diameter));
	const heightOf = (diameter: number): number =>
		Math.max(...pilesOf(diameter).map(({ count }) => count)) * diameter;
	const diameter = DIAMETERS.find((each) => heightOf(each) <= MOST_HEIGHT) ?? DIAMETERS.at(-1)!;
	const baseY = TOP + heightOf(diameter);
	return {
		...{ width: WIDTH, height: round(baseY + FOOT), radius: round(diameter / 2 - 0.75), baseY: round(baseY) },
		dots: pilesOf(diameter).flatMap(({ x: at, count, isBeyond }) =>
			Array.from({ length: count }, (_, level) => ({
				x: round(at),
				y: round(baseY - diameter * (level + 0.5)),
				isBeyond
			}))
		),
		...{ limitX: round(limitX), limitTop: TOP - 10 },
		ticks: listTicks(low, high, x)
	};
}
