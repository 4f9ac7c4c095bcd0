import { Integrator, type Failure, type Reached } from '../solve/integrator';
import type { Step } from '../solve/stepper';
import type { Leg, Scenario } from '../types';
import { Bms, type PlannedChange } from './bms';
import { fillUp, planChargeSpan, readSoc } from './charge';
import { findLegConstants } from './leg-drive';
import { Kinks } from './kinks';
import { measureSpan, outsideTempC } from './measured-course';
import { countMinutes } from './minute-record';
import type { Standing, StepSink } from './step-sink';
import { VehicleStepper } from './vehicle-stepper';

const S_PER_H = 3600;
const S_PER_MIN = 60;
/** Two instants nearer than this are one, s. */
const SAME_INSTANT_S = 1e-6;
/** The most that is suggested for the first step after a sudden change, s. */
const FIRST_STEP_S = 8;
/** After a latch only the current is another, which moves nothing so fast. */
const AFTER_LATCH_S = 60;
/** A decaying current is followed from its onset with steps of this share of its time constant. */
const DECAY_SHARE = 0.25;
/** At a whole hour the air's slope changes: the next step takes this share of what was suggested. */
const AT_HOUR = 0.7;
/** The most that is suggested after a thermostat has begun or ended to open, s. */
const AFTER_KINK_S = 15;
const MOST_STEPS = 400_000;

/**
 * Error allowed in one step, K: the hot nodes are felt by the battery only through what they give; the cells move so
 * slowly that a hundredth of a kelvin would be many seconds in the time of an event.
 */
const TOLERANCE_K: Partial<Record<string, number>> = {
	engine: 0.02,
	exhaust: 0.05,
	bay: 0.05,
	bonnet: 0.02,
	cells: 0.001
};
const BATTERY_TOLERANCE_K = 0.01;

const SENSOR_NODES = { cells: ['cells'], board: ['board'], hotter: ['cells', 'board'] } as const;
const CLOSED = { chargeOpen: false, dischargeOpen: false };

/** Runs scenarios through all their legs, one after the other on the same memory. */
export class VehicleRun {
	readonly stepper: VehicleStepper;
	readonly integrator: Integrator;
	readonly temps: Float64Array;
	soc = 0;
	/** What the charger would have put in while the charge latch was open, Ah. */
	refusedAh = 0;
	/** The same for a battery that fills up and tapers meanwhile: what it could not have held is not missed, Ah. */
	missedAh = 0;
	/** What it would hold beyond what it does, since the charge latch opened, 0…1. */
	private missedSoc = 0;
	timeS = 0;
	bms!: Bms;
	private scenario!: Scenario;
	private sink!: StepSink;
	private standing!: Standing;
	private legEndS = 0;
	private nextMinute = 0;
	private minuteCount = 0;
	private spanMinute = 0;
	private pending: readonly PlannedChange[] = [];
	private readonly kinks: Kinks;

	/**
	 * @param account whether to sum the heats along the way
	 * @param toleranceShare how much of the error that is allowed to a step is made use of
	 */
	constructor(shielded: boolean, account: boolean, toleranceShare = 1) {
		this.stepper = new VehicleStepper(shielded, account);
		const { names } = this.stepper;
		const toleranceK = Float64Array.from(
			names,
			(name) => toleranceShare * (TOLERANCE_K[name] ?? BATTERY_TOLERANCE_K)
		);
		this.kinks = new Kinks(names);
		this.integrator = new Integrator(this.stepper, {
			toleranceK,
			mostSteps: MOST_STEPS,
			findBend: this.kinks.findFirst,
			afterBendS: AFTER_KINK_S
		});
		this.temps = new Float64Array(names.length);
	}

	/** Runs one scenario, whose shield is there or not as this run was made for; null, or why it was given up. */
	run(scenario: Scenario, sink: StepSink): Failure | null {
		this.begin(scenario, sink);
		for (const leg of scenario.legs) {
			const failure = this.runLeg(leg);
			if (failure) return failure;
		}
		return this.end();
	}

	/** The same, leg by leg: of a trace of weeks nothing else would get its turn for as long as a whole run takes. */
	*runByLegs(scenario: Scenario, sink: StepSink): Generator<void, Failure | null> {
		this.begin(scenario, sink);
		for (const leg of scenario.legs) {
			const failure = this.runLeg(leg);
			if (failure) return failure;
			yield;
		}
		return this.end();
	}

	hourAt(timeS: number): number {
		return this.scenario.start.hour + timeS / S_PER_H;
	}

	private begin(scenario: Scenario, sink: StepSink): void {
		const { start, legs, bms, measured } = scenario;
		this.scenario = scenario;
		this.sink = sink;
		this.soc = start.soc;
		this.refusedAh = 0;
		this.missedAh = 0;
		this.missedSoc = 0;
		this.timeS = 0;
		this.legEndS = 0;
		this.nextMinute = 0;
		this.minuteCount = countMinutes(scenario);
		this.stepper.reset();
		this.integrator.reset();
		this.temps.fill(outsideTempC(scenario, start.hour));
		const { names } = this.stepper;
		for (const [name, startC] of Object.entries(measured?.startC ?? {})) {
			if (names.includes(name)) this.temps[names.indexOf(name)] = startC;
		}
		this.bms = new Bms(
			bms,
			SENSOR_NODES[bms.sensor].map((name) => names.indexOf(name))
		);
		this.standing = {
			span: planChargeSpan(scenario, legs[0]!, start.soc, CLOSED),
			spanStartS: 0,
			...CLOSED
		};
		this.bms.settle(0, this.hourAt(0), this.temps);
	}

