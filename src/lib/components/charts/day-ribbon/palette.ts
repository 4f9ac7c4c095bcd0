/** Colours of one drawing of the ribbon. */
export interface RibbonPalette {
	paper: string;
	ink: string;
	muted: string;
	rule: string;
	/** Cool to hot. */
	heat: readonly [string, string, string, string, string];
	/** The rim that keeps the cool end of the cells' line apart from the paper. */
	rim: string;
	band: string;
	bandOpacity: number;
}

export type RibbonScheme = 'page' | 'light' | 'dark' | 'black-and-white';

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
		rim: 'var(--color-muted)',
		band: 'var(--color-heat-3)',
		bandOpacity: 0.22
	},
	light: {
		paper: '#F6F2E9',
		ink: '#1F1B16',
		muted: '#6A6253',
		rule: '#D8D0BF',
		heat: ['#EADFC0', '#E3BC63', '#CF8030', '#A5401F', '#5C1714'],
		rim: '#6A6253',
		band: '#CF8030',
		bandOpacity: 0.22
	},
	dark: {
		paper: '#1F1B16',
		ink: '#F6F2E9',
		muted: '#A99F8C',
		rule: '#463F34',
		heat: ['#F3E9CD', '#EBC36A', '#E08F3C', '#DB6A30', '#C0352F'],
		rim: '#A99F8C',
		band: '#E08F3C',
		bandOpacity: 0.22
	},
	'black-and-white': {
		paper: '#FFFFFF',
		ink: '#000000',
		muted: '#333333',
		rule: '#B3B3B3',
		heat: ['#000000', '#000000', '#000000', '#000000', '#000000'],
		rim: '#000000',
		band: '#000000',
		bandOpacity: 0.12
	}
};

/** The temperature of each step of the ramp, °C: the same on every ribbon, so that two can be compared. */
export const HEAT_STEPS_C = [15, 30, 48, 64, 80] as const;
