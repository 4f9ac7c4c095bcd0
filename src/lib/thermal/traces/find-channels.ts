import { CHANNEL_LAWS, TRACE_UNITS, type TraceChannel, type TraceUnit } from './channels';

/** How units are written in headers, the longer before the shorter. A degree sign in a wrong code is any one sign. */
const UNIT_PATTERNS: readonly { unit: TraceUnit; pattern: RegExp }[] = [
	{ unit: 'km/h', pattern: /\bkm\s*\/\s*hr?\b|\bkmh\b|\bkph\b/i },
	{ unit: 'mph', pattern: /\bmph\b|\bmi\s*\/\s*h\b/i },
	{ unit: 'm/s', pattern: /\bm\s*\/\s*s\b|\bmps\b/i },
	{ unit: 'mA', pattern: /\bmA\b/ },
	{ unit: '°F', pattern: /[°º˚\uFFFD]\s*F\b|\bdeg(rees)?[ _.]*F\b|\bfahrenheit\b|(^|[\s([,])F[)\]]?$/i },
	{ unit: '°C', pattern: /[°º˚\uFFFD]\s*C\b|\bdeg(rees)?[ _.]*C\b|\bcelsius\b|(^|[\s([,])C[)\]]?$/i },
	{ unit: 'A', pattern: /\bA\b|\bamp(ere)?s?\b/ }
];

/** How channels are named in headers, the narrower before the wider. */
const CHANNEL_PATTERNS: readonly { channel: TraceChannel; pattern: RegExp }[] = [
	{ channel: 'speedKmh', pattern: /\bspeed\b|\bvelocity\b/ },
	{ channel: 'currentA', pattern: /\bcurrent\b|\bamps?\b|\bamperes?\b/ },
	{ channel: 'exhaustShieldC', pattern: /\bexhaust\b|\b(heat ?)?shield\b/ },
	{ channel: 'boardC', pattern: /\bboard\b|\bbms\b|\bpcb\b|\bfets?\b/ },
	{ channel: 'cellC', pattern: /\bcells?\b|\bcore\b/ },
	{ channel: 'bayAirC', pattern: /\bbay\b|\bunder ?(bonnet|hood)\b|\bengine (compartment|room)\b/ },
	{
		channel: 'ambientC',
		pattern: /\bt?amb(ient)?(temp)?\d*\b|\boutside\b|\boutdoors?\b|\boat\b/
	},
	{ channel: 'caseC', pattern: /\bcas(e|ing)\b|\bbatt(ery)?\b/ }
];

/** Names of what no channel takes. */
const SOMETHING_ELSE =
	/\b(v|mv|volts?|voltage|rpm|revs?|%|soc|rh|humidity|pressure|hpa|kpa|bar|w|wh|ah|watts?|power)\b|%/i;

/** bay_airTemp → bay air temp */
const toWords = (name: string): string =>
	name
		.replace(/[_\-.]+/g, ' ')
		.replace(/([a-z])([A-Z])/g, '$1 $2')
		.trim();

/** The unit that a header names; null where it names none. */
export function findUnit(name: string): TraceUnit | null {
	const words = toWords(name);
	const found = UNIT_PATTERNS.find(({ pattern }) => pattern.test(name) || pattern.test(words));
	return found?.unit ?? null;
}

const OWN_UNITS = { temperature: '°C', current: 'A', speed: 'km/h' } as const;

export interface FoundChannel {
	channel: TraceChannel | null;
	/** The unit that the header names, else the channel's own; null where there is neither. */
	unit: TraceUnit | null;
	/** Whether the header says the unit, or it was taken for granted. */
	unitSaid: boolean;
}

/**
 * The channel and unit that the name of a column tells of.
 *
 * @param name as it stands in the header
 * @returns channel and unit, each null where it is not recognised; a unit that the channel cannot have rules it out
 * Validity: English names; what is not recognised is for a person to say.
 * Source: common practice; units as SI writes them and as loggers do.
 * @example
 * findChannel('Bay air (°F)'); // { channel: 'bayAirC', unit: '°F', unitSaid: true }
 * findChannel('cell_voltage'); // { channel: null, unit: null, unitSaid: false }
 */
export function findChannel(name: string): FoundChannel {
	const words = toWords(name).toLowerCase();
	const unit = findUnit(name);
	const unitSaid = unit !== null;
	if (SOMETHING_ELSE.test(words)) return { channel: null, unit, unitSaid };
	const found = CHANNEL_PATTERNS.find(({ channel, pattern }) => {
		const fits = unit === null || TRACE_UNITS[unit].quantity === CHANNEL_LAWS[channel].quantity;
		return fits && pattern.test(words);
	});
	if (!found) return { channel: null, unit, unitSaid };
	return { channel: found.channel, unit: unit ?? OWN_UNITS[CHANNEL_LAWS[found.channel].quantity], unitSaid };
}
