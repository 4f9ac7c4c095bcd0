import type { NetworkLink, NetworkNode, NetworkSource } from './description';

/** A mixed node by its place in the table of nodes: T = offset + Σ weight·T. */
export interface Mix {
	node: number;
	offsetK: number;
	parts: Int32Array;
	weights: Float64Array;
}

/** One product that the Jacobian is summed from: weight times the slope of a link or source. */
export interface Scatter {
	row: number;
	column: number;
	slope: number;
	weight: number;
}

interface Table {
	/** Number of stored nodes, which stand first. */
	size: number;
	indexOf: (node: string) => number;
	mixes: readonly Mix[];
}

export function sortByKind<T extends { kind: string }>(
	parts: readonly T[],
	kinds: readonly T['kind'][]
): T[] {
	return kinds.flatMap((kind) => parts.filter((part) => part.kind === kind));
}

/** The mixed nodes with their parts as places in the table of nodes. */
export function planMixes(nodes: readonly NetworkNode[], indexOf: (node: string) => number): Mix[] {
	return nodes
		.filter((node) => node.kind === 'mixed')
		.map(({ name, offsetK, parts }) => ({
			node: indexOf(name),
			offsetK,
			parts: Int32Array.from(parts, (part) => indexOf(part.node)),
			weights: Float64Array.from(parts, (part) => part.weight)
		}));
}

/** Where the run of each kind ends in the sorted list of links and sources. */
export function countKinds(
	links: readonly NetworkLink[],
	sources: readonly NetworkSource[]
): Record<NetworkLink['kind'] | NetworkSource['kind'], number> {
	let sum = 0;
	const upTo = (kind: string) =>
		(sum += [...links, ...sources].filter((part: { kind: string }) => part.kind === kind).length);
	return {
		conductance: upTo('conductance'),
		flow: upTo('flow'),
		radiation: upTo('radiation'),
		gate: upTo('gate'),
		excess: upTo('excess'),
		heat: upTo('heat'),
		joule: upTo('joule')
	};
}

/** The stored nodes, with weights, on which the temperature of a node depends. */
function expand({ size, mixes }: Table, node: number): [number, number][] {
	if (node < size) return [[node, 1]];
	const mix = mixes.find((candidate) => candidate.node === node);
	if (!mix) return [];
	return Array.from(mix.parts, (part, k): [number, number] => [part, mix.weights[k]!]).filter(
		([part]) => part < size
	);
}

/** Where each slope of each link and source goes in the Jacobian: two slopes a link, along its ends. */
export function planScatter(
	links: readonly NetworkLink[],
	sources: readonly NetworkSource[],
	table: Table
): Scatter[] {
	const { size, indexOf } = table;
	const entries: Scatter[] = [];
	const addRow = (row: number, slope: number, along: number, weight: number): void => {
		if (row >= size) return;
		for (const [column, share] of expand(table, along)) {
			entries.push({ row, column, slope, weight: weight * share });
		}
	};
	links.forEach((link, at) => {
		const from = indexOf(link.from);
		const to = indexOf(link.to);
		for (const [slope, along] of [
			[2 * at, from],
			[2 * at + 1, to]
		] as const) {
			if (link.kind !== 'flow') addRow(from, slope, along, -1);
			addRow(to, slope, along, 1);
			if (link.kind === 'gate') addRow(indexOf(link.carryTo), slope, along, link.carryShare);
		}
	});
	sources.forEach((source, k) => {
		const at = links.length + k;
		const node = indexOf(source.node);
		if (source.kind === 'joule') addRow(node, 2 * at, node, 1);
	});
	return entries;
}
