import { KELVIN_AT_ZERO_C, STEFAN_BOLTZMANN } from '../correlations/radiation';
import type { NetworkDescription, NetworkLink, NetworkNode } from '../network/description';
import { DRIVEN } from '../vehicle/network-table';
import type { HeatSource } from './types';

/** Nodes whose temperature the ledger takes apart; the others are where the heat comes from. */
export const BATTERY_NODES = ['shield', 'tray', 'case', 'cells', 'board'] as const;
export type BatteryNode = (typeof BATTERY_NODES)[number];

/** What a node outside the battery stands for in the ledger. Outside air itself is what all is measured from. */
const SOURCE_OF_NODE: Readonly<Record<string, HeatSource>> = {
	bay: 'bay-air',
	enclosure: 'enclosure-air',
	exhaust: 'exhaust',
	engine: 'engine',
	bonnet: 'bonnet'
};
/** Where a link of the battery ends outside it: a node, or air mixed from several. */
export interface OuterEnd {
	parts: readonly { node: string; weight: number; source: HeatSource | null }[];
	/** The sunlit ground warms this air too. */
	warmedByRoad: boolean;
	/** What it is when it is one hot body and not air. */
	body: HeatSource | null;
}

export interface BatteryLink {
	inner: number;
	/** Index of the other battery node, or the end outside. */
	outer: number | OuterEnd;
	kind: 'conductance' | 'radiation';
	/** W/K, or m² of exchange area. */
	size: number;
}

/** The part of a vehicle's network that is the battery and its surroundings. */
export interface BatteryNetwork {
	names: BatteryNode[];
	heatCapacityJPerK: number[];
	links: BatteryLink[];
}

function findOuterEnd(name: string, nodes: ReadonlyMap<string, NetworkNode>): OuterEnd {
	const node = nodes.get(name);
	if (node?.kind !== 'mixed') {
		const source = SOURCE_OF_NODE[name] ?? null;
		return { parts: [{ node: name, weight: 1, source }], warmedByRoad: false, body: source };
	}
	const parts = node.parts.map((part) => ({ ...part, source: SOURCE_OF_NODE[part.node] ?? null }));
	return { parts, warmedByRoad: Object.hasOwn(DRIVEN, name), body: null };
}

function pickLink(
	link: NetworkLink,
	names: readonly string[],
	nodes: ReadonlyMap<string, NetworkNode>
): BatteryLink | null {
	const [from, to] = [names.indexOf(link.from), names.indexOf(link.to)];
	if (from < 0 && to < 0) return null;
	if (link.kind !== 'conductance' && link.kind !== 'radiation') {
		throw new Error(`The ledger knows no ${link.kind} link at the battery: ${link.name}.`);
	}
	const size = link.kind === 'radiation' ? link.exchangeAreaM2 : link.conductanceWPerK;
	if (from >= 0 && to >= 0) return { inner: from, outer: to, kind: link.kind, size };
	const outer = findOuterEnd(from < 0 ? link.from : link.to, nodes);
	return { inner: from < 0 ? to : from, outer, kind: link.kind, size };
}

/** Cuts the battery out of a vehicle's network. */
export function pickBattery(network: NetworkDescription): BatteryNetwork {
	const nodes = new Map(network.nodes.map((node) => [node.name, node]));
	const stored = BATTERY_NODES.flatMap((name) => {
		const node = nodes.get(name);
		return node?.kind === 'stored' ? [{ name, heatCapacityJPerK: node.heatCapacityJPerK }] : [];
	});
	const names = stored.map(({ name }) => name);
	return {
		names,
		heatCapacityJPerK: stored.map(({ heatCapacityJPerK }) => heatCapacityJPerK),
		links: network.links.flatMap((link) => pickLink(link, names, nodes) ?? [])
	};
}

/** Temperatures at one instant, °C. */
export interface Moment {
	ambientC: number;
	/** What the ground adds to mixed air at this instant, K. */
	roadK: number;
	tempOf: (node: string) => number;
}

/** How far an outer end stands above the outside air, K; tells `add` each source's part. */
export function liftOf(
	end: OuterEnd,
	moment: Moment,
	add: (source: HeatSource, kelvin: number) => void = () => {}
): number {
	let sum = 0;
	for (const { node, weight, source } of end.parts) {
		if (source === null) continue;
		const lift = weight * (moment.tempOf(node) - moment.ambientC);
		sum += lift;
		add(source, lift);
	}
	if (end.warmedByRoad) {
		sum += moment.roadK;
		add('road', moment.roadK);
	}
	return sum;
}

/** The conductance that carries a link's heat exactly, W/K: for radiation the secant of the fourth-power law. */
export function conductanceOf(link: BatteryLink, innerC: number, outerC: number): number {
	if (link.kind === 'conductance') return link.size;
	// As radiativeConductance has it, without its checks: it is asked for some ten thousand times a ledger.
	const inner = innerC + KELVIN_AT_ZERO_C;
	const outer = outerC + KELVIN_AT_ZERO_C;
	return STEFAN_BOLTZMANN * link.size * (inner * inner + outer * outer) * (inner + outer);
}
