import type { EChartsCoreOption } from 'echarts/core';

import { MONTH_KEYS } from '../../../schemas/months';
import type { ReviewTrends } from '../../../schemas/review';
import { RIBBON_PALETTES } from '../day-ribbon/palette';

export const TRENDS_SIZES = {
	phone: { width: 328, height: 380 },
	desk: { width: 680, height: 380 }
} as const;
export type TrendsSize = keyof typeof TRENDS_SIZES;
/** Letters of so many months have room side by side; where they have not, every third stands. */
const TICK_EVERY: Record<TrendsSize, number> = { phone: 3, desk: 1 };

const LEFT: Record<TrendsSize, number> = { phone: 28, desk: 48 };

/** Every so many months, counted from January, so that the years stand. */
function tickOf(month: string, index: number, every: number): string {
	const number = Number(month.slice(5, 7));
	const letter = MONTH_KEYS[number - 1]!.slice(0, 1);
	if (number === 1 || (index === 0 && every === 1)) return `${letter}\n${month.slice(0, 4)}`;
	return (number - 1) % every === 0 ? letter : '';
}

/** Dark days above, predicted as a line and reported as filled marks; below, what was fitted. */
export function trendsOption({ months }: ReviewTrends, size: TrendsSize): EChartsCoreOption {
	const { ink, muted, rule, paper } = RIBBON_PALETTES.page;
	const labels = months.map(({ month }, index) => tickOf(month, index, TICK_EVERY[size]));
	const text = { color: muted, fontSize: 12, fontFamily: 'inherit' };
	const axis = (gridIndex: number, show: boolean) => ({
		...{ gridIndex, type: 'category' as const, data: labels, axisTick: { show: false } },
		axisLine: { lineStyle: { color: muted } },
		axisLabel: { ...text, show, interval: 0 }
	});
	const scale = (gridIndex: number, name: string) => ({
		...{ gridIndex, name, type: 'value' as const, minInterval: 1, splitNumber: 3 },
		nameTextStyle: { ...text, align: 'left' as const },
		axisLabel: text,
		splitLine: { lineStyle: { color: rule } }
	});
	return {
		animation: false,
		grid: [
			{ left: LEFT[size], right: 8, top: 28, height: 150 },
			{ left: LEFT[size], right: 8, top: 222, height: 100 }
		],
		xAxis: [axis(0, false), axis(1, true)],
		yAxis: [scale(0, 'dark days a month'), scale(1, 'fitted in the month')],
		series: [
			{
				...{ type: 'line', xAxisIndex: 0, yAxisIndex: 0, symbol: 'none', step: 'middle' },
				lineStyle: { color: ink, width: 1.5, type: 'dashed' },
				data: months.map(({ predictedDays }) => predictedDays)
			},
			{
				...{ type: 'scatter', xAxisIndex: 0, yAxisIndex: 0, symbol: 'circle', symbolSize: 8 },
				itemStyle: { color: ink, borderColor: paper, borderWidth: 1 },
				data: months.map(({ reportedDays }) => reportedDays)
			},
			{
				...{ type: 'bar', xAxisIndex: 1, yAxisIndex: 1, barWidth: '62%' },
				itemStyle: { color: rule, borderColor: ink, borderWidth: 1 },
				data: months.map(({ fitted }) => Object.values(fitted).reduce((sum, count) => sum + count, 0))
			}
		]
	};
}
