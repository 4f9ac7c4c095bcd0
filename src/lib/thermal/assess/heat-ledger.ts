import type { MinuteSeries, Scenario } from '../types';
import { conductanceOf, liftOf, type BatteryNetwork, type Moment } from './battery-network';
import { flowsAt } from './source-watts';
import { LegClock } from './leg-clock';
import { ownHeatW } from './own-heat';
import { solveColumns } from './solve-columns';
import { HEAT_SOURCES, type HeatSource, type LedgerEntry } from './types';

const MINUTE_S = 60;
const columnOf = Object.fromEntries(HEAT_SOURCES.map((source, at) => [source, at])) as Record<
	HeatSource,
	number
>;
const COLUMNS = HEAT_SOURCES.length;

interface LedgerRun {
	scenario: Scenario;
	minutes: MinuteSeries;
}

/** A row a battery node, a column a source: how far that source lifts that node above the outside air, K. */
type Lifts = Float64Array[];

/**
 * One minute of the tagged balance, by the implicit midpoint rule with the conductances of the run itself.
 *
 *     C dθs/dt = Σ G (θs,j − θs) + Σ G lift_s + heat_s,   θ = T − Tamb;   outside air: heat = −C dTamb/dt
 *
 * @returns the lifts a minute later; `lifts` becomes what the next call may write into
 */
function advance(
	lifts: Lifts,
	free: Lifts,
	matrix: Lifts,
	clock: LegClock,
	run: LedgerRun,
	from: number
): Lifts {
	const { minutes, scenario } = run;
	const network = clock.networkAt(from + 0.5);
	const moment = clock.momentAt(from, 0.5);
	const { names, heatCapacityJPerK } = network;
	const right = free;
	for (const rows of [matrix, right]) for (const row of rows) row.fill(0);
	gatherLinks(network, moment, matrix, right);
	const ownW = ownHeatW(scenario, moment, minutes.currentA[from]!);
	const ambientKPerS = (minutes.ambient[from + 1]! - minutes.ambient[from]!) / MINUTE_S;
	for (let row = 0; row < names.length; row++) {
		const capacity = heatCapacityJPerK[row]!;
		right[row]![columnOf['own-current']]! += ownW[names[row]!] ?? 0;
		right[row]![columnOf['outside-air']]! -= capacity * ambientKPerS;
		for (let column = 0; column < COLUMNS; column++) {
			let given = right[row]![column]! + (capacity / MINUTE_S) * lifts[row]![column]!;
			for (let other = 0; other < names.length; other++) {
				given -= 0.5 * matrix[row]![other]! * lifts[other]![column]!;
			}
			right[row]![column] = given;
		}
	}
	for (let row = 0; row < names.length; row++) {
		for (let other = 0; other < names.length; other++) matrix[row]![other]! *= 0.5;
		matrix[row]![row]! += heatCapacityJPerK[row]! / MINUTE_S;
	}
	return solveColumns(matrix, right);
}

function gatherLinks(network: BatteryNetwork, moment: Moment, matrix: Lifts, right: Lifts): void {
	const { names } = network;
	for (const link of network.links) {
		const { inner, outer } = link;
		const innerC = moment.tempOf(names[inner]!);
		if (typeof outer === 'number') {
			const g = conductanceOf(link, innerC, moment.tempOf(names[outer]!));
			matrix[inner]![inner]! += g;
			matrix[outer]![outer]! += g;
			matrix[inner]![outer]! -= g;
			matrix[outer]![inner]! -= g;
		} else {
			const g = conductanceOf(link, innerC, moment.ambientC + liftOf(outer, moment));
			matrix[inner]![inner]! += g;
			liftOf(outer, moment, (source, kelvin) => (right[inner]![columnOf[source]]! += g * kelvin));
		}
	}
}

/**
 * Where the heat in the cells came from, at a minute of a run.
 *
 * Along the run the balances of shield, tray, case, cells and board are linear in their temperatures once each
 * radiation link is written with its secant conductance; so each source is followed by itself, and the parts sum to
 * the cells' temperature above the outside air (to 0.1 K: steps of one minute).
 *
 * @param scenario whole scenario
 * @param minutes its run
 * @param gridPoint whole minutes since the start
 * @returns one entry a source, in the order of HEAT_SOURCES
 * Source: superposition in a linear network; the secant conductance is exact along the run (Incropera et al., 6th ed., eq. 1.9).
 */
export function keepLedger(scenario: Scenario, minutes: MinuteSeries, gridPoint: number): LedgerEntry[] {
	const clock = new LegClock(scenario, minutes);
	const { names } = clock.networkAt(0);
	const rows = (columns: number): Lifts => names.map(() => new Float64Array(columns));
	const matrix = rows(names.length);
	let lifts = rows(COLUMNS);
	let free = rows(COLUMNS);
	for (let minute = 0; minute < gridPoint; minute++) {
		[lifts, free] = [advance(lifts, free, matrix, clock, { scenario, minutes }, minute), lifts];
	}
	const watts = flowsAt(scenario, clock, minutes, gridPoint);
	const cells = lifts[names.indexOf('cells')]!;
	return HEAT_SOURCES.map((source) => ({ source, watts: watts[source], kelvin: cells[columnOf[source]]! }));
}
