import { QueryTypes, type Transaction } from 'sequelize';
import type { Verdict } from '$lib/schemas/verdicts';
import { ENGINE_VERSION } from '$lib/thermal';
import { connection } from '../../db/connection';
import { CoefficientBook, Customer, Person, Place, Vehicle, Workshop } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { addDays, addMonths } from '../days';
import { draw, inventDarkDays, spreadOverYear, type DarkDay, type DrawName } from './invent-dark-days';
import { placeInZones } from './place-zones';

/** How a workshop is invented: the same seed and day give the same rows. */
export interface Invention {
	installations: number;
	seed: number;
	today: string;
	/** Its own workshop, under this name. */
	name: string;
	/** Who may look at it. */
	manager: { name: string; email: string; passwordHash: string | null };
}

const CHUNK = 1_000;
const PLACES = 60;
const CUSTOMERS = 200;
const YEARS = 5;
const DAYS_A_YEAR = 365.25;
const ZONES = ['Aw', 'BWh', 'BWk', 'BSh', 'BSk', 'Csa', 'Csb', 'Cfa', 'Cfb', 'Dfb'] as const;

const VERDICT_SHARES: [Verdict, number][] = [
	['cuts-out', 0.06],
	['runs-close', 0.3],
	['rides-it-out', 1]
];
/** Most dark days a year of a verdict. */
const MOST_DAYS: Record<Verdict, number> = { 'cuts-out': 8, 'runs-close': 1, 'rides-it-out': 0.05 };
const WITHOUT_BMS_SHARE = 0.08;
const OUTLOOK_SHARE = 0.95;
const LOOKED_SHARE = 0.8;
const SHEET_SHARE = 0.9;
const ACKNOWLEDGED_SHARE = 0.85;
const REMOVED_SHARE = 0.01;

interface Invented {
	index: number;
	place: Place;
	fittedOn: string;
	verdict: Verdict;
	chemistry: string;
	expected: number[] | null;
	darkDays: DarkDay[];
	followUps: { months: number; dueOn: string; isDone: boolean }[];
	sheet: 'none' | 'sent' | 'acknowledged';
	isRemoved: boolean;
}

function inventOne(invention: Invention, index: number, places: readonly Place[]): Invented {
	const { seed, today } = invention;
	const random = (what: DrawName, again?: number): number => draw(seed, index, what, again);
	// Few places have many of the installations, as in any shop.
	const place = places[Math.floor(random('place') ** 2 * places.length)]!;
	const fittedOn = addDays(today, -Math.floor(random('fitted') * YEARS * DAYS_A_YEAR));
	const [verdict] = VERDICT_SHARES.find(([, share]) => random('verdict') < share)!;
	const monthDays = spreadOverYear(MOST_DAYS[verdict] * random('days'), place.latitudeDeg < 0);
	const chemistry = random('chemistry') < WITHOUT_BMS_SHARE ? 'lead-acid-agm' : 'lithium-iron-phosphate';
	const followUps = [1, 6, 12].map((months) => {
		const dueOn = addMonths(fittedOn, months);
		return { months, dueOn, isDone: dueOn <= today && random('looked', months) < LOOKED_SHARE };
	});
	const isSent = random('sheet') < SHEET_SHARE;
	return {
		...{ index, place, fittedOn, verdict, chemistry, followUps },
		expected: random('outlook') < OUTLOOK_SHARE ? monthDays : null,
		darkDays: inventDarkDays({ seed, index, fittedOn, today, monthDays }),
		sheet: isSent ? (random('acknowledged') < ACKNOWLEDGED_SHARE ? 'acknowledged' : 'sent') : 'none',
		isRemoved: random('removed') < REMOVED_SHARE
	};
}

/** Inserts rows at once and says which numbers they got: those of one statement follow each other. */
async function insert(
	table: string,
	columns: readonly string[],
	rows: readonly (readonly unknown[])[],
	transaction: Transaction
): Promise<number[]> {
	if (rows.length === 0) return [];
	const [first] = await connection().query(`INSERT INTO ${table} (${columns.join(', ')}) VALUES :rows`, {
		replacements: { rows },
		type: QueryTypes.INSERT,
		transaction
	});
	return rows.map((_, at) => Number(first) + at);
}

