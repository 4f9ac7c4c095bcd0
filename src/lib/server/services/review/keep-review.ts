import { QueryTypes, type Transaction } from 'sequelize';
import { connection } from '../../db/connection';
import { inTransaction } from '../../db/transaction';
import { refreshChecks } from '../accuracy/keep-checks';
import { isUnstruck } from '../field-standing';
import { findingBy, isOtherwise } from '../judged-notes';
import {
	readRow,
	ROW_COLUMNS,
	rowValues,
	SUM_COLUMNS,
	SUM_KEYS,
	summarise,
	sumsOf,
	type ReviewRow,
	type ReviewSource,
	type StoredRow
} from './review-row';

/** So many are read and written at a time. */
const BATCH = 500;

/** The recommendation that it is held against, and the newest page of what was agreed that still stands. */
const SOURCES = `
	SELECT i.id AS installationId, i.workshop_id AS workshopId, i.mount_id AS mountId, i.job_id AS jobId,
		i.assessment_id AS assessmentId, CAST(i.fitted_on AS CHAR) AS fittedOn, a.verdict, a.chemistry,
		COALESCE(j.place_id, 0) AS placeId, COALESCE(p.computed_zone, p.climate_zone, '') AS zone,
		COALESCE(p.own_zone_id, 0) AS ownZoneId,
		(SELECT CAST(MIN(f.due_on) AS CHAR) FROM follow_ups f
			WHERE f.installation_id = i.id AND f.done_on IS NULL) AS nextDueOn,
		r.id AS recommendationId, COALESCE(r.against_verdict OR r.against_maker, 0) AS againstVerdict,
		(SELECT MAX(s.id) FROM sheets s JOIN recommendations sr ON sr.id = s.recommendation_id
			WHERE s.job_id = i.job_id AND sr.assessment_id = i.assessment_id AND s.withdrawn_at IS NULL) AS sheetId,
		EXISTS (SELECT 1 FROM sheets s JOIN recommendations sr ON sr.id = s.recommendation_id
			JOIN acknowledgements k ON k.sheet_id = s.id
			WHERE s.job_id = i.job_id AND sr.assessment_id = i.assessment_id) AS isAcknowledged
	FROM installations i
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		JOIN assessments a ON a.id = i.assessment_id
		JOIN jobs j ON j.id = i.job_id
		LEFT JOIN places p ON p.id = j.place_id
		LEFT JOIN recommendations r ON r.id = i.recommendation_id
	WHERE i.id IN (:ids)
`;

/** Read with a lock: an outlook that is being stored now is waited for, not missed. */
const OUTLOOKS = `
	SELECT assessment_id AS assessmentId, JSON_EXTRACT(outlook, '$.year.months[*].middle') AS expectedDays
	FROM assessment_outlooks WHERE assessment_id IN (:ids) LOCK IN SHARE MODE
`;

/** Nothing is taken off that cannot be judged: not held against anything, or against what was not fitted. */
const DARK_DAYS = `
	SELECT n.installation_id AS installationId, CAST(n.noted_on AS CHAR) AS darkOn,
		MAX(COALESCE(JSON_VALUE(${findingBy('n', 'i')}, '$.cause.finding'), '') <> 'not-explained'
			OR ${isOtherwise('i')}) AS isHeat
	FROM field_notes n JOIN installations i ON i.id = n.installation_id
	WHERE n.installation_id IN (:ids) AND n.kind = 'cut-out' AND ${isUnstruck('n')}
	GROUP BY n.installation_id, n.noted_on ORDER BY n.noted_on
`;

async function select<Row extends object>(
	sql: string,
	replacements: Record<string, unknown>,
	transaction: Transaction
): Promise<Row[]> {
	return connection().query<Row>(sql, { replacements, transaction, type: QueryTypes.SELECT });
}

async function run(
	sql: string,
	replacements: Record<string, unknown>,
	transaction: Transaction
): Promise<void> {
	await connection().query(sql, { replacements, transaction });
}

