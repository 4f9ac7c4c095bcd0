import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { jobQuerySchema, newJobSchema, type JobQuery } from '$lib/schemas/jobs';
import { connection } from '../db/connection';
import { findBreak } from './audit';
import { createBattery } from './batteries';
import { createJob, getJob, listJobs, repeatJob, setJobBattery, setJobClimate } from './jobs';
import { createPlace } from './places';
import { BATTERY, PLACE, newJob } from '../../../../tests/support/records';

useTestDatabase();

const query = (asked: Record<string, unknown> = {}): JobQuery => jobQuerySchema.parse(asked);
/** Eight days of each month on the road. */
const WEEKENDS = Array<number>(12).fill(8);
const HOT_DAY = { hotDayMaxC: 44, dailyRangeK: 15, sunPeakWPerM2: 1020 };

async function writeOutcome(jobId: number, verdict: string, headroomK: number): Promise<void> {
	await connection().query(
		"UPDATE jobs SET verdict = :verdict, headroom_k = :headroomK, stage = 'assessed' WHERE id = :jobId",
		{ replacements: { jobId, verdict, headroomK } }
	);
}

/** All pages one after another, as someone who keeps asking for more would see them. */
async function readAll(crew: Crew, asked: Record<string, unknown>): Promise<number[]> {
	const numbers: number[] = [];
	let cursor: string | undefined;
	do {
		const page = await listJobs(crew.installer, query({ ...asked, ...(cursor ? { cursor } : {}) }));
		numbers.push(...page.rows.map((row) => row.number));
		cursor = page.next ?? undefined;
	} while (cursor);
	return numbers;
}

async function makeJobs(crew: Crew, names: string[]): Promise<number[]> {
	const ids: number[] = [];
	for (const customerName of names) ids.push((await createJob(crew.installer, newJob({ customerName }))).id);
	return ids;
}

describe('a new job', () => {
	it('keeps its customer, its vehicle and its note, and has nothing else yet', async () => {
		const { installer } = await makeCrew();
		const job = await createJob(installer, newJob({ note: 'Fridge and lights.' }));
		const { customerName, note } = newJob({ note: 'Fridge and lights.' });
		expect(job).toMatchObject({ number: 1, stage: 'survey', note, customer: { name: customerName } });
		expect(job.vehicle).toMatchObject({ make: 'Farrow', massKg: 2900, customerId: job.customer.id });
		expect([job.battery, job.place, job.hotDay, job.dayPlan, job.verdict]).toEqual([
			...[null, null, null, null, null]
		]);
		expect(await getJob(installer, job.id)).toEqual(job);
	});

	it('gets a number of its own, even when twelve begin at once', async () => {
		const { installer } = await makeCrew();
		const jobs = await Promise.all(Array.from({ length: 12 }, () => createJob(installer, newJob())));
		const numbers = jobs.map(({ number }) => number).sort((a, b) => a - b);
		expect(numbers).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]);
	});

	it('belongs to the customer that the shop knows by name and e-mail', async () => {
		const { installer } = await makeCrew();
		const first = await createJob(installer, newJob({ customerEmail: 'ana@travellers.example' }));
		const second = await createJob(installer, newJob({ customerEmail: 'ana@travellers.example' }));
		const nameOnly = await createJob(installer, newJob());
		expect(second.customer.id).toBe(first.customer.id);
		expect(nameOnly.customer.id).not.toBe(first.customer.id);
	});

	it('is written down, in a trail that is whole', async () => {
		const { installer, workshopId } = await makeCrew();
		await createJob(installer, newJob());
		expect(await findBreak(workshopId)).toBeNull();
	});

	it('is not a matter for a customer', async () => {
		const { customer } = await makeCrew();
		await expect(createJob(customer, newJob())).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(listJobs(customer, query())).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('needs a customer and a vehicle with figures that can be', () => {
		const parsed = newJobSchema.safeParse({ ...newJob(), customerName: ' ', massKg: 90 });
		expect(parsed.error?.issues.map(({ path }) => path[0])).toEqual(['customerName', 'massKg']);
	});
});

