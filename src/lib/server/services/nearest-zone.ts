import { ZoneClock } from '$lib/thermal/traces';
import { ZONE_PLACES } from './zone-places';

interface Site {
	latitudeDeg: number;
	longitudeDeg: number;
}

interface Zone extends Site {
	name: string;
}

/** What a place says of its time zone: one, where it is clear, and those that come into question where it is not. */
export interface ZoneGuess {
	clear: string | null;
	candidates: string[];
}

const EARTH_KM = 6371;
const MOST_WIDE = 4;
/** Zones of a few counties or one valley: theirs is the clock near their own place alone. By the comments of zone1970.tab. */
const POCKETS =
	/^(Australia\/(Eucla|Broken_Hill|Lindeman|Lord_Howe)|America\/(Indiana\/(?!Indianapolis)|Kentucky\/|North_Dakota\/)\w+|America\/(Menominee|Fort_Nelson|Dawson_Creek|Swift_Current|Glace_Bay|Ojinaga|Ciudad_Juarez|Matamoros))/;
const POCKET_KM = 60;
/** Where clocks are looked at to tell whether two zones keep the same: the middle of each month of 2025. */
const MONTHS_S = Array.from({ length: 12 }, (_, month) => Date.UTC(2025, month, 15) / 1000);

const inRadians = (degrees: number): number => (degrees * Math.PI) / 180;

const ZONES: readonly Zone[] = ZONE_PLACES.trim()
	.split('\n')
	.map((line) => {
		const [latitudeDeg, longitudeDeg, name] = line.split(' ') as [string, string, string];
		return { name, latitudeDeg: Number(latitudeDeg), longitudeDeg: Number(longitudeDeg) };
	});

function kilometresBetween(a: Site, b: Site): number {
	const [latA, latB] = [inRadians(a.latitudeDeg), inRadians(b.latitudeDeg)];
	const apart = inRadians(a.longitudeDeg - b.longitudeDeg);
	const cosine = Math.sin(latA) * Math.sin(latB) + Math.cos(latA) * Math.cos(latB) * Math.cos(apart);
	return EARTH_KM * Math.acos(Math.min(1, Math.max(-1, cosine)));
}

const clocks = new Map<string, string>();
/** The offsets of a zone through the year: zones with the same ones read a trace alike. */
function clockOf({ name }: Zone): string {
	const known = clocks.get(name);
	if (known !== undefined) return known;
	const clock = new ZoneClock(name);
	const offsets = MONTHS_S.map((atS) => clock.offsetAt(atS)).join();
	clocks.set(name, offsets);
	return offsets;
}

/**
 * How far another zone may lie to cast doubt on the nearest: four times as far near by, where borders are drawn around towns, twice
 * as far in the empty parts. Engineering judgement.
 */
const doubtKm = (nearestKm: number): number =>
	Math.max(2 * nearestKm, Math.min(4 * nearestKm, nearestKm + 600));

interface Near {
	zone: Zone;
	km: number;
}

/** "Australia/Darwin" → "Australia". */
const partOfWorld = ({ zone }: Near): string => zone.name.split('/')[0]!;
const isPocket = ({ zone, km }: Near): boolean => km > POCKET_KM && POCKETS.test(zone.name);

/** Zones to choose between, the nearest first, and pockets last; those of the same part of the world alone, where there are any. */
function nameCandidates(nearest: Near, rivals: readonly Near[], near: readonly Near[]): string[] {
	const part = partOfWorld(near[0]!);
	const there = rivals.filter((each) => partOfWorld(each) === part);
	const asked = there.length > 0 ? there : rivals;
	const isLikeNearest = (each: Near): boolean =>
		partOfWorld(each) === part && !isPocket(each) && clockOf(each.zone) === clockOf(nearest.zone);
	const first = there.length > 0 ? near.find(isLikeNearest) : nearest;
	const wide = [...(first ? [first] : []), ...asked.filter((each) => !isPocket(each))].slice(0, MOST_WIDE);
	return [...wide, ...asked.filter(isPocket).slice(0, 1)].map(({ zone }) => zone.name);
}

/**
 * The time zone of a place by the principal places of all zones. It is clear where no zone with another clock is nearly as close as
 * the nearest; else those that come into question are named, for a person to choose.
 */
export function guessZone(site: Site): ZoneGuess {
	const near = ZONES.map((zone) => ({ zone, km: kilometresBetween(site, zone) })).sort((a, b) => a.km - b.km);
	const nearest = near.find((each) => !isPocket(each))!;
	const rivals = near.filter(
		(each) =>
			each.km <= (isPocket(each) ? nearest.km : doubtKm(nearest.km)) &&
			clockOf(each.zone) !== clockOf(nearest.zone)
	);
	if (rivals.length === 0) return { clear: nearest.zone.name, candidates: [nearest.zone.name] };
	return { clear: null, candidates: nameCandidates(nearest, rivals, near) };
}
