import { redirect } from '@sveltejs/kit';
import { spanOf } from '$lib/components/charts/day-ribbon/frame';
import { renderDayRibbonSvg } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { toRibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';
import { dayLimitsOf } from '$lib/format/heat-limits';
import type { MountOutcome } from '$lib/schemas/assessments';
import type { SignedInPerson } from '$lib/schemas/people';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { presentReport } from '$lib/server/presenters/reports';
import { assessJob, getAssessment, listMountOutcomes } from '$lib/server/services/assessments';
import { getJob } from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

const DESK_PX = 780;
const PHONE_PX = 340;

/** One mount of the comparison: its picture and figures, once it is assessed. */
async function loadColumn(person: SignedInPerson, { letter, name, assessment }: MountOutcome) {
	if (!assessment) return null;
	const view = await getAssessment(person, assessment.id);
	const { figures, maker } = presentReport(view);
	return {
		...{ letter, name, figures, maker },
		id: view.id,
		verdict: view.verdict,
		headroomK: view.headroomK,
		isCurrent: view.isCurrent,
		ribbon: toRibbonData(
			view.result,
			dayLimitsOf(view.inputs.battery),
			view.inputs.mount.survey.positionKind
		),
		chemistry: view.inputs.battery.chemistry
	};
}
type Column = NonNullable<Awaited<ReturnType<typeof loadColumn>>>;

/** The little ribbons, all on the same axes, at the widths of a desk and of a phone. */
function withPictures(columns: Column[]) {
	const span = columns.length > 0 ? spanOf(columns.map(({ ribbon }) => ribbon)) : undefined;
	const draw = ({ letter, ribbon }: Column, width: number) =>
		renderDayRibbonSvg(ribbon, {
			...{ size: 'mini', scheme: 'page', width, idPrefix: `day-${letter}-${width}` },
			...(span ? { span } : {})
		});
	return columns.map((column) => ({
		...column,
		pictures: { desk: draw(column, DESK_PX), phone: draw(column, PHONE_PX) }
	}));
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'assessments.read');
	const jobId = pageId(event.params.jobId);
	const outcomes = await orPageError(listMountOutcomes(person, jobId));
	const columns = await Promise.all(outcomes.map((outcome) => loadColumn(person, outcome)));
	return {
		jobId,
		jobNumber: (await orPageError(getJob(person, jobId))).number,
		mounts: withPictures(columns.filter((column) => column !== null)),
		unassessed: outcomes.filter(({ assessment }) => assessment === null)
	};
};

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'assessments.run');
		const jobId = pageId(event.params.jobId);
		await orPageError(assessJob(person, jobId));
		redirect(303, `/jobs/${jobId}/compare`);
	}
};
