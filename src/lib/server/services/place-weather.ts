import type { PlaceView } from '$lib/schemas/places';
import { placeInputSchema } from '$lib/schemas/places';
import type { SignedInPerson } from '$lib/schemas/people';
import type { WeatherChoice, WeatherReading } from '$lib/schemas/weather';
import {
	MONTH_NAMES,
	deriveWeatherFigures,
	parseWeatherFile,
	type WeatherFile,
	type WeatherProblem
} from '$lib/thermal/weather';
import { Place } from '../db/models';
import type { WeatherFields } from '../db/models/place';
import { inTransaction } from '../db/transaction';
import { AppError, notFound, type FieldProblem } from '../errors';
import { sha256 } from '../hash';
import { allow } from '../policies';
import { presentPlace } from '../presenters/places';
import { recordBy } from './audit';
import { cleanFileName } from './file-names';
import { saveVersioned } from './records';
import { placeInZones } from './review/place-zones';

/** A file as it was sent. */
export interface Sent {
	name: string;
	bytes: Uint8Array;
}

const NAMELESS = 'weather file';

function asFieldProblem({ kind, line, column, value, limit, message }: WeatherProblem): FieldProblem {
	return {
		path: 'file',
		...{ code: kind, message, value, limit },
		...(line === null ? {} : { line }),
		...(column === null ? {} : { column })
	};
}

function refuseFile(problems: readonly WeatherProblem[], problemCount: number): AppError {
	const count = problemCount === 1 ? 'one problem' : `${problemCount} problems`;
	const told = problemCount > problems.length ? `, of which the first ${problems.length} are told` : '';
	return new AppError(
		'invalid_input',
		`The file has ${count}${told}. Nothing was stored.`,
		problems.map(asFieldProblem)
	);
}

const round = (value: number, decimals: number): number => Number(value.toFixed(decimals));

function readingOf({ site, hours }: WeatherFile, file: WeatherReading['file']): WeatherReading {
	const figures = deriveWeatherFigures(hours);
	const { sunPeakWPerM2 } = figures;
	return {
		file,
		monthlyMaxC: figures.monthlyMaxC.map((value) => round(value, 2)),
		monthlySpreadK: figures.monthlySpreadK.map((value) => round(value, 2)),
		hotDayMaxC: round(figures.hotDayMaxC, 1),
		dailyRangeK: round(figures.dailyRangeK, 1),
		sunPeakWPerM2: sunPeakWPerM2 === null ? null : round(sunPeakWPerM2, 0),
		hottestMonth: MONTH_NAMES[figures.hottestMonth]!,
		site
	};
}

/** The figures of a weather file; all that is wrong with it at once, and then nothing of it is used. */
export function readWeather({ name, bytes }: Sent): WeatherReading {
	const parsed = parseWeatherFile(new TextDecoder().decode(bytes));
	if (!parsed.ok) throw refuseFile(parsed.problems, parsed.problemCount);
	const file = { name: cleanFileName(name, NAMELESS), sizeBytes: bytes.byteLength, sha256: sha256(bytes) };
	return readingOf(parsed.file, file);
}

function hotDayFields(
	place: Place,
	{ file, hottestMonth, ...reading }: WeatherReading
): Partial<WeatherFields> {
	const { hotDayMaxC, dailyRangeK, sunPeakWPerM2 } = reading;
	const sun =
		sunPeakWPerM2 === null
			? 'The sun is as it was before.'
			: `The sun is the brightest hour of ${hottestMonth}.`;
	return {
		...{ hotDayMaxC, dailyRangeK, sunPeakWPerM2: sunPeakWPerM2 ?? place.sunPeakWPerM2 },
		source: `Weather file ${file.name}: 0.4 % of its hours are hotter; the range is the mean of ${hottestMonth}. ${sun}`
	};
}

