import ical, { ICalCalendarMethod } from 'ical-generator';
import type { SignedInPerson } from '$lib/schemas/people';
import { FollowUp, Installation, Job, Vehicle } from '../db/models';
import { env } from '../env';
import { AppError } from '../errors';
import { addDays } from './days';
import { getFitting } from './fittings';

/**
 * The follow-ups of a mount that are still to be done, as a calendar file (RFC 5545). A date keeps its identity however
 * often the file is read, and a later version of it replaces the earlier.
 */
export async function writeCalendar(person: SignedInPerson, mountId: number): Promise<string> {
	const fitting = await getFitting(person, mountId);
	if (!fitting.installation)
		throw new AppError('conflict', 'Nothing has been fitted yet: there are no dates.');
	const installation = await Installation.findByPk(fitting.installation.id);
	const job = await Job.findByPk(fitting.jobId);
	const vehicle = job && (await Vehicle.findByPk(job.vehicleId));
	const open = await FollowUp.findAll({ where: { installationId: installation!.id, doneOn: null } });
	const calendar = ical({ name: 'Battery follow-ups', method: ICalCalendarMethod.PUBLISH });
	const link = `${env().ORIGIN}/mounts/${mountId}/fitted`;
	for (const { id, dueOn, afterMonths, version, updatedAt } of open) {
		calendar.createEvent({
			id: `follow-up-${id}@soakline.invalid`,
			sequence: version,
			stamp: updatedAt,
			start: new Date(`${dueOn}T00:00:00Z`),
			end: new Date(`${addDays(dueOn, 1)}T00:00:00Z`),
			allDay: true,
			summary: `Look at the battery, job ${job?.number ?? ''}`,
			description:
				`${afterMonths === 1 ? 'One month' : `${afterMonths} months`} after fitting. ${vehicle?.make ?? ''} ${vehicle?.model ?? ''}`.trim(),
			url: link
		});
	}
	return calendar.toString();
}
