import { ZONE_PLACES } from './zone-places';

interface Site {
	latitudeDeg: number;
	longitudeDeg: number;
}

const inRadians = (degrees: number): number => (degrees * Math.PI) / 180;

const ZONES = ZONE_PLACES.trim()
	.split('\n')
	.map((line) => {
		const [latitudeDeg, longitudeDeg, name] = line.split(' ') as [string, string, string];
		return { name, latitudeDeg: Number(latitudeDeg), longitudeDeg: Number(longitudeDeg) };
	});

/** Cosine of the angle between two places: the larger, the nearer. */
function nearness(a: Site, b: Site): number {
	const [latA, latB] = [inRadians(a.latitudeDeg), inRadians(b.latitudeDeg)];
	const apart = inRadians(a.longitudeDeg - b.longitudeDeg);
	return Math.sin(latA) * Math.sin(latB) + Math.cos(latA) * Math.cos(latB) * Math.cos(apart);
}

/** The zone whose principal place is the nearest: a first guess, which may be the neighbour's near a border. */
export const nearestZone = (site: Site): string =>
	ZONES.reduce((best, zone) => (nearness(site, zone) > nearness(site, best) ? zone : best)).name;
