import { fail, redirect } from '@sveltejs/kit';
import { versionSchema } from '$lib/schemas/fields';
import type { PlaceView } from '$lib/schemas/places';
import { weatherReadingSchema, type WeatherReading } from '$lib/schemas/weather';
import { AppError } from '$lib/server/errors';
import { isSealed, sealOf } from '$lib/server/hash';
import { fileOf, readFileForm } from '$lib/server/http/file-upload';
import { readPageForm, saveOnce } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { previewWeather, putBackWeather, takeWeather } from '$lib/server/services/place-weather';
import { getPlace } from '$lib/server/services/places';
import { CSV_NAMES, FEWEST_HOURS, MOST_WEATHER_BYTES } from '$lib/thermal/weather';
import type { Actions, PageServerLoad } from './$types';

/** The place of the page, before anything is said of what was sent. */
async function openPlace(event: Parameters<typeof guard>[0] & { params: { placeId: string } }) {
	const person = guard(event, 'places.write');
	return { person, place: await orPageError(getPlace(person, pageId(event.params.placeId))) };
}

export const load: PageServerLoad = async (event) => {
	const { place } = await openPlace(event);
	const limits = { fewestHours: FEWEST_HOURS, mostBytes: MOST_WEATHER_BYTES };
	return { place, limits, csvNames: CSV_NAMES };
};

/** What was read travels through the page, not through the database: the seal says that it came back as it was. */
const purposeOf = (placeId: number): string => `weather of place ${placeId}`;

function previewOf({ id, version }: PlaceView, reading: WeatherReading) {
	const text = JSON.stringify(reading);
	return { reading, text, seal: sealOf(purposeOf(id), text), version };
}

function openReading(placeId: number, formData: FormData): WeatherReading {
	const text = String(formData.get('reading') ?? '');
	if (!isSealed(purposeOf(placeId), text, String(formData.get('seal') ?? ''))) {
		throw new AppError('invalid_input', 'What the file said did not come back whole: choose the file again.');
	}
	return validate(weatherReadingSchema, JSON.parse(text));
}

function refuse(refusal: unknown) {
	if (!(refusal instanceof AppError)) throw refusal;
	const problems = refusal.problems.map(({ message }) => message);
	return fail(refusal.status, { refusal: refusal.message, problems, preview: null });
}

export const actions: Actions = {
	/** Reads a file and shows what it would change; nothing is stored. */
	read: async (event) => {
		const { person, place } = await openPlace(event);
		try {
			const formData = await readFileForm(event.request, MOST_WEATHER_BYTES);
			const file = await fileOf(formData, MOST_WEATHER_BYTES);
			const { reading } = await previewWeather(person, place.id, file);
			return { refusal: null, problems: [], preview: previewOf(place, reading) };
		} catch (refusal) {
			return refuse(refusal);
		}
	},
	take: async (event) => {
		const { person, place } = await openPlace(event);
		const formData = await readPageForm(event.request);
		const choice = { takeHotDay: formData.has('takeHotDay'), takeSite: formData.has('takeSite') };
		const take = async (): Promise<string> => {
			const reading = openReading(place.id, formData);
			const version = validate(versionSchema, formData.get('version'));
			await takeWeather(person, place.id, reading, { ...choice, version });
			return `/places/${place.id}?weather`;
		};
		const next = await saveOnce(person, event, formData, take, () => Promise.resolve()).catch(
			(refusal: unknown) => ({ refusal })
		);
		if (typeof next === 'string') redirect(303, next);
		const { refusal } = next;
		const isLate = refusal instanceof AppError && refusal.code === 'changed_meanwhile';
		if (!isLate) return refuse(refusal);
		// The page shows the place as it is now beside the file: to say yes again is meant.
		const preview = previewOf(place, openReading(place.id, formData));
		return fail(refusal.status, { refusal: refusal.message, problems: [], preview });
	},
	putBack: async (event) => {
		const { person, place } = await openPlace(event);
		const formData = await readPageForm(event.request);
		try {
			await putBackWeather(person, place.id, validate(versionSchema, formData.get('version')));
		} catch (refusal) {
			return refuse(refusal);
		}
		redirect(303, `/places/${place.id}?put-back`);
	}
};
