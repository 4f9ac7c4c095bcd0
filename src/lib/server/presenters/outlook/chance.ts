import { formatKelvin, formatNumber } from '$lib/format/numbers';
import type { ChanceReport } from '$lib/schemas/outlook-reports';
import type { DaySpread } from '$lib/thermal/outlook';
import { sayDaysLikeThis, sayOfTwenty, type EventWords } from '$lib/format/outlook-words';

const TWENTY = 20;

const ofTwenty = (share: number): string => formatNumber(TWENTY * share, 1);

function sayInterval({ shareInterval, samples }: DaySpread): string {
	const range = `Between ${ofTwenty(shareInterval.low)} and ${ofTwenty(shareInterval.high)} of 20`;
	return `${range}, as far as ${samples} drawn days can tell. What the model itself gets wrong is not in this range.`;
}

function sayHeadroom({ headroomLowK, headroomMiddleK, headroomHighK }: DaySpread): string {
	const range = `between ${formatKelvin(headroomLowK)} and ${formatKelvin(headroomHighK)}`;
	return `Headroom on such days: ${formatKelvin(headroomMiddleK)} in the middle, nine days in ten ${range}.`;
}

/** How sure the answer is, and how that settled as more days were drawn. */
export function presentChance(day: DaySpread, { happens }: EventWords): ChanceReport {
	const { cutOutShare, samples, seed, convergence } = day;
	return {
		ofTwenty: Math.round(TWENTY * cutOutShare),
		sentence: `${sayDaysLikeThis(cutOutShare)} ${happens}.`,
		value: sayOfTwenty(cutOutShare),
		interval: sayInterval(day),
		headroom: sayHeadroom(day),
		band: 'Half of all days like this lie in the darker part of the band, nine in ten in the lighter part.',
		settled: convergence.map((point) => ({
			draws: String(point.samples),
			chance: `${ofTwenty(point.cutOutShare)} of 20`,
			headroom: formatKelvin(point.middleHeadroomK)
		})),
		method: `${samples} days were drawn with the seed ${seed}: everything that nobody measured spread about its estimate, each day run to its end. The same seed gives the same digits.`
	};
}