interface Base {
	workshopId: number;
	managerId: number;
	bookId: number;
	places: Place[];
	/** Each with a vehicle of theirs. */
	customers: { customerId: number; vehicleId: number }[];
}

async function inventBase({ seed, name, manager }: Invention): Promise<Base> {
	const workshop = await Workshop.create({ name });
	const workshopId = workshop.id;
	const person = await Person.create({ workshopId, role: 'manager', ...manager });
	const book = await CoefficientBook.create({ workshopId, number: 1, name: 'Invented', state: 'in-force' });
	const places = await Place.bulkCreate(
		Array.from({ length: PLACES }, (_, index) => ({
			...{ workshopId, name: `Invented place ${index + 1}`, altitudeM: 100 },
			latitudeDeg: Math.round(-38 + 76 * draw(seed, index, 'latitude')),
			longitudeDeg: Math.round(-120 + 270 * draw(seed, index, 'longitude')),
			climateZone: ZONES[index % ZONES.length]!,
			...{ hotDayMaxC: 40, dailyRangeK: 14, sunPeakWPerM2: 1_000, source: 'Invented' }
		}))
	);
	const customers = await Customer.bulkCreate(
		Array.from({ length: CUSTOMERS }, (_, index) => ({ workshopId, name: `Invented customer ${index + 1}` }))
	);
	const vehicles = await Vehicle.bulkCreate(
		customers.map(({ id: customerId }, index) => ({
			...{ workshopId, customerId, make: 'Invented', model: `Vehicle ${index + 1}`, modelYear: 2020 },
			...{ engineLayout: 'inline' as const, massKg: 2_200, dragAreaM2: 1.1 }
		}))
	);
	return {
		...{ workshopId, managerId: person.id, bookId: book.id, places },
		customers: customers.map(({ id }, index) => ({ customerId: id, vehicleId: vehicles[index]!.id }))
	};
}

const NOTHING = JSON.stringify({});

