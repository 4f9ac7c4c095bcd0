import { formatKelvinChange, formatWatts } from '../../format/numbers';
import type { HeatSource, LedgerEntry } from '../../thermal/assess/types';

const SOURCE_WORDS: Record<HeatSource, string> = {
	'bay-air': 'Bay air',
	exhaust: 'Exhaust',
	engine: 'Engine',
	bonnet: 'Bonnet and sun',
	'enclosure-air': 'Air around it',
	road: 'Road below',
	'own-current': 'Own current',
	'outside-air': 'Outside air'
};

/** Smaller than this it is told neither in the bar nor in the table. */
const LEAST_KELVIN = 0.05;
const LEAST_WATTS = 0.05;

/** One row of the ledger, ready to be shown. */
export interface LedgerRow {
	source: HeatSource;
	words: string;
	watts: string;
	kelvin: string;
	/** Its place in the bar; null when it warms nothing. */
	part: { order: number; fromShare: number; toShare: number } | null;
}

/** The ledger from the largest warming share to the largest cooling one; the bar holds the warming ones. */
export function layOutLedger(ledger: readonly LedgerEntry[]): LedgerRow[] {
	const told = ledger
		.filter(({ watts, kelvin }) => Math.abs(watts) >= LEAST_WATTS || Math.abs(kelvin) >= LEAST_KELVIN)
		.sort((a, b) => b.kelvin - a.kelvin);
	const warming = told.filter(({ kelvin }) => kelvin >= LEAST_KELVIN);
	const wholeK = warming.reduce((sum, { kelvin }) => sum + kelvin, 0);
	let share = 0;
	return told.map((entry) => {
		const order = warming.indexOf(entry);
		const fromShare = share;
		if (order >= 0) share += entry.kelvin / wholeK;
		return {
			source: entry.source,
			words: SOURCE_WORDS[entry.source],
			watts: formatWatts(entry.watts),
			kelvin: formatKelvinChange(entry.kelvin),
			part: order < 0 ? null : { order, fromShare, toShare: share }
		};
	});
}

export const sumKelvin = (ledger: readonly LedgerEntry[]): number =>
	ledger.reduce((sum, { kelvin }) => sum + kelvin, 0);
