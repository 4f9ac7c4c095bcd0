import { BarChart, LineChart, ScatterChart } from 'echarts/charts';
import { GridComponent } from 'echarts/components';
import { init, use } from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';
import type { ReviewTrends } from '../../../schemas/review';
import { cleanSvg } from '../day-ribbon/clean-svg';
import { TRENDS_SIZES, trendsOption, type TrendsSize } from './trends-option';

use([BarChart, LineChart, ScatterChart, GridComponent, SVGRenderer]);

/** The months as an SVG that a page with a strict policy may carry, drawn on the server. */
export function renderTrendsSvg(trends: ReviewTrends, label: string, size: TrendsSize): string {
	const chart = init(null, null, { renderer: 'svg', ssr: true, ...TRENDS_SIZES[size] });
	try {
		chart.setOption(trendsOption(trends, size));
		return cleanSvg(chart.renderToSVGString(), { ...TRENDS_SIZES[size], label, idPrefix: `trends-${size}` });
	} finally {
		chart.dispose();
	}
}
