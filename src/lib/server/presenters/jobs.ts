import { formatBattery } from '$lib/format/batteries';
import { formatVehicle } from '$lib/format/vehicles';
import type { JobRow, JobView, MountStanding } from '$lib/schemas/jobs';
import type { Assessment, DayPlan, Job, Mount } from '../db/models';
import { presentBattery } from './batteries';
import { presentCustomer } from './customers';
import { presentDayPlan } from './day-plans';
import { presentMount } from './mounts';
import { presentPlace } from './places';
import { presentVehicle } from './vehicles';

/** A job as it was read: with its customer and its vehicle. */
function withOwner({ customer, vehicle }: Job) {
	if (!customer || !vehicle) throw new Error('The job was read without its customer or its vehicle.');
	return { customer, vehicle };
}

export function presentJobRow(job: Job, openQuestions: number): JobRow {
	const { id, number, batteryRecord, place, stage, verdict, assessedChemistry, headroomK, updatedAt } = job;
	const { customer, vehicle } = withOwner(job);
	return {
		...{ id, number, stage, verdict, assessedChemistry, headroomK, openQuestions },
		customerName: customer.name,
		vehicle: formatVehicle(vehicle),
		battery: batteryRecord ? formatBattery(batteryRecord) : null,
		place: place?.name ?? null,
		climateZone: place?.climateZone ?? null,
		updatedAt: updatedAt.toISOString()
	};
}

/** The hot day to plan for: the place's own figures unless the job changed them. */
export function presentHotDay(job: Job): JobView['hotDay'] {
	const { place } = job;
	if (!place) return null;
	return {
		hotDayMaxC: job.hotDayMaxC ?? place.hotDayMaxC,
		dailyRangeK: job.dailyRangeK ?? place.dailyRangeK,
		sunPeakWPerM2: job.sunPeakWPerM2 ?? place.sunPeakWPerM2
	};
}

export function presentStanding(
	{ id, mountId, chemistry, verdict, headroomK, createdAt }: Assessment,
	changedSince: MountStanding['changedSince']
): MountStanding {
	const assessedAt = createdAt.toISOString();
	return { mountId, assessmentId: id, chemistry, verdict, headroomK, assessedAt, changedSince };
}

/** The job sheet: the job with everything that stands on it. */
export function presentJob(
	job: Job,
	mounts: Mount[],
	dayPlan: DayPlan | null,
	standings: MountStanding[]
): JobView {
	const { id, version, number, stage, verdict, headroomK, note, batteryRecord, place } = job;
	const { assessedChemistry } = job;
	const { customer, vehicle } = withOwner(job);
	return {
		...{ id, version, number, stage, verdict, assessedChemistry, headroomK, note },
		customer: presentCustomer(customer),
		vehicle: presentVehicle(vehicle),
		battery: batteryRecord ? presentBattery(batteryRecord) : null,
		place: place ? presentPlace(place) : null,
		hotDay: presentHotDay(job),
		daysOnRoad: job.daysOnRoad ?? null,
		createdAt: job.createdAt.toISOString(),
		updatedAt: job.updatedAt.toISOString(),
		mounts: mounts.map(presentMount),
		standings,
		dayPlan: dayPlan && presentDayPlan(dayPlan)
	};
}
