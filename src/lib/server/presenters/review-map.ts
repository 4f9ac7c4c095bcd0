import { geoBounds, geoEquirectangular, geoPath, type GeoProjection } from 'd3-geo';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import land from 'world-atlas/land-110m.json' with { type: 'json' };
import type { ReviewPlace } from '$lib/schemas/review';

export interface MapMark {
	placeId: number;
	x: number;
	y: number;
	radius: number;
	/** Some were reported dark there: filled; else open. */
	isFilled: boolean;
	label: string;
	/** Where the name stands, or null where it would run into another. */
	nameX: number | null;
	isNameLeft: boolean;
}

export interface MapDrawing {
	width: number;
	height: number;
	land: string;
	marks: MapMark[];
}

/** Each is shown about as large as it is drawn, so that names can be read and marks be met by a thumb. */
const MAP_SIZES = {
	phone: { width: 340, height: 300, edge: 28, largestRadius: 18 },
	desk: { width: 720, height: 400, edge: 40, largestRadius: 22 }
} as const;
export type MapSize = keyof typeof MAP_SIZES;
/** A single place is shown with so much around it, degrees. */
const LEAST_SPAN_DEG = 30;
const SMALLEST_RADIUS = 6;
const CHARACTER_PX = 6.6;
const LINE_PX = 15;

const COASTS = feature(
	land as unknown as Topology<{ land: GeometryCollection }>,
	(land as unknown as Topology<{ land: GeometryCollection }>).objects.land
);

/** The corners of what is shown: all the places, and some of the world around them. */
function frameOf(places: readonly ReviewPlace[]) {
	const points = {
		type: 'MultiPoint' as const,
		coordinates: places.map((p): [number, number] => [p.longitudeDeg, p.latitudeDeg])
	};
	const [[west, south], [east, north]] =
		places.length > 0
			? geoBounds(points)
			: [
					[-180, -60],
					[180, 75]
				];
	const wide = Math.max((LEAST_SPAN_DEG - (east - west)) / 2, 0);
	const high = Math.max((LEAST_SPAN_DEG / 2 - (north - south)) / 2, 0);
	// Across the date line the whole world is shown.
	const [left, right] = east < west ? [-180, 180] : [Math.max(west - wide, -180), Math.min(east + wide, 180)];
	const [bottom, top] = [Math.max(south - high, -85), Math.min(north + high, 85)];
	return {
		type: 'MultiPoint' as const,
		coordinates: [
			[left, bottom],
			[right, top]
		]
	};
}

interface Box {
	left: number;
	right: number;
	top: number;
	bottom: number;
}
const meet = (a: Box, b: Box): boolean =>
	a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/** Names where they run into nothing, the largest marks first. */
function placeName(
	name: string,
	{ x, y, radius }: Pick<MapMark, 'x' | 'y' | 'radius'>,
	taken: readonly Box[],
	paperWidth: number
) {
	const width = name.length * CHARACTER_PX;
	for (const isNameLeft of [false, true]) {
		const nameX = isNameLeft ? x - radius - 5 : x + radius + 5;
		const left = isNameLeft ? nameX - width : nameX;
		const box = { left, right: left + width, top: y - LINE_PX / 2, bottom: y + LINE_PX / 2 };
		if (box.left > 0 && box.right < paperWidth && !taken.some((other) => meet(box, other)))
			return { nameX, isNameLeft, box };
	}
	return null;
}

const round = (px: number): number => Math.round(px * 10) / 10;

const sayMark = ({ name, installations, goneDark }: ReviewPlace): string =>
	`${name}: ${installations} ${installations === 1 ? 'installation' : 'installations'}, ${goneDark} reported dark`;

/** The world's coasts take longer to draw than all the rest: those of the frames last shown are kept. */
const drawnCoasts = new Map<string, string>();
const MOST_DRAWN = 50;

function drawCoasts(projection: GeoProjection, frame: string): string {
	const drawn = drawnCoasts.get(frame) ?? geoPath(projection).digits(1)(COASTS) ?? '';
	// The one asked for last goes to the end; the one not asked for the longest is forgotten.
	drawnCoasts.delete(frame);
	drawnCoasts.set(frame, drawn);
	const [oldest = ''] = drawnCoasts.keys();
	if (drawnCoasts.size > MOST_DRAWN) drawnCoasts.delete(oldest);
	return drawn;
}

/** Coasts and marks as numbers and paths; the page draws them. */
export function drawReviewMap(places: readonly ReviewPlace[], size: MapSize): MapDrawing {
	const { width, height, edge, largestRadius } = MAP_SIZES[size];
	const extent: [[number, number], [number, number]] = [
		[edge, edge],
		[width - edge, height - edge]
	];
	const frame = frameOf(places);
	const projection = geoEquirectangular().fitExtent(extent, frame as GeoJSON.MultiPoint);
	projection.clipExtent([
		[0, 0],
		[width, height]
	]);
	const most = Math.max(...places.map(({ installations }) => installations), 1);
	const spots = places.map((place) => {
		const [x = 0, y = 0] = projection([place.longitudeDeg, place.latitudeDeg]) ?? [];
		// The area tells the count.
		const radius = Math.max(largestRadius * Math.sqrt(place.installations / most), SMALLEST_RADIUS);
		return { place, x: round(x), y: round(y), radius: round(radius) };
	});
	const taken: Box[] = spots.map(({ x, y, radius }) => ({
		...{ left: x - radius, right: x + radius, top: y - radius, bottom: y + radius }
	}));
	const marks = spots.map(({ place, ...spot }): MapMark => {
		const named = placeName(place.name, spot, taken, width);
		if (named) taken.push(named.box);
		return {
			...{ placeId: place.placeId, isFilled: place.goneDark > 0, label: sayMark(place), ...spot },
			nameX: named ? round(named.nameX) : null,
			isNameLeft: named?.isNameLeft ?? false
		};
	});
	return { width, height, land: drawCoasts(projection, JSON.stringify([size, frame])), marks };
}
