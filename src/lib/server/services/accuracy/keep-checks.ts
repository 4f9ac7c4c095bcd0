import { QueryTypes, type Transaction } from 'sequelize';
import { hasBms, type BatteryInput } from '$lib/schemas/batteries';
import { capacityTestSchema } from '$lib/schemas/field-notes';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import {
	holdCapacity,
	holdDays,
	tenVehicles,
	toReferenceTemperature,
	type LifePoint,
	type StatedDays
} from '$lib/thermal/field';
import { connection } from '../../db/connection';
import { daysBetween } from '../days';
import { isUnstruck } from '../field-standing';
import { daysInMonth, predictUntil } from '../review/predicted-days';
import { writeChecks, type CheckRow } from './check-rows';
import { predictionAt } from './prediction-at';

const DAYS_A_YEAR = 365.25;

/** An installation with when somebody last looked at its battery, and what was reported of it. */
const WATCHED = `
	SELECT i.id AS installationId, i.workshop_id AS workshopId, i.mount_id AS mountId, a.id AS assessmentId,
		a.book_id AS bookId, a.chemistry, CAST(i.fitted_on AS CHAR) AS fittedOn,
		DATE(a.created_at) > i.fitted_on AS isEnteredLater,
		(SELECT CAST(MAX(f.done_on) AS CHAR) FROM follow_ups f WHERE f.installation_id = i.id) AS doneOn,
		CAST(MAX(CASE WHEN n.kind <> 'cut-out' THEN n.noted_on END) AS CHAR) AS lookedOn,
		CAST(MAX(n.noted_on) AS CHAR) AS notedOn,
		COUNT(DISTINCT CASE WHEN n.kind = 'cut-out' THEN n.noted_on END) AS darkDays
	FROM installations i
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		JOIN assessments a ON a.id = i.assessment_id
		LEFT JOIN field_notes n ON n.installation_id = i.id AND ${isUnstruck('n')}
	WHERE i.id IN (:ids) GROUP BY i.id
`;

const TESTS = `
	SELECT n.id AS fieldNoteId, n.data, CAST(n.noted_on AS CHAR) AS readOn, i.id AS installationId,
		i.workshop_id AS workshopId, i.mount_id AS mountId, CAST(i.fitted_on AS CHAR) AS fittedOn,
		a.id AS assessmentId, a.book_id AS bookId, JSON_EXTRACT(a.inputs, '$.battery') AS battery,
		DATE(a.created_at) > n.noted_on AS isEnteredLater, NOT ${isUnstruck('n')} AS isStruck
	FROM field_notes n
		JOIN installations i ON i.id = n.installation_id
		JOIN mounts m ON m.id = i.mount_id AND m.removed_at IS NULL
		JOIN assessments a ON a.id = ${predictionAt('n', 'i')}
	WHERE n.installation_id IN (:ids) AND n.kind = 'capacity-test' ORDER BY n.id
`;

/** Read with a lock: an outlook that is being stored now is waited for, not missed. */
const OUTLOOKS = `
	SELECT assessment_id AS assessmentId, JSON_EXTRACT(outlook, '$.year.months') AS months,
		JSON_EXTRACT(outlook, '$.year.tenths') AS tenths,
		JSON_EXTRACT(outlook, '$.life.years') AS life
	FROM assessment_outlooks WHERE assessment_id IN (:ids) LOCK IN SHARE MODE
`;

/** Labels are held against the model when they are noted; all else follows from what is kept. */
const CLEAR =
	"DELETE FROM prediction_checks WHERE installation_id IN (:ids) AND kind IN ('capacity', 'cut-out')";

interface About {
	installationId: number;
	workshopId: number;
	mountId: number;
	assessmentId: number;
	bookId: number;
	fittedOn: string;
	isEnteredLater: number;
}
type Watched = About & {
	chemistry: string;
	doneOn: string | null;
	lookedOn: string | null;
	notedOn: string | null;
	darkDays: number;
};
type Test = About & {
	fieldNoteId: number;
	readOn: string;
	isStruck: number;
	data: unknown;
	battery: unknown;
};
interface Stated {
	months: StatedDays[] | null;
	/** Days a year of ten vehicles, where they were kept. */
	tenths: number[] | null;
	life: LifePoint[] | null;
}

const parsed = <T>(json: unknown): T | null =>
	((typeof json === 'string' ? JSON.parse(json) : json) as T | null) ?? null;

const select = <Row extends object>(
	sql: string,
	ids: readonly number[],
	transaction: Transaction
): Promise<Row[]> =>
	connection().query<Row>(sql, { replacements: { ids }, transaction, type: QueryTypes.SELECT });

async function readStated(
	ids: readonly number[],
	transaction: Transaction
): Promise<ReadonlyMap<number, Stated>> {
	if (ids.length === 0) return new Map();
	const rows = await select<{ assessmentId: number; months: unknown; tenths: unknown; life: unknown }>(
		OUTLOOKS,
		ids,
		transaction
	);
	return new Map(
		rows.map(({ assessmentId, months, tenths, life }) => [
			assessmentId,
			{
				months: parsed<StatedDays[]>(months),
				tenths: parsed<number[]>(tenths),
				life: parsed<LifePoint[]>(life)
			}
		])
	);
}

