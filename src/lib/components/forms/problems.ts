import type { FieldProblem } from './field';

/** Everything that is wrong with a form, as the summary at its top lists it: the whole first, then field by field. */
export function listProblems(errors: Record<string, unknown>, message?: string): FieldProblem[] {
	const ofFields = Object.entries(errors).flatMap(([path, words]) =>
		Array.isArray(words) && typeof words[0] === 'string' ? [{ path, message: words[0] }] : []
	);
	return message ? [{ path: '', message }, ...ofFields] : ofFields;
}
