import { airProperties, type AirProperties } from '../correlations/air';
import { nusseltPlateLaminar } from '../correlations/forced-plate';
import { nusseltVerticalPlate } from '../correlations/natural-convection';
import { filmCoefficientWPerM2K, rayleigh, reynolds } from '../correlations/similarity';
import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import type { BatteryShape } from './battery-shape';
import { show, type ScenarioDraft } from './draft';

/** Where the films are taken: the middle of case and air on a hot day, how far they lie apart, and the wind they are counted by. */
const FILM = { tempC: 60, differenceK: 15, speedMPerS: 1, pressurePa: 101_325 } as const;

function stillFilm(heightM: number, air: AirProperties): number {
	const ra = rayleigh(FILM.differenceK, heightM, {
		expansionPerK: 1 / (FILM.tempC + KELVIN_AT_ZERO_C),
		kinematicViscosityM2PerS: air.kinematicViscosityM2PerS,
		diffusivityM2PerS: air.diffusivityM2PerS
	});
	return filmCoefficientWPerM2K(nusseltVerticalPlate(ra, air.prandtl), air.conductivityWPerMK, heightM);
}

function windFilm(lengthM: number, air: AirProperties): number {
	const re = reynolds(FILM.speedMPerS, lengthM, air.kinematicViscosityM2PerS);
	return filmCoefficientWPerM2K(nusseltPlateLaminar(re, air.prandtl), air.conductivityWPerMK, lengthM);
}

/**
 * Films of the case from its size: its sides as upright plates in still air, and along the wind.
 *
 * Bay air is stirred and the case has edges, so that the true film in the wind is rather higher than that of a smooth plate.
 */
export function deriveFilms(draft: ScenarioDraft, { lengthM, heightM }: BatteryShape): void {
	const air = airProperties(FILM.tempC, FILM.pressurePa);
	draft.derive(
		'battery',
		'filmStill',
		stillFilm(heightM, air),
		`Upright plate of ${show(heightM)} m, ${FILM.differenceK} K apart from air at ${FILM.tempC} °C: ` +
			'Nu of Churchill and Chu (Incropera et al., 6th ed., eq. 9.26), h = Nu·k/H; taken for the top too.'
	);
	draft.derive(
		'battery',
		'filmPerSqrtSpeed',
		windFilm(lengthM, air),
		`Smooth plate of ${show(lengthM)} m along a wind of 1 m/s: Nu = 0.664 Re^½ Pr^⅓ (Incropera et al., 6th ed., eq. 7.30), ` +
			'h = Nu·k/L, which grows with the root of the speed.'
	);
}