describe('another job on a known vehicle', () => {
	it('has the same customer and vehicle, and begins with the battery, the hot day and the days on the road of the last', async () => {
		const { installer } = await makeCrew();
		const battery = await createBattery(installer, BATTERY);
		const place = await createPlace(installer, PLACE);
		const first = await createJob(installer, newJob());
		const second = await setJobBattery(installer, first.id, { batteryRecordId: battery.id, version: 0 });
		const { version } = second;
		await setJobClimate(installer, first.id, {
			placeId: place.id,
			...HOT_DAY,
			daysOnRoad: WEEKENDS,
			version
		});
		const again = await repeatJob(installer, { vehicleId: first.vehicle.id, note: 'Second tray' });
		expect(again.number).toBe(2);
		expect(again.customer).toEqual(first.customer);
		expect(again.vehicle).toEqual(first.vehicle);
		expect(again.battery?.id).toBe(battery.id);
		expect(again.hotDay).toEqual(HOT_DAY);
		expect(again.daysOnRoad).toEqual(WEEKENDS);
		expect(again.note).toBe('Second tray');
	});

	it('needs a vehicle of this workshop', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { vehicle } = await createJob(theirs.installer, newJob());
		await expect(repeatJob(ours.installer, { vehicleId: vehicle.id, note: '' })).rejects.toMatchObject({
			code: 'not_found'
		});
	});
});

describe('the battery and the hot day of a job', () => {
	it('are refused when somebody changed the job meanwhile, and nothing is lost', async () => {
		const { installer, engineer } = await makeCrew();
		const battery = await createBattery(installer, BATTERY);
		const place = await createPlace(installer, PLACE);
		const { id, version } = await createJob(installer, newJob());
		await setJobClimate(engineer, id, { placeId: place.id, ...HOT_DAY, daysOnRoad: null, version });
		const late = setJobBattery(installer, id, { batteryRecordId: battery.id, version });
		await expect(late).rejects.toMatchObject({ code: 'changed_meanwhile' });
		const job = await getJob(installer, id);
		expect([job.hotDay, job.battery]).toEqual([HOT_DAY, null]);
	});

	it('come from this workshop alone', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const battery = await createBattery(theirs.installer, BATTERY);
		const place = await createPlace(theirs.installer, PLACE);
		const { id, version } = await createJob(ours.installer, newJob());
		await expect(
			setJobBattery(ours.installer, id, { batteryRecordId: battery.id, version })
		).rejects.toMatchObject({ problems: [{ path: 'batteryRecordId' }] });
		await expect(
			setJobClimate(ours.installer, id, { placeId: place.id, ...HOT_DAY, daysOnRoad: null, version })
		).rejects.toMatchObject({ problems: [{ path: 'placeId' }] });
	});
});

describe('a job of another workshop', () => {
	it('is not there: not to read, not to change, not in the list', async () => {
		const [ours, theirs] = await Promise.all([makeCrew(), makeCrew()]);
		const { id, version } = await createJob(theirs.installer, newJob());
		const battery = await createBattery(ours.installer, BATTERY);
		const missing = { code: 'not_found' };
		await expect(getJob(ours.manager, id)).rejects.toMatchObject(missing);
		await expect(
			setJobBattery(ours.manager, id, { batteryRecordId: battery.id, version })
		).rejects.toMatchObject(missing);
		expect(await listJobs(ours.manager, query())).toEqual({ rows: [], total: 0, next: null });
	});
});

