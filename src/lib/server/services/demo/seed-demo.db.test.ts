import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
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
import { fitInputSchema } from '$lib/schemas/fits';
import { parseScenario, type ScenarioInput } from '$lib/thermal';
import { reproduceAssessment } from '../assessments';
import { findBreak } from '../audit';
import { createFit, followFit, getFit, listChoices, prepareFit } from '../fits';
import { finishReruns } from '../reruns/run-reruns';
import { fillWithDemo, seedDemo } from './seed-demo';
import { VERDICTS } from '$lib/schemas/verdicts';
import type { SignedInPerson } from '$lib/schemas/people';

useTestDatabase();

async function findPerson(workshop: Workshop, role: 'manager' | 'engineer'): Promise<SignedInPerson> {
	const person = await Person.findOne({ where: { workshopId: workshop.id, role } });
	if (!person) throw new Error(`The demo has no ${role}.`);
	const { id, workshopId, name, email } = person;
	return { id, workshopId, workshopName: workshop.name, customerId: null, name, email, role };
}

async function findDemo(): Promise<Workshop> {
	const demo = await Workshop.findOne({ where: { name: workshops[0]?.name ?? '' } });
	if (!demo) throw new Error('Nothing was seeded.');
	return demo;
}

interface Truth {
	coefficients: Record<string, Record<string, number>>;
	assessed: ScenarioInput;
}
const TRUTH = JSON.parse(readFileSync(join('reference-data', 'demo-traces', 'truth.json'), 'utf8')) as Truth;

/** It signs, measures and assesses fourteen jobs and then makes every assessment again. */
const LONG_MS = 180_000;

beforeAll(async () => {
	await fillWithDemo();
}, LONG_MS);

describe('the demo workshop', () => {
	it(
		'has people of every role, thirteen jobs with a customer each in four climates, and every verdict',
		async () => {
			const demo = await findDemo();
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
			const manager = await findPerson(demo, 'manager');
			for (const { id } of assessments)
				expect(await reproduceAssessment(manager, id)).toMatchObject({ same: true });
			expect(await findBreak(demo.id)).toBeNull();
			expect(await seedDemo()).toBe('there already');
		},
		LONG_MS
	);

	it(
		'has traces of the very mount that they stand at: a fit to them finds what is true, and follows every channel',
		async () => {
			const engineer = await findPerson(await findDemo(), 'engineer');
			const traces = await Trace.findAll({ where: { workshopId: engineer.workshopId } });
			const assessment = await Assessment.findOne({ where: { mountId: traces[0]!.mountId } });
			expect(parseScenario(assessment!.inputs.scenario)).toEqual(parseScenario(TRUTH.assessed));

			const { coefficients: choices } = await listChoices(engineer);
			const truths = Object.entries(TRUTH.coefficients).flatMap(([group, values]) =>
				Object.entries(values).map(([key, value]) => ({ group, key, value }))
			);
			const coefficients = truths.map(({ group, key }) => ({
				...{ group, key, prior: choices.find((each) => each.group === group && each.key === key)!.prior }
			}));
			const asked = traces.map(({ id: traceId }) => ({ traceId }));
			const input = fitInputSchema.parse({ name: 'All three', traces: asked, coefficients });
			const { id } = await createFit(engineer, input, await prepareFit(engineer, input));
			await followFit(engineer, id);
			const { state, isSynthetic, result } = await getFit(engineer, id);
			expect({ state, isSynthetic, misfits: result!.misfits }).toEqual({
				...{ state: 'done', isSynthetic: true, misfits: [] }
			});
			for (const { group, key, value } of truths) {
				const found = result!.estimates.find((each) => each.group === group && each.key === key)!;
				expect([found.low < value, value < found.high], key).toEqual([true, true]);
				expect(Math.abs(found.value / value - 1), key).toBeLessThan(0.05);
			}
			// What was put in as noise is 0.3 K; the bay follows the outside air, which is read with as much, on top.
			const { before, after } = result!.errors.fitted;
			for (const channel of ['bayAirC', 'exhaustShieldC', 'caseC', 'cellC'] as const) {
				expect(after.byChannel[channel]!.rmsK, channel).toBeLessThan(0.5);
				expect(before.byChannel[channel]!.rmsK, channel).toBeGreaterThan(after.byChannel[channel]!.rmsK);
			}
		},
		LONG_MS
	);
});
