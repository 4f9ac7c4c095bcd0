import type { PlaceView } from '$lib/schemas/places';
import type { Place } from '../db/models';

export function presentPlace(place: Place): PlaceView {
	const { id, version, name, region, latitudeDeg, longitudeDeg, altitudeM, climateZone } = place;
	const { hotDayMaxC, dailyRangeK, sunPeakWPerM2, source } = place;
	return {
		...{ id, version, name, region, latitudeDeg, longitudeDeg, altitudeM, climateZone },
		...{ hotDayMaxC, dailyRangeK, sunPeakWPerM2, source },
		// Of a record that was made just now the columns that nobody filled are not there yet.
		monthlyMaxC: place.monthlyMaxC ?? null,
		monthlySpreadK: place.monthlySpreadK ?? null,
		monthsSource: place.monthsSource ?? null,
		monthlyMeanC: place.monthlyMeanC ?? null,
		monthlyRainMm: place.monthlyRainMm ?? null,
		classSource: place.classSource ?? null,
		computedZone: place.computedZone ?? null,
		weatherFile: place.weatherFile ?? null,
		canPutBack: Boolean(place.beforeWeather)
	};
}