describe('the list of jobs', () => {
	it('is found by any words of customer, vehicle and number, in any order', async () => {
		const crew = await makeCrew();
		await createJob(crew.installer, newJob({ customerName: 'Ana Quillfeather', registration: 'WREN 42' }));
		await createJob(crew.installer, newJob({ customerName: 'Ben 100% Sure', make: 'Tolley' }));
		const found = async (search: string) => readAll(crew, { search, sort: 'lowest-number' });
		expect(await found('farrow quill')).toEqual([1]);
		expect(await found('wren')).toEqual([1]);
		expect(await found('tolley')).toEqual([2]);
		expect(await found('2')).toContain(2);
		expect(await found('100%')).toEqual([2]);
		expect(await found('%')).toEqual([2]);
		expect(await found('_')).toEqual([]);
		expect(await found("' OR 1=1 --")).toEqual([]);
	});

	it('is filtered by verdict, stage and climate, and says how many there are', async () => {
		const crew = await makeCrew();
		const [first, second] = await makeJobs(crew, ['Ana', 'Ben', 'Cleo']);
		const place = await createPlace(crew.installer, PLACE);
		await setJobClimate(crew.installer, first!, {
			placeId: place.id,
			...HOT_DAY,
			daysOnRoad: null,
			version: 0
		});
		await writeOutcome(second!, 'cuts-out', -3);
		const count = async (asked: Record<string, unknown>) =>
			(await listJobs(crew.installer, query({ ...asked, limit: 1 }))).total;
		expect(await count({})).toBe(3);
		expect(await count({ verdict: 'cuts-out' })).toBe(1);
		expect(await count({ stage: 'survey' })).toBe(2);
		expect(await count({ zone: 'BWh' })).toBe(1);
		expect(await count({ zone: 'Cfb' })).toBe(0);
		expect(await count({ verdict: 'cuts-out', zone: 'BWh' })).toBe(0);
	});

	it.each([
		['lowest-number', [1, 2, 3, 4, 5, 6, 7]],
		['highest-number', [7, 6, 5, 4, 3, 2, 1]],
		['customer-a-to-z', [3, 1, 5, 7, 2, 4, 6]],
		['customer-z-to-a', [6, 4, 2, 7, 5, 1, 3]],
		['least-headroom', [4, 2, 6, 1, 3, 5, 7]],
		['most-headroom', [6, 2, 4, 7, 5, 3, 1]]
	])('stands in order by %s, page after page, each job once', async (sort, expected) => {
		const crew = await makeCrew();
		const ids = await makeJobs(crew, ['Ben', 'Dora', 'Ana', 'Eli', 'Ben', 'Finn', 'Ben']);
		await writeOutcome(ids[1]!, 'runs-close', 1.25);
		await writeOutcome(ids[3]!, 'cuts-out', -6.5);
		await writeOutcome(ids[5]!, 'rides-it-out', 1.25);
		const read = await Promise.all([2, 3, 7].map((limit) => readAll(crew, { sort, limit })));
		expect(read).toEqual([expected, expected, expected]);
	});

	it('shows the job that was changed last on top', async () => {
		const crew = await makeCrew();
		const ids = await makeJobs(crew, ['Ana', 'Ben', 'Cleo']);
		const battery = await createBattery(crew.installer, BATTERY);
		await setJobBattery(crew.installer, ids[1]!, { batteryRecordId: battery.id, version: 0 });
		expect(await readAll(crew, { limit: 2 })).toEqual([2, 3, 1]);
		expect(await readAll(crew, { limit: 2, sort: 'oldest' })).toEqual([1, 3, 2]);
	});

	it('loses and repeats nothing when a job is begun between two pages', async () => {
		const crew = await makeCrew();
		await makeJobs(crew, ['Ana', 'Ben', 'Cleo']);
		const first = await listJobs(crew.installer, query({ sort: 'highest-number', limit: 2 }));
		await makeJobs(crew, ['Dora']);
		const asked = { sort: 'highest-number', limit: 2, cursor: first.next };
		const second = await listJobs(crew.installer, query(asked));
		expect([...first.rows, ...second.rows].map(({ number }) => number)).toEqual([3, 2, 1]);
	});

	it('takes only a place in the list that it gave itself, for this list and this workshop', async () => {
		const [crew, other] = await Promise.all([makeCrew(), makeCrew()]);
		await makeJobs(crew, ['Ana', 'Ben']);
		const { next } = await listJobs(crew.installer, query({ sort: 'lowest-number', limit: 1 }));
		const position = Buffer.from('{"stretch":0,"after":[0]}').toString('base64url');
		const forged = [`${position}.${'0'.repeat(32)}`, position, '', '.', `${next}x`, `x${next}`];
		const refused = { code: 'invalid_input', problems: [{ path: 'cursor' }] };
		for (const cursor of forged) {
			const asked = query({ sort: 'lowest-number', cursor });
			await expect(listJobs(crew.installer, asked)).rejects.toMatchObject(refused);
		}
		const elsewhere = query({ sort: 'newest', cursor: next });
		await expect(listJobs(crew.installer, elsewhere)).rejects.toMatchObject(refused);
		const theirs = query({ sort: 'lowest-number', cursor: next });
		await expect(listJobs(other.installer, theirs)).rejects.toMatchObject(refused);
	});
});
