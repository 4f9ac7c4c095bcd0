import type { MinuteSeries, Scenario } from '../types';
import { conductanceOf, liftOf, type BatteryNetwork, type Moment } from './battery-network';
import { LegClock } from './leg-clock';
import { ownHeatW } from './own-heat';
import { solveBalance } from './solve-balance';
import { flowsAt } from './source-watts';
import { HEAT_SOURCES, type HeatSource, type LedgerEntry } from './types';

const MINUTE_S = 60;
const columnOf = Object.fromEntries(HEAT_SOURCES.map((source, at) => [source, at])) as Record<
	HeatSource,
	number
>;
const COLUMNS = HEAT_SOURCES.length;

/**
 * One minute of the balance of the battery's nodes: their conductances to each other and to what is around them.
 *
 * Written over for each minute, so that a ledger of a day asks for no memory along the way.
 */
class MinuteBalance {
	/** Σ G between the nodes, row after row, W/K; and the matrix that is solved. */
	private readonly conductances: Float64Array;
	private readonly solved: Float64Array;
	/** Of each link, W/K. */
	private linkWPerK = new Float64Array(0);
	private network!: BatteryNetwork;
	private moment!: Moment;

	constructor(private readonly size: number) {
		this.conductances = new Float64Array(size * size);
		this.solved = new Float64Array(size * size);
	}

	take(network: BatteryNetwork, moment: Moment): void {
		this.network = network;
		this.moment = moment;
		const { names, links } = network;
		if (this.linkWPerK.length < links.length) this.linkWPerK = new Float64Array(links.length);
		this.conductances.fill(0);
		for (let at = 0; at < links.length; at++) {
			const link = links[at]!;
			const { inner, outer } = link;
			const outerC =
				typeof outer === 'number' ? moment.tempOf(names[outer]!) : moment.ambientC + liftOf(outer, moment);
			const g = conductanceOf(link, moment.tempOf(names[inner]!), outerC);
			this.linkWPerK[at] = g;
			this.add(inner, inner, g);
			if (typeof outer !== 'number') continue;
			this.add(outer, outer, g);
			this.add(inner, outer, -g);
			this.add(outer, inner, -g);
		}
	}

	private add(row: number, column: number, g: number): void {
		this.conductances[row * this.size + column]! += g;
	}

	/** (C/Δt + ½ G) x = b; b becomes x. */
	solve(right: Float64Array): void {
		const { size, conductances, solved, network } = this;
		for (let at = 0; at < solved.length; at++) solved[at] = 0.5 * conductances[at]!;
		for (let row = 0; row < size; row++) {
			solved[row * (size + 1)]! += network.heatCapacityJPerK[row]! / MINUTE_S;
		}
		solveBalance(solved, right);
	}

	/** (C/Δt − ½ G) x */
	carryBack(felt: Float64Array, carried: Float64Array): void {
		const { size, conductances, network } = this;
		for (let row = 0; row < size; row++) {
			let sum = (network.heatCapacityJPerK[row]! / MINUTE_S) * felt[row]!;
			for (let other = 0; other < size; other++) {
				sum -= 0.5 * conductances[row * size + other]! * felt[other]!;
			}
			carried[row] = sum;
		}
	}

	/** What the sources around the battery gave in this minute, weighed by what a watt in each node comes to. */
	count(felt: Float64Array, kelvin: Float64Array): void {
		const { network, linkWPerK, moment } = this;
		let weight = 0;
		const add = (source: HeatSource, lift: number): void => {
			kelvin[columnOf[source]]! += weight * lift;
		};
		for (let at = 0; at < network.links.length; at++) {
			const { inner, outer } = network.links[at]!;
			if (typeof outer === 'number') continue;
			weight = felt[inner]! * linkWPerK[at]!;
			liftOf(outer, moment, add);
		}
	}
}

/**
 * Where the heat in the cells came from, at a minute of a run.
 *
 * Along the run the balances of shield, tray, case, cells and board are linear in their temperatures once each
 * radiation link is written with its secant conductance; so what each source gave can be followed by itself, and the
 * parts sum to the cells' temperature above the outside air (to 0.1 K: steps of one minute). It is followed backwards:
 * what a watt in each node, minute by minute, comes to in the cells at the end is the same for all sources.
 *
 *     C dθ/dt = Σ G (θⱼ − θ) + Σ G lift + heat,   θ = T − Tamb;   outside air: heat = −C dTamb/dt
 *     (C/Δt + ½G) μ = λ,   kelvin_s += μ · b_s,   λ ← (C/Δt − ½G) μ      (implicit midpoint rule, G of the run itself)
 *
 * @param scenario whole scenario
 * @param minutes its run
 * @param gridPoint whole minutes since the start
 * @returns one entry a source, in the order of HEAT_SOURCES
 * Source: superposition in a linear network; the secant conductance is exact along the run (Incropera et al., 6th ed.,
 * eq. 1.9); the adjoint of a linear recurrence, whose matrices are symmetric here.
 */
export function keepLedger(scenario: Scenario, minutes: MinuteSeries, gridPoint: number): LedgerEntry[] {
	const clock = new LegClock(scenario, minutes);
	const { names, heatCapacityJPerK } = clock.networkAt(0);
	const balance = new MinuteBalance(names.length);
	const kelvin = new Float64Array(COLUMNS);
	const felt = new Float64Array(names.length);
	const influence = new Float64Array(names.length);
	influence[names.indexOf('cells')] = 1;
	for (let minute = gridPoint - 1; minute >= 0; minute--) {
		const moment = clock.momentAt(minute, 0.5);
		balance.take(clock.networkAt(minute + 0.5), moment);
		felt.set(influence);
		balance.solve(felt);
		balance.count(felt, kelvin);
		const ownW = ownHeatW(scenario, moment, minutes.currentA[minute]!);
		const ambientKPerS = (minutes.ambient[minute + 1]! - minutes.ambient[minute]!) / MINUTE_S;
		for (let node = 0; node < names.length; node++) {
			kelvin[columnOf['own-current']]! += felt[node]! * (ownW[names[node]!] ?? 0);
			kelvin[columnOf['outside-air']]! -= felt[node]! * heatCapacityJPerK[node]! * ambientKPerS;
		}
		balance.carryBack(felt, influence);
	}
	const watts = flowsAt(scenario, clock, minutes, gridPoint);
	return HEAT_SOURCES.map((source) => ({ source, watts: watts[source], kelvin: kelvin[columnOf[source]]! }));
}
