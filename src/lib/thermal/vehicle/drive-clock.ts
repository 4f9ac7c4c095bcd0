import { INSTANTS, planSlots, SLOPE } from '../network/step-generator/slots';
import { expOf } from '../solve/elementary';
import { readCurrentA, type ChargeSpan } from './charge';
import { emptyDrive, findFuelRegime, findUnlitDrive, type Drive } from './leg-drive';
import { nextAirBendHour, SAME_INSTANT_S } from './measured-course';
import { DRIVEN, SUNLIT, type Setting } from './network-table';
import { CELLS_PER_H, findSunPlace, readSunShape, readSunSlopePerH } from './sun-shape';
import { shapeVehicle } from './vehicle-shape';

const S_PER_H = 3600;
const KINK_HALVINGS = 40;

type Reader = (typeof DRIVEN)[string];

function readersOf(sunlit: boolean): Reader[] {
	return Object.entries(DRIVEN).flatMap(([name, read]) => (SUNLIT.has(name) === sunlit ? [read] : []));
}

const BENT = readersOf(false);
const LIT = readersOf(true);
/** The places are the same with a shield and without. */
const PLACES = planSlots(shapeVehicle(false)).driven;
const FIRST_BENT = Math.min(...PLACES.bent.values());
const FIRST_LIT = Math.min(...PLACES.lit.values());

/**
 * What the clock drives, for the instants at which a step looks.
 *
 * Within an hour of a leg the air's temperature is a straight line, and what follows from it bends so little that the
 * parabola through both ends and the middle has it to a millionth; the sun is read from its own cubics, the current is in closed form.
 */
export class DriveClock {
	/** What a generated step reads, in the places of its plan. */
	readonly values = new Float64Array(PLACES.size);
	/** Until when the parabolas hold, s. */
	segmentEndS = 0;
	private segmentStartS = 0;
	private startHour = 0;
	private setting!: Setting;
	private span!: ChargeSpan;
	private spanStartS = 0;
	private isLit = false;
	/** Where the step starts: the sun's place among its cells, and the current, A. */
	private sunPlace = 0;
	private stepStartA = 0;
	private readonly drive: Drive = emptyDrive();

	/** From `timeS` on this leg runs. */
	startLeg(setting: Setting, timeS: number): void {
		this.setting = setting;
		this.startHour = setting.scenario.start.hour;
		this.drive.sunWPerM2 = setting.scenario.climate.sunPeak;
		this.isLit = false;
		for (let k = 0; k < LIT.length; k++) {
			const peak = LIT[k]!(this.drive, setting.scenario);
			this.values[FIRST_LIT + k] = peak;
			if (peak !== 0) this.isLit = true;
		}
		this.values.fill(0, PLACES.signal, PLACES.signal + SLOPE + 1);
		this.segmentEndS = timeS;
	}

	/** From `startS` on this current flows. */
	setSpan(span: ChargeSpan, startS: number): void {
		this.span = span;
		this.spanStartS = startS;
		this.values.fill(span.currentA, PLACES.current, PLACES.current + SLOPE);
		this.values[PLACES.current + SLOPE] = 0;
	}

	/** Works out the parabolas from `timeS` to the next whole hour, or to where the engine's load comes to its limits. */
	enterSegment(timeS: number): void {
		const { setting, drive, values, startHour } = this;
		const hour = startHour + timeS / S_PER_H;
		const endHour = this.findKink(hour, nextAirBendHour(setting.scenario, hour));
		this.segmentStartS = timeS;
		this.segmentEndS = (endHour - startHour) * S_PER_H;
		const length = this.segmentEndS - timeS;
		const { scenario, leg, constants } = setting;
		for (let point = 0; point < 3; point++) {
			findUnlitDrive(scenario, leg, constants, hour + (point / 2) * (endHour - hour), drive);
			for (let k = 0; k < BENT.length; k++) values[FIRST_BENT + 3 * k + point] = BENT[k]!(drive, scenario);
		}
		for (let at = FIRST_BENT; at < FIRST_BENT + 3 * BENT.length; at += 3) {
			const start = values[at]!;
			const middle = values[at + 1]!;
			const end = values[at + 2]!;
			values[at + 1] = (4 * middle - 3 * start - end) / length;
			values[at + 2] = (2 * (start + end - 2 * middle)) / (length * length);
		}
	}

	/** Where within the hour the fuel power comes to idle or to its rating; the end of the hour when nowhere. */
	private findKink(fromHour: number, toHour: number): number {
		const { scenario, leg, constants } = this.setting;
		const regimeAt = (hour: number) => findFuelRegime(scenario, leg, constants, hour);
		if (!leg.engineOn || constants.speedMPerS === 0) return toHour;
		const regime = regimeAt(fromHour + SAME_INSTANT_S / S_PER_H);
		if (regimeAt(toHour) === regime) return toHour;
		let low = fromHour;
		let high = toHour;
		for (let halving = 0; halving < KINK_HALVINGS; halving++) {
			const middle = (low + high) / 2;
			if (regimeAt(middle) === regime) low = middle;
			else high = middle;
		}
		return high;
	}

	/** Writes what holds at the start of a step. */
	fillStart(timeS: number): void {
		const { values } = this;
		values[PLACES.elapsed] = timeS - this.segmentStartS;
		if (this.isLit) {
			this.sunPlace = findSunPlace(this.startHour + timeS / S_PER_H);
			values[PLACES.signal] = readSunShape(this.sunPlace);
			values[PLACES.signal + SLOPE] = readSunSlopePerH(this.sunPlace) / S_PER_H;
		}
		const { decayPerS } = this.span;
		if (decayPerS === 0) return;
		this.stepStartA = readCurrentA(this.span, timeS - this.spanStartS);
		values[PLACES.current] = this.stepStartA;
		values[PLACES.current + SLOPE] = -decayPerS * this.stepStartA;
	}

	/** Writes what the stages of the step find at their instants. */
	fillStages(lengthS: number): void {
		const { values, isLit, span } = this;
		values[PLACES.length] = lengthS;
		if (isLit) {
			const cells = (lengthS / S_PER_H) * CELLS_PER_H;
			for (let k = 1; k < INSTANTS.length; k++) {
				values[PLACES.signal + k] = readSunShape(this.sunPlace + INSTANTS[k]! * cells);
			}
		}
		if (span.decayPerS === 0) return;
		for (let k = 1; k < INSTANTS.length; k++) {
			values[PLACES.current + k] = this.stepStartA * expOf(-span.decayPerS * INSTANTS[k]! * lengthS);
		}
	}
}
