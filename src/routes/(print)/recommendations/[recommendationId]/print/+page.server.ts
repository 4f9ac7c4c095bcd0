import { drawRibbonPictures } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { toRibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';
import { dayLimitsOf } from '$lib/format/heat-limits';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { presentReport } from '$lib/server/presenters/reports';
import { getRecommendationDocument } from '$lib/server/services/recommendations';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'assessments.read');
	const id = pageId(event.params.recommendationId);
	const { recommendation, assessment, workshop, customer, others } = await orPageError(
		getRecommendationDocument(person, id)
	);
	const { inputs, result } = assessment;
	const ribbon = toRibbonData(result, dayLimitsOf(inputs.battery), inputs.mount.survey.positionKind);
	return {
		...{ recommendation, workshop, others, ribbon },
		customer: { name: inputs.customerName, ...customer },
		chemistry: inputs.battery.chemistry,
		ledger: result.ledger,
		report: presentReport(assessment),
		pictures: drawRibbonPictures(ribbon, ['print'], 'day', 'print')
	};
};
