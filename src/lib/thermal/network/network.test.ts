import { describe, expect, it } from 'vitest';
import { checkNetwork, NetworkError } from './check-network';
import { CompiledNetwork } from './compile-network';
import type { NetworkDescription, NetworkLink } from './description';
import { readHeats } from './read-heats';
import { simulateNetwork } from './simulate-network';

/** One of every kind of node, link and source. */
const EVERYTHING: NetworkDescription = {
	nodes: [
		{ name: 'hot', kind: 'stored', heatCapacityJPerK: 900 },
		{ name: 'warm', kind: 'stored', heatCapacityJPerK: 4000 },
		{ name: 'cool', kind: 'stored', heatCapacityJPerK: 250 },
		{ name: 'air', kind: 'fixed', tempC: 20 },
		{ name: 'limit', kind: 'fixed', tempC: 45 },
		{
			name: 'mixed air',
			kind: 'mixed',
			offsetK: 1.5,
			parts: [
				{ node: 'air', weight: 0.4 },
				{ node: 'warm', weight: 0.6 }
			]
		}
	],
	links: [
		{ name: 'wall', kind: 'conductance', from: 'hot', to: 'warm', conductanceWPerK: 3 },
		{ name: 'film', kind: 'conductance', from: 'mixed air', to: 'cool', conductanceWPerK: 2 },
		{ name: 'draught', kind: 'flow', from: 'air', to: 'warm', conductanceWPerK: 4 },
		{ name: 'glow', kind: 'radiation', from: 'hot', to: 'cool', exchangeAreaM2: 0.05 },
		{ name: 'glow of the air', kind: 'radiation', from: 'mixed air', to: 'cool', exchangeAreaM2: 0.2 },
		{
			name: 'valve',
			kind: 'gate',
			from: 'hot',
			to: 'air',
			conductanceWPerK: 10,
			openC: 100,
			fullC: 300,
			carryTo: 'warm',
			carryShare: 0.3
		},
		{ name: 'cooling', kind: 'excess', from: 'warm', to: 'limit', conductanceWPerK: 6 }
	],
	sources: [
		{ name: 'burner', kind: 'heat', node: 'hot', heatW: 700 },
		{ name: 'current', kind: 'joule', node: 'cool', currentA: 20, r25Ohm: 0.05, activationK: 1500 }
	]
};
const TEMPS = { hot: 220, warm: 60, cool: 35 };

function heatsAt(network: CompiledNetwork, temps: readonly number[]): Float64Array {
	const heats = new Float64Array(network.size);
	network.sumHeats(Float64Array.from(temps), heats);
	return heats;
}

describe('a compiled network', () => {
	const network = new CompiledNetwork(EVERYTHING);
	const temps = network.storedNames.map((name) => TEMPS[name as keyof typeof TEMPS]);

	it('sums the same heats as reading the description link by link', () => {
		const flows = readHeats(EVERYTHING, TEMPS);
		const gives = (link: string) => EVERYTHING.links.find(({ name }) => name === link)?.kind !== 'flow';
		heatsAt(network, temps).forEach((heat, node) => {
			const name = network.storedNames[node]!;
			const expected = flows.reduce(
				(sum, flow) =>
					sum +
					(flow.to === name ? flow.heatW : 0) -
					(flow.from === name && gives(flow.name) ? flow.heatW : 0),
				0
			);
			expect(heat).toBeCloseTo(expected, 9);
		});
	});

	it('has a derivative that agrees with differences', () => {
		const size = network.size;
		const jacobian = new Float64Array(size * size);
		network.fillJacobian(Float64Array.from(temps), jacobian);
		for (let column = 0; column < size; column++) {
			const shifted = (by: number) =>
				heatsAt(
					network,
					temps.map((temp, k) => (k === column ? temp + by : temp))
				);
			const above = shifted(1e-3);
			const below = shifted(-1e-3);
			for (let row = 0; row < size; row++) {
				expect(jacobian[row * size + column]).toBeCloseTo((above[row]! - below[row]!) / 2e-3, 5);
			}
		}
	});

	it('knows its nodes and parts by name and no others', () => {
		expect(() => network.indexOf('cellar')).toThrow(RangeError);
		expect(() => network.placeOf('cable')).toThrow(RangeError);
	});
});