const aboutOf = ({ workshopId, mountId, installationId, assessmentId, bookId, isEnteredLater }: About) => ({
	...{ workshopId, mountId, installationId, assessmentId, bookId },
	isEnteredLater: Number(isEnteredLater) === 1
});

/**
 * Days to be expected of ten equally likely vehicles from the day of fitting to the last day of which anything is known.
 * Their days are spread over the year as those of all of them together.
 */
function statedUntil(
	months: readonly StatedDays[],
	tenths: Stated['tenths'],
	fittedOn: string,
	until: string
) {
	const days = daysInMonth(fittedOn);
	const left = (days - Number(fittedOn.slice(8, 10)) + 1) / days;
	const sum = (key: keyof StatedDays): number => {
		const monthDays = months.map((month) => month[key]);
		const firstMonthDays = monthDays[Number(fittedOn.slice(5, 7)) - 1]! * left;
		return predictUntil({ month: fittedOn.slice(0, 7), firstMonthDays, monthDays }, until);
	};
	const middle = sum('middle');
	if (!tenths) return tenVehicles({ low: sum('low'), middle, high: sum('high') });
	const yearDays = tenths.reduce((total, tenth) => total + tenth, 0) / tenths.length;
	return tenths.map((tenth) => (yearDays > 0 ? (tenth * middle) / yearDays : 0));
}

/** Reported days against the stated ones, as long as it was watched; nothing where nobody has looked or reported. */
function checkDays(watched: Watched, stated: Stated | undefined): CheckRow[] {
	const { fittedOn, doneOn, lookedOn, notedOn, chemistry } = watched;
	const until = [doneOn, notedOn].reduce<string>((last, day) => (day && day > last ? day : last), fittedOn);
	const observedDays = daysBetween(fittedOn, until);
	if (!stated?.months || observedDays < 1 || !hasBms(chemistry)) return [];
	const { chance, ...held } = holdDays(
		Number(watched.darkDays),
		statedUntil(stated.months, stated.tenths, fittedOn, until)
	);
	const isLookedAt = doneOn !== null || lookedOn !== null;
	return [
		{
			...{
				kind: 'cut-out',
				...aboutOf(watched),
				fieldNoteId: null,
				traceId: null,
				readOn: until,
				held,
				leftOut: ''
			},
			watched: { chance, observedDays, isLookedAt }
		}
	];
}

const isStruck = (test: Test): boolean => Number(test.isStruck) === 1;

/** Of several tests on one day the last counts; what was struck out neither counts nor puts another right. */
function findLeftOut(test: Test, all: readonly Test[]): CheckRow['leftOut'] {
	const { installationId, readOn, fieldNoteId } = test;
	if (isStruck(test)) return 'struck';
	const isAgain = all.some(
		(other) =>
			other.installationId === installationId &&
			other.readOn === readOn &&
			other.fieldNoteId > fieldNoteId &&
			!isStruck(other)
	);
	return isAgain ? 'noted-again' : '';
}

/** A capacity test against the ageing band at its age. */
function checkCapacity(test: Test, all: readonly Test[], stated: Stated | undefined): CheckRow[] {
	const battery = parsed<BatteryInput>(test.battery);
	if (!stated?.life || !battery) return [];
	const { fieldNoteId, readOn, fittedOn } = test;
	const years = Math.max(daysBetween(fittedOn, readOn), 0) / DAYS_A_YEAR;
	const { capacityAh, currentA, cutOffV, tempC } = capacityTestSchema.parse(parsed(test.data));
	const isLeadAcid = heatLimitsOf(battery) !== null;
	const foundAh = toReferenceTemperature({ years, capacityAh, currentA, cutOffV, tempC }, isLeadAcid);
	const held = holdCapacity(foundAh / battery.capacityAh, years, stated.life);
	if (!held) return [];
	return [
		{
			...{ kind: 'capacity', ...aboutOf(test), fieldNoteId, traceId: null, readOn, held, watched: null },
			leftOut: findLeftOut(test, all)
		}
	];
}

/**
 * Holds anew what was tested and reported of these installations against what was stated of them, inside the transaction
 * that changed something about them. An outlook that is worked out later than a note was stated with its assessment all
 * the same: it follows from it.
 */
export async function refreshChecks(ids: readonly number[], transaction: Transaction): Promise<void> {
	await connection().query(CLEAR, { replacements: { ids }, transaction });
	const watched = await select<Watched>(WATCHED, ids, transaction);
	const tests = await select<Test>(TESTS, ids, transaction);
	const assessmentIds = new Set([...watched, ...tests].map(({ assessmentId }) => assessmentId));
	const stated = await readStated([...assessmentIds], transaction);
	await writeChecks(
		[
			...watched.flatMap((each) => checkDays(each, stated.get(each.assessmentId))),
			...tests.flatMap((each) => checkCapacity(each, tests, stated.get(each.assessmentId)))
		],
		transaction
	);
}
