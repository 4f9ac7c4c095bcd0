import { requirePositive } from '../correlations/require';
import { normalQuantile, sampleQuantile, scrambledSobolPoint } from '../statistics';
import { checkTest, toReferenceTemperature, type CapacityTest } from './capacity-tests';

/** How a capacity falls: by as much each year, or ever more slowly, with the square root of time. */
export const TREND_LAWS = ['linear', 'square-root'] as const;
export type TrendLaw = (typeof TREND_LAWS)[number];

const TIME_OF: Readonly<Record<TrendLaw, (years: number) => number>> = {
	linear: (years) => years,
	'square-root': (years) => Math.sqrt(years)
};
const YEARS_OF: Readonly<Record<TrendLaw, (time: number) => number>> = {
	linear: (time) => time,
	'square-root': (time) => time * time
};

/** A test is right to this share of the capacity, and a new battery holds its rated capacity to this: judgement. */
const TEST_SIGMA = 0.02;
const NEW_SIGMA = 0.05;
/** Nothing is held to be known of the yearly loss but that it is no more than a few tenths. */
const LOSS_SIGMA = 0.3;
/** Twice the logarithm of how much better one law fits: from here on the tests tell them apart (19 of 20). */
const TOLD_APART_FROM = 3.84;
const LONGEST_YEARS = 30;
const DRAWS = 1024;
const EDGE = 0.05;

/** Years; null beyond thirty. */
export interface YearsRange {
	low: number | null;
	middle: number | null;
	high: number | null;
}

export interface Projection {
	law: TrendLaw;
	/** Share of the rated capacity when new, and lost by the first year. */
	newShare: number;
	firstYearLoss: number;
	/** Σ of squared misfits, in standard deviations. */
	misfit: number;
	points: { years: number; low: number; middle: number; high: number }[];
	toEightyPercent: YearsRange;
	/** To the capacity that was named. */
	toNamed: YearsRange | null;
}

export interface CapacityTrend {
	/** At 25 °C, in the order of time. */
	tests: { years: number; capacityAh: number }[];
	projections: Projection[];
	/** The one to go by, and whether the tests themselves tell it. */
	honest: TrendLaw;
	toldByTests: boolean;
}

interface Posterior {
	mean: readonly [number, number];
	/** Lower triangle of the Cholesky factor of the covariance. */
	root: readonly [number, number, number];
	misfit: number;
}

/** y = y0 − b·t with normal errors and normal priors: the posterior is normal and in closed form. */
function fitLine(times: readonly number[], shares: readonly number[]): Posterior {
	const weight = 1 / TEST_SIGMA ** 2;
	let [a, b, d] = [1 / NEW_SIGMA ** 2, 0, 1 / LOSS_SIGMA ** 2];
	let [p, q] = [1 / NEW_SIGMA ** 2, 0];
	times.forEach((time, at) => {
		a += weight;
		b -= weight * time;
		d += weight * time * time;
		p += weight * shares[at]!;
		q -= weight * time * shares[at]!;
	});
	const determinant = a * d - b * b;
	const mean = [(d * p - b * q) / determinant, (a * q - b * p) / determinant] as const;
	const [variance0, covariance, variance1] = [d / determinant, -b / determinant, a / determinant];
	const root0 = Math.sqrt(variance0);
	const root10 = covariance / root0;
	const misfit = times.reduce(
		(sum, time, at) => sum + weight * (shares[at]! - mean[0] + mean[1] * time) ** 2,
		((mean[0] - 1) / NEW_SIGMA) ** 2 + (mean[1] / LOSS_SIGMA) ** 2
	);
	return { mean, root: [root0, root10, Math.sqrt(Math.max(variance1 - root10 * root10, 0))], misfit };
}

/** Lines that the tests leave possible; none of them gains capacity with time. */
function drawLines({ mean, root }: Posterior): { newShare: number; loss: number }[] {
	return Array.from({ length: DRAWS }, (_, draw) => {
		const [u = 0.5, v = 0.5] = scrambledSobolPoint(draw, 2, 1);
		const [z0, z1] = [normalQuantile(u), normalQuantile(v)];
		return { newShare: mean[0] + root[0] * z0, loss: Math.max(mean[1] + root[1] * z0 + root[2] * z1, 0) };
	});
}

