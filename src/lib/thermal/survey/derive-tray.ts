import type { AnswerReader } from './answers';
import type { BatteryShape } from './battery-shape';
import { show, type ScenarioDraft } from './draft';
import {
	BASE_RESISTANCE_M2K_PER_W,
	BRACKET_WIDTH_PER_LENGTH,
	FLOOR_W_PER_M2K,
	GUARD_FRACTION,
	JUDGEMENT,
	MAT_RESISTANCE_M2K_PER_W,
	TRAY_MARGIN_M,
	TRAY_MATTER,
	UNDERSIDE_FILM_W_PER_M2K
} from './judgement';
import type { PositionKind, TrayUnderside } from './types';

/** Where nobody is asked what is under the tray. */
const OWN_UNDERSIDE: Partial<Record<PositionKind, TrayUnderside>> = {
	'canopy-box': 'open-air',
	'chassis-rail': 'open-air'
};

/** Derives the tray: its heat, and how it joins the battery to what is under it. */
export function deriveTray(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape): void {
	const matter = TRAY_MATTER[answers.choose('trayMaterial')];
	const thicknessM = answers.lengthM('trayThicknessMm');
	const lengthM = answers.lengthM('trayLengthMm', shape.lengthM + 2 * TRAY_MARGIN_M);
	const widthM = answers.lengthM('trayWidthMm', shape.widthM + 2 * TRAY_MARGIN_M);
	const areaM2 = lengthM * widthM;
	const contactM2 = Math.min(areaM2, shape.baseAreaM2);

	draft.derive(
		'tray',
		'heatCapacity',
		matter.densityKgPerM3 * matter.specificHeatJPerKgK * areaM2 * thicknessM,
		`ρ·c·area·thickness = ${matter.densityKgPerM3}·${matter.specificHeatJPerKgK}·${show(areaM2)}·${show(thicknessM)} ` +
			`(${matter.source}).`
	);
	deriveContact(draft, answers, contactM2, thicknessM / matter.conductivityWPerMK);
	draft.derive(
		'tray',
		'filmArea',
		2 * areaM2 - contactM2,
		`Both faces of ${show(areaM2)} m² less ${show(contactM2)} m² under the battery.`
	);
	const underside = OWN_UNDERSIDE[answers.survey.positionKind] ?? answers.choose('trayUnderside');
	deriveUnderside(draft, underside, areaM2, matter.conductivityWPerMK * thicknessM);
}

function deriveContact(
	draft: ScenarioDraft,
	answers: AnswerReader,
	contactM2: number,
	sheetM2KPerW: number
): void {
	const mat = MAT_RESISTANCE_M2K_PER_W[answers.choose('trayMat')];
	const resistance = BASE_RESISTANCE_M2K_PER_W + mat + sheetM2KPerW;
	draft.derive(
		'tray',
		'caseConductance',
		contactM2 / resistance,
		`Contact ${show(contactM2)} m² ÷ ${show(resistance)} m²K/W: base of the battery and trapped air ` +
			`${BASE_RESISTANCE_M2K_PER_W}, mat ${mat}, sheet ${show(sheetM2KPerW)}; ${JUDGEMENT}.`
	);
}

function deriveUnderside(
	draft: ScenarioDraft,
	underside: TrayUnderside,
	areaM2: number,
	sheetWPerK: number
): void {
	const film = UNDERSIDE_FILM_W_PER_M2K[underside];
	const legs = underside === 'inner-guard' ? BRACKET_WIDTH_PER_LENGTH * sheetWPerK : 0;
	draft.derive(
		'tray',
		'guardConductance',
		film * areaM2 + legs,
		`${film} W/m²K over ${show(areaM2)} m² of underside` +
			(legs > 0 ? ` and ${show(legs)} W/K along two legs to the panel; ${JUDGEMENT}.` : `; ${JUDGEMENT}.`)
	);
	draft.derive(
		'position',
		'guardFraction',
		GUARD_FRACTION[underside],
		`What is under the tray, between outside air (0) and bay air (1); ${JUDGEMENT}.`
	);
}

/** A battery that stands on a floor: no tray that anybody would measure. */
export function deriveFloor(draft: ScenarioDraft, shape: BatteryShape): void {
	const { baseAreaM2 } = shape;
	draft.derive(
		'tray',
		'guardConductance',
		FLOOR_W_PER_M2K * baseAreaM2,
		`Carpet and floor, ${FLOOR_W_PER_M2K} W/m²K over ${show(baseAreaM2)} m²; ${JUDGEMENT}.`
	);
	draft.derive('position', 'guardFraction', 0, 'The floor has outside air beneath it.');
}
