import { KELVIN_AT_ZERO_C, STEFAN_BOLTZMANN } from '../correlations/radiation';
import { readOpening, readResistanceFactor } from './element-laws';
import type { NetworkDescription, NetworkLink, NetworkSource } from './description';

/** Heat along one link or from one source, positive from `from` to `to`. */
export interface NamedHeat {
	name: string;
	/** Where it comes from; `source` for a prescribed heat, `current` for i²R. */
	from: string;
	to: string;
	heatW: number;
	/** Heat over temperature difference as it stands, W/K; null for a source. */
	conductanceWPerK: number | null;
}

/** The temperature of every node, stored ones given, the others worked out. */
function findTemps(
	{ nodes }: NetworkDescription,
	stored: Readonly<Record<string, number | null>>
): Map<string, number> {
	const temps = new Map<string, number>();
	for (const node of nodes) {
		if (node.kind === 'fixed') temps.set(node.name, node.tempC);
		if (node.kind !== 'stored') continue;
		const temp = stored[node.name];
		if (typeof temp !== 'number') throw new RangeError(`the temperature of "${node.name}" is missing`);
		temps.set(node.name, temp);
	}
	for (const node of nodes) {
		if (node.kind !== 'mixed') continue;
		const mixed = node.parts.reduce((sum, part) => sum + part.weight * temps.get(part.node)!, node.offsetK);
		temps.set(node.name, mixed);
	}
	return temps;
}

/** The conductance of a link between two temperatures, W/K; of radiation the secant of the fourth-power law. */
function findConductance(link: NetworkLink, fromC: number, toC: number): number {
	if (link.kind === 'radiation') {
		const from = fromC + KELVIN_AT_ZERO_C;
		const to = toC + KELVIN_AT_ZERO_C;
		return STEFAN_BOLTZMANN * link.exchangeAreaM2 * (from ** 2 + to ** 2) * (from + to);
	}
	if (link.kind === 'gate') return link.conductanceWPerK * readOpening(link, fromC);
	if (link.kind === 'excess') return fromC > toC ? link.conductanceWPerK : 0;
	return link.conductanceWPerK;
}

function readSource(source: NetworkSource, temps: ReadonlyMap<string, number>): NamedHeat {
	const { name, node } = source;
	if (source.kind === 'heat') {
		return { name, from: 'source', to: node, heatW: source.heatW, conductanceWPerK: null };
	}
	const resistance = source.r25Ohm * readResistanceFactor(source.activationK, temps.get(node)!);
	return {
		name,
		from: 'current',
		to: node,
		heatW: source.currentA ** 2 * resistance,
		conductanceWPerK: null
	};
}

/**
 * Every heat of a network at the temperatures given.
 *
 *     Q = G (Tfrom − Tto),  of radiation G = σ A (T̃from² + T̃to²)(T̃from + T̃to)
 *
 * @param network nodes, links and sources
 * @param stored temperature of each stored node, °C, by name
 * @returns one entry a link and source, W; what a gate carries on is an entry of its own, named `… carried`
 * @throws RangeError when the temperature of a stored node is missing
 * Validity: any network that checkNetwork accepts.
 * Source: the definitions in description.ts.
 * @example
 * const network = {
 * 	nodes: [
 * 		{ name: 'pan', kind: 'stored', heatCapacityJPerK: 500 },
 * 		{ name: 'room', kind: 'fixed', tempC: 20 }
 * 	],
 * 	links: [{ name: 'film', kind: 'conductance', from: 'pan', to: 'room', conductanceWPerK: 2 }],
 * 	sources: []
 * };
 * readHeats(network, { pan: 50 })[0].heatW; // 60
 */
export function readHeats(
	network: NetworkDescription,
	stored: Readonly<Record<string, number | null>>
): NamedHeat[] {
	const temps = findTemps(network, stored);
	const flows = network.links.flatMap((link): NamedHeat[] => {
		const fromC = temps.get(link.from)!;
		const toC = temps.get(link.to)!;
		const conductanceWPerK = findConductance(link, fromC, toC);
		const heatW = conductanceWPerK * (fromC - toC);
		const flow = { name: link.name, from: link.from, to: link.to, heatW, conductanceWPerK };
		if (link.kind !== 'gate') return [flow];
		const carried = {
			name: `${link.name} carried`,
			from: link.to,
			to: link.carryTo,
			heatW: link.carryShare * heatW,
			conductanceWPerK: null
		};
		return [flow, carried];
	});
	return [...flows, ...network.sources.map((source) => readSource(source, temps))];
}
