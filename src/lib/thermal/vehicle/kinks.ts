import { findRoots, readCubic } from '../solve/crossings';
import type { Step } from '../solve/stepper';
import type { Leg, Scenario } from '../types';

/** A step is to end this far beyond a kink, so that the next one begins on the other side, K. */
const BEYOND_K = 5e-4;
/** And it may end this far beyond. */
const FAR_BEYOND_K = 2e-3;

interface Kink {
	node: number;
	levelC: number;
}

/** Where a heat bends sharply with a temperature: a thermostat that begins or ends to open, cooling that sets in. */
export class Kinks {
	private readonly engine: number;
	private readonly enclosure: number;
	private kinks: readonly Kink[] = [];

	constructor(names: readonly string[]) {
		this.engine = names.indexOf('engine');
		this.enclosure = names.indexOf('enclosure');
	}

	startLeg({ engine, enclosure }: Scenario, leg: Leg): void {
		this.kinks = [
			{ node: this.engine, levelC: engine.thermostatOpen },
			{ node: this.engine, levelC: engine.thermostatFull },
			{ node: this.enclosure, levelC: enclosure.coolSet }
		].filter(({ node }) => leg.engineOn && (node !== this.enclosure || enclosure.coolGain > 0));
	}

	/** The first place in a step where one is passed; null when none is. */
	readonly findFirst = (step: Step): number | null => {
		let first: number | null = null;
		for (let k = 0; k < this.kinks.length; k++) {
			const kink = this.kinks[k]!;
			const before = step.from[kink.node]! - kink.levelC;
			const after = step.to[kink.node]! - kink.levelC;
			if (before < 0 === after < 0 || Math.abs(after) < FAR_BEYOND_K || Math.abs(before) < FAR_BEYOND_K)
				continue;
			const place = findPassage(step, kink, Math.sign(after - before));
			if (place !== null && (first === null || place < first)) first = place;
		}
		return first;
	};
}

function findPassage(step: Step, { node, levelC }: Kink, direction: number): number | null {
	const [place] = findRoots(readCubic(step, node), levelC + direction * BEYOND_K);
	return place ?? null;
}
