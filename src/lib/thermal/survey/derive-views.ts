import { viewFactorCoaxialDiscs } from '../correlations/view-factors';
import type { AnswerReader } from './answers';
import type { BatteryShape } from './battery-shape';
import { show, type ScenarioDraft } from './draft';
import { BONNET_SHARE_IN_VIEW, FACING_FACTOR, JUDGEMENT, LINING_PASSES } from './judgement';
import type { Facing } from './types';

/** What a battery sees of a hot surface. */
export interface HotPatch {
	widthM: number;
	heightM: number;
	gapM: number;
	facing: Facing;
	/** Area of the battery's side that faces it, m². */
	facingAreaM2: number;
}

const HANDBOOK = 'coaxial parallel discs of the same areas, Incropera et al., 6th ed., Table 13.2';

const discRadiusM = (areaM2: number): number => Math.sqrt(areaM2 / Math.PI);

/**
 * View area between a hot patch and the battery: visible area × view factor × facing factor.
 *
 *     r1 = √(patch/π),  r2 = √(side/π),  view area = patch · F12(r1, r2, gap) · facing
 *
 * @param patch width, height and gap in m, how it faces, and the area in m² of the side that faces it
 * @returns view area, m²
 * @throws EngineInputError when a length or the side's area is not above zero
 * Validity: flat patch and flat side about opposite one another; a factor of 1 square on, 0.5 at an angle, 0 hidden.
 * Source: the disc formula is that of Incropera et al., 6th ed., Table 13.2; the facing factors are engineering judgement.
 * @example
 * viewAreaOf({ widthM: 0.3, heightM: 0.15, gapM: 0.15, facing: 'square-on', facingAreaM2: 0.07095 }); // 0.019052
 */
export function viewAreaOf({ widthM, heightM, gapM, facing, facingAreaM2 }: HotPatch): number {
	const patchM2 = widthM * heightM;
	const viewFactor = viewFactorCoaxialDiscs(discRadiusM(patchM2), discRadiusM(facingAreaM2), gapM);
	return patchM2 * viewFactor * FACING_FACTOR[facing];
}

function describeView(patch: HotPatch, viewAreaM2: number): string {
	const patchM2 = patch.widthM * patch.heightM;
	const factor = FACING_FACTOR[patch.facing];
	return (
		`Patch ${show(patchM2)} m² × view factor ${show(viewAreaM2 / (patchM2 * factor))} × ${factor} for how it faces; ` +
		`side of the battery ${show(patch.facingAreaM2)} m², gap ${show(patch.gapM)} m: ${HANDBOOK}.`
	);
}

type Hot = 'exhaust' | 'engine';
const HOT_NAMES: Record<Hot, string> = { exhaust: 'exhaust', engine: 'engine' };

function readPatch(answers: AnswerReader, shape: BatteryShape, hot: Hot, facing: Facing): HotPatch {
	return {
		facing,
		gapM: answers.lengthM(`${hot}GapMm`),
		widthM: answers.lengthM(`${hot}SeenWidthMm`),
		heightM: answers.lengthM(`${hot}SeenHeightMm`),
		facingAreaM2: shape.sideAreaM2[answers.choose(`${hot}BatterySide`)]
	};
}

/** Derives `position.exhaustView` or `position.engineView` from the tape measure. */
export function deriveView(
	draft: ScenarioDraft,
	answers: AnswerReader,
	shape: BatteryShape,
	hot: Hot
): number {
	const key = `${hot}View`;
	const facing = answers.choose(`${hot}Facing`);
	if (facing === 'hidden') {
		draft.derive('position', key, 0, `The ${HOT_NAMES[hot]} is hidden from the battery: facing factor 0.`);
		return 0;
	}
	const patch = readPatch(answers, shape, hot, facing);
	const measured = viewAreaOf(patch);
	const mostM2 = draft.coefficient(hot, 'area');
	const capped = Math.min(measured, mostM2);
	const note = capped < measured ? ` Held to the ${show(mostM2)} m² that the ${HOT_NAMES[hot]} has.` : '';
	draft.derive('position', key, capped, describeView(patch, measured) + note);
	return capped;
}

/** Derives `position.bonnetView` from the gap above the battery and the lining. */
export function deriveBonnetView(draft: ScenarioDraft, answers: AnswerReader, shape: BatteryShape): void {
	const gapM = answers.lengthM('bonnetGapMm');
	const passes = LINING_PASSES[answers.choose('bonnetLining')];
	const seenM2 = draft.coefficient('bonnet', 'area') * BONNET_SHARE_IN_VIEW;
	if (seenM2 === 0) return draft.derive('position', 'bonnetView', 0, 'The coefficient book has no bonnet.');
	const viewFactor = viewFactorCoaxialDiscs(discRadiusM(shape.baseAreaM2), discRadiusM(seenM2), gapM);
	draft.derive(
		'position',
		'bonnetView',
		viewFactor * passes,
		`View factor ${show(viewFactor)} from the top to a quarter of the bonnet, ${show(seenM2)} m², ${show(gapM)} m above ` +
			`(${HANDBOOK}) × ${passes} for the underside of the bonnet; the quarter and the lining are ${JUDGEMENT}.`
	);
}
