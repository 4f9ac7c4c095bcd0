import type { Transaction } from 'sequelize';
import { findOwnZone } from '$lib/schemas/own-zones';
import type { PlaceInput } from '$lib/schemas/places';
import { climateClass } from '$lib/thermal/correlations';
import { connection } from '../../db/connection';
import { OwnZone, Place } from '../../db/models';

/** The climate class of a place from its monthly means and rain; null where they are not known. */
export function computeZone({ monthlyMeanC, monthlyRainMm }: PlaceInput): { computedZone: string | null } {
	if (!monthlyMeanC || !monthlyRainMm) return { computedZone: null };
	return { computedZone: climateClass({ meanC: monthlyMeanC, rainMm: monthlyRainMm }) };
}

/** Installations follow their place into its zones. */
const FOLLOW = `
	UPDATE review_rows r JOIN places p ON p.id = r.place_id
	SET r.zone = COALESCE(p.computed_zone, p.climate_zone), r.own_zone_id = p.own_zone_id
	WHERE r.workshop_id = :workshopId
	  AND (r.zone <> COALESCE(p.computed_zone, p.climate_zone) OR r.own_zone_id <> p.own_zone_id)
`;

/** Puts every place into its zones again, inside the transaction that changed a place or a zone. */
export async function placeInZones(workshopId: number, transaction: Transaction): Promise<void> {
	const zones = await OwnZone.findAll({
		where: { workshopId },
		order: [
			['position', 'ASC'],
			['id', 'ASC']
		],
		transaction
	});
	const places = await Place.findAll({ where: { workshopId }, transaction });
	for (const place of places) {
		const ownZoneId = findOwnZone(place, zones);
		if (ownZoneId === place.ownZoneId) continue;
		// Not an edit of the place: whoever has its form open may still save.
		await connection().query('UPDATE places SET own_zone_id = :ownZoneId WHERE id = :id', {
			replacements: { ownZoneId, id: place.id },
			transaction
		});
	}
	await connection().query(FOLLOW, { replacements: { workshopId }, transaction });
}
