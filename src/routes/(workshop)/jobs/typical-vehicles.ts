/** A body or a trailer as they commonly are: a start for whoever has neither a weighbridge ticket nor a handbook. */
export interface Typical {
	id: string;
	label: string;
	massKg: number;
	dragAreaM2: number;
}

/*
 * Common practice, no source: rounded from memory of laden touring vehicles, drag coefficient times frontal area
 * (for instance 0.33 × 2.7 m² for a wagon, 0.46 × 2.9 m² for a tall four-wheel drive with a rack).
 */
export const TYPICAL_BODIES: readonly Typical[] = [
	{ id: 'wagon', label: 'Wagon', massKg: 2200, dragAreaM2: 0.9 },
	{ id: 'dual-cab', label: 'Dual cab, bare tray', massKg: 2700, dragAreaM2: 1.1 },
	{ id: 'dual-cab-canopy', label: 'Dual cab with a canopy', massKg: 3000, dragAreaM2: 1.2 },
	{ id: 'tall-four-wheel-drive', label: 'Tall four-wheel drive', massKg: 3000, dragAreaM2: 1.2 },
	{
		id: 'four-wheel-drive-rack',
		label: 'Tall four-wheel drive with a roof rack',
		massKg: 3200,
		dragAreaM2: 1.35
	},
	{ id: 'van', label: 'High-roof van', massKg: 3200, dragAreaM2: 1.6 }
];

export const TYPICAL_TRAILERS: readonly Typical[] = [
	{ id: 'none', label: 'Nothing behind it', massKg: 0, dragAreaM2: 0 },
	{ id: 'box-trailer', label: 'Box trailer', massKg: 900, dragAreaM2: 0.3 },
	{ id: 'camper', label: 'Low camper trailer', massKg: 1500, dragAreaM2: 0.3 },
	{ id: 'pop-top', label: 'Pop-top caravan', massKg: 2000, dragAreaM2: 0.8 },
	{ id: 'caravan', label: 'Full-height caravan', massKg: 2800, dragAreaM2: 1.2 }
];
