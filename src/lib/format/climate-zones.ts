import type { CLIMATE_ZONES } from '../schemas/places';

export type ClimateZone = (typeof CLIMATE_ZONES)[number];

/** Each class of Köppen and Geiger in plain words; the criteria behind them are those of Peel, Finlayson and McMahon 2007. */
const WORDS: Record<ClimateZone, string> = {
	Af: 'hot and wet all year',
	Am: 'hot, heavy rains with a short dry spell',
	Aw: 'hot, with a dry season',
	BWh: 'hot desert',
	BWk: 'desert with cold winters',
	BSh: 'hot, half dry',
	BSk: 'half dry with cold winters',
	Csa: 'mild wet winters, hot dry summers',
	Csb: 'mild wet winters, warm dry summers',
	Csc: 'mild wet winters, cool dry summers',
	Cwa: 'mild dry winters, hot wet summers',
	Cwb: 'mild dry winters, warm wet summers',
	Cwc: 'mild dry winters, cool wet summers',
	Cfa: 'mild winters, hot summers, rain all year',
	Cfb: 'mild winters, warm summers, rain all year',
	Cfc: 'mild winters, cool summers, rain all year',
	Dsa: 'cold winters, hot dry summers',
	Dsb: 'cold winters, warm dry summers',
	Dsc: 'cold winters, cool dry summers',
	Dsd: 'bitterly cold winters, dry summers',
	Dwa: 'cold dry winters, hot summers',
	Dwb: 'cold dry winters, warm summers',
	Dwc: 'cold dry winters, cool summers',
	Dwd: 'bitterly cold dry winters',
	Dfa: 'cold winters, hot summers, rain or snow all year',
	Dfb: 'cold winters, warm summers, rain or snow all year',
	Dfc: 'cold winters, cool summers, rain or snow all year',
	Dfd: 'bitterly cold winters, rain or snow all year',
	ET: 'tundra, the warmest month below 10 °C',
	EF: 'frost all year'
};

/** The class in words: "BWh" → "hot desert". What is no class is said as it stands. */
export const sayClimateZone = (zone: string): string => (zone in WORDS ? WORDS[zone as ClimateZone] : zone);

/** For lists: "Hot desert (BWh)". */
export function formatClimateZone(zone: string): string {
	const words = sayClimateZone(zone);
	return words === zone ? zone : `${words.charAt(0).toUpperCase()}${words.slice(1)} (${zone})`;
}
