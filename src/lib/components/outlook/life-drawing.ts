import type { LifeCurve } from '../../schemas/outlook-reports';

export const LIFE_BOX = { width: 340, height: 200, left: 34, right: 62, top: 18, bottom: 34 } as const;

export interface LifeDrawing {
	/** Of the first curve: where what is left may lie. */
	band: string;
	lines: { label: string; d: string; isFirst: boolean; endY: number }[];
	/** Tests within the years that are drawn. */
	dots: { x: number; y: number }[];
	xTicks: { years: number; x: number }[];
	yTicks: { share: number; y: number; isWorn: boolean }[];
}

const WORN_SHARE = 0.8;
const STEP = 0.1;
const LOWEST_TOP_SHARE = 0.7;
const YEAR_TICKS = [0, 2, 4, 6, 8, 10];
const LABEL_STEP_PX = 13;

const round = (px: number): number => Math.round(px * 10) / 10;

/** Pushes labels at one edge apart, from the top down, and back up from the foot. */
function spread(ys: number[], foot: number): number[] {
	const order = ys.map((y, at) => ({ y, at })).sort((a, b) => a.y - b.y);
	order.forEach((each, k) => {
		const above = order[k - 1];
		if (above) each.y = Math.max(each.y, above.y + LABEL_STEP_PX);
	});
	for (let k = order.length - 1; k >= 0; k--) {
		const limit = k === order.length - 1 ? foot : order[k + 1]!.y - LABEL_STEP_PX;
		order[k]!.y = Math.min(order[k]!.y, limit);
	}
	const spreadYs = [...ys];
	for (const { y, at } of order) spreadYs[at] = round(y);
	return spreadYs;
}

/** What is left of the capacity year by year: a band and its middle for the first, a line for each other. */
export function drawLife(
	curves: readonly LifeCurve[],
	tests: readonly { years: number; share: number }[] = []
): LifeDrawing {
	const { width, height, left, right, top, bottom } = LIFE_BOX;
	const foot = height - bottom;
	const longest = YEAR_TICKS.at(-1)!;
	const lowest = Math.min(
		...tests.map(({ share }) => share),
		...curves.flatMap(({ years }, at) => years.map(({ low, middle }) => (at === 0 ? low : middle))),
		LOWEST_TOP_SHARE
	);
	const least = Math.max(Math.floor(lowest / STEP + 1e-9) * STEP, 0);
	const x = (years: number): number => round(left + (years / longest) * (width - left - right));
	const y = (share: number): number => round(foot - ((share - least) / (1 - least)) * (foot - top));
	const point = (years: number, share: number): string => `${x(years)} ${y(Math.max(share, least))}`;
	const pathOf = (curve: LifeCurve, line: 'low' | 'middle' | 'high'): string[] => [
		point(0, 1),
		...curve.years.map((year) => point(year.years, year[line]))
	];
	const [first] = curves;
	const ends = spread(
		curves.map(({ years }) => y(Math.max(years.at(-1)?.middle ?? 1, least))),
		foot
	);
	return {
		band: first ? `M${[...pathOf(first, 'high'), ...pathOf(first, 'low').reverse()].join('L')}Z` : '',
		lines: curves.map((curve, at) => ({
			label: curve.label,
			d: `M${pathOf(curve, 'middle').join('L')}`,
			isFirst: at === 0,
			endY: ends[at]!
		})),
		dots: tests
			.filter(({ years }) => years <= longest)
			.map(({ years, share }) => ({ x: x(years), y: y(Math.min(Math.max(share, least), 1.04)) })),
		xTicks: YEAR_TICKS.map((years) => ({ years, x: x(years) })),
		yTicks: Array.from({ length: Math.round((1 - least) / STEP) + 1 }, (_, at) => {
			const share = least + at * STEP;
			return { share, y: y(share), isWorn: Math.abs(share - WORN_SHARE) < 1e-6 };
		})
	};
}
