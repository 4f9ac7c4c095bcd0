import { redirect } from '@sveltejs/kit';
import { drawRibbonPictures } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { toRibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';
import { dayLimitsOf } from '$lib/format/heat-limits';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { presentReport } from '$lib/server/presenters/reports';
import {
	assessJob,
	assessMount,
	getAssessment,
	listMountOutcomes,
	reproduceAssessment
} from '$lib/server/services/assessments';
import { peekOutlookReport } from '$lib/server/services/outlook-reports';
import { newestRecommendation } from '$lib/server/services/recommendations';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'assessments.read');
	const assessment = await orPageError(getAssessment(person, pageId(event.params.assessmentId)));
	const { id, jobId, mountId, inputs, result, isCurrent, bookId, headroomK } = assessment;
	const outcomes = await orPageError(listMountOutcomes(person, jobId));
	const recommendation = await orPageError(newestRecommendation(person, jobId));
	const others = outcomes.filter((outcome) => outcome.mountId !== mountId);
	const sayTrouble = (error: unknown) => logger.error({ assessmentId: id, err: error }, 'outlook failed');
	const { told, waiting } = await orPageError(peekOutlookReport(person, assessment, others, sayTrouble));
	const { positionKind } = inputs.mount.survey;
	const band = told?.outlook.day.band ?? null;
	const ribbon = toRibbonData(result, dayLimitsOf(inputs.battery), positionKind, band);
	return {
		outlook: told?.report ?? null,
		...{ id, jobId, mountId, isCurrent, bookId, headroomK, ribbon },
		jobNumber: inputs.jobNumber,
		customerName: inputs.customerName,
		vehicle: `${inputs.vehicle.make} ${inputs.vehicle.model}`,
		mount: inputs.mount,
		chemistry: inputs.battery.chemistry,
		ledger: result.ledger,
		report: presentReport(assessment),
		pictures: drawRibbonPictures(ribbon, ['desk', 'phone'], 'day'),
		newest: outcomes.find((outcome) => outcome.mountId === mountId)?.assessment?.id ?? null,
		...{ others, waiting },
		recommendation: recommendation?.assessment.id === id ? recommendation : null
	};
};

/** Runs something on this page's assessment and goes on to what it gives. */
async function goOn(event: RequestEvent, next: (id: number) => Promise<string>): Promise<never> {
	redirect(303, await orPageError(next(pageId(event.params.assessmentId))));
}

export const actions: Actions = {
	again: async (event) => {
		const person = guard(event, 'assessments.run');
		return goOn(event, async (id) => {
			const { mountId } = await getAssessment(person, id);
			return `/assessments/${(await assessMount(person, { mountId })).id}`;
		});
	},
	others: async (event) => {
		const person = guard(event, 'assessments.run');
		return goOn(event, async (id) => {
			const { jobId } = await getAssessment(person, id);
			await assessJob(person, jobId);
			return `/assessments/${id}`;
		});
	},
	reproduce: async (event) => {
		const person = guard(event, 'assessments.read');
		return { proof: await orPageError(reproduceAssessment(person, pageId(event.params.assessmentId))) };
	}
};
