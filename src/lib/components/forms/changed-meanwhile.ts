import type { FormValues } from '$lib/format/form-values';

export interface ChangedField {
	label: string;
	mine: string;
	now: string;
}

const sayValue = (value: string | boolean | undefined): string => {
	if (typeof value === 'boolean') return value ? 'yes' : 'no';
	return value === undefined || value === '' ? 'nothing' : value;
};

/** Where a record that was saved by somebody else meanwhile differs from what was typed; null when nobody saved it. */
export function findChanges(
	mine: FormValues,
	now: FormValues | undefined,
	labels: Record<string, string>
): ChangedField[] | null {
	if (!now || now.version === mine.version) return null;
	return Object.entries(labels)
		.filter(([field]) => mine[field] !== now[field])
		.map(([field, label]) => ({ label, mine: sayValue(mine[field]), now: sayValue(now[field]) }));
}

/** What the record says now, when the answer to a save brought it because somebody else had saved meanwhile. */
export function findNewest(answer: object | null): FormValues | undefined {
	return answer && 'newest' in answer ? (answer.newest as FormValues) : undefined;
}
