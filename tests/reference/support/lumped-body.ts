import type { NetworkDescription, NetworkLink } from '../../../src/lib/thermal/network/description';
import { simulateNetwork, type NetworkRun } from '../../../src/lib/thermal/network/simulate-network';

/** One lumped node with films and radiation to boundaries of given temperature. */
export interface Body {
	heatCapacityJPerK: number;
	films?: readonly { conductanceWPerK: number; tempC: number }[];
	radiates?: readonly { exchangeAreaM2: number; tempC: number }[];
}

function describeBody({ heatCapacityJPerK, films = [], radiates = [] }: Body): NetworkDescription {
	const ends = [...films, ...radiates].map(({ tempC }, k) => ({
		name: `boundary ${k}`,
		kind: 'fixed' as const,
		tempC
	}));
	const links = [
		...films.map(({ conductanceWPerK }) => ({ kind: 'conductance' as const, conductanceWPerK })),
		...radiates.map(({ exchangeAreaM2 }) => ({ kind: 'radiation' as const, exchangeAreaM2 }))
	].map((link, k): NetworkLink => ({ ...link, name: `link ${k}`, from: `boundary ${k}`, to: 'body' }));
	return { nodes: [{ name: 'body', kind: 'stored', heatCapacityJPerK }, ...ends], links, sources: [] };
}

/** Temperatures of all nodes at the times of a run, by the engine. */
export function temperaturesOf(network: NetworkDescription, run: NetworkRun): Record<string, number>[] {
	const solution = simulateNetwork(network, run);
	if (solution.status === 'failed') throw new Error(solution.reason);
	return solution.temps;
}

export function bodyAt(body: Body, startC: number, timesS: number[]): number[] {
	return temperaturesOf(describeBody(body), { startC: { body: startC }, timesS }).map((row) => row.body!);
}

/** When the body first passes a temperature, s, to a thousandth of the range searched. */
export function timeTo(body: Body, startC: number, targetC: number, withinS: number): number {
	const timesS = Array.from({ length: 4001 }, (_, k) => (withinS * k) / 4000);
	const temps = bodyAt(body, startC, timesS);
	const after = temps.findIndex((temp) => Math.sign(temp - targetC) !== Math.sign(startC - targetC));
	const share = (targetC - temps[after - 1]!) / (temps[after]! - temps[after - 1]!);
	return timesS[after - 1]! + share * (timesS[after]! - timesS[after - 1]!);
}

/** Surface and heat capacity of a sphere. */
export function sphere(diameterM: number, densityKgPerM3: number, heatJPerKgK: number) {
	return {
		areaM2: Math.PI * diameterM ** 2,
		heatCapacityJPerK: (densityKgPerM3 * heatJPerKgK * Math.PI * diameterM ** 3) / 6
	};
}
