import type { NetworkDescription, NetworkLink, NetworkNode, NetworkSource } from './description';

/** A network that makes no sense: says which part and why. */
export class NetworkError extends Error {
	readonly part: string;

	constructor(part: string, reason: string) {
		super(`${part}: ${reason}`);
		this.name = 'NetworkError';
		this.part = part;
	}
}

function requireThat(holds: boolean, part: string, reason: string): void {
	if (!holds) throw new NetworkError(part, reason);
}

function requireNotNegative(value: number, part: string, what: string): void {
	requireThat(Number.isFinite(value) && value >= 0, part, `${what} is ${value}, it must be 0 or more`);
}

function checkNode(node: NetworkNode, kinds: ReadonlyMap<string, NetworkNode['kind']>): void {
	if (node.kind === 'stored') {
		const capacity = node.heatCapacityJPerK;
		requireThat(
			Number.isFinite(capacity) && capacity > 0,
			node.name,
			`heat capacity is ${capacity}, it must be above 0`
		);
	} else if (node.kind === 'fixed') {
		requireThat(node.tempC >= -273.15, node.name, `temperature is ${node.tempC}, below absolute zero`);
	} else {
		for (const part of node.parts) {
			const kind = kinds.get(part.node);
			requireThat(
				kind === 'stored' || kind === 'fixed',
				node.name,
				`mixes "${part.node}", not a stored or fixed node`
			);
		}
	}
}

function checkLink(link: NetworkLink, kinds: ReadonlyMap<string, NetworkNode['kind']>): void {
	for (const end of [link.from, link.to]) {
		requireThat(kinds.has(end), link.name, `ends at "${end}", which is not a node`);
	}
	requireThat(link.from !== link.to, link.name, 'ends where it begins');
	if (link.kind === 'radiation') {
		requireNotNegative(link.exchangeAreaM2, link.name, 'exchange area');
		return;
	}
	requireNotNegative(link.conductanceWPerK, link.name, 'conductance');
	if (link.kind !== 'gate') return;
	requireThat(kinds.has(link.carryTo), link.name, `carries to "${link.carryTo}", which is not a node`);
	requireThat(link.fullC > link.openC, link.name, `is fully open at ${link.fullC}, not above ${link.openC}`);
	requireThat(link.carryShare >= 0 && link.carryShare <= 1, link.name, 'carries a share outside 0 to 1');
}

function checkSource(source: NetworkSource, kinds: ReadonlyMap<string, NetworkNode['kind']>): void {
	requireThat(kinds.get(source.node) === 'stored', source.name, `heats "${source.node}", not a stored node`);
	if (source.kind === 'joule') requireNotNegative(source.r25Ohm, source.name, 'resistance');
}

/**
 * Checks that every name is known and used once, and that capacities, conductances and areas are possible.
 *
 * @throws NetworkError naming the part
 */
export function checkNetwork({ nodes, links, sources }: NetworkDescription): void {
	const kinds = new Map<string, NetworkNode['kind']>();
	for (const node of nodes) {
		requireThat(!kinds.has(node.name), node.name, 'is the name of two nodes');
		kinds.set(node.name, node.kind);
	}
	requireThat([...kinds.values()].includes('stored'), 'network', 'has no node that stores heat');
	const names = new Set<string>();
	for (const part of [...links, ...sources]) {
		requireThat(!names.has(part.name), part.name, 'is the name of two links or sources');
		names.add(part.name);
	}
	for (const node of nodes) checkNode(node, kinds);
	for (const link of links) checkLink(link, kinds);
	for (const source of sources) checkSource(source, kinds);
}
