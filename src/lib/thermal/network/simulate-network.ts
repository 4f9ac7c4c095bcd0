import { EnergyAccount } from '../solve/energy-account';
import { Integrator, type Failure } from '../solve/integrator';
import { RosenbrockStepper } from '../solve/rosenbrock';
import { readStep } from '../solve/stepper';
import { CompiledNetwork } from './compile-network';
import type { NetworkDescription } from './description';

export interface NetworkRun {
	/** Temperature of each stored node at time 0, °C. */
	startC: Readonly<Record<string, number>>;
	/** When to read the temperatures, s, ascending and not below 0; the last one ends the run. */
	timesS: readonly number[];
	/** Error allowed in one step, K. */
	toleranceK?: number;
	/** Temperatures of fixed nodes that change in time, °C, smooth in t. */
	fixedC?: (timeS: number) => Readonly<Record<string, number>>;
}

export type NetworkSolution =
	| {
			status: 'done';
			/** Temperatures of the stored nodes at each of the times asked for, °C. */
			temps: Record<string, number>[];
			/** |heat in − heat out − heat stored| over what passed, node by node. */
			relativeImbalances: number[];
			steps: number;
			evaluations: number;
	  }
	| { status: 'failed'; reason: Failure; atS: number; steps: number; evaluations: number };

const TOLERANCE_K = 1e-6;
const MOST_STEPS = 1_000_000;

/**
 * Follows any lumped network in time.
 *
 *     C dT/dt = Σ heat in − Σ heat out + sources
 *
 * @param description nodes, links and sources
 * @param run start temperatures in °C, times in s, tolerance in K, and what changes in time
 * @returns temperatures in °C at the times asked for, and how well the energy closes; or the reason of a failure
 * @throws NetworkError for a network that makes no sense, RangeError for a missing start temperature
 * Validity: lumped nodes (Biot number below about 0.1 within each).
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., ch. 5; solver as Rodas.
 * @example
 * const network = {
 * 	nodes: [
 * 		{ name: 'pan', kind: 'stored', heatCapacityJPerK: 500 },
 * 		{ name: 'room', kind: 'fixed', tempC: 20 }
 * 	],
 * 	links: [{ name: 'film', kind: 'conductance', from: 'pan', to: 'room', conductanceWPerK: 2 }],
 * 	sources: []
 * };
 * simulateNetwork(network, { startC: { pan: 90 }, timesS: [250] }).temps[0].pan; // 45.752
 */
export function simulateNetwork(description: NetworkDescription, run: NetworkRun): NetworkSolution {
	const network = new CompiledNetwork(description);
	const { fixedC, timesS } = run;
	if (fixedC) {
		network.drive = (timeS) => {
			for (const [name, tempC] of Object.entries(fixedC(timeS))) {
				network.setFixedTemp(network.indexOf(name), tempC);
			}
		};
	}
	const temps = Float64Array.from(network.storedNames, (name) => readStart(run.startC, name));
	const toleranceK = new Float64Array(network.size).fill(run.toleranceK ?? TOLERANCE_K);
	const stepper = new RosenbrockStepper(network);
	const integrator = new Integrator(stepper, { toleranceK, mostSteps: MOST_STEPS });
	const energy = new EnergyAccount(network.size, stepper);
	const rows: Record<string, number>[] = [];
	const addRow = (read: (node: number) => number): void => {
		rows.push(Object.fromEntries(network.storedNames.map((name, node) => [name, read(node)])));
	};
	while (rows.length < timesS.length && timesS[rows.length]! <= 0) addRow((node) => temps[node]!);
	const reached = integrator.advance(
		0,
		timesS.at(-1) ?? 0,
		temps,
		() => null,
		(step) => {
			energy.book(step, network);
			const endS = step.timeS + step.lengthS;
			while (rows.length < timesS.length && timesS[rows.length]! < endS) {
				const share = (timesS[rows.length]! - step.timeS) / step.lengthS;
				addRow((node) => readStep(step, node, share));
			}
		}
	);
	const counts = { steps: integrator.steps, evaluations: stepper.evaluations };
	if (reached === 'failed') {
		return { status: 'failed', reason: integrator.failure!, atS: integrator.timeS, ...counts };
	}
	while (rows.length < timesS.length) addRow((node) => temps[node]!);
	return { status: 'done', temps: rows, relativeImbalances: energy.relativeImbalances(network), ...counts };
}

function readStart(startC: Readonly<Record<string, number>>, name: string): number {
	const temp = startC[name];
	if (temp === undefined) throw new RangeError(`the start temperature of "${name}" is missing`);
	return temp;
}
