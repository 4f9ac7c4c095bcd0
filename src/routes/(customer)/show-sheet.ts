import { drawRibbonPictures } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { airAt, nameLeg } from '$lib/components/charts/day-ribbon/ribbon-data';
import { askSchema } from '$lib/schemas/questions';
import { acknowledgeSchema, type SheetView } from '$lib/schemas/sheets';
import { loadForm } from '$lib/server/http/forms';

/** A stored sheet as its page shows it: the words as they are, the picture drawn from its stored data. */
export async function showSheet(sheet: SheetView, askedBy = '') {
	const { content, contentSha256, acknowledgement, newerSentAt, questions, lessons, logo } = sheet;
	const { ribbon, ...words } = content;
	const legs = ribbon.legs.map((leg) => ({ ...leg, kind: nameLeg(leg) }));
	const day = { ...ribbon, legs, air: airAt(ribbon.position), band: null };
	return {
		...{ words, acknowledgement, newerSentAt, questions, lessons, logo, day },
		screen: drawRibbonPictures(day, ['phone', 'desk'], 'screen'),
		paper: drawRibbonPictures(day, ['print'], 'paper'),
		form: await loadForm(acknowledgeSchema, { contentSha256 }),
		askForm: await loadForm(askSchema, { askedBy })
	};
}
export type ShownSheet = Awaited<ReturnType<typeof showSheet>>;
