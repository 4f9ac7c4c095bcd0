/** Where a rule comes from, and how far that can be trusted. */
export interface WiringSource {
	source: string;
	standing: 'read in a page that quotes it' | 'from memory' | 'common practice';
}

/** One entry for each rule that a sizing rests on. */
export const WIRING_SOURCES = {
	ambientFactor: {
		source:
			'IEC 60287-1-1, 1.4 (square root of the temperature differences); agrees with IEC 60364-5-52 Table B.52.14',
		standing: 'from memory'
	},
	tableAmpacityA: {
		source: 'IEC 60364-5-52:2009, Tables B.52.2, B.52.3 (method B1), B.52.10, B.52.12 (method E)',
		standing: 'from memory'
	},
	cableResistanceOhm: {
		source: 'IEC 60228, Table 3, class 5, plain copper; temperature coefficient of IEC 60287-1-1, Table 1',
		standing: 'read in a page that quotes it'
	},
	shortCircuitFactor: {
		source: 'IEC 60364-5-54, annex A',
		standing: 'read in a page that quotes it'
	},
	overload: {
		source: 'IEC 60364-4-43, 433.1: rating within the cable, sure opening within 1.45 times the cable',
		standing: 'from memory'
	},
	fuseSurelyOpensA: {
		source: 'ISO 8820-3, operating times at 135 % of the rating',
		standing: 'from memory'
	},
	fuseRatingAtA: {
		source: "straight line through typical curves of fuses; the maker's curve overrides it",
		standing: 'common practice'
	},
	fuseContinuousA: {
		source: "four fifths of the rating for years; the maker's figure overrides it",
		standing: 'common practice'
	}
} as const satisfies Record<string, WiringSource>;
