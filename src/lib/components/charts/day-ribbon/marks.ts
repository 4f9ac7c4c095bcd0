import type { Box } from './geometry';

/** One thing on the paper that is no curve; colours are names of the palette. */
export type Ink = 'paper' | 'ink' | 'muted' | 'rule';
export type Mark =
	| { kind: 'path'; d: string; stroke: Ink; widthPx: number; dash?: number[]; round?: boolean }
	| { kind: 'band'; d: string }
	| { kind: 'box'; box: Box; fill?: Ink; stroke?: Ink; widthPx?: number }
	| { kind: 'ring'; x: number; y: number; radiusPx: number }
	| {
			kind: 'words';
			text: string;
			x: number;
			y: number;
			align: 'left' | 'center' | 'right';
			fontPx: number;
			fill: Ink;
			bold?: boolean;
			/** A rim of paper, so that a line underneath does not cross the letters. */
			halo?: boolean;
	  };
