import type { MinuteSeries, Scenario } from '../types';
import {
	conductanceOf,
	liftOf,
	type BatteryLink,
	type BatteryNetwork,
	type BatteryNode,
	type Moment,
	type OuterEnd
} from './battery-network';
import type { LegClock } from './leg-clock';
import { ownHeatW } from './own-heat';
import { HEAT_SOURCES, type HeatSource } from './types';

/** Shield and tray pass heat on; what the ledger counts is what arrives in these. */
const COUNTED: readonly BatteryNode[] = ['case', 'cells', 'board'];

type Watts = Record<HeatSource, number>;

/**
 * Counts a link's heat, g (Tend − T): hot metal sends all of it; air sends what its sources lift it above the outside
 * air, and the outside air has the rest.
 */
function countLink(watts: Watts, end: OuterEnd, g: number, innerC: number, moment: Moment): void {
	if (end.body !== null) {
		watts[end.body] += g * (moment.ambientC + liftOf(end, moment) - innerC);
		return;
	}
	liftOf(end, moment, (source, kelvin) => (watts[source] += g * kelvin));
	watts['outside-air'] += g * (moment.ambientC - innerC);
}

/** What shield or tray passes on to the case, by source: each of its links in series with its link to the case. */
function countThrough(watts: Watts, network: BatteryNetwork, node: number, moment: Moment): void {
	const { names, links } = network;
	const nodeC = moment.tempOf(names[node]!);
	const caseC = moment.tempOf('case');
	let toCase = 0;
	const outer: { end: OuterEnd; g: number }[] = [];
	for (const link of links) {
		if (typeof link.outer !== 'number') {
			if (link.inner !== node) continue;
			const g = conductanceOf(link, nodeC, moment.ambientC + liftOf(link.outer, moment));
			outer.push({ end: link.outer, g });
		} else if (link.inner === node || link.outer === node) {
			toCase += conductanceOf(link, nodeC, caseC);
		}
	}
	const sum = outer.reduce((all, { g }) => all + g, toCase);
	if (sum === 0) return;
	let passed = 0;
	for (const { end, g } of outer) {
		const through = (g * toCase) / sum;
		countLink(watts, end, through, caseC, moment);
		passed += through * (moment.ambientC + liftOf(end, moment) - caseC);
	}
	// What shield or tray stores or gives up at this instant.
	watts['outside-air'] += toCase * (nodeC - caseC) - passed;
}

function isDirect(link: BatteryLink, names: readonly BatteryNode[]): boolean {
	return COUNTED.includes(names[link.inner]!) && typeof link.outer !== 'number';
}

/** Heat into case, cells and board by source at a grid point, W. */
export function flowsAt(
	scenario: Scenario,
	clock: LegClock,
	minutes: MinuteSeries,
	gridPoint: number
): Watts {
	const network = clock.networkAt(gridPoint);
	const moment = clock.momentAt(gridPoint, 0);
	const watts = Object.fromEntries(HEAT_SOURCES.map((source) => [source, 0])) as Watts;
	for (const link of network.links) {
		if (!isDirect(link, network.names)) continue;
		const end = link.outer as OuterEnd;
		const innerC = moment.tempOf(network.names[link.inner]!);
		const g = conductanceOf(link, innerC, moment.ambientC + liftOf(end, moment));
		countLink(watts, end, g, innerC, moment);
	}
	network.names.forEach((name, node) => {
		if (!COUNTED.includes(name)) countThrough(watts, network, node, moment);
	});
	const own = ownHeatW(scenario, moment, minutes.currentA[gridPoint]!);
	watts['own-current'] += (own.cells ?? 0) + (own.board ?? 0);
	return watts;
}
