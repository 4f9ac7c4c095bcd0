import { fail, type RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import { toFormValues } from '$lib/format/form-values';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { saveForm, type FormSteps } from './forms';
import { guard } from './guard';

/**
 * A form that changes a record: like any form, and when somebody saved the record meanwhile the page also gets what it
 * says now, so that the person can compare and decide.
 */
export async function saveEdited<S extends z.ZodObject, Prepared = void>(
	event: RequestEvent,
	steps: FormSteps<S, Prepared> & {
		/** The record as it is now. */
		newest: (person: SignedInPerson) => Promise<Partial<z.input<S>>>;
	}
) {
	const { newest, ...form } = steps;
	let wasChangedMeanwhile = false;
	const save: typeof form.save = async (...given) => {
		try {
			return await form.save(...given);
		} catch (error) {
			wasChangedMeanwhile = error instanceof AppError && error.code === 'changed_meanwhile';
			throw error;
		}
	};
	const answer = await saveForm(event, { ...form, save });
	// What cannot be saved at all is refused in its own words: to offer saving it again would promise too much.
	if (!('status' in answer) || !wasChangedMeanwhile) return answer;
	const now = toFormValues(form.schema, await newest(guard(event, form.action)));
	return fail(409, { ...answer.data, newest: now });
}
