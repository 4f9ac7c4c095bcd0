import { secondsOfLocal } from './civil';

/** Offsets of zones change on quarters of an hour. */
const SLOT_S = 900;
const DAY_S = 86_400;

function makeFormat(timeZone: string): Intl.DateTimeFormat {
	const two = '2-digit';
	return new Intl.DateTimeFormat('en-GB', {
		...{ timeZone, hourCycle: 'h23', calendar: 'gregory', numberingSystem: 'latn' },
		...{ year: 'numeric', month: two, day: two, hour: two, minute: two, second: two }
	});
}

/**
 * Whether the machine knows a time zone of this name.
 *
 * @param timeZone anything; a name is a text
 * @returns true for an IANA name, or another that the machine takes for one
 * Validity: depends on the time zone database that the machine has.
 * Source: IANA time zone database, as the machine's own clock knows it.
 * @example
 * isTimeZone('Australia/Darwin'); // true
 * isTimeZone('Nowhere/Else'); // false
 */
export function isTimeZone(timeZone: unknown): boolean {
	if (typeof timeZone !== 'string' || timeZone === '') return false;
	try {
		return makeFormat(timeZone) !== null;
	} catch {
		return false;
	}
}

/** What a quarter of an hour of local time can mean: its offsets from UTC, the earlier instant first. */
interface LocalSlot {
	kind: 'plain' | 'fold' | 'gap';
	offsetS: number;
	laterOffsetS: number;
}

/**
 * Turns local times of one zone into seconds since 1970 UTC, through the hours that come twice and those that never come.
 *
 * An hour that comes twice (a fold): of its two instants the one nearer to where the next row was to be expected is taken, the
 * first where there is none before. A time that never comes (a gap) is read with the offset from before the gap. Both are counted.
 *
 * Validity: from 1980 on, zones whose offset is a whole number of quarter hours.
 * Source: RFC 5545 (2009) 3.3.5 for gaps; the offsets are those of the IANA time zone database that the machine has.
 * @example
 * const clock = new ZoneClock('Europe/Paris');
 * clock.toUtcS(secondsOfLocal(2024, 3, 31, 2.5 * 3600)) === secondsOfLocal(2024, 3, 31, 1.5 * 3600); // true
 * clock.gapRows; // 1
 */
export class ZoneClock {
	foldRows = 0;
	gapRows = 0;
	private readonly format: Intl.DateTimeFormat;
	private readonly offsets = new Map<number, number>();
	private readonly slots = new Map<number, LocalSlot>();
	private lastNumber = NaN;
	private lastSlot: LocalSlot = { kind: 'plain', offsetS: 0, laterOffsetS: 0 };
	private beforeS = NaN;
	private readonly steps: [number, number] = [0, 0];

	constructor(readonly timeZone: string) {
		this.format = makeFormat(timeZone);
	}

	/** Local time less UTC at an instant, s. */
	offsetAt(utcS: number): number {
		const slot = Math.floor(utcS / SLOT_S);
		let offsetS = this.offsets.get(slot);
		if (offsetS === undefined) {
			offsetS = this.askOffset(slot * SLOT_S);
			this.offsets.set(slot, offsetS);
		}
		return offsetS;
	}

	/** Seconds since 1970 UTC of a local time, itself given as seconds as if it were UTC. */
	toUtcS(localS: number): number {
		const number = Math.floor(localS / SLOT_S);
		if (number !== this.lastNumber) {
			this.lastSlot = this.slotAt(number);
			this.lastNumber = number;
		}
		const { kind, offsetS, laterOffsetS } = this.lastSlot;
		let utcS = localS - offsetS;
		if (kind === 'gap') this.gapRows++;
		if (kind === 'fold') {
			this.foldRows++;
			const laterS = localS - laterOffsetS;
			const expectedS = this.beforeS + Math.min(...this.steps);
			if (Math.abs(laterS - expectedS) < Math.abs(utcS - expectedS)) utcS = laterS;
		}
		this.follow(utcS);
		return utcS;
	}

	/** Keeps the last two steps forward: the shorter is the logger's own, the longer may be a silence. */
	private follow(utcS: number): void {
		if (utcS > this.beforeS) {
			this.steps[0] = this.steps[1];
			this.steps[1] = utcS - this.beforeS;
		}
		this.beforeS = utcS;
	}

	private slotAt(number: number): LocalSlot {
		let slot = this.slots.get(number);
		if (slot === undefined) {
			slot = this.findSlot(number * SLOT_S);
			this.slots.set(number, slot);
		}
		return slot;
	}

	private findSlot(localS: number): LocalSlot {
		const before = this.offsetAt(localS - DAY_S);
		const after = this.offsetAt(localS + DAY_S);
		const beforeHolds = this.offsetAt(localS - before) === before;
		const afterHolds = this.offsetAt(localS - after) === after;
		if (before !== after && beforeHolds && afterHolds) {
			return { kind: 'fold', offsetS: Math.max(before, after), laterOffsetS: Math.min(before, after) };
		}
		const offsetS = !beforeHolds && afterHolds ? after : before;
		return { kind: beforeHolds || afterHolds ? 'plain' : 'gap', offsetS, laterOffsetS: offsetS };
	}

	private askOffset(utcS: number): number {
		// By name: in which order a machine writes them is its own affair.
		const parts = this.format.formatToParts(utcS * 1000).map(({ type, value }) => [type, Number(value)]);
		const { year, month, day, hour, minute, second } = Object.fromEntries(parts) as Record<string, number>;
		return secondsOfLocal(year!, month!, day!, hour! * 3600 + minute! * 60 + second!) - utcS;
	}
}
