import type { PlaceInput, PlaceView } from '$lib/schemas/places';
import type { SignedInPerson } from '$lib/schemas/people';
import { Place } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { canonicalJson } from '../hash';
import { allow } from '../policies';
import { presentPlace } from '../presenters/places';
import { recordBy } from './audit';
import { orNameTaken, saveVersioned } from './records';
import { computeZone, placeInZones } from './review/place-zones';

export async function listPlaces(person: SignedInPerson): Promise<PlaceView[]> {
	allow(person, 'places.read');
	const places = await Place.findAll({
		where: { workshopId: person.workshopId },
		order: [
			['name', 'ASC'],
			['id', 'ASC']
		]
	});
	return places.map(presentPlace);
}

export async function getPlace(person: SignedInPerson, placeId: number): Promise<PlaceView> {
	allow(person, 'places.read');
	const place = await Place.findOne({ where: { id: placeId, workshopId: person.workshopId } });
	if (!place) throw notFound('place');
	return presentPlace(place);
}

export async function createPlace(person: SignedInPerson, input: PlaceInput): Promise<PlaceView> {
	allow(person, 'places.write');
	return orNameTaken('place', 'name', () =>
		inTransaction(async (transaction) => {
			const { workshopId } = person;
			const place = await Place.create({ ...input, ...computeZone(input), workshopId }, { transaction });
			await placeInZones(workshopId, transaction);
			await recordBy(person, 'place.created', { type: 'place', id: place.id }, transaction, { ...input });
			return presentPlace(place);
		})
	);
}

const MONTHS_FIELDS = ['monthlyMaxC', 'monthlySpreadK', 'monthsSource'] as const;

/** Months that somebody typed over are no longer the weather file's; and what it replaced is not put back any more. */
function weatherMarkAfter(place: Place, input: PlaceInput): Pick<Place, 'weatherFile' | 'beforeWeather'> {
	const isKept = MONTHS_FIELDS.every((field) => canonicalJson(place[field]) === canonicalJson(input[field]));
	return { weatherFile: isKept ? place.weatherFile : null, beforeWeather: null };
}

export async function updatePlace(
	person: SignedInPerson,
	placeId: number,
	{ version, ...input }: PlaceInput & { version: number }
): Promise<PlaceView> {
	allow(person, 'places.write');
	return orNameTaken('place', 'name', () =>
		inTransaction(async (transaction) => {
			const place = await Place.findOne({
				where: { id: placeId, workshopId: person.workshopId },
				transaction
			});
			if (!place) throw notFound('place');
			const changes = { ...input, ...computeZone(input), ...weatherMarkAfter(place, input) };
			await saveVersioned(place, 'place', version, changes, transaction);
			await placeInZones(person.workshopId, transaction);
			await recordBy(person, 'place.changed', { type: 'place', id: place.id }, transaction, { ...input });
			return presentPlace(place);
		})
	);
}
