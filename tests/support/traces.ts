import { writeFile } from 'node:fs/promises';
import type { SignedInPerson } from '../../src/lib/schemas/people';
import type { TraceMappingInput, TraceView } from '../../src/lib/schemas/traces';
import { sha256 } from '../../src/lib/server/hash';
import { followReading } from '../../src/lib/server/services/trace-reading';
import { addTrace, confirmMapping, getTrace } from '../../src/lib/server/services/traces';
import { newIncomingPath } from '../../src/lib/server/storage';

/** A file as it waits on the disk after it has come in. */
export async function asIncomingTrace(name: string, text: string) {
	const path = await newIncomingPath();
	await writeFile(path, text);
	return { name, path, bytes: Buffer.byteLength(text), sha256: sha256(text) };
}

export const sendTrace = async (
	person: SignedInPerson,
	mountId: number,
	text: string,
	name = 'day.csv'
): Promise<TraceView> => addTrace(person, mountId, await asIncomingTrace(name, text));

export interface Confirmed {
	mapping?: TraceMappingInput;
	isSynthetic?: boolean;
	startHour?: number | null;
}

/** What a person writes who knows the clock of the logger, where the box of the zone is empty. */
const KNOWN_ZONE = 'Australia/Darwin';

/** A proposed mapping, its zone filled in where it was left open. */
export const fillZone = (mapping: TraceMappingInput): TraceMappingInput =>
	'timeZone' in mapping.time && mapping.time.timeZone === ''
		? { ...mapping, time: { ...mapping.time, timeZone: KNOWN_ZONE } }
		: mapping;

/** Confirms the columns, as they are proposed unless said otherwise, and waits until the file is read. */
export async function readAs(
	person: SignedInPerson,
	{ id, mapping, version }: TraceView,
	{ isSynthetic = false, startHour = null, ...said }: Confirmed = {}
): Promise<TraceView> {
	await confirmMapping(person, id, {
		mapping: fillZone(said.mapping ?? mapping),
		isSynthetic,
		startHour,
		version
	});
	await followReading(person, id);
	return getTrace(person, id);
}

const twoDigits = (value: number): string => String(value).padStart(2, '0');

/** A day of a logger, a row a minute from midnight: an hour's stop, a drive of two hours at 80 km/h, and a stop again. */
export function dayText({ minutes = 360, date = '2026-02-03' } = {}): string {
	const rows = Array.from({ length: minutes }, (_, minute) => {
		const isDriving = minute >= 60 && minute < 180;
		const airC = 24 + minute / 60;
		const time = `${date} ${twoDigits(Math.floor(minute / 60))}:${twoDigits(minute % 60)}:00`;
		const cellC = airC + (isDriving ? 4 : 1) + (minute % 7) / 10;
		return [time, airC.toFixed(1), cellC.toFixed(1), isDriving ? 80 : 0].join(',');
	});
	return ['Time,Ambient (°C),Cell (°C),Speed (km/h)', ...rows, ''].join('\n');
}
