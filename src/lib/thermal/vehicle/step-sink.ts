import type { Step } from '../solve/stepper';
import type { Bms } from './bms';
import type { ChargeSpan } from './charge';

/** The current that flows and the latches as they stand while steps are taken. */
export interface Standing {
	span: ChargeSpan;
	spanStartS: number;
	bms: Bms;
}

/** What becomes of the steps of a run. */
export interface StepSink {
	/** A step with the whole minutes in it: from `minute` up to, but not at, `last` (none when they are the same). */
	takeStep(step: Step, standing: Standing, minute: number, last: number): void;
	/** The grid points that are left at the very end. */
	takeEnd(temps: Float64Array, standing: Standing, minute: number): void;
}
