/**
 * What the integrator needs to know of a system of heat balances C dT/dt = H(t, T).
 *
 * Temperatures in °C, heats in W, capacities in J/K, time in s.
 */
export interface HeatSystem {
	/** Number of temperatures that are solved for. */
	readonly size: number;
	readonly capacityJPerK: Float64Array;
	/** Where H depends on a temperature: [row, column] pairs. */
	readonly pattern: readonly (readonly [number, number])[];
	/** Brings everything that is prescribed in time to this instant. */
	setTime(timeS: number): void;
	/** Writes H at the instant last set. */
	sumHeats(temps: Float64Array, heats: Float64Array): void;
	/** Writes dH/dT, row by row, at the instant last set. */
	fillJacobian(temps: Float64Array, jacobian: Float64Array): void;
	/** Writes, for each node, the sum of the sizes of all heats at the temperatures last summed. */
	sumThroughput(throughput: Float64Array): void;
}
