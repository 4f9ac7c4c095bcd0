import { writeNumber } from '$lib/format/numbers';
import type { OwnZoneView } from '$lib/schemas/own-zones';

const UNITS = { 'hottest-month': '\u202F°C', latitude: '°' } as const;

/** What a zone takes, in words: "places whose hottest month has a mean from 28 °C". */
export function sayRule({ rule, fromValue, toValue, placeIds }: OwnZoneView): string {
	if (rule === 'places')
		return placeIds.length === 1 ? 'one chosen place' : `${placeIds.length} chosen places`;
	const unit = UNITS[rule];
	const range = [
		...(fromValue === null ? [] : [`from ${writeNumber(fromValue)}${unit}`]),
		...(toValue === null ? [] : [`to below ${writeNumber(toValue)}${unit}`])
	].join(' ');
	return rule === 'latitude' ? `latitudes ${range}` : `a hottest month with a mean ${range}`;
}
