/** What a logger can have measured. Current counts positive while the battery charges, as everywhere in the engine. */
export const TRACE_CHANNELS = [
	...(['ambientC', 'bayAirC', 'exhaustShieldC', 'caseC', 'cellC', 'boardC'] as const),
	...(['currentA', 'speedKmh'] as const)
] as const;
export type TraceChannel = (typeof TRACE_CHANNELS)[number];

export type Quantity = 'temperature' | 'current' | 'speed';

interface UnitLaw {
	quantity: Quantity;
	/** Value in the channel's own unit = (value + shift) × factor. */
	shift: number;
	factor: number;
}

/** Units that a column may have. °F and mile by definition (NIST SP 811, 2008, appendix B). */
export const TRACE_UNITS = {
	'°C': { quantity: 'temperature', shift: 0, factor: 1 },
	'°F': { quantity: 'temperature', shift: -32, factor: 5 / 9 },
	A: { quantity: 'current', shift: 0, factor: 1 },
	mA: { quantity: 'current', shift: 0, factor: 1e-3 },
	'km/h': { quantity: 'speed', shift: 0, factor: 1 },
	'm/s': { quantity: 'speed', shift: 0, factor: 3.6 },
	mph: { quantity: 'speed', shift: 0, factor: 1.609344 }
} as const satisfies Record<string, UnitLaw>;
export type TraceUnit = keyof typeof TRACE_UNITS;

export interface ChannelLaw {
	quantity: Quantity;
	/** What the channel can be, in its own unit, ends included; engineering judgement. */
	low: number;
	high: number;
	/** A single value further than this from both neighbours is no measurement; Infinity where such jumps are real. */
	spikeOver: number;
	/** … when the neighbours stand no further than this from it, s. */
	spikeWithinS: number;
}

const SLOW = { quantity: 'temperature', spikeWithinS: 60 } as const;
const QUICK = { quantity: 'temperature', spikeWithinS: 20 } as const;

/** What each channel can do; engineering judgement: wide enough for every vehicle, narrow enough for a loose wire. */
export const CHANNEL_LAWS: Readonly<Record<TraceChannel, ChannelLaw>> = {
	ambientC: { ...SLOW, low: -60, high: 70, spikeOver: 8 },
	bayAirC: { ...QUICK, low: -60, high: 250, spikeOver: 25 },
	exhaustShieldC: { ...QUICK, low: -60, high: 700, spikeOver: 60 },
	caseC: { ...SLOW, low: -60, high: 150, spikeOver: 8 },
	cellC: { ...SLOW, low: -60, high: 150, spikeOver: 8 },
	boardC: { ...QUICK, low: -60, high: 200, spikeOver: 15 },
	currentA: { quantity: 'current', low: -2000, high: 2000, spikeOver: Infinity, spikeWithinS: 0 },
	speedKmh: { quantity: 'speed', low: 0, high: 400, spikeOver: 60, spikeWithinS: 2 }
};

/**
 * A measured value in the unit that its channel is kept in: °C, A or km/h.
 *
 *     T = (F − 32) 5/9;   v = 3.6 v(m/s);   v = 1.609344 v(mph)
 *
 * @param value as the logger wrote it
 * @param unit one of the keys of TRACE_UNITS
 * @returns °C, A or km/h
 * Validity: exact.
 * Source: NIST Special Publication 811, Guide for the Use of the SI, 2008 edition, appendix B.8.
 * @example
 * toChannelUnit(212, '°F'); // 100
 * toChannelUnit(10, 'm/s'); // 36
 */
export function toChannelUnit(value: number, unit: TraceUnit): number {
	const { shift, factor } = TRACE_UNITS[unit];
	return (value + shift) * factor;
}
