import { KELVIN_AT_ZERO_C } from '../correlations/radiation';

const REFERENCE_K = 298.15;

/** How far a thermostat stands open at a temperature, 0…1. */
export function readOpening({ openC, fullC }: { openC: number; fullC: number }, tempC: number): number {
	return Math.min(Math.max((tempC - openC) / (fullC - openC), 0), 1);
}

/** R(T)/R(25 °C) = exp(a (1/T̃ − 1/298.15)). */
export function readResistanceFactor(activationK: number, tempC: number): number {
	if (activationK === 0) return 1;
	return Math.exp(activationK * (1 / (tempC + KELVIN_AT_ZERO_C) - 1 / REFERENCE_K));
}
