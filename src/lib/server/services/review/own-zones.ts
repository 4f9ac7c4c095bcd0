import type { Transaction } from 'sequelize';
import type { OwnZoneChange, OwnZoneInput, OwnZoneView } from '$lib/schemas/own-zones';
import type { SignedInPerson } from '$lib/schemas/people';
import { OwnZone, Place } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { AppError, notFound } from '../../errors';
import { allow } from '../../policies';
import { presentOwnZone } from '../../presenters/own-zones';
import { recordBy } from '../audit';
import { orNameTaken, saveVersioned } from '../records';
import { placeInZones } from './place-zones';

async function findZone({ workshopId }: SignedInPerson, zoneId: number): Promise<OwnZone> {
	const zone = await OwnZone.findOne({ where: { id: zoneId, workshopId } });
	if (!zone) throw notFound('zone');
	return zone;
}

async function placesOf(workshopId: number): Promise<Place[]> {
	return Place.findAll({ where: { workshopId }, order: [['name', 'ASC']] });
}

/** The zones of the shop's own, in the order in which they take their places. */
export async function listOwnZones(person: SignedInPerson): Promise<OwnZoneView[]> {
	const { workshopId } = allow(person, 'review.read');
	const zones = await OwnZone.findAll({
		where: { workshopId },
		order: [
			['position', 'ASC'],
			['id', 'ASC']
		]
	});
	const places = await placesOf(workshopId);
	return zones.map((zone) => presentOwnZone(zone, places));
}

export async function getOwnZone(person: SignedInPerson, zoneId: number): Promise<OwnZoneView> {
	allow(person, 'review.read');
	return presentOwnZone(await findZone(person, zoneId), await placesOf(person.workshopId));
}

/** A list of places is the rule of one kind, a range that of the others; what does not belong is not kept. */
function normalise({ placeIds, fromValue, toValue, ...zone }: OwnZoneInput): OwnZoneInput {
	const isList = zone.rule === 'places';
	return {
		...zone,
		...(isList ? { fromValue: null, toValue: null } : { fromValue, toValue }),
		placeIds: isList ? [...new Set(placeIds)] : []
	};
}

async function requireOwnPlaces(
	{ workshopId }: SignedInPerson,
	placeIds: readonly number[],
	transaction: Transaction
): Promise<void> {
	const found = await Place.count({ where: { id: [...placeIds], workshopId }, transaction });
	if (found === placeIds.length) return;
	const message = 'There is no such place here: choose from those of the workshop.';
	throw new AppError('invalid_input', message, [{ path: 'placeIds', message }]);
}

export async function createOwnZone(person: SignedInPerson, input: OwnZoneInput): Promise<OwnZoneView> {
	const { workshopId } = allow(person, 'own-zones.write');
	return orNameTaken('zone', 'name', () =>
		inTransaction(async (transaction) => {
			const given = normalise(input);
			await requireOwnPlaces(person, given.placeIds, transaction);
			const zone = await OwnZone.create({ ...given, workshopId }, { transaction });
			await placeInZones(workshopId, transaction);
			await recordBy(person, 'own-zone.created', { type: 'own-zone', id: zone.id }, transaction, {
				...given
			});
			return getOwnZone(person, zone.id);
		})
	);
}

export async function updateOwnZone(
	person: SignedInPerson,
	zoneId: number,
	{ version, ...input }: OwnZoneChange
): Promise<OwnZoneView> {
	const { workshopId } = allow(person, 'own-zones.write');
	return orNameTaken('zone', 'name', () =>
		inTransaction(async (transaction) => {
			const zone = await findZone(person, zoneId);
			const given = normalise(input);
			await requireOwnPlaces(person, given.placeIds, transaction);
			await saveVersioned(zone, 'zone', version, given, transaction);
			await placeInZones(workshopId, transaction);
			await recordBy(person, 'own-zone.changed', { type: 'own-zone', id: zone.id }, transaction, {
				...given
			});
			return getOwnZone(person, zone.id);
		})
	);
}

/** Its places fall into the next zone that takes them, or into none. */
export async function removeOwnZone(person: SignedInPerson, zoneId: number): Promise<OwnZoneView> {
	const { workshopId } = allow(person, 'own-zones.write');
	return inTransaction(async (transaction) => {
		const zone = await findZone(person, zoneId);
		const shown = presentOwnZone(zone, await placesOf(workshopId));
		await zone.destroy({ transaction });
		await placeInZones(workshopId, transaction);
		await recordBy(person, 'own-zone.removed', { type: 'own-zone', id: zoneId }, transaction, {
			name: zone.name
		});
		return shown;
	});
}
