import { z } from 'zod';
import { MONTH_KEYS } from './months';
import { placeSchema, weatherFileSchema } from './places';

const months = z.array(z.number()).length(MONTH_KEYS.length);

/** What a weather file says, in the figures that a place keeps. */
export const weatherReadingSchema = z.object({
	file: weatherFileSchema,
	monthlyMaxC: months,
	monthlySpreadK: months,
	hotDayMaxC: z.number(),
	dailyRangeK: z.number(),
	sunPeakWPerM2: z.number().nullable().meta({ description: 'Null where the file does not say' }),
	hottestMonth: z.string(),
	site: z
		.object({
			name: z.string(),
			latitudeDeg: z.number(),
			longitudeDeg: z.number(),
			altitudeM: z.number()
		})
		.nullable()
		.meta({ description: 'Where the file says that it was; null where it does not' })
});
export type WeatherReading = z.infer<typeof weatherReadingSchema>;

/** What of a reading goes into the place, besides the months. */
export interface WeatherChoice {
	takeHotDay: boolean;
	takeSite: boolean;
}

export const weatherAnswerSchema = z.object({
	saved: z.boolean(),
	reading: weatherReadingSchema,
	place: placeSchema.meta({ description: 'As it is now: changed, or as it was when nothing was saved' })
});
