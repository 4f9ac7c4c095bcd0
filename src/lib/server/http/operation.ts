import type { z } from 'zod';
import type { Action } from '../policies';

export type Method = 'GET' | 'POST' | 'PUT' | 'DELETE';

/** One thing that the API does: what it takes, what it gives, and who may. Endpoint and document are made from it. */
export interface Operation<
	Params extends z.ZodObject = z.ZodObject,
	Query extends z.ZodObject = z.ZodObject,
	Body extends z.ZodType = z.ZodType,
	Answer extends z.ZodType = z.ZodType
> {
	id: string;
	method: Method;
	/** As in the route folder: /api/v1/places/[placeId]. */
	path: string;
	/** What a person must be allowed to do. */
	action: Action;
	summary: string;
	params?: Params;
	query?: Query;
	body?: Body;
	answer: Answer;
	/** Status of a good answer. */
	status: 200 | 201;
}

export function defineOperation<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Body extends z.ZodType,
	Answer extends z.ZodType
>(operation: Operation<Params, Query, Body, Answer>): Operation<Params, Query, Body, Answer> {
	return operation;
}
