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

const named = (month: string | null, label: string): string =>
	month === null ? label : `${month}, ${label.toLowerCase()}`;
/** One month, or any month when no name is given. */
export const monthlyMaxField = (month: string | null = null) =>
	measure(named(month, MONTH_ROWS.monthlyMaxC), '°C', -60, 60);
export const monthlySpreadField = (month: string | null = null) =>
	measure(named(month, MONTH_ROWS.monthlySpreadK), 'K', 0.1, 20);

const monthsFields = {
	monthlyMaxC: monthList(monthlyMaxField(), MONTH_ROWS.monthlyMaxC),
	monthlySpreadK: monthList(monthlySpreadField(), MONTH_ROWS.monthlySpreadK),
	monthsSource: words(MONTH_ROWS.monthsSource, 300).nullable().default(null)
};
type MonthsField = keyof typeof monthsFields;
const MONTHS_FIELDS = Object.keys(monthsFields) as MonthsField[];

/** The months come with both rows and a source, or not at all. */
function refuseHalfMonths(
	place: Record<MonthsField, unknown>,
	{ addIssue }: { addIssue: (issue: { code: 'custom'; path: string[]; message: string }) => void }
): void {
	const missing = MONTHS_FIELDS.filter((field) => place[field] === null);
	if (missing.length === MONTHS_FIELDS.length) return;
	for (const field of missing) {
		const message = `${MONTH_ROWS[field]} is missing: the months need both rows and their source, or none of them.`;
		addIssue({ code: 'custom', path: [field], message });
	}
}

export const placeInputSchema = placeSiteSchema.extend(monthsFields).superRefine(refuseHalfMonths);
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
	weatherFile: weatherFileSchema
		.nullable()
		.meta({ description: 'The weather file that the months were taken from' }),
	canPutBack: z
		.boolean()
		.meta({ description: 'The figures from before the weather file are still there to be put back' })
});
export type PlaceView = z.infer<typeof placeSchema>;
