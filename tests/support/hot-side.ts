/** A touring day of nineteen hours: two drives of four hours with a stop between, and camp. */
export const TOURING_LEGS = [
	{ minutes: 240, engineOn: true, speedKmh: 80, loadA: 4 },
	{ minutes: 60, loadA: 6 },
	{ minutes: 240, engineOn: true, speedKmh: 60, surface: 'gravel' as const, loadA: 4 },
	{ minutes: 600, loadA: 8 }
];

/** Beside the exhaust, in hardly any wind. */
export const HOT_SIDE = {
	bayAirFraction: 0.95,
	exhaustView: 0.03,
	engineView: 0.1,
	airExposure: 0.05,
	guardFraction: 0.9
};
