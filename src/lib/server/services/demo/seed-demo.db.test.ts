import { describe, expect, it } from 'vitest';
import workshops from '../../../../../seeds/demo-workshops.json';
import { useTestDatabase } from '../../../../../tests/support/services';
import {
	Assessment,
	Customer,
	Job,
	Person,
	Place,
	Recommendation,
	RerunItem,
	Trace,
	Workshop
} from '../../db/models';
import { reproduceAssessment } from '../assessments';
import { findBreak } from '../audit';
import { finishReruns } from '../reruns/run-reruns';
import { fillWithDemo, seedDemo } from './seed-demo';
import { VERDICTS } from '$lib/schemas/verdicts';
import type { SignedInPerson } from '$lib/schemas/people';

useTestDatabase();

async function findManager(workshop: Workshop): Promise<SignedInPerson> {
	const person = await Person.findOne({ where: { workshopId: workshop.id, role: 'manager' } });
	if (!person) throw new Error('The demo has no manager.');
	const { id, workshopId, name, email } = person;
	return { id, workshopId, workshopName: workshop.name, customerId: null, name, email, role: 'manager' };
}

/** It signs, measures and assesses fourteen jobs and then makes every assessment again. */
const LONG_MS = 180_000;

describe('the demo workshop', () => {
	it(
		'has people of every role, thirteen jobs with a customer each in four climates, and every verdict',
		async () => {
			await fillWithDemo();
			const demo = await Workshop.findOne({ where: { name: workshops[0]?.name ?? '' } });
			if (!demo) throw new Error('Nothing was seeded.');
			const where = { workshopId: demo.id };
			const people = await Person.findAll({ where });
			expect(new Set(people.map(({ role }) => role))).toEqual(
				new Set(['installer', 'engineer', 'manager', 'customer'])
			);
			expect(people.length).toBeGreaterThanOrEqual(4);
			const jobs = await Job.findAll({ where });
			expect(jobs).toHaveLength(13);
			expect(new Set(jobs.map(({ customerId }) => customerId)).size).toBe(13);
			expect(await Customer.count({ where })).toBe(13);
			const places = await Place.findAll({ where: { id: jobs.flatMap(({ placeId }) => placeId ?? []) } });
			expect(new Set(places.map(({ climateZone }) => climateZone)).size).toBe(4);
			const assessments = await Assessment.findAll({ where });
			expect(new Set(assessments.map(({ verdict }) => verdict))).toEqual(new Set(VERDICTS));
			// One goes ahead against its verdict, with a name and a reason.
			expect(await Recommendation.count({ where: { ...where, againstVerdict: true } })).toBe(1);
			// One of them has a battery that nothing switches off, under the bonnet and elsewhere.
			const withoutBms = assessments.filter(({ result }) => result.leadAcid);
			expect(new Set(withoutBms.map(({ jobId }) => jobId)).size).toBe(1);
			expect(withoutBms).toHaveLength(2);
			// A book for some mounts came into force, and changed what was said of one.
			await finishReruns();
			expect(await RerunItem.findAll({ where })).toMatchObject([{ state: 'done', verdictChanged: true }]);
			// Three traces that were made up are at hand, and say so.
			const traces = await Trace.findAll({ where });
			expect(traces.map(({ state, isSynthetic }) => [state, Boolean(isSynthetic)])).toEqual(
				Array(3).fill(['read', true])
			);
			const manager = await findManager(demo);
			for (const { id } of assessments)
				expect(await reproduceAssessment(manager, id)).toMatchObject({ same: true });
			expect(await findBreak(demo.id)).toBeNull();
			expect(await seedDemo()).toBe('there already');
		},
		LONG_MS
	);
});
