import { radiateBetween } from '../correlations/radiation';
import type { AnswerReader } from './answers';
import type { BatteryShape } from './battery-shape';
import { show, type ScenarioDraft } from './draft';
import {
	GAP_AIR,
	JUDGEMENT,
	PLATE_HEAT_J_PER_M2K,
	SHIELD_COVERAGE,
	SHIELD_EMISSIVITY,
	WEIGHING_TEMPS_C
} from './judgement';
import { UNKNOWN, type BatterySide, type ShieldPlace } from './types';

/** View areas to the two hot surfaces, m². */
export interface HotViews {
	exhaustM2: number;
	engineM2: number;
}

interface Cover {
	areaM2: number;
	exhaust: boolean;
	engine: boolean;
}

function sideTowards(side: BatterySide | typeof UNKNOWN | undefined): BatterySide {
	return side === undefined || side === UNKNOWN ? 'long-side' : side;
}

/** What a shield at this place covers; one side may face both the exhaust and the engine. */
export function coverOf(place: ShieldPlace, answers: AnswerReader, shape: BatteryShape): Cover {
	const exhaustSide = sideTowards(answers.survey.exhaustBatterySide);
	const engineSide = sideTowards(answers.survey.engineBatterySide);
	const { sideAreaM2, aroundAreaM2 } = shape;
	switch (place) {
		case 'exhaust-side':
			return { areaM2: sideAreaM2[exhaustSide], exhaust: true, engine: false };
		case 'engine-side':
			return { areaM2: sideAreaM2[engineSide], exhaust: false, engine: true };
		case 'both-hot-sides': {
			// Two long sides, or a long side and an end; never more than the case has.
			const both = sideAreaM2[exhaustSide] + sideAreaM2[engineSide];
			return { areaM2: Math.min(both, shape.caseAreaM2), exhaust: true, engine: true };
		}
		case 'all-round':
			return { areaM2: aroundAreaM2, exhaust: exhaustSide !== 'top', engine: engineSide !== 'top' };
		case 'cool-side':
			return { areaM2: sideAreaM2['long-side'], exhaust: false, engine: false };
	}
}

/** Radiation that a view area would carry at typical temperatures, W: how the two hot sides weigh. */
function weighViews(draft: ScenarioDraft, { exhaustM2, engineM2 }: HotViews) {
	const { exhaust, engine, case: caseC } = WEIGHING_TEMPS_C;
	return {
		exhaustW: radiateBetween(draft.coefficient('exhaust', 'emissivity') * exhaustM2, exhaust, caseC),
		engineW: radiateBetween(draft.coefficient('engine', 'emissivity') * engineM2, engine, caseC)
	};
}

function deriveCoverage(draft: ScenarioDraft, cover: Cover, views: HotViews): void {
	const { exhaustW, engineW } = weighViews(draft, views);
	const seenW = exhaustW + engineW;
	const coveredW = (cover.exhaust ? exhaustW : 0) + (cover.engine ? engineW : 0);
	const share = seenW > 0 ? coveredW / seenW : 0;
	draft.derive(
		'shield',
		'coverage',
		SHIELD_COVERAGE * share,
		`${SHIELD_COVERAGE} of a covered side × ${show(share)}, the share of the hot view on covered sides, weighed by what ` +
			`exhaust at ${WEIGHING_TEMPS_C.exhaust} °C and engine at ${WEIGHING_TEMPS_C.engine} °C would send; ${JUDGEMENT}.`
	);
}

/** Derives the shield, if there is one. */
export function deriveShield(
	draft: ScenarioDraft,
	answers: AnswerReader,
	shape: BatteryShape,
	views: HotViews
): void {
	const kind = answers.choose('shieldKind');
	if (kind === 'none') return;
	const cover = coverOf(answers.choose('shieldPlace'), answers, shape);
	const areaM2 = Math.min(cover.areaM2, shape.caseAreaM2);
	const emissivity = SHIELD_EMISSIVITY[answers.choose('shieldFinish')];
	draft.derive('shield', 'area', areaM2, "The covered sides, from the battery's dimensions.");
	deriveCoverage(draft, cover, views);
	draft.derive(
		'shield',
		'emissivityOut',
		emissivity,
		'Aluminium, clean about 0.1, oxidised 0.2 to 0.33 (published emissivity tables).'
	);
	draft.derive('shield', 'emissivityIn', SHIELD_EMISSIVITY.bright, 'The inner face stays clean.');
	if (kind === 'reflective-wrap') deriveWrap(draft, areaM2);
	else derivePlate(draft, areaM2, answers.lengthM('shieldStandOffMm'));
}

function deriveWrap(draft: ScenarioDraft, areaM2: number): void {
	const gap = draft.coefficient('shield', 'gap');
	const perArea = draft.coefficient('shield', 'heatCapacity') / draft.coefficient('shield', 'area');
	draft.derive('shield', 'gap', gap, "The book's wrap, about 3 mm of fleece and air.");
	draft.derive('shield', 'heatCapacity', perArea * areaM2, `The book's wrap, ${show(perArea)} J/m²K.`);
}

function derivePlate(draft: ScenarioDraft, areaM2: number, gapM: number): void {
	const { conductivityWPerMK, leastWPerM2K } = GAP_AIR;
	draft.derive(
		'shield',
		'gap',
		Math.max(conductivityWPerMK / gapM, leastWPerM2K),
		`k/gap = ${conductivityWPerMK}/${show(gapM)} W/m²K, not below ${leastWPerM2K} for the air that turns over in it.`
	);
	draft.derive(
		'shield',
		'heatCapacity',
		PLATE_HEAT_J_PER_M2K * areaM2,
		`1 mm aluminium plate, ${show(PLATE_HEAT_J_PER_M2K)} J/m²K.`
	);
}
