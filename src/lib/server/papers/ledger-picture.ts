import { layOutLedger, sumKelvin } from '$lib/components/charts/heat-ledger';
import { formatKelvinChange } from '$lib/format/numbers';
import type { LedgerEntry } from '$lib/thermal/assess/types';

const WIDTH = 1000;
const HEIGHT = 66;
const GAP = 3;
/** Told apart without colour: the largest share is full, the others are lined ever more thinly. */
const LINES_APART = [0, 7, 12, 18, 26, 36];

/** Upright lines so far apart, within a box. */
function hatch(x: number, width: number, height: number, apart: number): string {
	if (apart === 0) return `<rect x="${x}" y="0" width="${width}" height="${height}" fill="#000000"/>`;
	const count = Math.floor(width / apart);
	const lines = Array.from({ length: count }, (_, index) => {
		const at = (x + (index + 0.5) * apart).toFixed(2);
		return `<path d="M${at} 0V${height}" stroke="#000000" stroke-width="1.6"/>`;
	});
	return `<rect x="${x}" y="0.8" width="${width}" height="${height - 1.6}" fill="none" stroke="#000000" stroke-width="1.6"/>${lines.join('')}`;
}

const svg = (width: number, height: number, body: string): string =>
	`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}">${body}</svg>`;

const patch = (order: number, x: number, width: number, height: number): string =>
	hatch(x, width, height, LINES_APART[Math.min(order, LINES_APART.length - 1)]!);

export interface LedgerPicture {
	bar: string;
	rows: { key: string | null; words: string; watts: string; kelvin: string }[];
	whole: string;
}

/** The ledger of heat for paper: a bar of the shares that warm, and a row a source. */
export function drawLedger(ledger: readonly LedgerEntry[]): LedgerPicture {
	const rows = layOutLedger(ledger);
	const bar = rows.map(({ part }) => {
		if (!part) return '';
		const width = Math.max((part.toShare - part.fromShare) * WIDTH - GAP, 1);
		return patch(part.order, part.fromShare * WIDTH, width, HEIGHT);
	});
	return {
		bar: svg(WIDTH, HEIGHT, bar.join('')),
		rows: rows.map(({ part, words, watts, kelvin }) => ({
			...{ words, watts, kelvin },
			key: part ? svg(60, 40, patch(part.order, 0, 60, 40)) : null
		})),
		whole: formatKelvinChange(sumKelvin(ledger))
	};
}
