import type { NetworkDescription, NetworkLink, NetworkNode, NetworkSource } from '../network/description';
import type { Leg, Scenario } from '../types';
import type { Drive, LegConstants } from './leg-drive';
import {
	DRIVEN,
	FIXED,
	LINKS,
	MIXED,
	SOURCES,
	STORED,
	type LinkRow,
	type Setting,
	type SourceRow
} from './network-table';

type ReadNow = (name: string, reader: ((setting: Setting) => number) | 'driven') => number;

function describeNodes(setting: Setting, readNow: ReadNow): NetworkNode[] {
	const stored = Object.entries(STORED)
		.filter(([name]) => name !== 'shield' || setting.scenario.shield !== null)
		.map(([name, read]): NetworkNode => ({
			kind: 'stored',
			name,
			heatCapacityJPerK: read(setting.scenario)
		}));
	const fixed = Object.entries(FIXED).map(([name, reader]): NetworkNode => ({
		kind: 'fixed',
		name,
		tempC: readNow(name, reader)
	}));
	const mixed = Object.entries(MIXED).map(([name, { offset, parts }]): NetworkNode => ({
		kind: 'mixed',
		name,
		offsetK: readNow(name, offset),
		parts: Object.entries(parts).map(([node, read]) => ({ node, weight: read(setting) }))
	}));
	return [...stored, ...fixed, ...mixed];
}

function describeLink(row: LinkRow, setting: Setting, readNow: ReadNow): NetworkLink {
	const { kind, name, from, to, gate } = row;
	const size = readNow(name, row.size);
	if (kind === 'radiation') return { kind, name, from, to, exchangeAreaM2: size };
	if (kind !== 'gate') return { kind, name, from, to, conductanceWPerK: size };
	const { openC, fullC, carryTo, carryShare } = gate!;
	const moving = { openC: openC(setting), fullC: fullC(setting), carryTo, carryShare: carryShare(setting) };
	return { kind, name, from, to, conductanceWPerK: size, ...moving };
}

function describeSource(row: SourceRow, setting: Setting, readNow: ReadNow, currentA: number): NetworkSource {
	const { kind, name, node } = row;
	if (kind === 'heat') return { kind, name, node, heatW: readNow(name, 'driven') };
	return {
		kind,
		name,
		node,
		currentA,
		r25Ohm: row.r25Ohm!(setting),
		activationK: row.activationK!(setting)
	};
}

/** Whether a link is there: those of the shield are only with one. */
export function hasLink({ from, to }: LinkRow, shielded: boolean): boolean {
	return shielded || (from !== 'shield' && to !== 'shield');
}

/**
 * The under-bonnet network of one leg at one instant: ten stored nodes (nine without a shield), the outside air, the
 * sky, the exhaust gas, the air around the battery and the guard panel, and what passes between them.
 *
 * @param scenario whole scenario
 * @param leg the leg that runs
 * @param constants what its speed sets, from findLegConstants
 * @param drive what the clock sets, from findDrive
 * @param currentA battery current, A
 * @returns the network, whose names the heat ledger shows
 */
export function describeVehicle(
	scenario: Scenario,
	leg: Leg,
	constants: LegConstants,
	drive: Drive,
	currentA: number
): NetworkDescription {
	const setting = { scenario, leg, constants };
	const readNow: ReadNow = (name, reader) =>
		reader === 'driven' ? DRIVEN[name]!(drive, scenario) : reader(setting);
	return {
		nodes: describeNodes(setting, readNow),
		links: LINKS.filter((link) => hasLink(link, scenario.shield !== null)).map((link) =>
			describeLink(link, setting, readNow)
		),
		sources: SOURCES.map((source) => describeSource(source, setting, readNow, currentA))
	};
}
