import { CustomChart, LineChart } from 'echarts/charts';
import { GridComponent } from 'echarts/components';
import { init, use } from 'echarts/core';
import { SVGRenderer } from 'echarts/renderers';
import { cleanSvg } from './clean-svg';
import { dayRibbonOption, type RibbonSettings } from './day-ribbon-option';
import { describeRibbon } from './describe-ribbon';
import { RIBBON_SIZES, type RibbonSize, type RibbonSpan } from './frame';
import type { RibbonScheme } from './palette';
import type { RibbonData } from './ribbon-data';

use([CustomChart, LineChart, GridComponent, SVGRenderer]);

/** The day as an SVG that a page with a strict policy may carry: on the server, and in the browser where it is live. */
export function renderDayRibbonSvg(
	data: RibbonData,
	settings: RibbonSettings & { idPrefix: string }
): string {
	const width = Math.round(settings.width ?? RIBBON_SIZES[settings.size].width);
	const { height } = RIBBON_SIZES[settings.size];
	const chart = init(null, null, { renderer: 'svg', ssr: true, width, height });
	try {
		chart.setOption(dayRibbonOption(data, { ...settings, width }));
		const root = { width, height, label: describeRibbon(data), idPrefix: settings.idPrefix };
		return cleanSvg(chart.renderToSVGString(), root);
	} finally {
		chart.dispose();
	}
}

/** Pictures by size: the page shows the one that fits. */
export type RibbonPictures = Partial<Record<RibbonSize, string>>;

/** The pictures that a page wants, drawn while it is loaded; for paper in black and white unless told otherwise. */
export function drawRibbonPictures(
	data: RibbonData,
	sizes: readonly RibbonSize[],
	idPrefix: string,
	scheme?: RibbonScheme,
	span?: RibbonSpan
): RibbonPictures {
	const drawn = sizes.map((size): [RibbonSize, string] => [
		size,
		renderDayRibbonSvg(data, {
			size,
			span,
			scheme: scheme ?? (size === 'print' ? 'print' : 'page'),
			idPrefix: `${idPrefix}-${size}`
		})
	]);
	return Object.fromEntries(drawn);
}
