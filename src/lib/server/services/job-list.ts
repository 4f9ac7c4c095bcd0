import { Op, type OrderItem, type WhereOptions } from 'sequelize';
import { z } from 'zod';
import type { JobQuery, JobSort } from '$lib/schemas/jobs';
import { BatteryRecord, Customer, Job, Place, Vehicle } from '../db/models';
import { readCursor, writeCursor } from './cursors';
import { matchWords } from './search-words';

type Key = string | number;
type Direction = 'ASC' | 'DESC';

/** One stretch of the ordered list; its columns together tell any two jobs apart. */
interface Stretch {
	columns: string[];
	where: WhereOptions;
	keyOf: (job: Job) => Key[];
}

const BY_UPDATE: Stretch[] = [
	{ columns: ['updatedAt', 'id'], where: {}, keyOf: (job) => [job.updatedAt.toISOString(), job.id] }
];
const BY_NUMBER: Stretch[] = [{ columns: ['number'], where: {}, keyOf: (job) => [job.number] }];
const BY_CUSTOMER: Stretch[] = [
	{
		columns: ['$customer.name$', '$customer.id$', 'id'],
		where: {},
		keyOf: (job) => [job.customer?.name ?? '', job.customerId, job.id]
	}
];
/** Jobs without an assessment come last, whichever way the others stand. */
const BY_HEADROOM: Stretch[] = [
	{
		columns: ['headroomK', 'id'],
		where: { headroomK: { [Op.not]: null } },
		keyOf: (job) => [job.headroomK ?? 0, job.id]
	},
	{ columns: ['id'], where: { headroomK: null }, keyOf: (job) => [job.id] }
];

const SORTS: Record<JobSort, { stretches: Stretch[]; direction: Direction }> = {
	newest: { stretches: BY_UPDATE, direction: 'DESC' },
	oldest: { stretches: BY_UPDATE, direction: 'ASC' },
	'highest-number': { stretches: BY_NUMBER, direction: 'DESC' },
	'lowest-number': { stretches: BY_NUMBER, direction: 'ASC' },
	'customer-a-to-z': { stretches: BY_CUSTOMER, direction: 'ASC' },
	'customer-z-to-a': { stretches: BY_CUSTOMER, direction: 'DESC' },
	'least-headroom': { stretches: BY_HEADROOM, direction: 'ASC' },
	'most-headroom': { stretches: BY_HEADROOM, direction: 'DESC' }
};

/** Where a page begins: in which stretch, and after which of its jobs. */
const positionSchema = z.object({
	stretch: z.number().int().min(0),
	after: z.array(z.union([z.string(), z.number()])).optional()
});
type Position = z.infer<typeof positionSchema>;

const WITH_NAMES = [
	{ model: Customer, as: 'customer', required: true },
	{ model: Vehicle, as: 'vehicle', required: true },
	{ model: BatteryRecord, as: 'batteryRecord' },
	{ model: Place, as: 'place' }
];
const SEARCHED = ['$customer.name$', '$vehicle.make$', '$vehicle.model$', '$vehicle.registration$'];

function filterOf(workshopId: number, { search, verdict, stage, zone }: JobQuery): WhereOptions {
	return {
		[Op.and]: [
			{ workshopId },
			verdict ? { verdict } : {},
			stage ? { stage } : {},
			zone ? { '$place.climate_zone$': zone } : {},
			matchWords(search, SEARCHED, 'number')
		]
	};
}

/** What lies beyond a key: the first column does, or it is the same and the second does, and so on. */
function beyond(columns: string[], key: Key[], direction: Direction): WhereOptions {
	const comparison = direction === 'ASC' ? Op.gt : Op.lt;
	const parts = columns.map((column, place) => ({
		[Op.and]: [
			...columns.slice(0, place).map((same, index) => ({ [same]: key[index] })),
			{ [column]: { [comparison]: key[place] } }
		]
	}));
	return { [Op.or]: parts };
}

function orderBy(column: string, direction: Direction): OrderItem {
	const [table = '', name] = column.replaceAll('$', '').split('.');
	return name ? [table, name, direction] : [column, direction];
}

async function readStretch(filter: WhereOptions, from: Position, sort: JobSort, limit: number) {
	const { stretches, direction } = SORTS[sort];
	const stretch = stretches[from.stretch];
	if (!stretch || limit <= 0) return [];
	const { columns, where, keyOf } = stretch;
	const jobs = await Job.findAll({
		where: { [Op.and]: [filter, where, from.after ? beyond(columns, from.after, direction) : {}] },
		include: WITH_NAMES,
		order: columns.map((column) => orderBy(column, direction)),
		limit,
		subQuery: false
	});
	return jobs.map((job) => ({ job, position: { stretch: from.stretch, after: keyOf(job) } }));
}

/** One page of a workshop's jobs, how many there are of them in all, and where the next page begins. */
export async function findJobs(
	workshopId: number,
	query: JobQuery
): Promise<{ jobs: Job[]; total: number; next: string | null }> {
	const { sort, limit, cursor } = query;
	const scope = `jobs ${workshopId} ${sort}`;
	const start = cursor === undefined ? { stretch: 0 } : readCursor(scope, cursor, positionSchema);
	const filter = filterOf(workshopId, query);
	// One more than asked for tells whether there is a next page.
	const found = await readStretch(filter, start, sort, limit + 1);
	for (let stretch = start.stretch + 1; stretch < SORTS[sort].stretches.length; stretch++) {
		found.push(...(await readStretch(filter, { stretch }, sort, limit + 1 - found.length)));
	}
	const page = found.slice(0, limit);
	const last = page.at(-1);
	return {
		jobs: page.map(({ job }) => job),
		total: await Job.count({ where: filter, include: WITH_NAMES }),
		next: found.length > limit && last ? writeCursor(scope, last.position) : null
	};
}
