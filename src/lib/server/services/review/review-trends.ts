import { QueryTypes } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { ReviewScope, ReviewTrends } from '$lib/schemas/review';
import { connection } from '../../db/connection';
import { allow } from '../../policies';
import { today } from '../days';
import { listMonths, monthOf, monthsBefore, predictInMonth } from './predicted-days';
import { listCohorts, listCounts, storedZone } from './read-sums';
import { countVerdicts } from './review-zones';

/** So many months, that of today included. */
const MONTHS_SHOWN = 24;

/** Days reported dark by month, of the installations whose chance is known. */
async function countReported(
	workshopId: number,
	scope: ReviewScope,
	from: string
): Promise<Map<string, number>> {
	const { kind, zone, place, verdict, since, until } = scope;
	const conditions = ['d.workshop_id = :workshopId', 'd.dark_on >= :from'];
	if (zone !== undefined)
		conditions.push(
			`${kind === 'own' ? 'p.own_zone_id' : 'COALESCE(p.computed_zone, p.climate_zone)'} = :zone`
		);
	if (place !== undefined) conditions.push('d.place_id = :place');
	if (verdict !== undefined) conditions.push('d.verdict = :verdict');
	if (since !== undefined) conditions.push('d.fitted_on >= :since');
	if (until !== undefined) conditions.push('d.fitted_on <= LAST_DAY(:until)');
	const rows = await connection().query<{ month: string; days: number }>(
		`SELECT LEFT(d.dark_on, 7) AS month, COUNT(*) AS days
			FROM review_dark_days d LEFT JOIN places p ON p.id = d.place_id
			WHERE ${conditions.join(' AND ')} GROUP BY month`,
		{
			replacements: {
				...{ workshopId, place, verdict, from: `${from}-01` },
				zone: zone === undefined ? undefined : storedZone(kind, zone),
				since: since && `${since}-01`,
				until: until && `${until}-01`
			},
			type: QueryTypes.SELECT
		}
	);
	return new Map(rows.map(({ month, days }) => [month, Number(days)]));
}

/** Month by month: what was fitted, and how many dark days were predicted and reported. */
export async function reviewTrends(person: SignedInPerson, scope: ReviewScope): Promise<ReviewTrends> {
	allow(person, 'review.read');
	const { workshopId } = person;
	const now = today();
	const from = monthsBefore(monthOf(now), MONTHS_SHOWN - 1);
	const [counts, cohorts, reported] = await Promise.all([
		listCounts(workshopId, scope, 'month'),
		listCohorts(workshopId, scope, 'nothing'),
		countReported(workshopId, scope, from)
	]);
	return {
		on: now,
		months: listMonths(from, monthOf(now)).map((month) => ({
			month,
			fitted: countVerdicts(counts.filter(({ group }) => group.startsWith(month))),
			predictedDays: cohorts.reduce((total, cohort) => total + predictInMonth(cohort, month, now), 0),
			reportedDays: reported.get(month) ?? 0
		}))
	};
}
