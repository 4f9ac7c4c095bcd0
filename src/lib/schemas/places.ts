import { z } from 'zod';
import { editedSchema, measure, optionalWords, words } from './fields';
import { monthList } from './months';

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

/** Where a place is and the hot day to plan for there. */
export const placeSiteSchema = z.object({
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

/** The rows of a place's months, as people call them. */
export const MONTH_ROWS = {
	monthlyMaxC: 'Mean of the daily highest',
	monthlySpreadK: 'Spread from day to day',
	monthsSource: 'Where the months come from'
} as const;

/** What a climate class is computed from, as people call it. */
export const CLASS_ROWS = {
	monthlyMeanC: 'Mean of the whole month',
	monthlyRainMm: 'Rain of the month',
	classSource: 'Where means and rain come from'
} as const;

const named = (month: string | null, label: string): string =>
	month === null ? label : `${month}, ${label.toLowerCase()}`;
/** One month, or any month when no name is given. */
export const monthlyMaxField = (month: string | null = null) =>
	measure(named(month, MONTH_ROWS.monthlyMaxC), '°C', -60, 60);
export const monthlySpreadField = (month: string | null = null) =>
	measure(named(month, MONTH_ROWS.monthlySpreadK), 'K', 0.1, 20);
/** One month, or any month when no name is given. */
export const monthlyMeanField = (month: string | null = null) =>
	measure(named(month, CLASS_ROWS.monthlyMeanC), '°C', -60, 50);
export const monthlyRainField = (month: string | null = null) =>
	measure(named(month, CLASS_ROWS.monthlyRainMm), 'mm', 0, 3_000);

const monthsFields = {
	monthlyMaxC: monthList(monthlyMaxField(), MONTH_ROWS.monthlyMaxC),
	monthlySpreadK: monthList(monthlySpreadField(), MONTH_ROWS.monthlySpreadK),
	monthsSource: words(MONTH_ROWS.monthsSource, 300).nullable().default(null)
};
const classFields = {
	monthlyMeanC: monthList(monthlyMeanField(), CLASS_ROWS.monthlyMeanC),
	monthlyRainMm: monthList(monthlyRainField(), CLASS_ROWS.monthlyRainMm),
	classSource: words(CLASS_ROWS.classSource, 300).nullable().default(null)
};
type Issues = { addIssue: (issue: { code: 'custom'; path: string[]; message: string }) => void };

/** Rows that belong together come with both and a source, or not at all. */
const refuseHalf =
	<Field extends string>(what: string, labels: Record<Field, string>) =>
	(place: Record<Field, unknown>, { addIssue }: Issues): void => {
		const fields = Object.keys(labels) as Field[];
		const missing = fields.filter((field) => place[field] === null);
		if (missing.length === fields.length) return;
		for (const field of missing) {
			const message = `${labels[field]} is missing: ${what} need both rows and their source, or none of them.`;
			addIssue({ code: 'custom', path: [field], message });
		}
	};

export const placeInputSchema = placeSiteSchema
	.extend({ ...monthsFields, ...classFields })
	.superRefine(refuseHalf('the months', MONTH_ROWS))
	.superRefine(refuseHalf('means and rain', CLASS_ROWS));
export type PlaceInput = z.infer<typeof placeInputSchema>;

/** What is kept of a weather file: not the file. */
export const weatherFileSchema = z.object({
	name: z.string().max(120),
	sizeBytes: z.number().int().positive(),
	sha256: z.string().regex(/^[0-9a-f]{64}$/)
});
export type WeatherFileMark = z.infer<typeof weatherFileSchema>;

export const placeSchema = editedSchema.extend({
	...placeInputSchema.shape,
	computedZone: z
		.string()
		.nullable()
		.meta({ description: 'Climate class computed from means and rain; null where they are not known' }),
	weatherFile: weatherFileSchema
		.nullable()
		.meta({ description: 'The weather file that the months were taken from' }),
	canPutBack: z
		.boolean()
		.meta({ description: 'The figures from before the weather file are still there to be put back' })
});
export type PlaceView = z.infer<typeof placeSchema>;
