import type {
	AirPath,
	BayPlace,
	BonnetLining,
	EnclosureAir,
	Facing,
	RoadHeat,
	ShieldFinish,
	SunLoad,
	TrayMaterial,
	TrayMat,
	TrayUnderside
} from './types';

/** Said beside every number below that no source stands behind. */
export const JUDGEMENT = 'engineering judgement, to be calibrated';

/** Facing factor of the thermal model, section 4. */
export const FACING_FACTOR: Record<Facing, number> = { 'square-on': 1, 'at-an-angle': 0.5, hidden: 0 };

/** How much of the bay's warming the air at that place has had. */
export const BAY_AIR_FRACTION: Record<BayPlace, number> = {
	'front-corner': 0.6,
	middle: 0.75,
	firewall: 0.85,
	'firewall-exhaust': 0.95
};
/** Air that leaves the bay and passes along the rails. */
export const RAIL_BAY_AIR_FRACTION = 0.1;

/** Local air speed as a share of road speed. */
export const AIR_EXPOSURE: Record<'bay' | 'rail', Record<AirPath, number>> = {
	bay: { 'closed-corner': 0.05, 'some-through-flow': 0.15, 'in-the-airstream': 0.3 },
	rail: { 'closed-corner': 0.1, 'some-through-flow': 0.3, 'in-the-airstream': 0.6 }
};

/** A battery in a corner of the bay has about a quarter of the bonnet in view. */
export const BONNET_SHARE_IN_VIEW = 0.25;
/** What an insulating lining lets through. */
export const LINING_PASSES: Record<BonnetLining, number> = { bare: 1, lined: 0.3 };

/** Warming of the air under the vehicle by sunlit ground, K per 1000 W/m². */
export const ROAD_UPLIFT: Record<RoadHeat, number> = {
	shielded: 3,
	'open-to-track': 6,
	'open-to-bitumen': 10
};

export const TRAY_MATTER: Record<
	TrayMaterial,
	{ densityKgPerM3: number; specificHeatJPerKgK: number; conductivityWPerMK: number; source: string }
> = {
	steel: {
		densityKgPerM3: 7832,
		specificHeatJPerKgK: 434,
		conductivityWPerMK: 63.9,
		source: 'plain carbon steel, Incropera et al., 6th ed., Table A.1'
	},
	aluminium: {
		densityKgPerM3: 2770,
		specificHeatJPerKgK: 875,
		conductivityWPerMK: 177,
		source: 'aluminium alloy 2024, Incropera et al., 6th ed., Table A.1'
	},
	plastic: {
		densityKgPerM3: 905,
		specificHeatJPerKgK: 1900,
		conductivityWPerMK: 0.2,
		source: 'polypropylene, usual values, from memory'
	}
};

/** What lies between the case and the tray, m²K/W. */
export const MAT_RESISTANCE_M2K_PER_W: Record<TrayMat, number> = {
	none: 0,
	/** 6 mm at 0.15 W/mK. */
	rubber: 0.04,
	/** 10 mm at 0.04 W/mK. */
	foam: 0.25
};
/** The battery's own base (3 mm of plastic at 0.2 W/mK) and half a millimetre of trapped air (0.028 W/mK). */
export const BASE_RESISTANCE_M2K_PER_W = 0.015 + 0.018;

/** From the underside of the tray to what is under it: still or passing air and radiation, W/m²K. */
export const UNDERSIDE_FILM_W_PER_M2K: Record<TrayUnderside, number> = {
	'open-air': 14,
	'inner-guard': 9,
	'bay-air': 14
};
/** Where what is under the tray stands between outside air and bay air. */
export const GUARD_FRACTION: Record<TrayUnderside, number> = {
	'open-air': 0,
	'inner-guard': 0.5,
	'bay-air': 1
};
/** Two legs, each 40 mm wide and 100 mm long, of the tray's own sheet. */
export const BRACKET_WIDTH_PER_LENGTH = (2 * 0.04) / 0.1;
/** What a tray that nobody measured has to spare around the battery, each side. */
export const TRAY_MARGIN_M = 0.02;
/** Carpet and floor under a battery that stands inside, W/m²K. */
export const FLOOR_W_PER_M2K = 4;

/** Aluminium foil or sheet: clean about 0.1, aged about 0.3. */
export const SHIELD_EMISSIVITY: Record<ShieldFinish, number> = { bright: 0.1, dull: 0.3 };
/** Edges and fixings leave a tenth of a covered side in view. */
export const SHIELD_COVERAGE = 0.9;
/** Plate of 1 mm aluminium, J/m²K. */
export const PLATE_HEAT_J_PER_M2K = 2770 * 875 * 0.001;
/** Air in a gap that neither widens nor closes further with convection, W/mK and W/m²K. */
export const GAP_AIR = { conductivityWPerMK: 0.028, leastWPerM2K: 2 };
/** Temperatures at which the two hot sides are weighed against one another, °C. */
export const WEIGHING_TEMPS_C = { exhaust: 350, engine: 95, case: 60 };

interface EnclosureNumbers {
	heatCapacity: number;
	uaStill: number;
	uaPerSpeed: number;
	coolGain: number;
	solarArea: Record<SunLoad, number>;
}
/** Spaces that a battery can stand in: the parked cabin runs about 20 K above the outside air in full sun. */
export const ENCLOSURES: Record<'cabin' | 'cargo-area' | 'canopy-box', EnclosureNumbers> = {
	cabin: {
		heatCapacity: 40e3,
		uaStill: 35,
		uaPerSpeed: 2,
		coolGain: 150,
		solarArea: { shaded: 0.4, 'through-windows': 0.7, 'full-sun': 0.9 }
	},
	'cargo-area': {
		heatCapacity: 40e3,
		uaStill: 35,
		uaPerSpeed: 2,
		coolGain: 75,
		solarArea: { shaded: 0.3, 'through-windows': 0.6, 'full-sun': 0.9 }
	},
	'canopy-box': {
		heatCapacity: 25e3,
		uaStill: 35,
		uaPerSpeed: 2,
		coolGain: 0,
		solarArea: { shaded: 0.15, 'through-windows': 0.35, 'full-sun': 0.5 }
	}
};
/** What vents or an open side add to the box's air exchange, W/K. */
export const BOX_AIR_W_PER_K: Record<EnclosureAir, number> = { sealed: 0, vented: 15, open: 60 };
