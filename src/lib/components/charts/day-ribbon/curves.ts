import { lineOf, type CurvePoint, type RibbonFrame } from './frame';
import { watchesBoardAlone } from './limit-rows';
import type { Ink } from './marks';
import type { RibbonData } from './ribbon-data';

/** A curve ready to be drawn. */
export interface DrawnCurve {
	name: 'outside' | 'air' | 'board' | 'case' | 'cells';
	word: string;
	line: CurvePoint[];
	widthPx: number;
	dash: number[];
	ink: Ink;
}

/** The curves of one day, from the back to the front. The board is drawn where the BMS watches it. */
export function drawCurves(frame: RibbonFrame, data: RibbonData): DrawnCurve[] {
	const { curves, air } = data;
	const scale = frame.spec.cellsPx / 4;
	const thin = 1.15 * Math.max(scale, 0.85);
	const rows: (Omit<DrawnCurve, 'line'> & { valuesC: number[] })[] = [
		{
			name: 'outside',
			word: 'outside',
			valuesC: curves.ambientC,
			widthPx: thin * 1.1,
			dash: [1.2, 3.4],
			ink: 'muted'
		},
		{ name: 'air', word: air.word, valuesC: curves[air.curve], widthPx: thin, dash: [], ink: 'muted' },
		{ name: 'case', word: 'case', valuesC: curves.caseC, widthPx: thin * 1.25, dash: [5.5, 3.5], ink: 'ink' },
		{
			name: 'cells',
			word: 'cells',
			valuesC: curves.cellsC,
			widthPx: frame.spec.cellsPx,
			dash: [],
			ink: 'ink'
		}
	];
	if (watchesBoardAlone(data)) {
		const board = { name: 'board', word: 'BMS board', valuesC: curves.boardC, dash: [8, 3, 1.5, 3] } as const;
		rows.splice(3, 0, { ...board, dash: [...board.dash], widthPx: thin * 1.25, ink: 'ink' });
	}
	return rows.map(({ valuesC, ...rest }) => ({ ...rest, line: lineOf(frame, curves, valuesC) }));
}
