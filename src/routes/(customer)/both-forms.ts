import { fail, isRedirect, type ActionFailure, type RequestEvent } from '@sveltejs/kit';
import { askSchema } from '$lib/schemas/questions';
import { acknowledgeSchema } from '$lib/schemas/sheets';
import { fillForm, readPageForm, type PageForm } from '$lib/server/http/forms';

/** A page without a script has one form for both, so that what was typed for the one survives sending the other. */
const OTHERS = {
	acknowledge: {
		schema: askSchema,
		isTyped: ({ data }: PageForm): boolean => data.question !== '',
		done: 'We have it: you have read this page. Your question below is not sent yet.'
	},
	ask: {
		schema: acknowledgeSchema,
		isTyped: ({ data }: PageForm): boolean => data.name !== '' || data.understood === true,
		done: 'Your question is with the shop. That you have read this page is not sent yet.'
	}
};

const copyOf = ({ request }: RequestEvent): Promise<FormData> => readPageForm(request.clone());

/** Which of the two the Enter key sends: the question, once there is one, or where only questions are left. */
export async function isQuestion(event: RequestEvent): Promise<boolean> {
	const sent = await copyOf(event);
	return !sent.has('contentSha256') || String(sent.get('question') ?? '').trim() !== '';
}

/** Sends one of the two; what stands in the boxes of the other comes back with the page. */
export async function sendOneOfTwo(
	event: RequestEvent,
	sent: keyof typeof OTHERS,
	send: () => Promise<ActionFailure<{ form: PageForm }> | { form: PageForm }>
) {
	const { schema, isTyped, done } = OTHERS[sent];
	const beside = await fillForm(await copyOf(event), schema, {});
	try {
		const answer = await send();
		if (!('status' in answer)) return { form: answer.form, beside, done: '' };
		return fail(answer.status, { form: answer.data.form, beside, done: '' });
	} catch (thrown) {
		if (isRedirect(thrown) && isTyped(beside)) return { form: null, beside, done };
		throw thrown;
	}
}