/** Jobs, mounts, assessments and what hangs on them, of one chunk. */
async function storeChunk(
	{ workshopId, managerId, bookId, customers }: Base,
	invented: readonly Invented[],
	transaction: Transaction
): Promise<void> {
	const at = (day: string): string => `${day} 08:00:00.000`;
	const add = (table: string, columns: string, rows: readonly (readonly unknown[])[]): Promise<number[]> =>
		insert(table, columns.split(' '), rows, transaction);
	const jobs = await add(
		'jobs',
		'workshop_id number customer_id vehicle_id place_id stage verdict created_by created_at updated_at',
		invented.map(({ index, place, fittedOn, verdict, sheet }) => {
			const { customerId, vehicleId } = customers[index % customers.length]!;
			const stage = { none: 'recommended', sent: 'sent', acknowledged: 'acknowledged' }[sheet];
			return [
				...[workshopId, index + 1, customerId, vehicleId, place.id, stage, verdict, managerId],
				...[at(fittedOn), at(fittedOn)]
			];
		})
	);
	const mounts = await add(
		'mounts',
		'workshop_id job_id letter name position_kind survey survey_complete removed_at created_at updated_at',
		invented.map(({ fittedOn, isRemoved }, k) => [
			...[
				workshopId,
				jobs[k],
				'A',
				'Invented position',
				'under-bonnet',
				'{"positionKind":"under-bonnet"}',
				1
			],
			...[isRemoved ? at(fittedOn) : null, at(fittedOn), at(fittedOn)]
		])
	);
	const assessments = await add(
		'assessments',
		'workshop_id job_id mount_id book_id engine_version inputs inputs_sha256 result chemistry verdict headroom_k peak_cells_c peak_at_hour dark_hours charge_missed_ah created_by created_at',
		invented.map(({ fittedOn, verdict, chemistry }, k) => [
			...[workshopId, jobs[k], mounts[k], bookId, ENGINE_VERSION, NOTHING, '0'.repeat(64), NOTHING],
			...[chemistry, verdict, 0, 60, 17, 0, 0, managerId, at(fittedOn)]
		])
	);
	await add(
		'assessment_outlooks',
		'workshop_id assessment_id engine_version request outlook created_at',
		invented.flatMap(({ fittedOn, expected }, k) => {
			if (!expected) return [];
			const months = expected.map((middle) => ({ low: 0.4 * middle, middle, high: 1.8 * middle }));
			const outlook = JSON.stringify({ year: { months } });
			return [[workshopId, assessments[k], ENGINE_VERSION, NOTHING, outlook, at(fittedOn)]];
		})
	);
	const recommendations = await add(
		'recommendations',
		'workshop_id job_id number assessment_id against_verdict decided_by reason created_by created_at',
		invented.map(({ fittedOn, verdict }, k) => {
			const words =
				verdict === 'cuts-out'
					? [1, 'Invented manager', 'Invented: a duct is fitted before summer.']
					: [0, null, null];
			return [workshopId, jobs[k], 1, assessments[k], ...words, managerId, at(fittedOn)];
		})
	);
	const sent = invented.flatMap((each, k) => (each.sheet === 'none' ? [] : [{ ...each, k }]));
	const sheets = await add(
		'sheets',
		'workshop_id job_id recommendation_id token_hash text_version content content_sha256 created_by created_at',
		sent.map(({ fittedOn, k }) => [
			...[workshopId, jobs[k], recommendations[k], `${workshopId}-${jobs[k]}`.padEnd(64, '-'), 'invented'],
			...[NOTHING, '0'.repeat(64), managerId, at(fittedOn)]
		])
	);
	await add(
		'acknowledgements',
		'sheet_id name text_version content_sha256 created_at',
		sent.flatMap(({ fittedOn, sheet }, k) =>
			sheet === 'acknowledged' ? [[sheets[k], 'Invented', 'invented', '0'.repeat(64), at(fittedOn)]] : []
		)
	);
	const installations = await add(
		'installations',
		'workshop_id job_id mount_id assessment_id recommendation_id fitted_on fitted_by agreed differences created_by created_at updated_at',
		invented.map(({ fittedOn }, k) => [
			...[workshopId, jobs[k], mounts[k], assessments[k], recommendations[k], fittedOn, 'Invented'],
			...['[]', '[]', managerId, at(fittedOn), at(fittedOn)]
		])
	);
	await add(
		'follow_ups',
		'workshop_id installation_id after_months due_on done_on done_by reminded_at created_at updated_at',
		invented.flatMap(({ fittedOn, followUps }, k) =>
			followUps.map(({ months, dueOn, isDone }) => [
				...[workshopId, installations[k], months, dueOn, isDone ? dueOn : null, isDone ? 'Invented' : null],
				// Nobody is to be written to.
				...[at(dueOn), at(fittedOn), at(fittedOn)]
			])
		)
	);
	await add(
		'field_notes',
		'workshop_id installation_id kind noted_on data finding engine_version created_by created_at',
		invented.flatMap(({ darkDays }, k) =>
			darkDays.map(({ on, isHeat }) => {
				const data = JSON.stringify({ kind: 'cut-out', notedOn: on });
				const finding = JSON.stringify({ cause: { finding: isHeat ? 'explained' : 'not-explained' } });
				return [
					workshopId,
					installations[k],
					'cut-out',
					on,
					data,
					finding,
					ENGINE_VERSION,
					managerId,
					at(on)
				];
			})
		)
	);
}

/** Fills a workshop of its own with invented installations; the review of it is still to be made. */
export async function inventInstallations(invention: Invention): Promise<{ workshopId: number }> {
	const base = await inTransaction(() => inventBase(invention));
	for (let from = 0; from < invention.installations; from += CHUNK) {
		const size = Math.min(CHUNK, invention.installations - from);
		const invented = Array.from({ length: size }, (_, k) => inventOne(invention, from + k, base.places));
		await inTransaction((transaction) => storeChunk(base, invented, transaction));
	}
	await inTransaction((transaction) => placeInZones(base.workshopId, transaction));
	return { workshopId: base.workshopId };
}
