import { drawRibbonPictures } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { toRibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';
import { dayLimitsOf } from '$lib/format/heat-limits';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { presentReport } from '$lib/server/presenters/reports';
import { getOutlookReport } from '$lib/server/services/outlook-reports';
import { getRecommendationDocument } from '$lib/server/services/recommendations';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'assessments.read');
	const id = pageId(event.params.recommendationId);
	const { recommendation, assessment, workshop, logo, customer, others } = await orPageError(
		getRecommendationDocument(person, id)
	);
	const { inputs, result } = assessment;
	// Without the other mounts, whose years may be worked out later: a reprint says what the first print said.
	const { outlook, report } = await orPageError(getOutlookReport(person, assessment, []));
	const { positionKind } = inputs.mount.survey;
	const ribbon = toRibbonData(result, dayLimitsOf(inputs.battery), positionKind, outlook.day.band);
	return {
		...{ recommendation, workshop, logo, others, ribbon },
		customer: { name: inputs.customerName, ...customer },
		chemistry: inputs.battery.chemistry,
		ledger: result.ledger,
		report: presentReport(assessment),
		outlook: report,
		pictures: drawRibbonPictures(ribbon, ['print'], 'day', 'print')
	};
};
