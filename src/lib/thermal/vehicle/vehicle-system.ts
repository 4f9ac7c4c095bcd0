import { CompiledNetwork } from '../network/compile-network';
import type { Leg, Scenario } from '../types';
import { readCurrentA, type ChargeSpan } from './charge';
import { describeVehicle, DRIVEN } from './describe-vehicle';
import { emptyDrive, findDrive, findLegConstants } from './leg-drive';

const S_PER_H = 3600;

/** The network of one leg, compiled; `span` is the current that flows from `spanStartS` on. */
export interface VehicleSystem {
	network: CompiledNetwork;
	setSpan: (span: ChargeSpan, spanStartS: number) => void;
}

type Update = () => void;

/** Lays out the network of a leg and ties to the clock what the clock drives. */
export function compileVehicle(scenario: Scenario, leg: Leg): VehicleSystem {
	const constants = findLegConstants(scenario, leg);
	const drive = emptyDrive();
	const startHour = scenario.start.hour;
	findDrive(scenario, leg, constants, startHour, drive);
	const network = new CompiledNetwork(describeVehicle(scenario, leg, constants, drive, 0));
	const updates: Update[] = [];
	for (const [name, read] of Object.entries(DRIVEN.temps)) {
		const node = network.indexOf(name);
		updates.push(() => network.setFixedTemp(node, read(drive)));
	}
	for (const [name, read] of Object.entries({ ...DRIVEN.links, ...DRIVEN.sources })) {
		const place = network.placeOf(name);
		updates.push(() => network.setCoefficient(place, read(drive, scenario)));
	}
	for (const [name, read] of Object.entries(DRIVEN.mixes)) {
		const mix = network.mixOf(name);
		updates.push(() => network.setMixOffset(mix, read(drive, scenario)));
	}
	let span: ChargeSpan | null = null;
	let spanStartS = 0;
	network.drive = (timeS) => {
		findDrive(scenario, leg, constants, startHour + timeS / S_PER_H, drive);
		for (let k = 0; k < updates.length; k++) updates[k]!();
		if (span) network.setCurrent(readCurrentA(span, timeS - spanStartS));
	};
	return {
		network,
		setSpan: (next, startS) => {
			span = next;
			spanStartS = startS;
		}
	};
}