type BareSource = Omit<ReviewSource, 'expectedDays' | 'darkDays' | 'againstVerdict' | 'isAcknowledged'> & {
	assessmentId: number;
	againstVerdict: number;
	isAcknowledged: number;
};

const parsed = (json: unknown): number[] | null =>
	(typeof json === 'string' ? (JSON.parse(json) as number[] | null) : (json as number[] | null)) ?? null;

/** Everything that a row is made of, from the tables that it summarises. */
async function readSources(ids: readonly number[], transaction: Transaction): Promise<ReviewSource[]> {
	const bare = await select<BareSource>(SOURCES, { ids }, transaction);
	if (bare.length === 0) return [];
	const assessmentIds = bare.map(({ assessmentId }) => assessmentId);
	const outlooks = await select<{ assessmentId: number; expectedDays: unknown }>(
		OUTLOOKS,
		{ ids: assessmentIds },
		transaction
	);
	const expectedOf = new Map(outlooks.map((row) => [row.assessmentId, parsed(row.expectedDays)]));
	const dark = await select<{ installationId: number; darkOn: string; isHeat: number }>(
		DARK_DAYS,
		{ ids },
		transaction
	);
	const darkOf = new Map<number, { on: string; isHeat: boolean }[]>();
	for (const { installationId, darkOn, isHeat } of dark) {
		const day = { on: darkOn, isHeat: Number(isHeat) === 1 };
		darkOf.set(installationId, [...(darkOf.get(installationId) ?? []), day]);
	}
	return bare.map(({ assessmentId, ...source }) => ({
		...source,
		againstVerdict: Number(source.againstVerdict) === 1,
		isAcknowledged: Number(source.isAcknowledged) === 1,
		expectedDays: expectedOf.get(assessmentId) ?? null,
		darkDays: darkOf.get(source.installationId) ?? []
	}));
}

const setAll = (columns: readonly string[], value: (column: string) => string): string =>
	columns.map((column) => `${column} = ${value(column)}`).join(', ');

const WRITE_ROWS = `
	INSERT INTO review_rows (${ROW_COLUMNS.join(', ')}) VALUES :rows
	ON DUPLICATE KEY UPDATE ${setAll(ROW_COLUMNS.slice(1), (column) => `VALUES(${column})`)}
`;
const ADD_SUMS = `
	INSERT INTO review_months (${[...SUM_KEYS, ...SUM_COLUMNS].join(', ')}) VALUES :rows
	ON DUPLICATE KEY UPDATE ${setAll(SUM_COLUMNS, (column) => `${column} + VALUES(${column})`)}
`;
const WRITE_DARK_DAYS = `
	INSERT INTO review_dark_days (installation_id, dark_on, workshop_id, place_id, verdict, fitted_on) VALUES :rows
`;

/** What the sums change by when some rows go and others come. */
function changeOfSums(gone: readonly ReviewRow[], come: readonly ReviewRow[]): unknown[][] {
	const changes = new Map<string, { key: (string | number)[]; sums: number[] }>();
	const add = (row: ReviewRow, sign: 1 | -1): void => {
		const { key, sums } = sumsOf(row);
		const name = key.join('|');
		const change = changes.get(name) ?? { key, sums: sums.map(() => 0) };
		changes.set(name, { key, sums: change.sums.map((sum, at) => sum + sign * sums[at]!) });
	};
	for (const row of gone) add(row, -1);
	for (const row of come) add(row, 1);
	return [...changes.values()]
		.filter(({ sums }) => sums.some((sum) => sum !== 0))
		.map(({ key, sums }) => [...key, ...sums]);
}

