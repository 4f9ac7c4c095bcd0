import { randomUUID } from 'node:crypto';
import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { message, setError, superValidate, type SuperValidated } from 'sveltekit-superforms';
import type { z } from 'zod';
import { formShape, parseForm, toFormValues, type FormValues } from '$lib/format/form-values';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { sha256 } from '../hash';
import type { Action } from '../policies';
import { readFormData } from './body';
import { guard, orPageError } from './guard';
import { keepOnce } from './idempotency';
import { zod4 } from './zod-adapter';

/** A form as the page holds it: numbers are the text that was typed, until the schema has read them. */
export type PageForm = SuperValidated<FormValues, string>;

/** A form on its way to the page; its key goes along when it is sent, so that sending it twice does it once. */
export type FreshForm = PageForm & { onceKey: string };

const ONCE_KEY = 'onceKey';

/** The form for a page, with what is known so far in its boxes. */
export async function loadForm<S extends z.ZodObject>(
	schema: S,
	data: Partial<z.input<S>> = {}
): Promise<FreshForm> {
	const shape = formShape(schema);
	const values = toFormValues(schema, data) as never;
	const form = (await superValidate(values, zod4(shape), { errors: false })) as unknown as PageForm;
	return { ...form, onceKey: randomUUID() };
}

type Read<S extends z.ZodObject> = { form: PageForm; data: z.output<S> } | { form: PageForm; data: null };

/** Reads a posted form against its schema; what is wrong stands at its field, what was typed stays. */
export async function readForm<S extends z.ZodObject>(formData: FormData, schema: S): Promise<Read<S>> {
	const form = (await superValidate(formData, zod4(formShape(schema)), {
		errors: false
	})) as unknown as PageForm;
	const parsed = parseForm(schema, Object.fromEntries(formData));
	if ('data' in parsed) return { form, data: parsed.data };
	for (const problem of parsed.errors) setError(form, problem.path as never, problem.message);
	form.valid = false;
	return { form, data: null };
}

/** Puts what a service refused beside its field, or above the form when it concerns the whole. */
export function refuseForm(form: PageForm, error: unknown) {
	if (!(error instanceof AppError)) throw error;
	const named = error.problems.filter((problem) => problem.path in form.data);
	for (const problem of named) setError(form, problem.path as never, problem.message);
	form.valid = false;
	if (named.length === error.problems.length && named.length > 0) return fail(error.status, { form });
	return message(form, error.message, { status: error.status as 400 });
}

/** What a form does where several buttons and the Enter key can ask for it, and the boxes that are about it. */
export interface Deed {
	name: string;
	schema: z.ZodObject;
}

/** What is the same when the same form is sent twice with the same words in it; null for a form that may be. */
export function onceKeyOf(
	{ url }: Pick<RequestEvent, 'url'>,
	formData: FormData,
	deed?: Deed
): string | null {
	if (!formData.has(ONCE_KEY)) return null;
	const isAbout = (box: string): boolean => !deed || box === ONCE_KEY || box in deed.schema.shape;
	const sent = [...formData].filter(([box]) => isAbout(box));
	return `form-${sha256(JSON.stringify([url.pathname, deed?.name ?? url.search, ...sent]))}`;
}

/** Does what a form asks once for the page that it stood on: a second press leads to what the first one made. */
export async function saveOnce<Prepared>(
	{ id: personId }: SignedInPerson,
	event: RequestEvent,
	formData: FormData,
	save: (prepared: Prepared) => Promise<string>,
	prepare: () => Promise<Prepared>,
	deed?: Deed
): Promise<string> {
	const key = onceKeyOf(event, formData, deed);
	const { body } = await keepOnce({ personId, key, request: key ?? '' }, prepare, async (prepared) => ({
		status: 303,
		body: await save(prepared)
	}));
	return body;
}

/** What a page sent, read no further than a form may be long. */
export const readPageForm = (request: Request): Promise<FormData> => orPageError(readFormData(request));

/** A form as it was typed, with some boxes filled in; nothing is checked yet. */
export async function fillForm<S extends z.ZodObject>(
	formData: FormData,
	schema: S,
	filled: FormValues
): Promise<PageForm> {
	const options = { errors: false };
	const form = (await superValidate(formData, zod4(formShape(schema)), options)) as unknown as PageForm;
	return { ...form, data: { ...form.data, ...filled } };
}

/** What a form is read by, and what it does. */
export interface FormSteps<S extends z.ZodObject, Prepared> {
	action: Action;
	schema: S;
	/** The schema for what was sent, where one answer says how others are read. */
	schemaFor?: (sent: FormData) => S;
	/** What it does, where more than one button asks for it. */
	does?: string;
	/** What was sent, where it was read already. */
	sent?: FormData;
	/** What takes seconds and changes nothing: done before, and in no transaction. */
	prepare?: (person: SignedInPerson, data: z.output<S>) => Promise<Prepared>;
	/** Does it, and says where to go next. */
	save: (person: SignedInPerson, data: z.output<S>, prepared: Prepared) => Promise<string>;
}

/**
 * A form's whole way: guard, validate, do (the service authorises, records and keeps it in one transaction), then 303.
 * After any refusal the page comes back with every word still in its box.
 */
export async function saveForm<S extends z.ZodObject, Prepared = void>(
	event: RequestEvent,
	steps: FormSteps<S, Prepared>
) {
	const person = guard(event, steps.action);
	const formData = steps.sent ?? (await readPageForm(event.request));
	const { form, data } = await readForm(formData, steps.schemaFor?.(formData) ?? steps.schema);
	if (data === null) return fail(422, { form });
	const prepare = async () => (await steps.prepare?.(person, data)) as Prepared;
	const save = (prepared: Prepared) => steps.save(person, data, prepared);
	const deed = steps.does === undefined ? undefined : { name: steps.does, schema: steps.schema };
	const next = await saveOnce(person, event, formData, save, prepare, deed).catch((error: unknown) => ({
		refusal: error
	}));
	if (typeof next !== 'string') return refuseForm(form, next.refusal);
	redirect(303, next);
}
