import { error } from '@sveltejs/kit';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	findAgainst,
	isUndecided,
	recommendationInputSchema,
	type RecommendationView
} from '$lib/schemas/recommendations';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { presentReport } from '$lib/server/presenters/reports';
import { getAssessment, listMountOutcomes } from '$lib/server/services/assessments';
import { getJob } from '$lib/server/services/jobs';
import { snapshotPreDrill } from '$lib/server/services/pre-drill';
import { listRecommendations, makeRecommendation } from '$lib/server/services/recommendations';
import type { Actions, PageServerLoad } from './$types';

/** The assessment that the address asks to recommend, in the words that matter here. */
async function loadChosen(person: SignedInPerson, jobId: number, asked: string | null) {
	if (asked === null) return null;
	const assessment = await getAssessment(person, pageId(asked));
	if (assessment.jobId !== jobId) error(404, { message: 'There is no such assessment here.' });
	const { id, mountId, mountLetter, mountName, chemistry, verdict, headroomK, isCurrent } = assessment;
	const { sentence, maker } = presentReport(assessment);
	const preDrill = await snapshotPreDrill(person, mountId);
	return {
		...{ id, mountId, mountLetter, mountName, chemistry, verdict, headroomK, isCurrent },
		...{ sentence, maker, preDrill, against: findAgainst(assessment) }
	};
}

/** The recommendation that stands, with what its maker says and whether its assessment still holds. */
async function loadStanding(person: SignedInPerson, recommendation: RecommendationView | undefined) {
	if (!recommendation) return null;
	const assessment = await getAssessment(person, recommendation.assessment.id);
	return {
		...recommendation,
		isCurrent: assessment.isCurrent,
		isUndecided: isUndecided(recommendation, assessment),
		maker: presentReport(assessment).maker
	};
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'recommendations.write');
	const jobId = pageId(event.params.jobId);
	const outcomes = await orPageError(listMountOutcomes(person, jobId));
	const asked = event.url.searchParams.get('assessment');
	const chosen = await orPageError(loadChosen(person, jobId, asked));
	const job = await orPageError(getJob(person, jobId));
	const made = await orPageError(listRecommendations(person, jobId));
	return {
		...{ jobId, outcomes, chosen, made },
		jobNumber: job.number,
		chemistry: job.battery?.chemistry ?? '',
		standing: await orPageError(loadStanding(person, made[0])),
		isMade: event.url.searchParams.has('made'),
		form: await loadForm(recommendationInputSchema, chosen ? { assessmentId: chosen.id } : {})
	};
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'recommendations.write',
			schema: recommendationInputSchema,
			save: async (person, data) =>
				`/jobs/${(await makeRecommendation(person, data)).jobId}/recommendation?made`
		})
};
