import type { AnswerReader } from './answers';
import type { BatteryShape } from './battery-shape';
import type { ScenarioDraft } from './draft';
import { deriveShield } from './derive-shield';
import { deriveFloor, deriveTray } from './derive-tray';
import { deriveBonnetView, deriveView } from './derive-views';
import {
	AIR_EXPOSURE,
	BAY_AIR_FRACTION,
	BOX_AIR_W_PER_K,
	ENCLOSURES,
	JUDGEMENT,
	RAIL_BAY_AIR_FRACTION,
	ROAD_UPLIFT
} from './judgement';
import type { PositionKind } from './types';

type Inside = 'cabin' | 'cargo-area' | 'canopy-box';

function deriveUnderBonnet(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape): void {
	const { deriveAll, derive } = bind(draft);
	derive('bayAirFraction', BAY_AIR_FRACTION[answers.choose('bayPlace')], `Place in the bay; ${JUDGEMENT}.`);
	deriveAll({ enclosureFraction: 0, roadUplift: 0 }, 'Under the bonnet.');
	const exhaustM2 = deriveView(draft, answers, shape, 'exhaust');
	const engineM2 = deriveView(draft, answers, shape, 'engine');
	deriveBonnetView(draft, answers, shape);
	derive('airExposure', AIR_EXPOSURE.bay[answers.choose('airPath')], `Air path; ${JUDGEMENT}.`);
	deriveTray(draft, answers, shape);
	deriveShield(draft, answers, shape, { exhaustM2, engineM2 });
}

function deriveChassisRail(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape): void {
	const { deriveAll, derive } = bind(draft);
	derive(
		'bayAirFraction',
		RAIL_BAY_AIR_FRACTION,
		`Air from the bay that passes along the rail; ${JUDGEMENT}.`
	);
	deriveAll({ enclosureFraction: 0, engineView: 0, bonnetView: 0 }, 'On the chassis rail.');
	const exhaustM2 = deriveView(draft, answers, shape, 'exhaust');
	derive('airExposure', AIR_EXPOSURE.rail[answers.choose('airPath')], `Air path; ${JUDGEMENT}.`);
	derive('roadUplift', ROAD_UPLIFT[answers.choose('roadHeat')], `Sunlit ground below; ${JUDGEMENT}.`);
	deriveTray(draft, answers, shape);
	deriveShield(draft, answers, shape, { exhaustM2, engineM2: 0 });
}

function deriveInside(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape, kind: Inside): void {
	const inside = 'Inside: its air is that of the space, and nothing hot is in view.';
	const away = {
		bayAirFraction: 0,
		roadUplift: 0,
		airExposure: 0,
		exhaustView: 0,
		engineView: 0,
		bonnetView: 0
	};
	draft.deriveAll('position', { enclosureFraction: 1, ...away }, inside);
	deriveEnclosure(draft, answers, kind);
	if (kind === 'canopy-box') deriveTray(draft, answers, shape);
	else deriveFloor(draft, shape);
}

function deriveEnclosure(draft: ScenarioDraft, answers: AnswerReader, kind: Inside): void {
	const { heatCapacity, uaStill, uaPerSpeed, coolGain, solarArea } = ENCLOSURES[kind];
	const boxAir = kind === 'canopy-box' ? BOX_AIR_W_PER_K[answers.choose('enclosureAir')] : 0;
	const cooled = kind !== 'canopy-box' && answers.choose('enclosureCooling') === 'cooled';
	draft.deriveAll(
		'enclosure',
		{ heatCapacity, uaStill: uaStill + boxAir, uaPerSpeed, coolGain: cooled ? coolGain : 0 },
		`A usual ${kind.replace('-', ' ')}; ${JUDGEMENT}.`
	);
	draft.derive(
		'enclosure',
		'solarArea',
		solarArea[answers.choose('enclosureSun')],
		`Sun on it; ${JUDGEMENT}. A parked cabin in the sun settled about 22 K above the outside air in McLaren, Null and ` +
			'Quinn, Pediatrics 116 (2005) e109.'
	);
}

/** The position group is set most often: its name once. */
function bind(draft: ScenarioDraft) {
	return {
		derive: (key: string, value: number, basis: string) => draft.derive('position', key, value, basis),
		deriveAll: (values: Record<string, number>, basis: string) => draft.deriveAll('position', values, basis)
	};
}

const BY_KIND: Record<
	PositionKind,
	(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape) => void
> = {
	'under-bonnet': deriveUnderBonnet,
	'chassis-rail': deriveChassisRail,
	cabin: (draft, answers, shape) => deriveInside(draft, answers, shape, 'cabin'),
	'cargo-area': (draft, answers, shape) => deriveInside(draft, answers, shape, 'cargo-area'),
	'canopy-box': (draft, answers, shape) => deriveInside(draft, answers, shape, 'canopy-box')
};

/** Derives position, tray, enclosure and shield from the answers. */
export function derivePosition(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape): void {
	BY_KIND[answers.survey.positionKind](draft, answers, shape);
}
