import { describe, expect, it } from 'vitest';
import type { FieldNoteView } from '$lib/schemas/field-notes';
import { presentNote } from './field-reports';

const days = (middle: number, high = middle) => ({ low: 0, middle, high });
const belief = (year: ReturnType<typeof days>, headroomMiddleK: number) => ({
	...{ year: { year }, cutOutShare: 0.05, headroomMiddleK },
	...{ headroomLowK: headroomMiddleK - 5, headroomHighK: headroomMiddleK + 5 }
});

/** A label read on a mount, with what was believed before and after; no more than its report looks at. */
function reportOf(before: ReturnType<typeof belief>, after: ReturnType<typeof belief>) {
	const learning = {
		...{ fits: true, unknowns: [], before, after },
		...{ samples: 512, seed: 1, effectiveSamples: 90 }
	};
	const data = { kind: 'peak-label', place: 'case', turnedC: 60, notTurnedC: 65, hottestDayC: 40 };
	const note = {
		...{ id: 1, kind: 'peak-label', notedOn: '2026-02-01', notedBy: 'Ida Fenn', data, struck: null },
		...{ restsOnStruck: null, doubts: 0, judgedBy: { battery: 'Cindervale Ridge 4', otherwise: [] } },
		finding: { cause: null, learning }
	};
	return presentNote(note as unknown as FieldNoteView).learning!;
}

describe('what a reading changed', () => {
	it('is said as the figures beside it show it', () => {
		const { sentence, rows } = reportOf(belief(days(0.4), 10.9), belief(days(0.1), 5.1));
		expect(rows[0]).toMatchObject({ before: 'fewer than 1 day', after: 'fewer than 1 day' });
		expect(sentence).toBe(
			'With this about as many dark days as before are to be expected, with less headroom.'
		);
	});

	it.each([
		['more dark days than', 4, 9],
		['fewer dark days than', 9, 4],
		['about as many dark days as', 9, 9.2]
	])('is %s before where the days go from one to the other', (words, was, is) => {
		const { sentence } = reportOf(belief(days(was, 30), 3), belief(days(is, 30), 3));
		expect(sentence).toBe(`With this ${words} before are to be expected.`);
	});
});
