import { describe, expect, it } from 'vitest';
import { makeInvented } from '../../../../../tests/support/review';
import { makeCrew, useTestDatabase } from '../../../../../tests/support/services';
import {
	reviewFilterSchema,
	reviewListQuerySchema,
	reviewScopeSchema,
	type ReviewInstallation,
	type ReviewListQuery
} from '$lib/schemas/review';
import type { SignedInPerson } from '$lib/schemas/people';
import { VERDICTS } from '$lib/schemas/verdicts';
import {
	Acknowledgement,
	Assessment,
	AssessmentOutlook,
	FieldNote,
	FollowUp,
	Installation,
	Job,
	Mount,
	Place,
	Recommendation,
	Sheet
} from '../../db/models';
import { today } from '../days';
import { createOwnZone } from './own-zones';
import { listInstallations, walkInstallations } from './review-list';
import { reviewMap } from './review-map';
import { reviewTrends } from './review-trends';
import { reviewZones } from './review-zones';

useTestDatabase();

const LONG_MS = 300_000;
const DAY_MS = 86_400_000;
const FEW = 400;

/** One installation as it is counted by hand, from the tables that people write to. */
interface Counted {
	id: number;
	placeId: number;
	latitudeDeg: number;
	zone: string;
	verdict: string;
	fittedOn: string;
	chance: string;
	/** Summed day by day from the day of fitting to today. */
	predicted: number;
	predictedByMonth: Map<string, number>;
	dark: string[];
	isOverdue: boolean;
	isOverride: boolean;
	sheet: string;
}

const daysIn = (year: number, month: number): number => new Date(Date.UTC(year, month + 1, 0)).getUTCDate();

/** Day by day, each with its share of its month. */
function predictByHand(months: readonly { middle: number }[], fittedOn: string, now: string) {
	const byMonth = new Map<string, number>();
	for (let at = Date.parse(fittedOn); at <= Date.parse(now); at += DAY_MS) {
		const date = new Date(at);
		const [year, month] = [date.getUTCFullYear(), date.getUTCMonth()];
		const name = date.toISOString().slice(0, 7);
		byMonth.set(name, (byMonth.get(name) ?? 0) + months[month]!.middle / daysIn(year, month));
	}
	return byMonth;
}

/** Counts without any of the tables that the review keeps. */
async function countByHand(workshopId: number): Promise<Counted[]> {
	const where = { workshopId };
	const now = today();
	const [
		installations,
		mounts,
		jobs,
		places,
		assessments,
		outlooks,
		followUps,
		notes,
		recommendations,
		sheets
	] = await Promise.all([
		Installation.findAll({ where }),
		Mount.findAll({ where }),
		Job.findAll({ where }),
		Place.findAll({ where }),
		Assessment.findAll({ where }),
		AssessmentOutlook.findAll({ where }),
		FollowUp.findAll({ where }),
		FieldNote.findAll({ where }),
		Recommendation.findAll({ where }),
		Sheet.findAll({ where })
	]);
	const acknowledged = new Set(
		(await Acknowledgement.findAll({ where: { sheetId: sheets.map(({ id }) => id) } })).map(
			({ sheetId }) => sheetId
		)
	);
	const by = <T, K>(rows: T[], keyOf: (row: T) => K): Map<K, T> =>
		new Map(rows.map((row) => [keyOf(row), row]));
	const [mountOf, jobOf] = [by(mounts, ({ id }) => id), by(jobs, ({ id }) => id)];
	const [placeOf, assessmentOf] = [by(places, ({ id }) => id), by(assessments, ({ id }) => id)];
	const outlookOf = by(outlooks, ({ assessmentId }) => assessmentId);
	const recommendationOf = by(recommendations, ({ assessmentId }) => assessmentId);
	const sheetOf = by(sheets, ({ jobId }) => jobId);
	return installations.flatMap((installation): Counted[] => {
		const { id, fittedOn, assessmentId, jobId, mountId } = installation;
		if (mountOf.get(mountId)!.removedAt) return [];
		const place = placeOf.get(jobOf.get(jobId)!.placeId!)!;
		const { verdict, chemistry } = assessmentOf.get(assessmentId)!;
		const outlook = outlookOf.get(assessmentId);
		const chance = chemistry === 'lead-acid-agm' ? 'never' : outlook ? 'known' : 'unknown';
		const months = outlook?.outlook.year.months ?? [];
		const byMonth = chance === 'known' ? predictByHand(months, fittedOn, now) : new Map<string, number>();
		const sheet = sheetOf.get(jobId);
		const own = followUps.filter((each) => each.installationId === id);
		const dark = notes.filter((each) => each.installationId === id && each.kind === 'cut-out');
		return [
			{
				...{ id, fittedOn, verdict, chance, predictedByMonth: byMonth },
				...{ placeId: place.id, latitudeDeg: place.latitudeDeg, zone: place.climateZone },
				predicted: [...byMonth.values()].reduce((sum, days) => sum + days, 0),
				dark: [...new Set(dark.map(({ notedOn }) => notedOn))],
				isOverdue: own.some(({ doneOn, dueOn }) => doneOn === null && dueOn < now),
				isOverride: recommendationOf.get(assessmentId)!.againstVerdict,
				sheet: sheet ? (acknowledged.has(sheet.id) ? 'acknowledged' : 'waiting') : 'missing'
			}
		];
	});
}

