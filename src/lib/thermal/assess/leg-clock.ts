import { describeVehicle } from '../vehicle/describe-vehicle';
import { emptyDrive, findDrive, findLegConstants, type Drive, type LegConstants } from '../vehicle/leg-drive';
import { DRIVEN } from '../vehicle/network-table';
import type { Leg, MinuteSeries, NodeName, Scenario } from '../types';
import { pickBattery, type BatteryNetwork, type Moment } from './battery-network';

const findRoadK = DRIVEN['local air']!;

interface TimedLeg {
	leg: Leg;
	constants: LegConstants;
	fromMin: number;
	network: BatteryNetwork;
}

/** Knows, for each minute of a run, which leg's network holds and how warm everything around the battery is. */
export class LegClock {
	private readonly legs: TimedLeg[];
	private readonly drive: Drive = emptyDrive();
	private at = 0;

	constructor(
		private readonly scenario: Scenario,
		private readonly minutes: MinuteSeries
	) {
		let fromMin = 0;
		this.legs = scenario.legs.map((leg) => {
			const constants = findLegConstants(scenario, leg);
			const drive = findDrive(scenario, leg, constants, scenario.start.hour, this.drive);
			const timed = {
				leg,
				constants,
				fromMin,
				network: pickBattery(describeVehicle(scenario, leg, constants, drive, 0))
			};
			fromMin += leg.minutes;
			return timed;
		});
	}

	/** The battery's network in the leg that runs at this minute. */
	networkAt(minute: number): BatteryNetwork {
		return this.legAt(minute).network;
	}

	/** Temperatures between one grid point and the next, or at a grid point when `share` is 0. */
	momentAt(gridPoint: number, share: number): Moment {
		const { scenario, minutes, drive } = this;
		const { leg, constants } = this.legAt(gridPoint + share);
		// The ground matters to few positions, and what drives it takes longer to find than all the rest.
		if (scenario.position.roadUplift > 0) {
			findDrive(scenario, leg, constants, minutes.startHour + (gridPoint + share) / 60, drive);
		}
		const mix = (series: Float64Array): number => {
			const before = series[gridPoint]!;
			return share === 0 ? before : before + share * (series[gridPoint + 1]! - before);
		};
		return {
			ambientC: mix(minutes.ambient),
			roadK: findRoadK(drive, scenario),
			tempOf: (node) => mix(minutes.nodes[node as NodeName])
		};
	}

	private legAt(minute: number): TimedLeg {
		const { legs } = this;
		while (this.at > 0 && minute < legs[this.at]!.fromMin) this.at--;
		while (this.at + 1 < legs.length && minute >= legs[this.at + 1]!.fromMin) this.at++;
		return legs[this.at]!;
	}
}
