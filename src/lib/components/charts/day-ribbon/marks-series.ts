import type { CustomSeriesOption } from 'echarts/charts';
import type { CustomSeriesRenderItemReturn } from 'echarts/types/dist/shared';
import { heightOf, widthOf } from './geometry';
import type { Mark } from './marks';
import type { RibbonPalette } from './palette';

export const RIBBON_FONT = 'Roboto Flex Variable, Roboto, Helvetica Neue, Arial, sans-serif';

/** A tenth of a px is finer than any screen. */
const roundPx = (px: number): number => Math.round(px * 10) / 10;

/** Marks as one series of the chart library, drawn in the order given. */
export function marksSeries(palette: RibbonPalette, z: number, marks: Mark[]): CustomSeriesOption {
	return {
		type: 'custom',
		coordinateSystem: 'none',
		silent: true,
		z,
		data: marks.map((_, i) => i),
		renderItem: (params) => elementOf(palette, marks[params.dataIndex] as Mark)
	};
}

function elementOf(palette: RibbonPalette, mark: Mark): CustomSeriesRenderItemReturn {
	switch (mark.kind) {
		case 'path':
			return {
				type: 'path',
				shape: { pathData: mark.d },
				style: {
					fill: 'none',
					stroke: palette[mark.stroke],
					lineWidth: mark.widthPx,
					lineDash: mark.dash?.length ? mark.dash : undefined,
					lineCap: mark.round ? 'round' : 'butt'
				}
			};
		case 'band':
			return {
				type: 'path',
				shape: { pathData: mark.d },
				style: { fill: palette.band, opacity: palette.bandOpacity }
			};
		case 'box':
			return {
				type: 'rect',
				shape: { x: mark.box.left, y: mark.box.top, width: widthOf(mark.box), height: heightOf(mark.box) },
				style: {
					fill: mark.fill ? palette[mark.fill] : 'none',
					stroke: mark.stroke && palette[mark.stroke],
					lineWidth: mark.widthPx ?? 0
				}
			};
		case 'ring':
			return {
				type: 'circle',
				shape: { cx: mark.x, cy: mark.y, r: mark.radiusPx },
				style: { fill: palette.paper, stroke: palette.ink, lineWidth: 2 }
			};
		case 'words':
			return {
				type: 'text',
				style: {
					text: mark.text,
					x: roundPx(mark.x),
					y: roundPx(mark.y),
					align: mark.align,
					verticalAlign: 'middle',
					fill: palette[mark.fill],
					fontFamily: RIBBON_FONT,
					fontSize: mark.fontPx,
					fontWeight: mark.bold ? 640 : 400,
					stroke: mark.halo ? palette.paper : undefined,
					lineWidth: mark.halo ? 3 : 0
				}
			};
	}
}
