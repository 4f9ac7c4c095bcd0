import { QueryTypes } from 'sequelize';
import type { Accuracy, LeftOut, ReadingKind } from '$lib/schemas/accuracy';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../../db/connection';
import { CoefficientBook } from '../../db/models';
import { allow } from '../../policies';
import {
	CHANCE_EDGES,
	presentAccuracy,
	STEP_K,
	STEPS_EACH_SIDE,
	type ChanceSums,
	type CheckSums,
	type StepSums
} from '../../presenters/accuracy';
import { isUnstruck } from '../field-standing';
import { CHECKS, UNHELD_TRACES, WAITS, ZONE } from './check-scope';

/** One row for each kind, book, zone and kind of position that occurs: a few hundred at most, whatever was read. */
const SUMS = `
	SELECT c.kind, b.number AS book, ${ZONE} AS zone, m.position_kind AS position,
		COALESCE(c.is_looked_at, 0) AS isLookedAt, COUNT(c.measured) AS readings,
		COALESCE(SUM(c.error), 0) AS error, COALESCE(SUM(c.square), 0) AS square,
		SUM(c.stand = 'inside' AND c.measured IS NOT NULL) AS inside, SUM(c.measured IS NULL) AS oneSided,
		SUM(c.measured IS NULL AND c.stand <> 'inside') AS oneSidedOutside, SUM(c.is_entered_later) AS enteredLater,
		SUM(c.predicted) AS stated, COALESCE(SUM(c.measured), 0) AS reported,
		COALESCE(SUM(c.observed_days), 0) AS observedDays
	FROM ${CHECKS} WHERE c.workshop_id = :workshopId AND c.left_out = ''
	GROUP BY c.kind, b.number, zone, m.position_kind, isLookedAt
`;

const STEPS = `
	SELECT c.kind, LEAST(GREATEST(FLOOR(c.error / :stepK), :lowest), :highest) AS step, COUNT(*) AS readings
	FROM ${CHECKS}
	WHERE c.workshop_id = :workshopId AND c.left_out = '' AND c.kind IN ('label', 'trace') AND c.error IS NOT NULL
	GROUP BY c.kind, step
`;

const CHANCES = `
	SELECT INTERVAL(c.chance, :inner) AS bin, COUNT(*) AS installations, SUM(c.chance) AS chances,
		SUM(c.measured > 0) AS wentDark
	FROM ${CHECKS} WHERE c.workshop_id = :workshopId AND c.left_out = '' AND c.kind = 'cut-out'
	GROUP BY bin
`;

const LEFT_OUT = `
	SELECT c.kind, c.left_out AS why, COUNT(*) AS readings, SUM(c.stand = 'inside') AS inside
	FROM ${CHECKS} WHERE c.workshop_id = :workshopId AND c.left_out <> '' GROUP BY c.kind, c.left_out
`;

const WAITING = `
	SELECT COUNT(*) AS waiting FROM field_notes n
		JOIN installations i ON i.id = n.installation_id
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		LEFT JOIN prediction_checks c ON c.field_note_id = n.id
	WHERE n.workshop_id = :workshopId AND n.kind = 'capacity-test' AND c.id IS NULL AND ${isUnstruck('n')}
`;

/**
 * At mounts that stand: those that are being worked out, and those that cannot be, for want of an assessment, an hour of
 * beginning, a reading of the battery, or a day that can be run.
 */
const UNHELD = `
	SELECT COALESCE(SUM(${WAITS}), 0) AS waiting, COUNT(*) AS traces FROM ${UNHELD_TRACES} AND t.workshop_id = :workshopId
`;

type Stored = Record<string, string | number>;

const select = (sql: string, replacements: Record<string, unknown>): Promise<Stored[]> =>
	connection().query<Stored>(sql, { replacements, type: QueryTypes.SELECT });

/** Sums come as decimals, which the driver hands over as text. */
function numbersOf<Key extends string>(row: Stored, keys: readonly Key[]): Record<Key, number> {
	return Object.fromEntries(keys.map((key) => [key, Number(row[key])])) as Record<Key, number>;
}

const SUM_KEYS = [
	...(['book', 'readings', 'error', 'square', 'inside', 'oneSided', 'oneSidedOutside'] as const),
	...(['enteredLater', 'stated', 'reported', 'observedDays'] as const)
];

function readSums(row: Stored): CheckSums {
	const { kind, zone, position, isLookedAt } = row;
	return {
		...numbersOf(row, SUM_KEYS),
		...({ kind, zone, position } as Pick<CheckSums, 'kind' | 'zone' | 'position'>),
		isLookedAt: Number(isLookedAt) === 1
	};
}

/** How the predictions of a workshop did against what was measured or reported afterwards. */
export async function readAccuracy(person: SignedInPerson): Promise<Accuracy> {
	const { workshopId } = allow(person, 'books.read');
	const where = { workshopId };
	const [sums, steps, chances, leftOut, waiting, unheld, books] = await Promise.all([
		select(SUMS, where),
		select(STEPS, { ...where, stepK: STEP_K, lowest: -STEPS_EACH_SIDE, highest: STEPS_EACH_SIDE - 1 }),
		select(CHANCES, { ...where, inner: CHANCE_EDGES.slice(1, -1) }),
		select(LEFT_OUT, where),
		select(WAITING, where),
		select(UNHELD, where),
		CoefficientBook.findAll({ where, attributes: ['number', 'name'] })
	]);
	return presentAccuracy({
		sums: sums.map(readSums),
		steps: steps.map((row): StepSums => ({
			kind: row.kind as ReadingKind,
			...numbersOf(row, ['step', 'readings'])
		})),
		chances: chances.map((row): ChanceSums =>
			numbersOf(row, ['bin', 'installations', 'chances', 'wentDark'])
		),
		leftOut: leftOut.map((row) => ({
			...({ kind: row.kind, why: row.why } as { kind: ReadingKind; why: LeftOut }),
			...numbersOf(row, ['readings', 'inside'])
		})),
		waiting: Number(waiting[0]?.waiting ?? 0),
		waitingTraces: Number(unheld[0]?.waiting ?? 0),
		unheldTraces: Number(unheld[0]?.traces ?? 0) - Number(unheld[0]?.waiting ?? 0),
		books: new Map(books.map(({ number, name }) => [number, name]))
	});
}
