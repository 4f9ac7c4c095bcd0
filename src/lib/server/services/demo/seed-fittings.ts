import { Op, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import { FollowUp } from '../../db/models';
import { addDays, today } from '../days';
import { LIGHT_LEARNING } from '../field-findings';
import { addFieldNote } from '../field-notes';
import { finishFollowUp, saveFitting } from '../fittings';

/** When a demo battery was fitted, how many of its looks are done, when it went dark since, and what was read of it. */
export interface DemoFitting {
	daysAgo: number;
	looksDone: number;
	darkDaysAgo: number[];
	labels?: { daysAgo: number; turnedC: number | null; notTurnedC: number | null; hottestDayC: number }[];
	tests?: { daysAgo: number; capacityAh: number }[];
}

export const TODAY: DemoFitting = { daysAgo: 0, looksDone: 0, darkDaysAgo: [] };

/** A hot day's evening, as a customer would tell it. */
const WENT_DARK = { wentDarkHour: 16.5, cameBackHour: 20.5, withinHours: 1, hottestDayC: 43 };

/** How each invented capacity test was made. */
const SLOW_TEST = { currentA: 5, cutOffV: 10.8, tempC: 24 };

/** Fitted as agreed, some time ago, with what has been noted since. */
export async function seedFitting(
	person: SignedInPerson,
	mountId: number,
	{ daysAgo, looksDone, darkDaysAgo, labels = [], tests = [] }: DemoFitting,
	transaction: Transaction
): Promise<void> {
	const { followUps, installation } = await saveFitting(person, mountId, {
		...{ fittedOn: addDays(today(), -daysAgo), fittedBy: person.name, serialNumber: '', note: '' },
		...{ differences: [], version: null }
	});
	for (const { id, version } of followUps.slice(0, looksDone))
		await finishFollowUp(person, id, { isDone: true, version });
	// Who is overdue was reminded at the time: the demo's mailbox begins without those letters.
	const past = { installationId: installation!.id, dueOn: { [Op.lt]: addDays(today(), 8) } };
	await FollowUp.update({ remindedAt: new Date() }, { where: past, transaction });
	for (const ago of darkDaysAgo)
		await addFieldNote(person, mountId, { kind: 'cut-out', notedOn: addDays(today(), -ago), ...WENT_DARK });
	for (const { daysAgo: ago, ...label } of labels) {
		const note = { kind: 'peak-label', place: 'case', notedOn: addDays(today(), -ago), ...label } as const;
		await addFieldNote(person, mountId, note, LIGHT_LEARNING);
	}
	for (const { daysAgo: ago, capacityAh } of tests) {
		const note = {
			kind: 'capacity-test',
			notedOn: addDays(today(), -ago),
			capacityAh,
			...SLOW_TEST
		} as const;
		await addFieldNote(person, mountId, note);
	}
}
