import type { z } from 'zod';
import type { AssessmentInputs } from '$lib/schemas/assessments';
import { batteryInputSchema } from '$lib/schemas/batteries';
import type { BookView, MountCase } from '$lib/schemas/books';
import { dayPlanInputSchema } from '$lib/schemas/day-plans';
import { placeSiteSchema } from '$lib/schemas/places';
import { vehicleInputSchema } from '$lib/schemas/vehicles';
import { BatteryRecord, Customer, DayPlan, Place, Vehicle, type Job, type Mount } from '../db/models';
import { AppError, notFound } from '../errors';
import { coefficientsOf } from './books';
import { completeInputs, type MeasuredInputs } from './run-inputs';
import { touringYearOf } from './touring-year';

/** What a job must have before anything can be assessed, in the words that its page uses. */
const PARTS = {
	battery: 'The job has no battery yet.',
	place: 'The job has no place and hot day yet.',
	dayPlan: 'The job has no day plan yet.',
	survey: 'The survey of this mount is not finished.'
} as const;
type Part = keyof typeof PARTS;

/** A job's records, of which some may not be there yet. */
export interface JobParts {
	job: Job;
	customer: Customer;
	vehicle: Vehicle;
	battery: BatteryRecord | null;
	place: Place | null;
	dayPlan: DayPlan | null;
}

export async function findJobParts(job: Job): Promise<JobParts> {
	const { customerId, vehicleId, batteryRecordId, placeId, workshopId } = job;
	const ours = (id: number) => ({ where: { id, workshopId } });
	const customer = await Customer.findOne(ours(customerId));
	const vehicle = await Vehicle.findOne(ours(vehicleId));
	if (!customer || !vehicle) throw notFound('job');
	const battery = batteryRecordId === null ? null : await BatteryRecord.findOne(ours(batteryRecordId));
	const place = placeId === null ? null : await Place.findOne(ours(placeId));
	const dayPlan = await DayPlan.findOne({ where: { jobId: job.id, workshopId } });
	return { job, customer, vehicle, battery, place, dayPlan };
}

/** What the book for a mount is chosen by. */
export const caseOf = ({ vehicle }: Pick<JobParts, 'vehicle'>, { positionKind }: Mount): MountCase => ({
	engineLayout: vehicle.engineLayout,
	positionKind
});

function listMissing({ battery, place, dayPlan }: JobParts, mount: Mount): Part[] {
	const present: Record<Part, unknown> = { battery, place, dayPlan, survey: mount.surveyComplete || null };
	return (Object.keys(PARTS) as Part[]).filter((part) => present[part] === null);
}

/** Whether a mount can be assessed as the job stands. */
export const isAssessable = (parts: JobParts, mount: Mount): boolean =>
	listMissing(parts, mount).length === 0;

/** The fields of a record that its schema knows, as they are stored: what was let in once is not refused later. */
function fieldsOf<S extends z.ZodObject>(schema: S, record: object): z.output<S> {
	const values = record as Record<string, unknown>;
	return Object.fromEntries(Object.keys(schema.shape).map((key) => [key, values[key]])) as z.output<S>;
}

function measuredOf(
	{ job, customer, vehicle, battery, place, dayPlan }: JobParts,
	mount: Mount,
	book: BookView
): MeasuredInputs {
	const at = fieldsOf(placeSiteSchema, place!);
	return {
		jobNumber: job.number,
		customerName: customer.name,
		vehicle: fieldsOf(vehicleInputSchema, vehicle),
		battery: fieldsOf(batteryInputSchema, battery!),
		mount: {
			letter: mount.letter,
			name: mount.name,
			survey: { ...mount.survey, positionKind: mount.positionKind }
		},
		...(mount.cable ? { cable: mount.cable } : {}),
		dayPlan: fieldsOf(dayPlanInputSchema, dayPlan!),
		place: at,
		hotDay: {
			hotDayMaxC: job.hotDayMaxC ?? at.hotDayMaxC,
			dailyRangeK: job.dailyRangeK ?? at.dailyRangeK,
			sunPeakWPerM2: job.sunPeakWPerM2 ?? at.sunPeakWPerM2
		},
		touring: touringYearOf({ job, place: place! }),
		book: { number: book.number, name: book.name, coefficients: coefficientsOf(book) }
	};
}

/** Everything that goes into an assessment as the job stands now; says all that is missing at once. */
export function gatherInputs(parts: JobParts, mount: Mount, book: BookView): AssessmentInputs {
	const missing = listMissing(parts, mount);
	if (missing.length > 0) {
		const problems = missing.map((part) => ({ path: part, message: PARTS[part] }));
		const sentences = problems.map(({ message }) => message).join(' ');
		throw new AppError('conflict', `Mount ${mount.letter} cannot be assessed yet. ${sentences}`, problems);
	}
	return completeInputs(measuredOf(parts, mount, book));
}
