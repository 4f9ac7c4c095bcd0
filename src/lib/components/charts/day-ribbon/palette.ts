/** Colours of one drawing of the ribbon. */
export interface RibbonPalette {
	paper: string;
	ink: string;
	muted: string;
	rule: string;
	/** Cool to hot. */
	heat: readonly [string, string, string, string, string];
	band: string;
	bandOpacity: number;
}

export type RibbonScheme = 'page' | 'light' | 'dark' | 'print';

/*
 * "page" follows the tokens of app.css, so that one drawing serves day, night and the page's own print;
 * the fixed ones are for pictures that leave the page.
 */
export const RIBBON_PALETTES: Record<RibbonScheme, RibbonPalette> = {
	page: {
		paper: 'var(--color-paper)',
		ink: 'var(--color-ink)',
		muted: 'var(--color-muted)',
		rule: 'var(--color-rule)',
		heat: [
			'var(--color-heat-1)',
			'var(--color-heat-2)',
			'var(--color-heat-3)',
			'var(--color-heat-4)',
			'var(--color-heat-5)'
		],
		band: 'var(--color-heat-3)',
		bandOpacity: 0.22
	},
	light: {
		paper: '#f6f2e9',
		ink: '#1f1b16',
		muted: '#6a6253',
		rule: '#d8d0bf',
		heat: ['#f4eac8', '#d7aa49', '#b56804', '#882700', '#440005'],
		band: '#b56804',
		bandOpacity: 0.22
	},
	dark: {
		paper: '#1f1b16',
		ink: '#f6f2e9',
		muted: '#a99f8c',
		rule: '#463f34',
		heat: ['#fff6dc', '#e4b656', '#c67201', '#992e01', '#4f0a0e'],
		band: '#c67201',
		bandOpacity: 0.22
	},
	print: {
		paper: '#FFFFFF',
		ink: '#000000',
		muted: '#333333',
		rule: '#B3B3B3',
		heat: ['#000000', '#000000', '#000000', '#000000', '#000000'],
		band: '#000000',
		bandOpacity: 0.12
	}
};

/** The temperature of each step of the ramp, °C: the same on every ribbon, so that two can be compared. */
export const HEAT_STEPS_C = [15, 30, 48, 64, 80] as const;
