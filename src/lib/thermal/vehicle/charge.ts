import { expOf } from '../solve/elementary';
import type { Leg, Scenario } from '../types';

const S_PER_H = 3600;

/** A span over which the battery current is constant or falls exponentially. */
export interface ChargeSpan {
	/** At the start of the span, A, positive charging. */
	currentA: number;
	/** Current and distance from full both fall as exp(−decay t), 1/s; 0: the current is constant. */
	decayPerS: number;
	socAtStart: number;
	capacityAh: number;
	/** How long the span lasts unless a leg or a latch ends it, s. */
	lastsS: number;
	/** State of charge exactly at that end. */
	socAtEnd: number;
	/** What the charger would give but for the open charge latch, A. */
	refusedA: number;
}

/** What flows from now on, as long as the leg and the latches stay as they are. */
export function planChargeSpan(
	{ charger, battery }: Pick<Scenario, 'charger' | 'battery'>,
	leg: Leg,
	soc: number,
	latches: { chargeOpen: boolean; dischargeOpen: boolean }
): ChargeSpan {
	const { maxA, taperSoc } = charger;
	const { capacityAh } = battery;
	const still: ChargeSpan = {
		currentA: 0,
		decayPerS: 0,
		socAtStart: soc,
		capacityAh,
		lastsS: Infinity,
		socAtEnd: soc,
		refusedA: 0
	};
	const spareA = (leg.engineOn ? maxA : 0) - leg.loadA;
	if (spareA < 0) {
		if (latches.dischargeOpen || soc <= 0) return still;
		return { ...still, currentA: spareA, lastsS: (soc * S_PER_H * capacityAh) / -spareA, socAtEnd: 0 };
	}
	if (spareA === 0) return still;
	const onsetSoc = 1 - ((1 - taperSoc) * spareA) / maxA;
	const taperedA = (maxA * (1 - soc)) / (1 - taperSoc);
	if (latches.chargeOpen) return { ...still, refusedA: Math.min(spareA, taperedA) };
	if (soc < onsetSoc) {
		return {
			...still,
			currentA: spareA,
			lastsS: ((onsetSoc - soc) * S_PER_H * capacityAh) / spareA,
			socAtEnd: onsetSoc
		};
	}
	if (soc >= 1) return still;
	return { ...still, currentA: taperedA, decayPerS: maxA / ((1 - taperSoc) * S_PER_H * capacityAh) };
}

/** Battery current `afterS` seconds into the span, A. */
export function readCurrentA(span: ChargeSpan, afterS: number): number {
	return span.decayPerS === 0 ? span.currentA : span.currentA * expOf(-span.decayPerS * afterS);
}

/** State of charge `afterS` seconds into the span, 0…1. */
export function readSoc(span: ChargeSpan, afterS: number): number {
	if (afterS >= span.lastsS) return span.socAtEnd;
	const soc =
		span.decayPerS === 0
			? span.socAtStart + (span.currentA * afterS) / (S_PER_H * span.capacityAh)
			: 1 - (1 - span.socAtStart) * expOf(-span.decayPerS * afterS);
	return Math.min(Math.max(soc, 0), 1);
}

/**
 * What a battery would have taken in a while, as the charger and its own taper allow; nothing where loads take more.
 *
 * @returns the state of charge that it would have come to
 */
export function fillUp(
	scenario: Pick<Scenario, 'charger' | 'battery'>,
	leg: Leg,
	soc: number,
	lastedS: number
): number {
	let reached = soc;
	let leftS = lastedS;
	while (leftS > 0) {
		const span = planChargeSpan(scenario, leg, reached, { chargeOpen: false, dischargeOpen: true });
		if (span.currentA <= 0) break;
		reached = readSoc(span, Math.min(leftS, span.lastsS));
		leftS -= span.lastsS;
	}
	return reached;
}

const S_PER_MIN = 60;

/** Writes state of charge and current on whole minutes, from `minute` up to, but not at, `last`. */
export function fillCharge(
	span: ChargeSpan,
	spanStartS: number,
	soc: Float64Array,
	currentA: Float64Array,
	minute: number,
	last: number
): void {
	// Within a span of constant current both are straight lines, and what leaves 0…1 is at its end.
	if (span.decayPerS === 0 && (last - 1) * S_PER_MIN - spanStartS < span.lastsS) {
		const perMinute = (span.currentA * S_PER_MIN) / (S_PER_H * span.capacityAh);
		const atZero = span.socAtStart - (perMinute * spanStartS) / S_PER_MIN;
		for (let at = minute; at < last; at++) {
			soc[at] = atZero + perMinute * at;
			currentA[at] = span.currentA;
		}
		return;
	}
	// A decaying current falls by the same factor each minute.
	const eachMinute = expOf(-span.decayPerS * S_PER_MIN);
	let left = expOf(-span.decayPerS * (minute * S_PER_MIN - spanStartS));
	for (let at = minute; at < last; at++) {
		const afterS = at * S_PER_MIN - spanStartS;
		soc[at] = span.decayPerS === 0 ? readSoc(span, afterS) : 1 - (1 - span.socAtStart) * left;
		currentA[at] = span.currentA * left;
		left *= eachMinute;
	}
}