const sum = (rows: readonly Counted[], read: (row: Counted) => number): number =>
	rows.reduce((total, row) => total + read(row), 0);

/** The figures as they have to be, but for the ratio. */
function figuresByHand(rows: readonly Counted[]) {
	const many = (holds: (row: Counted) => boolean): number => rows.filter(holds).length;
	const known = rows.filter(({ chance }) => chance === 'known');
	return {
		installations: rows.length,
		verdicts: Object.fromEntries(
			VERDICTS.map((verdict) => [verdict, many((row) => row.verdict === verdict)])
		),
		chance: {
			known: known.length,
			unknown: many(({ chance }) => chance === 'unknown'),
			never: many(({ chance }) => chance === 'never')
		},
		reportedDays: sum(known, ({ dark }) => dark.length),
		reportedElsewhere: sum(rows, ({ dark }) => dark.length) - sum(known, ({ dark }) => dark.length),
		overdue: many(({ isOverdue }) => isOverdue),
		overrides: many(({ isOverride }) => isOverride),
		sheetsWaiting: many(({ sheet }) => sheet === 'waiting'),
		sheetsMissing: many(({ sheet }) => sheet === 'missing')
	};
}

async function collect(
	person: SignedInPerson,
	query: Partial<ReviewListQuery>
): Promise<ReviewInstallation[]> {
	const rows: ReviewInstallation[] = [];
	let cursor: string | undefined;
	do {
		const page = await listInstallations(person, reviewListQuerySchema.parse({ ...query, cursor }));
		rows.push(...page.rows);
		expect(page.rows.length).toBeLessThanOrEqual(query.limit ?? 50);
		cursor = page.next ?? undefined;
		if (!cursor) expect(page.total).toBe(rows.length);
	} while (cursor);
	return rows;
}

