import { drawRibbonPictures } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getRecommendationPaper } from '$lib/server/services/papers';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'assessments.read');
	const id = pageId(event.params.recommendationId);
	const paper = await orPageError(getRecommendationPaper(person, id));
	return { ...paper, pictures: drawRibbonPictures(paper.ribbon, ['print'], 'day', 'print') };
};