function rangeOf(years: readonly number[]): YearsRange {
	const at = (share: number): number | null => {
		const value = sampleQuantile(years, share);
		return value <= LONGEST_YEARS ? value : null;
	};
	return { low: at(EDGE), middle: at(0.5), high: at(1 - EDGE) };
}

function project(
	law: TrendLaw,
	tests: CapacityTrend['tests'],
	ratedAh: number,
	namedAh: number | null
): Projection {
	const timeOf = TIME_OF[law];
	const posterior = fitLine(
		tests.map(({ years }) => timeOf(years)),
		tests.map(({ capacityAh }) => capacityAh / ratedAh)
	);
	const lines = drawLines(posterior);
	const yearsTo = (share: number): YearsRange =>
		rangeOf(
			lines.map(({ newShare, loss }) => {
				const time = Math.max(newShare - share, 0) / Math.max(loss, 1e-9);
				return Math.min(YEARS_OF[law](time), 10 * LONGEST_YEARS);
			})
		);
	const points = Array.from({ length: 11 }, (_, years) => {
		const shares = lines.map(({ newShare, loss }) => Math.max(newShare - loss * timeOf(years), 0));
		const [low, middle, high] = [EDGE, 0.5, 1 - EDGE].map((share) => sampleQuantile(shares, share));
		return { years, low: low!, middle: middle!, high: high! };
	});
	return {
		...{ law, points, misfit: posterior.misfit },
		newShare: posterior.mean[0],
		firstYearLoss: posterior.mean[1],
		toEightyPercent: yearsTo(0.8),
		toNamed: namedAh === null ? null : yearsTo(namedAh / ratedAh)
	};
}

/** Where the tests do not tell the laws apart, the one that gets to 80 % first is gone by. */
function chooseHonest(projections: readonly Projection[]): Pick<CapacityTrend, 'honest' | 'toldByTests'> {
	const [best, other] = [...projections].sort((a, b) => a.misfit - b.misfit);
	if (other!.misfit - best!.misfit >= TOLD_APART_FROM) return { honest: best!.law, toldByTests: true };
	const yearsOf = ({ toEightyPercent }: Projection) => toEightyPercent.middle ?? Infinity;
	const [first] = [...projections].sort((a, b) => yearsOf(a) - yearsOf(b));
	return { honest: first!.law, toldByTests: false };
}

/**
 * What capacity tests say of the years to come.
 *
 *     y = y0 − b t   or   y = y0 − b √t,   y: share of the rated capacity at 25 °C;  y0 ~ N(1, 0.05), b ~ N(0, 0.3), b ≥ 0
 *
 * @param tests at least one, in any order; years since fitted, Ah, A, V, °C
 * @param ratedAh rated capacity, Ah
 * @param options whether the battery is lead-acid; a capacity that the customer needs, Ah, or null
 * @returns both laws with nine-in-ten ranges, and which of them to go by: the one that fits better where the tests tell,
 *   otherwise the one that comes to 80 % first
 * @throws EngineInputError for a test or a capacity that cannot be
 * Validity: no sudden failure, much the same use from year to year; ranges beyond thirty years are not given.
 * Source: Bayesian linear regression with known errors (Bishop, Pattern Recognition and Machine Learning, 2006, section 3.3);
 * the two laws are those of cycle and calendar ageing in the literature; the errors of 2 % and 5 % are judgement.
 * @example
 * const test = { years: 2, capacityAh: 90, currentA: 5, cutOffV: 10.8, tempC: 25 };
 * projectCapacity([test], 100, { isLeadAcid: false, namedAh: null }).toldByTests; // false
 */
export function projectCapacity(
	tests: readonly CapacityTest[],
	ratedAh: number,
	{ isLeadAcid, namedAh }: { isLeadAcid: boolean; namedAh: number | null }
): CapacityTrend {
	requirePositive({ ratedAh, tests: tests.length, ...(namedAh === null ? {} : { namedAh }) });
	for (const test of tests) checkTest(test);
	const corrected = tests
		.map((test) => ({ years: test.years, capacityAh: toReferenceTemperature(test, isLeadAcid) }))
		.sort((a, b) => a.years - b.years);
	const projections = TREND_LAWS.map((law) => project(law, corrected, ratedAh, namedAh));
	return { tests: corrected, projections, ...chooseHonest(projections) };
}