async function writeDarkDays(
	ids: readonly number[],
	sources: readonly ReviewSource[],
	rows: readonly ReviewRow[],
	transaction: Transaction
): Promise<void> {
	await run('DELETE FROM review_dark_days WHERE installation_id IN (:ids)', { ids }, transaction);
	const days = rows.flatMap(({ installationId, workshopId, placeId, verdict, fittedOn, chance }, at) =>
		chance === 'known'
			? sources[at]!.darkDays.map(({ on }) => [installationId, on, workshopId, placeId, verdict, fittedOn])
			: []
	);
	if (days.length > 0) await run(WRITE_DARK_DAYS, { rows: days }, transaction);
}

/** Writes the rows of these installations anew from what they summarise, and lets the sums follow. */
async function refreshBatch(ids: readonly number[], transaction: Transaction): Promise<void> {
	const stored = await select<StoredRow>(
		'SELECT * FROM review_rows WHERE installation_id IN (:ids)',
		{ ids },
		transaction
	);
	const sources = await readSources(ids, transaction);
	const rows = sources.map(summarise);
	const standing = new Set(rows.map(({ installationId }) => installationId));
	const gone = ids.filter((id) => !standing.has(id));
	if (rows.length > 0) await run(WRITE_ROWS, { rows: rows.map(rowValues) }, transaction);
	await writeDarkDays(ids, sources, rows, transaction);
	if (gone.length > 0)
		await run('DELETE FROM review_rows WHERE installation_id IN (:gone)', { gone }, transaction);
	const changes = changeOfSums(stored.map(readRow), rows);
	if (changes.length > 0) await run(ADD_SUMS, { rows: changes }, transaction);
}

async function refreshAll(ids: readonly number[], transaction: Transaction): Promise<void> {
	for (let from = 0; from < ids.length; from += BATCH) {
		const batch = ids.slice(from, from + BATCH);
		await refreshBatch(batch, transaction);
		await refreshChecks(batch, transaction);
	}
}

const ABOUT = {
	installation: 'id',
	mount: 'mount_id',
	job: 'job_id',
	assessment: 'assessment_id'
} as const;

/**
 * Lets the review say what has become of an installation, inside the transaction that changed it. Transactions of a
 * workshop meet over the head of its audit trail, so that no two of them can each miss what the other did.
 */
export async function refreshReview(
	about: keyof typeof ABOUT,
	id: number,
	transaction: Transaction
): Promise<void> {
	const rows = await select<{ id: number }>(
		`SELECT id FROM installations WHERE ${ABOUT[about]} = :id`,
		{ id },
		transaction
	);
	await refreshAll(
		rows.map((row) => row.id),
		transaction
	);
}

/** Throws away a workshop's review and makes it again from the tables that it summarises. */
export async function rebuildReview(workshopId: number): Promise<number> {
	return inTransaction(async (transaction) => {
		const where = { workshopId };
		await select(
			'SELECT sequence FROM audit_heads WHERE workshop_id = :workshopId FOR UPDATE',
			where,
			transaction
		);
		for (const table of ['review_rows', 'review_months', 'review_dark_days'])
			await run(`DELETE FROM ${table} WHERE workshop_id = :workshopId`, where, transaction);
		const rows = await select<{ id: number }>(
			'SELECT id FROM installations WHERE workshop_id = :workshopId ORDER BY id',
			where,
			transaction
		);
		await refreshAll(
			rows.map(({ id }) => id),
			transaction
		);
		return rows.length;
	});
}

/** Workshops with a standing installation of which the review does not know: from before there was one. */
const UNKNOWN = `
	SELECT DISTINCT i.workshop_id AS workshopId FROM installations i
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		LEFT JOIN review_rows r ON r.installation_id = i.id
	WHERE r.installation_id IS NULL
`;

/** Makes the review where there is none yet; says for how many workshops. */
export async function completeReviews(): Promise<number> {
	const workshops = await connection().query<{ workshopId: number }>(UNKNOWN, { type: QueryTypes.SELECT });
	for (const { workshopId } of workshops) await rebuildReview(workshopId);
	return workshops.length;
}
