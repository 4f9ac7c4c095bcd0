import { CompiledNetwork } from '../network/compile-network';
import type { Leg, Scenario } from '../types';
import { readCurrentA, type ChargeSpan } from './charge';
import { describeVehicle, DRIVEN } from './describe-vehicle';
import { emptyDrive, findDrive, findLegConstants, type Drive } from './leg-drive';

const S_PER_H = 3600;

/** The network of a scenario, laid out once: legs and currents come and go on it. */
export interface VehicleSystem {
	network: CompiledNetwork;
	/** From here on this leg runs. */
	startLeg: (leg: Leg) => void;
	/** From `spanStartS` on this current flows. */
	setSpan: (span: ChargeSpan, spanStartS: number) => void;
}

type Reader = (drive: Drive, scenario: Scenario) => number;

/** One row for each value that the clock drives: how it is worked out, and where it goes. */
function listDriven(network: CompiledNetwork): { read: Reader; set: (value: number) => void }[] {
	const parts = Object.entries({ ...DRIVEN.links, ...DRIVEN.sources });
	return [
		...Object.entries(DRIVEN.temps).map(([name, read]) => {
			const node = network.indexOf(name);
			return { read, set: (value: number) => network.setFixedTemp(node, value) };
		}),
		...parts.map(([name, read]) => {
			const place = network.placeOf(name);
			return { read, set: (value: number) => network.setCoefficient(place, value) };
		}),
		...Object.entries(DRIVEN.mixes).map(([name, read]) => {
			const mix = network.mixOf(name);
			return { read, set: (value: number) => network.setMixOffset(mix, value) };
		})
	];
}

/** Lays out the network with its first leg and ties to the clock what the clock drives. */
export function compileVehicle(scenario: Scenario, firstLeg: Leg): VehicleSystem {
	const startHour = scenario.start.hour;
	const drive = emptyDrive();
	let leg = firstLeg;
	let constants = findLegConstants(scenario, leg);
	let span: ChargeSpan | null = null;
	let spanStartS = 0;
	let drivenS = NaN;

	const describe = () => {
		findDrive(scenario, leg, constants, startHour, drive);
		return describeVehicle(scenario, leg, constants, drive, 0);
	};
	const network = new CompiledNetwork(describe());
	const driven = listDriven(network);
	network.drive = (timeS) => {
		// Several stages of a step look at the same instant.
		if (timeS === drivenS) return;
		drivenS = timeS;
		findDrive(scenario, leg, constants, startHour + timeS / S_PER_H, drive);
		for (let k = 0; k < driven.length; k++) driven[k]!.set(driven[k]!.read(drive, scenario));
		if (span) network.setCurrent(readCurrentA(span, timeS - spanStartS));
	};
	return {
		network,
		startLeg: (next) => {
			drivenS = NaN;
			leg = next;
			constants = findLegConstants(scenario, leg);
			network.take(describe());
		},
		setSpan: (next, startS) => {
			drivenS = NaN;
			span = next;
			spanStartS = startS;
		}
	};
}
