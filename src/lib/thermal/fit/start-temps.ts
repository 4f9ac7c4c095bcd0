import { EngineInputError, requirePositive } from '../correlations/require';
import type { NodeName } from '../types';
import { middleOf } from './condense-course';
import { CHANNEL_NODES, FIT_CHANNELS, type FitTrace } from './trace';

/**
 * Where nodes begin of which nothing was measured: at the outside air; after having stood so many hours before; or warmer than the
 * air by what is fitted, with what is believed of it, in K at the engine.
 */
export type UnmeasuredStart =
	{ kind: 'air' } | { kind: 'stood'; hours: number } | { kind: 'fitted'; meanK: number; sdK: number };

/** How much of the engine's excess over the air other nodes have some time after a drive; engineering judgement. */
const EXCESS_SHARE: Readonly<Partial<Record<NodeName, number>>> = {
	engine: 1,
	exhaust: 1,
	bay: 0.6,
	bonnet: 0.4,
	shield: 0.5,
	tray: 0.5,
	case: 0.5,
	cells: 0.5,
	board: 0.5
};
/** A first reading is the middle of those within this time of the start, s. */
const FIRST_WITHIN_S = 300;
/** How far the node may really be from its first reading, K; engineering judgement. */
const FIRST_READING_SD_K = 1;
const LONGEST_STOOD_H = 72;

/** One start temperature that is fitted along: of a node, or the excess of all that nothing is known of. */
export interface StartParameter {
	/** Null: the excess over the air. */
	node: NodeName | null;
	/** °C of a node, K of the excess. */
	mean: number;
	sd: number;
}

export function requireStart(start: UnmeasuredStart, path: string): void {
	if (start.kind === 'stood' && !(start.hours > 0 && start.hours <= LONGEST_STOOD_H)) {
		throw new EngineInputError(`${path}.hours`, start.hours, `above 0 and at most ${LONGEST_STOOD_H}`);
	}
	if (start.kind !== 'fitted') return;
	requirePositive({ [`${path}.sdK`]: start.sdK });
	if (!Number.isFinite(start.meanK))
		throw new EngineInputError(`${path}.meanK`, start.meanK, 'a finite number');
}

/** The start temperatures of a trace that are fitted along: of each node with a first reading, and the excess where asked for. */
export function listStartParameters(
	{ timeS, channels }: FitTrace,
	start: UnmeasuredStart,
	hasNode: (node: NodeName) => boolean
): StartParameter[] {
	const first = timeS.findIndex((time) => time > FIRST_WITHIN_S);
	const measured = FIT_CHANNELS.flatMap((channel): StartParameter[] => {
		const node = CHANNEL_NODES[channel];
		const mean = middleOf([...(channels[channel]?.subarray(0, Math.max(first, 1)) ?? [])]);
		return Number.isNaN(mean) || !hasNode(node) ? [] : [{ node, mean, sd: FIRST_READING_SD_K }];
	});
	return start.kind === 'fitted' ? [...measured, { node: null, mean: start.meanK, sd: start.sdK }] : measured;
}

/** Start temperatures from the parameters, over those that hold where there are none. */
export function placeStarts(
	parameters: readonly StartParameter[],
	values: readonly number[],
	airC: number,
	settledC: Partial<Record<NodeName, number>>
): Partial<Record<NodeName, number>> {
	const startC = { ...settledC };
	const excess = parameters.findIndex(({ node }) => node === null);
	if (excess >= 0) {
		for (const [node, share] of Object.entries(EXCESS_SHARE)) {
			startC[node as NodeName] = airC + share * values[excess]!;
		}
	}
	parameters.forEach(({ node }, at) => {
		if (node !== null) startC[node] = values[at]!;
	});
	return startC;
}
