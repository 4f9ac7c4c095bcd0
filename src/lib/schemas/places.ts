import { z } from 'zod';
import { editedSchema, measure, optionalWords, words } from './fields';

/** The thirty classes of Köppen and Geiger, as in Peel, Finlayson and McMahon 2007. */
export const CLIMATE_ZONES = [
	...[
		'Af',
		'Am',
		'Aw',
		'BWh',
		'BWk',
		'BSh',
		'BSk',
		'Csa',
		'Csb',
		'Csc',
		'Cwa',
		'Cwb',
		'Cwc',
		'Cfa',
		'Cfb',
		'Cfc'
	],
	...['Dsa', 'Dsb', 'Dsc', 'Dsd', 'Dwa', 'Dwb', 'Dwc', 'Dwd', 'Dfa', 'Dfb', 'Dfc', 'Dfd', 'ET', 'EF']
] as const satisfies readonly string[];

export const hotDayFields = {
	hotDayMaxC: measure('Hottest of the day', '°C', -20, 60),
	dailyRangeK: measure('From the hottest down to the coolest', 'K', 0, 35),
	sunPeakWPerM2: measure('Sun at noon', 'W/m²', 0, 1_400)
};

export const placeInputSchema = z.object({
	name: words('Place', 80),
	region: optionalWords('Region', 80),
	latitudeDeg: measure('Latitude', '°', -90, 90),
	longitudeDeg: measure('Longitude', '°', -180, 180),
	altitudeM: measure('Altitude', 'm', -430, 6_000),
	climateZone: z
		.string()
		.refine((zone) => (CLIMATE_ZONES as readonly string[]).includes(zone), {
			error: 'Choose one of the climate classes.'
		})
		.meta({ label: 'Climate class (Köppen–Geiger)' }),
	...hotDayFields,
	source: words('Where the figures come from', 300)
});
export type PlaceInput = z.infer<typeof placeInputSchema>;

export const placeSchema = editedSchema.extend(placeInputSchema.shape);
export type PlaceView = z.infer<typeof placeSchema>;
