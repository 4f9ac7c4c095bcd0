import { joinWords } from '$lib/format/join-words';
import { formatKelvin, formatNumber, formatPercent } from '$lib/format/numbers';
import type { MeasureReport, UnknownReport } from '$lib/schemas/outlook-reports';
import type { DaySpread, Influence, Influences } from '$lib/thermal/outlook';
import { sayShare } from '$lib/format/outlook-words';

/** At least and at most so many are told first. */
const FEWEST = 3;
const MOST = 5;
/** From this share on an unknown is worth telling first. */
const SHARE_THAT_COUNTS = 0.08;

function presentUnknown({ label, totalEffect, standardError, measure, basis }: Influence): UnknownReport {
	const share = Math.min(Math.max(totalEffect, 0), 1);
	return {
		...{ label, measure, basis, share },
		words: sayShare(share),
		figure: `${formatPercent(totalEffect)} ± ${formatNumber(100 * standardError, 1)}`
	};
}

/** The few unknowns that make the answer uncertain: what to measure first. */
export function presentMeasure(
	{ ranking, evaluations, seed }: Influences,
	{ headroomLowK, headroomHighK }: Pick<DaySpread, 'headroomLowK' | 'headroomHighK'>
): MeasureReport {
	const strong = ranking.filter(({ totalEffect }) => totalEffect >= SHARE_THAT_COUNTS).length;
	const count = Math.min(Math.max(strong, FEWEST), MOST);
	const unknowns = ranking.map(presentUnknown);
	const first = unknowns.slice(0, count);
	return {
		sentence: `Nine days in ten have a headroom within ${formatKelvin(headroomHighK - headroomLowK)} of each other. Most of that is ${joinWords(first.map(({ label }) => label))}.`,
		first,
		rest: unknowns.slice(count),
		method: `Share of the spread that would go if that one thing were known, with its standard error, in percent; what two things do together counts for both. From ${evaluations} runs with the seed ${seed}.`
	};
}