describe('energy', () => {
	it('stays the same in a network that nothing enters or leaves', () => {
		const isolated: NetworkDescription = {
			nodes: [
				{ name: 'a', kind: 'stored', heatCapacityJPerK: 700 },
				{ name: 'b', kind: 'stored', heatCapacityJPerK: 1300 }
			],
			links: [
				{ name: 'glow', kind: 'radiation', from: 'a', to: 'b', exchangeAreaM2: 0.5 },
				{ name: 'wall', kind: 'conductance', from: 'a', to: 'b', conductanceWPerK: 0.2 }
			],
			sources: []
		};
		const solution = simulateNetwork(isolated, { startC: { a: 500, b: 0 }, timesS: [300, 3000, 30_000] });
		if (solution.status === 'failed') throw new Error(solution.reason);
		for (const { a, b } of solution.temps) expect(700 * a! + 1300 * b!).toBeCloseTo(700 * 500, 5);
		for (const imbalance of solution.relativeImbalances) expect(imbalance).toBeLessThan(1e-6);
	});

	it('closes worse with a coarse tolerance: the account is not the solver', () => {
		const worst = (toleranceK: number) => {
			const solution = simulateNetwork(EVERYTHING, { startC: TEMPS, timesS: [3000], toleranceK });
			if (solution.status === 'failed') throw new Error(solution.reason);
			return Math.max(...solution.relativeImbalances);
		};
		expect(worst(1)).toBeGreaterThan(100 * worst(1e-6));
		expect(worst(1e-6)).toBeLessThan(1e-7);
	});

	it('says that a run failed when heat has no way out', () => {
		const trapped: NetworkDescription = {
			nodes: [{ name: 'a', kind: 'stored', heatCapacityJPerK: 1 }],
			links: [],
			sources: [{ name: 'fire', kind: 'heat', node: 'a', heatW: 1e6 }]
		};
		const solution = simulateNetwork(trapped, { startC: { a: 20 }, timesS: [1000] });
		expect(solution).toMatchObject({ status: 'failed', reason: 'impossible_temperature' });
	});
});

describe('a network that makes no sense is refused', () => {
	const wall: NetworkLink = {
		name: 'wall',
		kind: 'conductance',
		from: 'hot',
		to: 'air',
		conductanceWPerK: 1
	};
	const base: NetworkDescription = {
		nodes: [
			{ name: 'hot', kind: 'stored', heatCapacityJPerK: 5 },
			{ name: 'air', kind: 'fixed', tempC: 20 }
		],
		links: [wall],
		sources: []
	};

	it('and one that does is taken', () => {
		expect(() => checkNetwork(base)).not.toThrow();
	});

	it.each<[string, Partial<NetworkDescription>, string]>([
		['two nodes of one name', { nodes: [...base.nodes, { name: 'hot', kind: 'fixed', tempC: 1 }] }, 'hot'],
		['no stored node', { nodes: [{ name: 'air', kind: 'fixed', tempC: 1 }], links: [] }, 'network'],
		[
			'no heat capacity',
			{ nodes: [{ name: 'hot', kind: 'stored', heatCapacityJPerK: 0 }, base.nodes[1]!] },
			'hot'
		],
		['below absolute zero', { nodes: [base.nodes[0]!, { name: 'air', kind: 'fixed', tempC: -274 }] }, 'air'],
		['a link to nowhere', { links: [{ ...wall, to: 'cellar' }] }, 'wall'],
		['a link to itself', { links: [{ ...wall, to: 'hot' }] }, 'wall'],
		['a negative conductance', { links: [{ ...wall, conductanceWPerK: -1 }] }, 'wall'],
		['two links of one name', { links: [wall, wall] }, 'wall'],
		['a source at a boundary', { sources: [{ name: 'fire', kind: 'heat', node: 'air', heatW: 1 }] }, 'fire']
	])('%s', (_name, change, part) => {
		const act = () => checkNetwork({ ...base, ...change });
		expect(act).toThrow(NetworkError);
		expect(act).toThrow(expect.objectContaining({ part }));
	});
});
