import { describe, expect, it } from 'vitest';
import type { TraceLeg } from '../thermal/traces';
import { editLegs, maySplit, minutesInto, roomOf } from './trace-legs';

const leg = (startS: number, endS: number, kind: TraceLeg['kind'] = 'stopped'): TraceLeg => ({
	...{ startS, endS, kind, meanSpeedKmh: null, why: 'seen' }
});
/** Begins on no hour, as traces do. */
const LEGS = [leg(120, 720), leg(720, 4320, 'driving'), leg(4320, 7320)];

describe('legs under hand', () => {
	it('share a boundary, which moves by whole minutes and stops a minute before the next', () => {
		const moved = editLegs(LEGS, { kind: 'move', at: 0, toS: 1000 });
		expect([moved[0]!.endS, moved[1]!.startS]).toEqual([1020, 1020]);
		expect(editLegs(LEGS, { kind: 'move', at: 0, toS: 99_999 })[0]!.endS).toBe(4260);
		expect(editLegs(LEGS, { kind: 'move', at: 0, toS: -5 })[0]!.endS).toBe(180);
		expect(roomOf(LEGS, 0)).toEqual({ lowS: 180, highS: 4260 });
	});

	it('are split in their middle, joined, and called something else', () => {
		expect(editLegs(LEGS, { kind: 'split', at: 1 }).map(({ endS }) => endS)).toEqual([720, 2520, 4320, 7320]);
		expect(editLegs(LEGS, { kind: 'join', at: 0 })).toMatchObject([{ endS: 4320, kind: 'driving' }, {}]);
		expect(editLegs(LEGS, { kind: 'be', at: 0, state: 'driving' })[0]).toMatchObject({
			...{ kind: 'driving', why: 'set by hand' }
		});
		expect(editLegs(LEGS, { kind: 'be', at: 1, state: 'driving' })).toEqual(LEGS);
		expect(editLegs(LEGS, { kind: 'drive', at: 1, speedKmh: 70 })[1]!.meanSpeedKmh).toBe(70);
	});

	it('stay as they are where nothing can be done', () => {
		const short = [leg(0, 60)];
		expect(maySplit(short[0]!)).toBe(false);
		for (const edit of [
			{ kind: 'split', at: 0 },
			{ kind: 'join', at: 0 },
			{ kind: 'move', at: 0, toS: 30 },
			{ kind: 'join', at: 7 }
		] as const)
			expect(editLegs(short, edit)).toEqual(short);
	});

	it('count their minutes from the start of the trace', () => {
		expect(minutesInto(LEGS, LEGS[1]!.endS)).toBe(70);
	});
});
