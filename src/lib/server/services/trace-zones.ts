import type { Transaction } from 'sequelize';
import { joinWords } from '$lib/format/join-words';
import { zoneOf, type TraceMapping } from '$lib/thermal/traces';
import { Job, Place } from '../db/models';
import { guessZone, type ZoneGuess } from './nearest-zone';

/** What the place of a job says of the time zone there; null where the job has no place. */
export interface PlaceZone extends ZoneGuess {
	place: string;
}

export async function zoneOfJob(jobId: number, transaction: Transaction): Promise<PlaceZone | null> {
	const job = await Job.findByPk(jobId, { transaction });
	const place = job?.placeId ? await Place.findByPk(job.placeId, { transaction }) : null;
	return place && { place: place.name, ...guessZone(place) };
}

/** A mapping with the zone that stands in its box; an empty one is for a person to fill, and nothing is read before. */
export function withZone(mapping: TraceMapping, timeZone: string): TraceMapping {
	return zoneOf(mapping.time) === undefined
		? mapping
		: { ...mapping, time: { ...mapping.time, timeZone } as TraceMapping['time'] };
}

const UNSAID = 'The file says no time zone';

/** Where the zone in the box comes from, or what a person is to put there. */
export function sayZone(inBox: string, isKnown: boolean, zone: PlaceZone | null): string {
	if (isKnown) return `${UNSAID}: ${inBox} stands there as it was confirmed for this logger before.`;
	if (!zone)
		return `${UNSAID}, and the job has no place that could tell it: write the one that the logger’s clock kept.`;
	if (zone.clear === null) {
		const between = joinWords(zone.candidates, 'or');
		return `${UNSAID}, and near ${zone.place}, the place of the job, clocks differ: write the one that the logger’s clock kept, perhaps ${between}.`;
	}
	return `${UNSAID}: ${zone.clear} is proposed, as it is near ${zone.place}, the place of the job. Look whether the logger’s clock kept it.`;
}
