export type Derivative = (timeS: number, state: readonly number[]) => number[];

/** A piece of the solution that can be read anywhere inside. */
export interface Piece {
	fromS: number;
	toS: number;
	read: (timeS: number) => number[];
}

/** Integrates from one instant to another and hands out pieces in order until `take` says stop. */
export type ReferenceIntegrator = (
	derivative: Derivative,
	fromS: number,
	state: readonly number[],
	toS: number,
	take: (piece: Piece) => 'go on' | 'stop'
) => void;
