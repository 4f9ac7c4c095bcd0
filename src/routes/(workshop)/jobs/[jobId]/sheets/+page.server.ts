import { error, fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import type { SignedInPerson } from '$lib/schemas/people';
import { isUndecided } from '$lib/schemas/recommendations';
import { sendSheetFormSchema } from '$lib/schemas/sheets';
import { AppError } from '$lib/server/errors';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm, readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { getAssessment } from '$lib/server/services/assessments';
import { getJob } from '$lib/server/services/jobs';
import { newestRecommendation } from '$lib/server/services/recommendations';
import { readSheetSource } from '$lib/server/services/sheet-source';
import { listSheets, retrySheetLetter, sendSheet, withdrawSheet } from '$lib/server/services/sheets';
import type { Actions, PageServerLoad } from './$types';

function readId(text: unknown, what: string): number {
	return idSchema.safeParse(text).data ?? error(404, { message: `There is no such ${what} here.` });
}

/** What the form was opened beside; sheets come the newest first. */
const newestIdOf = (sheets: readonly { id: number }[]): number => sheets[0]?.id ?? 0;

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'sheets.write');
	const jobId = readId(event.params.jobId, 'job');
	const job = await orPageError(getJob(person, jobId));
	const [recommendation, sheets] = await orPageError(
		Promise.all([newestRecommendation(person, jobId), listSheets(person, jobId)])
	);
	const assessment = recommendation
		? await orPageError(getAssessment(person, recommendation.assessment.id))
		: null;
	const asked = idSchema.safeParse(event.url.searchParams.get('withdraw') ?? undefined).data;
	return {
		...{ job, recommendation, sheets },
		isUndecided: recommendation !== null && assessment !== null && isUndecided(recommendation, assessment),
		isOutOfDate: assessment?.isCurrent === false,
		toWithdraw: sheets.find(({ id, withdrawnAt }) => id === asked && withdrawnAt === null) ?? null,
		form: await loadForm(sendSheetFormSchema, {
			version: newestIdOf(sheets),
			sendTo: job.customer.email,
			...(recommendation ? { recommendationId: recommendation.id } : {})
		})
	};
};

/** One button on one sheet: does it and shows the list again, or says why it was not done. */
async function doWithSheet(
	event: RequestEvent,
	work: (person: SignedInPerson, sheetId: number) => Promise<unknown>
) {
	const person = guard(event, 'sheets.write');
	const sheetId = readId((await readPageForm(event.request)).get('sheetId'), 'sheet');
	try {
		await work(person, sheetId);
	} catch (refusal) {
		if (!(refusal instanceof AppError)) throw refusal;
		return fail(refusal.status, { refusal: refusal.message });
	}
	redirect(303, `${event.url.pathname}#sent`);
}

export const actions: Actions = {
	send: (event) =>
		saveEdited(event, {
			action: 'sheets.write',
			schema: sendSheetFormSchema,
			// What the page is written from may take seconds to work out.
			prepare: (person, { recommendationId }) => readSheetSource(person, recommendationId),
			save: async (person, { version, ...data }) => {
				const jobId = readId(event.params.jobId, 'job');
				await sendSheet(person, { ...data, jobId, newestId: version });
				return `/jobs/${jobId}/sheets`;
			},
			newest: async (person) => ({
				version: newestIdOf(await listSheets(person, readId(event.params.jobId, 'job')))
			})
		}),
	withdraw: (event) => doWithSheet(event, withdrawSheet),
	retry: (event) => doWithSheet(event, retrySheetLetter)
};
