import { z } from 'zod';
import { AppError } from '../errors';
import { tokenHash } from '../hash';

const SEAL_CHARS = 32;

const sealOf = (scope: string, position: string): string =>
	tokenHash(`cursor ${scope} ${position}`).slice(0, SEAL_CHARS);

const notOurs = (): AppError => {
	const message = 'This page of the list cannot be found: go back to its start.';
	return new AppError('invalid_input', message, [{ path: 'cursor', message }]);
};

/** Where a page of a list ended, sealed, so that nobody can write one of their own or use it in another list. */
export function writeCursor(scope: string, position: unknown): string {
	const encoded = Buffer.from(JSON.stringify(position)).toString('base64url');
	return `${encoded}.${sealOf(scope, encoded)}`;
}

export function readCursor<S extends z.ZodType>(scope: string, cursor: string, schema: S): z.output<S> {
	const [encoded = '', seal = ''] = cursor.split('.');
	if (cursor !== `${encoded}.${seal}` || seal !== sealOf(scope, encoded)) throw notOurs();
	return schema.parse(JSON.parse(Buffer.from(encoded, 'base64url').toString()));
}
