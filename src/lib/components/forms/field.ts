/** What every field of a form takes. */
export interface FieldProps {
	name: string;
	label: string;
	hint?: string;
	/** One sentence, as the summary at the top repeats it. */
	error?: string | string[];
	/** The bay's size of targets. */
	big?: boolean;
	/** The label is there for those who listen, but not shown: the page's heading asks already. */
	hideLabel?: boolean;
	required?: boolean;
	disabled?: boolean;
}

/** One error for a field: a dotted path, and the sentence. */
export interface FieldProblem {
	path: string;
	message: string;
}

/** The id of the box of a field, so that the summary can lead to it: "legs.0.minutes" → "field-legs-0-minutes". */
export const fieldId = (name: string): string => `field-${name.replace(/[^A-Za-z0-9_-]+/g, '-')}`;

export const firstError = (error: string | string[] | undefined): string | undefined =>
	Array.isArray(error) ? error[0] : error;

/** Ids of the hint and the error, for aria-describedby; undefined when there is neither. */
export function describedBy(name: string, hint?: string, error?: string | string[]): string | undefined {
	const id = fieldId(name);
	const ids = [hint && `${id}-hint`, firstError(error) && `${id}-error`].filter(Boolean);
	return ids.length > 0 ? ids.join(' ') : undefined;
}
