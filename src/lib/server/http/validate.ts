import type { z } from 'zod';
import { AppError, type ErrorCode, type FieldProblem } from '../errors';
import { sayIssue } from './say-issue';

/** "legs[2].minutes": where in the input a problem lies. */
export function pathText(path: readonly PropertyKey[]): string {
	return path.reduce<string>((text, part) => {
		if (typeof part === 'number') return `${text}[${part}]`;
		return text === '' ? String(part) : `${text}.${String(part)}`;
	}, '');
}

/** Checks input against its schema; throws one coded error with every problem in it. */
export function validate<S extends z.ZodType>(
	schema: S,
	input: unknown,
	code: ErrorCode = 'invalid_input'
): z.output<S> {
	const parsed = schema.safeParse(input, { error: sayIssue });
	if (parsed.success) return parsed.data;
	const problems: FieldProblem[] = parsed.error.issues.map((issue) => ({
		path: pathText(issue.path),
		message: issue.message,
		code: issue.code
	}));
	const first = problems[0];
	const where = first?.path ? `${first.path}: ` : '';
	throw new AppError(code, `${where}${first?.message ?? 'The input is not as it should be.'}`, problems);
}
