import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import { expOf } from '../solve/elementary';

const REFERENCE_K = 298.15;

/** The nearest value within 0…1. */
export function clampToUnit(value: number): number {
	return value > 0 ? (value < 1 ? value : 1) : 0;
}

/** How far a thermostat stands open at a temperature, 0…1. */
export function readOpening({ openC, fullC }: { openC: number; fullC: number }, tempC: number): number {
	return clampToUnit((tempC - openC) / (fullC - openC));
}

/** R(T)/R(25 °C) = exp(a (1/T̃ − 1/298.15)). */
export function readResistanceFactor(activationK: number, tempC: number): number {
	if (activationK === 0) return 1;
	return expOf(activationK * (1 / (tempC + KELVIN_AT_ZERO_C) - 1 / REFERENCE_K));
}

/** Beyond this the series is not close enough. */
const NEAR = 0.1;

/** e^x to 2e-9 by its series near 0, which is where the temperatures of a step are; elsewhere by the function itself. */
export function growNear(x: number): number {
	if (x > NEAR || x < -NEAR) return expOf(x);
	return 1 + x * (1 + x * (1 / 2 + x * (1 / 6 + x * (1 / 24 + x / 120))));
}
