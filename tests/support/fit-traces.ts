import type { SignedInPerson } from '../../src/lib/schemas/people';
import type { TraceView } from '../../src/lib/schemas/traces';
import { assessJob } from '../../src/lib/server/services/assessments';
import { makeAssessableJob } from './assessable-job';
import { writeTrueDay } from './fit-day';
import { readAs, sendTrace } from './traces';

/** A mount that was assessed, with traces of days of it: invented by this test, and not called synthetic in it. */
export async function makeFittable(
	{ installer, engineer }: { installer: SignedInPerson; engineer: SignedInPerson },
	seeds: readonly number[] = [1],
	isSynthetic = false
): Promise<{ jobId: number; mountId: number; traces: TraceView[]; texts: string[] }> {
	const { jobId, hot } = await makeAssessableJob(installer);
	const assessments = await assessJob(installer, jobId);
	const { inputs } = assessments.find(({ mountId }) => mountId === hot.id)!;
	const traces: TraceView[] = [];
	const texts = seeds.map((seed) => writeTrueDay(inputs.scenario, seed));
	for (const [at, text] of texts.entries()) {
		traces.push(
			await readAs(engineer, await sendTrace(engineer, hot.id, text, `day-${seeds[at]}.csv`), { isSynthetic })
		);
	}
	return { jobId, mountId: hot.id, traces, texts };
}