	/** Runs to the end of the next leg, span by span of the battery's current. */
	private runLeg(leg: Leg): Failure | null {
		const { scenario } = this;
		this.legEndS += leg.minutes * S_PER_MIN;
		this.stepper.startLeg({ scenario, leg, constants: findLegConstants(scenario, leg) }, this.timeS);
		this.kinks.startLeg(scenario, leg);
		this.integrator.restart(FIRST_STEP_S);
		do {
			this.beginSpan(leg);
			const failure = this.runSpan(this.legEndS);
			if (failure) return failure;
			this.endSpan(leg);
		} while (this.timeS < this.legEndS);
		return null;
	}

	private end(): null {
		this.noteLatches();
		this.sink.takeEnd(this.temps, this.standing, this.nextMinute);
		return null;
	}

	private beginSpan(leg: Leg): void {
		const { standing, scenario } = this;
		this.noteLatches();
		const planned = planChargeSpan(scenario, leg, this.soc, standing);
		const current = scenario.measured?.current;
		const span = current ? measureSpan(current, planned, this.timeS) : planned;
		standing.span = span;
		standing.spanStartS = this.timeS;
		this.spanMinute = this.nextMinute;
		this.stepper.clock.setSpan(span, this.timeS);
		if (span.decayPerS > 0) this.integrator.restart(DECAY_SHARE / span.decayPerS);
	}

	private noteLatches(): void {
		this.standing.chargeOpen = this.bms.isOpen('charge');
		this.standing.dischargeOpen = this.bms.isOpen('discharge');
	}

	private endSpan(leg: Leg): void {
		const { span, spanStartS, chargeOpen } = this.standing;
		const lastedS = this.timeS - spanStartS;
		// A span shorter than a rounding error of the clock still ends where it ends, or it would begin again for ever.
		this.soc = this.timeS >= spanStartS + span.lastsS ? span.socAtEnd : readSoc(span, lastedS);
		this.refusedAh += (span.refusedA * lastedS) / S_PER_H;
		if (chargeOpen) this.countMissed(leg, lastedS);
		else this.missedSoc = 0;
		this.sink.takeStanding?.(this.standing, this.spanMinute, this.nextMinute);
	}

	private countMissed(leg: Leg, lastedS: number): void {
		const { scenario } = this;
		const would = Math.min(this.soc + this.missedSoc, 1);
		const gained = fillUp(scenario, leg, would, lastedS) - would;
		this.missedSoc += gained;
		this.missedAh += gained * scenario.battery.capacityAh;
	}

	/** Runs until the leg or the span ends or a latch moves; where the air's slope changes is a stop too. */
	private runSpan(legEndS: number): Failure | null {
		const { clock } = this.stepper;
		const spanEndS = Math.min(legEndS, this.standing.spanStartS + this.standing.span.lastsS);
		while (this.timeS < spanEndS) {
			if (this.timeS >= clock.segmentEndS - SAME_INSTANT_S) {
				clock.enterSegment(this.timeS);
				this.integrator.ease(AT_HOUR);
			}
			const reached = this.advance(Math.min(spanEndS, clock.segmentEndS, this.bms.nextDeadlineS()));
			if (reached === 'failed') return this.integrator.failure;
			if (reached === 'stop' && this.applyPending()) return null;
			if (this.bms.settle(this.timeS, this.hourAt(this.timeS), this.temps)) {
				this.integrator.restart(AFTER_LATCH_S);
				return null;
			}
		}
		return null;
	}

	private advance(endS: number): Reached {
		if (endS - this.timeS <= SAME_INSTANT_S) {
			this.timeS = endS;
			return 'end';
		}
		const reached = this.integrator.advance(this.timeS, endS, this.temps, this.watch, this.accept);
		this.timeS = this.integrator.timeS;
		return reached;
	}

	private readonly watch = (step: Step): number | null => {
		const found = this.bms.findChange(step);
		if (!found) return null;
		this.pending = found.changes;
		return found.share;
	};

	private readonly accept = (step: Step): void => {
		const endS = step.timeS + step.lengthS;
		const last = Math.min(Math.ceil(endS / S_PER_MIN), this.minuteCount);
		this.sink.takeStep(step, this.standing, this.nextMinute, Math.max(last, this.nextMinute));
		this.nextMinute = Math.max(last, this.nextMinute);
	};

	private applyPending(): boolean {
		let moved = false;
		for (const { latch, change } of this.pending) {
			moved = this.bms.apply(latch, change, this.timeS, this.hourAt(this.timeS)) || moved;
		}
		if (moved) this.integrator.restart(AFTER_LATCH_S);
		return moved;
	}
}

/** Why a run was given up, in words. */
export const FAILURE_WORDS: Record<Failure, string> = {
	impossible_temperature:
		'A temperature left every possible range: the fields describe more heat than can get away.',
	step_too_small: 'The temperatures change too fast to be followed.',
	too_many_steps: `The day needs more than ${MOST_STEPS} steps: a latch or a temperature moves too often.`
};
