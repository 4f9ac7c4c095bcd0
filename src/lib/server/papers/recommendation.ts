import { toRibbonData, type RibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';
import { listCautions } from '$lib/format/cautions';
import { dayLimitsOf } from '$lib/format/heat-limits';
import type { MountOutcome } from '$lib/schemas/assessments';
import type { CautionLine } from '$lib/schemas/caution-texts';
import type { PaperPhoto } from '$lib/schemas/papers';
import type { OutlookReport } from '$lib/schemas/outlook-reports';
import type { Outlook } from '$lib/schemas/outlooks';
import type { RecommendationDocument, RecommendationView } from '$lib/schemas/recommendations';
import type { AssessmentReport } from '$lib/schemas/reports';
import type { LedgerEntry } from '$lib/thermal/assess/types';
import { presentReport } from '../presenters/reports';

/** All that the paper says, the same in print and as a document. */
export interface RecommendationPaper {
	recommendation: RecommendationView;
	workshop: RecommendationDocument['workshop'];
	logo: RecommendationDocument['logo'];
	customer: { name: string; phone: string; email: string };
	chemistry: string;
	/** As they read when it was issued. */
	cautions: CautionLine[];
	others: MountOutcome[];
	ribbon: RibbonData;
	ledger: LedgerEntry[];
	report: AssessmentReport;
	outlook: OutlookReport;
	/** What was photographed before it was issued, the picture of the mount first. */
	photos: PaperPhoto[];
}

/** What was recommended and what its estimate says, as the paper tells it. */
export function readRecommendation(
	{ recommendation, assessment, workshop, logo, customer, others }: RecommendationDocument,
	{ outlook, report }: { outlook: Outlook; report: OutlookReport },
	photos: PaperPhoto[]
): RecommendationPaper {
	const { inputs, result } = assessment;
	const { chemistry } = inputs.battery;
	const { positionKind } = inputs.mount.survey;
	return {
		...{ recommendation, workshop, logo, others, photos },
		customer: { name: recommendation.madeOutTo, ...customer },
		chemistry,
		cautions: recommendation.cautions ?? listCautions(chemistry),
		ribbon: toRibbonData(result, dayLimitsOf(inputs.battery), positionKind, outlook.day.band),
		ledger: result.ledger,
		report: presentReport(assessment),
		outlook: report
	};
}
