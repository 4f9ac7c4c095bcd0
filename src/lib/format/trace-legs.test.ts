import { describe, expect, it } from 'vitest';
import type { TraceLeg } from '../thermal/traces';
import { editLegs, legsOfDraft, listLegProblems, maySplit, minutesInto, roomOf } from './trace-legs';

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

describe('legs that come back from a form', () => {
	const BOXES = {
		...{ 'legs.0.endMin': '20', 'legs.0.kind': 'driving', 'legs.0.speedKmh': '60' },
		...{ 'legs.1.endMin': '70', 'legs.1.kind': 'driving', 'legs.1.speedKmh': '' },
		...{ 'legs.2.endMin': '120', 'legs.2.kind': 'stopped', 'legs.2.speedKmh': '' }
	};
	const draftOf = (changes: Record<string, string>) => ({ ...BOXES, ...changes });

	it('are those of the boxes, with what they were known by where they are the same', () => {
		expect(legsOfDraft(BOXES, LEGS)).toMatchObject([
			{ startS: 120, endS: 1320, kind: 'driving', meanSpeedKmh: 60, why: '' },
			{ startS: 1320, endS: 4320, kind: 'driving', meanSpeedKmh: null },
			{ startS: 4320, endS: 7320, kind: 'stopped', why: 'seen' }
		]);
		expect(listLegProblems(BOXES, LEGS)).toEqual([]);
	});

	it('keep their order where an end cannot be, which is told with its box, and all of it at once', () => {
		const draft = draftOf({ 'legs.0.endMin': '2000', 'legs.1.speedKmh': 'fast', startHour: 'noon' });
		const legs = legsOfDraft(draft, LEGS);
		expect(legs.map(({ startS, endS }) => endS - startS >= 60)).toEqual([true, true, true]);
		expect(legs.at(-1)!.endS).toBe(7320);
		expect(listLegProblems(draft, LEGS).map(({ path }) => path)).toEqual([
			...['startHour', 'legs.0.endMin', 'legs.1.speedKmh']
		]);
		expect(listLegProblems(draftOf({ 'legs.1.endMin': '' }), LEGS)).toMatchObject([
			{ path: 'legs.1.endMin', message: expect.stringContaining('is no minute from') as string }
		]);
	});

	it('are those that are known where there are more boxes than minutes, or none', () => {
		const many = Object.fromEntries(Array.from({ length: 200 }, (_, at) => [`legs.${at}.endMin`, `${at}`]));
		expect(legsOfDraft(many, LEGS)).toEqual(LEGS);
		expect(legsOfDraft({}, LEGS)).toEqual(LEGS);
	});
});
