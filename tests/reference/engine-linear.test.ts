import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { NetworkDescription, NetworkLink } from '../../src/lib/thermal/network/description';
import { simulateNetwork } from '../../src/lib/thermal/network/simulate-network';
import { exponentiate } from './support/mathjs';

interface Linear {
	capacities: number[];
	starts: number[];
	heats: number[];
	/** Between nodes; the last node is the air. */
	conductances: { from: number; to: number; value: number; carriesOnly: boolean }[];
	airC: number;
	timeS: number;
}

const SIZE = 4;
const AIR = SIZE;

const linearNetworks: fc.Arbitrary<Linear> = fc.record({
	capacities: fc.array(fc.double({ min: 50, max: 50_000, noNaN: true }), {
		minLength: SIZE,
		maxLength: SIZE
	}),
	starts: fc.array(fc.double({ min: -20, max: 200, noNaN: true }), { minLength: SIZE, maxLength: SIZE }),
	heats: fc.array(fc.double({ min: -20, max: 200, noNaN: true }), { minLength: SIZE, maxLength: SIZE }),
	conductances: fc.array(
		fc.record({
			from: fc.integer({ min: 0, max: AIR }),
			to: fc.integer({ min: 0, max: SIZE - 1 }),
			value: fc.double({ min: 0.01, max: 50, noNaN: true }),
			carriesOnly: fc.boolean()
		}),
		{ minLength: 1, maxLength: 8 }
	),
	airC: fc.double({ min: -10, max: 50, noNaN: true }),
	timeS: fc.double({ min: 1, max: 20_000, noNaN: true })
});

function describeLinear({ capacities, heats, conductances, airC }: Linear): NetworkDescription {
	const name = (node: number) => (node === AIR ? 'air' : `node ${node}`);
	return {
		nodes: [
			...capacities.map((heatCapacityJPerK, node) => ({
				name: name(node),
				kind: 'stored' as const,
				heatCapacityJPerK
			})),
			{ name: 'air', kind: 'fixed', tempC: airC }
		],
		links: conductances
			.filter(({ from, to }) => from !== to)
			.map(({ from, to, value, carriesOnly }, k): NetworkLink => ({
				name: `link ${k}`,
				kind: carriesOnly ? 'flow' : 'conductance',
				from: name(from),
				to: name(to),
				conductanceWPerK: value
			})),
		sources: heats.map((heatW, node) => ({
			name: `source ${node}`,
			kind: 'heat' as const,
			node: name(node),
			heatW
		}))
	};
}

/** dT/dt = A T + b, written as one matrix for the state with a one below it. */
function solveExactly({ capacities, starts, heats, conductances, airC, timeS }: Linear): number[] {
	const matrix = Array.from({ length: SIZE + 1 }, () => new Array<number>(SIZE + 1).fill(0));
	const add = (node: number, other: number, value: number) => {
		if (node === AIR) return;
		const rate = value / capacities[node]!;
		matrix[node]![node]! -= rate;
		if (other === AIR) matrix[node]![SIZE]! += rate * airC;
		else matrix[node]![other]! += rate;
	};
	for (const { from, to, value, carriesOnly } of conductances) {
		if (from === to) continue;
		add(to, from, value);
		if (!carriesOnly) add(from, to, value);
	}
	heats.forEach((heat, node) => (matrix[node]![SIZE]! += heat / capacities[node]!));
	const power = exponentiate(matrix.map((row) => row.map((value) => value * timeS)));
	const state = [...starts, 1];
	return power.slice(0, SIZE).map((row) => row.reduce((sum, value, k) => sum + value * state[k]!, 0));
}

describe('linear networks against the matrix exponential of mathjs', () => {
	it('agree within 0.001 K for networks drawn at random, and close their energy', () => {
		fc.assert(
			fc.property(linearNetworks, (linear) => {
				const solution = simulateNetwork(describeLinear(linear), {
					startC: Object.fromEntries(linear.starts.map((temp, node) => [`node ${node}`, temp])),
					timesS: [linear.timeS],
					toleranceK: 1e-8
				});
				if (solution.status === 'failed') {
					// Heat without a way out, or taken below absolute zero: the exact solution must say so too.
					const hottest = Math.max(...solveExactly(linear));
					const coldest = Math.min(...solveExactly(linear));
					expect(hottest > 10_000 || coldest < -273.15).toBe(true);
					return;
				}
				solveExactly(linear).forEach((exact, node) => {
					expect(Math.abs(solution.temps[0]![`node ${node}`]! - exact)).toBeLessThan(1e-3);
				});
				for (const imbalance of solution.relativeImbalances) expect(imbalance).toBeLessThan(1e-6);
			}),
			{ numRuns: 60, seed: 20 }
		);
	}, 60_000);
});