/** What the place becomes. */
function changesBy(place: Place, reading: WeatherReading, choice: WeatherChoice): Partial<WeatherFields> {
	const { monthlyMaxC, monthlySpreadK, file, site } = reading;
	const monthsSource = `Weather file ${file.name}, ${file.sizeBytes} bytes: the highest of each of its days.`;
	const { latitudeDeg, longitudeDeg, altitudeM } = site ?? place;
	return {
		...{ monthlyMaxC, monthlySpreadK, monthsSource, weatherFile: file },
		...(choice.takeHotDay ? hotDayFields(place, reading) : {}),
		...(choice.takeSite ? { latitudeDeg, longitudeDeg, altitudeM } : {})
	};
}

/** A good file can still say what no place can be, such as a month in which every day was alike. */
function requirePlaceLimits(place: Place, changes: Partial<WeatherFields>): void {
	const parsed = placeInputSchema.safeParse({ ...presentPlace(place), ...changes });
	if (parsed.success) return;
	const problems = parsed.error.issues.map(({ path, message }) => {
		const month = typeof path[1] === 'number' ? `${MONTH_NAMES[path[1]]!}: ` : '';
		return { path: path.join('.'), message: `${month}${message}` };
	});
	const first = problems[0]?.message ?? '';
	throw new AppError('invalid_input', `What the file says cannot be kept. ${first}`, problems);
}

function fieldsNow(place: Place): WeatherFields {
	const { latitudeDeg, longitudeDeg, altitudeM, hotDayMaxC, dailyRangeK, sunPeakWPerM2, source } = place;
	const { monthlyMaxC, monthlySpreadK, monthsSource, weatherFile } = place;
	return {
		...{ latitudeDeg, longitudeDeg, altitudeM, hotDayMaxC, dailyRangeK, sunPeakWPerM2, source },
		...{ monthlyMaxC, monthlySpreadK, monthsSource, weatherFile }
	};
}

async function findPlace({ workshopId }: SignedInPerson, placeId: number): Promise<Place> {
	const place = await Place.findOne({ where: { id: placeId, workshopId } });
	if (!place) throw notFound('place');
	return place;
}

/** What a file would make of a place; nothing is stored. */
export async function previewWeather(
	person: SignedInPerson,
	placeId: number,
	sent: Sent
): Promise<{ place: PlaceView; reading: WeatherReading }> {
	allow(person, 'places.write');
	const place = await findPlace(person, placeId);
	const reading = readWeather(sent);
	requirePlaceLimits(place, changesBy(place, reading, { takeHotDay: true, takeSite: true }));
	return { place: presentPlace(place), reading };
}

/** Puts the figures of a file into a place, and keeps those that they replace until somebody changes it again. */
export async function takeWeather(
	person: SignedInPerson,
	placeId: number,
	reading: WeatherReading,
	{ version, ...choice }: WeatherChoice & { version: number }
): Promise<PlaceView> {
	allow(person, 'places.write');
	return inTransaction(async (transaction) => {
		const place = await findPlace(person, placeId);
		const changes = changesBy(place, reading, choice);
		requirePlaceLimits(place, changes);
		const before = fieldsNow(place);
		await saveVersioned(place, 'place', version, { ...changes, beforeWeather: before }, transaction);
		await placeInZones(person.workshopId, transaction);
		const detail = { ...changes, before };
		await recordBy(person, 'place.weather-taken', { type: 'place', id: place.id }, transaction, detail);
		return presentPlace(place);
	});
}

/** Puts back what a weather file replaced, if nobody changed the place since. */
export async function putBackWeather(
	person: SignedInPerson,
	placeId: number,
	version: number
): Promise<PlaceView> {
	allow(person, 'places.write');
	return inTransaction(async (transaction) => {
		const place = await findPlace(person, placeId);
		const { beforeWeather: before } = place;
		if (!before) throw new AppError('conflict', 'There is nothing to put back: the place was changed since.');
		await saveVersioned(place, 'place', version, { ...before, beforeWeather: null }, transaction);
		await placeInZones(person.workshopId, transaction);
		const subject = { type: 'place', id: place.id };
		await recordBy(person, 'place.weather-put-back', subject, transaction, { ...before });
		return presentPlace(place);
	});
}