describe('the review against a count by hand', () => {
	it.each([1, 2, 3])(
		'has the same figures in every zone, place, month and list: seed %i',
		async (seed) => {
			const person = await makeInvented(FEW, seed);
			const counted = await countByHand(person.workshopId);
			expect(counted.length).toBeGreaterThan(FEW * 0.97);
			const { rows, all } = await reviewZones(person, reviewFilterSchema.parse({}));
			expect(all).toMatchObject(figuresByHand(counted));
			// Millionths are rounded for each month of each installation.
			expect(all.predictedDays).toBeCloseTo(
				sum(counted, ({ predicted }) => predicted),
				2
			);
			expect(all.ratio!.value).toBeCloseTo(all.reportedDays / all.predictedDays, 9);
			expect(rows.map(({ zone }) => zone)).toEqual([...new Set(counted.map(({ zone }) => zone))].sort());
			for (const zone of rows) {
				const inZone = counted.filter((row) => row.zone === zone.zone);
				expect(zone).toMatchObject(figuresByHand(inZone));
				expect(zone.predictedDays).toBeCloseTo(
					sum(inZone, ({ predicted }) => predicted),
					2
				);
			}

			const { places } = await reviewMap(person, reviewFilterSchema.parse({}));
			for (const place of places) {
				const there = counted.filter(({ placeId }) => placeId === place.placeId);
				expect(place.installations).toBe(there.length);
				expect(place.goneDark).toBe(there.filter(({ dark }) => dark.length > 0).length);
			}
			expect(places.reduce((total, { installations }) => total + installations, 0)).toBe(counted.length);

			const { months } = await reviewTrends(person, reviewScopeSchema.parse({}));
			expect(months).toHaveLength(24);
			for (const { month, fitted, predictedDays, reportedDays } of months) {
				const then = counted.filter(({ fittedOn }) => fittedOn.startsWith(month));
				expect(VERDICTS.reduce((total, verdict) => total + fitted[verdict], 0)).toBe(then.length);
				expect(predictedDays).toBeCloseTo(
					sum(counted, (row) => row.predictedByMonth.get(month) ?? 0),
					2
				);
				const known = counted.filter(({ chance }) => chance === 'known');
				expect(reportedDays).toBe(sum(known, ({ dark }) => dark.filter((on) => on.startsWith(month)).length));
			}

			const listed = async (query: Partial<ReviewListQuery>) =>
				(await collect(person, { limit: 37, ...query })).map(({ installationId }) => installationId);
			const expected = (holds: (row: Counted) => boolean, direction: 1 | -1 = -1) =>
				counted
					.filter(holds)
					.sort(
						(a, b) => (a.fittedOn < b.fittedOn ? -1 : a.fittedOn > b.fittedOn ? 1 : a.id - b.id) * direction
					)
					.map(({ id }) => id);
			expect(await listed({})).toEqual(expected(() => true));
			expect(await listed({ sort: 'oldest' })).toEqual(expected(() => true, 1));
			expect(await listed({ zone: 'BWh' })).toEqual(expected(({ zone }) => zone === 'BWh'));
			expect(await listed({ list: 'overrides' })).toEqual(expected(({ isOverride }) => isOverride));
			expect(await listed({ list: 'waiting' })).toEqual(expected(({ sheet }) => sheet === 'waiting'));
			expect(await listed({ list: 'missing', verdict: 'rides-it-out' })).toEqual(
				expected(({ sheet, verdict }) => sheet === 'missing' && verdict === 'rides-it-out')
			);
			expect(await listed({ list: 'gone-dark' })).toEqual(expected(({ dark }) => dark.length > 0));
			const overdue = await listed({ list: 'overdue' });
			expect([...overdue].sort((a, b) => a - b)).toEqual(
				expected(({ isOverdue }) => isOverdue).sort((a, b) => a - b)
			);
			const since = `${Number(today().slice(0, 4)) - 1}-05`;
			expect(await listed({ since })).toEqual(expected(({ fittedOn }) => fittedOn >= since));
			expect(await listed({ until: since })).toEqual(
				expected(({ fittedOn }) => fittedOn.slice(0, 7) <= since)
			);
		},
		LONG_MS
	);

	it(
		'holds for zones of the shop’s own, whose order decides',
		async () => {
			const person = await makeInvented(FEW, 4);
			const tropics = { rule: 'latitude' as const, fromValue: -20, toValue: 20, placeIds: [] };
			const south = { rule: 'latitude' as const, fromValue: null, toValue: 0, placeIds: [] };
			const second = await createOwnZone(person, { name: 'South', position: 20, ...south });
			const first = await createOwnZone(person, { name: 'Tropics', position: 10, ...tropics });
			const counted = await countByHand(person.workshopId);
			const zoneOf = ({ latitudeDeg }: Counted): string =>
				latitudeDeg >= -20 && latitudeDeg < 20
					? String(first.id)
					: latitudeDeg < 0
						? String(second.id)
						: 'none';
			const { rows } = await reviewZones(person, reviewFilterSchema.parse({ kind: 'own' }));
			expect(rows.map(({ name }) => name)).toEqual(['Tropics', 'South', 'In none of your zones']);
			for (const zone of rows) {
				expect(zone).toMatchObject(figuresByHand(counted.filter((row) => zoneOf(row) === zone.zone)));
				const listed = await collect(person, { kind: 'own', zone: zone.zone, limit: 100 });
				expect(listed).toHaveLength(zone.installations);
				expect(new Set(listed.map((row) => row.zone))).toEqual(new Set([zone.zone]));
			}
		},
		LONG_MS
	);

	it('walks through a list in batches and meets each installation once', async () => {
		const person = await makeInvented(50, 5);
		const sizes: number[] = [];
		const ids: number[] = [];
		for await (const rows of walkInstallations(person, reviewListQuerySchema.parse({}), 20)) {
			sizes.push(rows.length);
			ids.push(...rows.map(({ installationId }) => installationId));
		}
		const all = await collect(person, {});
		expect(ids).toEqual(all.map(({ installationId }) => installationId));
		expect(Math.max(...sizes)).toBe(20);
	});
});

describe('who looks at the review', () => {
	it('is the manager, and of one workshop only', async () => {
		const { manager, installer, engineer, customer } = await makeCrew();
		const other = await makeInvented(20, 6);
		const filter = reviewFilterSchema.parse({});
		for (const person of [installer, engineer, customer])
			await expect(reviewZones(person, filter)).rejects.toMatchObject({ code: 'not_allowed' });
		expect((await reviewZones(manager, filter)).all.installations).toBe(0);
		const page = await listInstallations(other, reviewListQuerySchema.parse({ limit: 5 }));
		await expect(
			listInstallations(manager, reviewListQuerySchema.parse({ cursor: page.next }))
		).rejects.toMatchObject({ problems: [{ path: 'cursor' }] });
		const zone = { name: 'X', position: 1, rule: 'places', fromValue: null, toValue: null } as const;
		const [place] = await Place.findAll({ where: { workshopId: other.workshopId }, limit: 1 });
		await expect(createOwnZone(manager, { ...zone, placeIds: [place!.id] })).rejects.toMatchObject({
			problems: [{ path: 'placeIds' }]
		});
	});
});
