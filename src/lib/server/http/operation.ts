import type { z } from 'zod';
import type { Action } from '../policies';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

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
	/** Takes a file in the place of a JSON body, up to this size. */
	mostFileBytes?: number;
	/** What a file may be sent as that is the body itself. */
	fileMedia?: readonly string[];
	answer: Answer;
	/** Gives a file in the place of JSON. */
	answerMedia?: readonly string[];
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

/** One that takes a file for a record. */
export interface FileOperation<
	Params extends z.ZodObject = z.ZodObject,
	Query extends z.ZodObject = z.ZodObject,
	Answer extends z.ZodType = z.ZodType
> extends Operation<Params, Query, z.ZodType, Answer> {
	params: Params;
	query: Query;
	mostFileBytes: number;
}

export function defineFileOperation<
	Params extends z.ZodObject,
	Query extends z.ZodObject,
	Answer extends z.ZodType
>(operation: FileOperation<Params, Query, Answer>): FileOperation<Params, Query, Answer> {
	return operation;
}

/** One that gives a file. */
export interface ContentOperation<
	Params extends z.ZodObject = z.ZodObject,
	Query extends z.ZodObject = z.ZodObject
> extends Operation<Params, Query, z.ZodType, z.ZodType> {
	params: Params;
	query: Query;
	answerMedia: readonly string[];
}

export function defineContentOperation<Params extends z.ZodObject, Query extends z.ZodObject>(
	operation: ContentOperation<Params, Query>
): ContentOperation<Params, Query> {
	return operation;
}
