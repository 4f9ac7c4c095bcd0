import type { Step } from '../solve/stepper';
import type { ChargeSpan } from './charge';

/** The current that flows and the latches as they stand, from one change of either to the next. */
export interface Standing {
	span: ChargeSpan;
	spanStartS: number;
	chargeOpen: boolean;
	dischargeOpen: boolean;
}

/**
 * What becomes of the steps of a run. Whole minutes are given from `minute` up to, but not at, `last`; there are none
 * when the two are the same.
 */
export interface StepSink {
	/** A step with the whole minutes in it. */
	takeStep(step: Step, standing: Standing, minute: number, last: number): void;
	/** All the steps since the current or a latch was another, with the whole minutes in them. */
	takeStanding?(standing: Standing, minute: number, last: number): void;
	/** The grid points that are left at the very end. */
	takeEnd(temps: Float64Array, standing: Standing, minute: number): void;
}
