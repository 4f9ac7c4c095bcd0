import type { FitChannel } from './trace';
import type { Noises } from './noise';
import { zeros, type Rows } from './small-matrices';
import type { Sensitivities } from './trace-problem';

/** Readings of which it is asked what they tell: those of a row of a trace, at these places. */
export interface Asked {
	trace: number;
	channel: FitChannel;
	row: number;
	at: Int32Array;
}

/**
 * What readings tell of the parameters.
 *
 *     Iₐᵦ = Σ sₐ sᵦ / (σ² τ),   s = ∂T/∂p
 *
 * @param asked readings
 * @param sensitivities by parameter and trace, K per standard deviation of the prior
 * @param noises what a reading of each channel is worth
 * @returns rows of the Fisher information of the data alone
 */
export function informationOf(
	asked: readonly Asked[],
	sensitivities: Sensitivities,
	noises: Noises
): number[][] {
	const count = sensitivities.length;
	const matrix = zeros(count);
	for (const { trace, channel, row, at } of asked) {
		const worth = noises[channel]!.informationPerK2;
		const columns = sensitivities.map((byTrace) => byTrace[trace]?.[row] ?? null);
		for (let a = 0; a < count; a++) {
			for (let b = 0; b <= a; b++) {
				const [left, right] = [columns[a], columns[b]];
				if (!left || !right) continue;
				let sum = 0;
				for (const place of at) sum += left[place]! * right[place]!;
				matrix[a]![b]! += worth * sum;
				if (a !== b) matrix[b]![a]! += worth * sum;
			}
		}
	}
	return matrix;
}

/** What a parameter's column and a change of the air tell together: Σ s g / (σ² τ), one number a parameter. */
export function pullOf(
	asked: readonly Asked[],
	sensitivities: Sensitivities,
	ofTrace: number,
	changed: readonly Float64Array[],
	noises: Noises
): number[] {
	return sensitivities.map((byTrace) => {
		let pull = 0;
		for (const { trace, channel, row, at } of asked) {
			const column = byTrace[trace]?.[row];
			if (trace !== ofTrace || !column) continue;
			let sum = 0;
			for (const place of at) sum += column[place]! * changed[row]![place]!;
			pull += noises[channel]!.informationPerK2 * sum;
		}
		return pull;
	});
}

/** The information of data and of priors whose standard deviations are 1. */
export function withPriorInformation(data: Rows): number[][] {
	return data.map((row, a) => row.map((value, b) => value + (a === b ? 1 : 0)));
}
