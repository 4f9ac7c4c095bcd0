import { readLegNumbers, sayWrongLegs } from '$lib/format/fits';
import { parseDecimal } from '$lib/format/parse';
import type { FitChoice } from '$lib/schemas/fits';
import type { FieldProblem } from '$lib/components/forms/field';

/** What stands in the boxes, by their names. */
export type FitDraft = Record<string, string>;

const pathOf = ({ group, key }: Pick<FitChoice, 'group' | 'key'>): string => `${group}.${key}`;

/** A number as it was typed; what is none stays as it is, for the schema to refuse. */
const readNumber = (text: string | undefined): number | string => parseDecimal(text ?? '') ?? text ?? '';

/** What the form about a fit asks for, for the schema to check. */
export function readFitForm(
	draft: FitDraft,
	traceIds: readonly number[],
	choices: readonly FitChoice[]
): unknown {
	return {
		name: draft.name ?? '',
		loss: draft.loss,
		leaveOut: draft.leaveOut === 'true',
		traces: traceIds.map((traceId) => {
			const text = draft[`held.${traceId}`] ?? '';
			return { traceId, heldOutLegs: readLegNumbers(text) ?? text };
		}),
		coefficients: choices.map((choice) => {
			const path = pathOf(choice);
			const prior = {
				law: draft[`${path}.law`],
				middle: readNumber(draft[`${path}.middle`]),
				spread: readNumber(draft[`${path}.spread`])
			};
			return { group: choice.group, key: choice.key, prior };
		})
	};
}

/** Legs that are kept back of traces that have no such ones. */
export function listHeldProblems(
	draft: FitDraft,
	traces: readonly { id: number; name: string; legs: readonly unknown[] }[]
): FieldProblem[] {
	return traces.flatMap(({ id, name, legs }) => {
		const path = `held.${id}`;
		const message = sayWrongLegs(name, legs.length, readLegNumbers(draft[path] ?? '') ?? []);
		return message ? [{ path, message }] : [];
	});
}

/** What was refused, as far as this page must know of it. */
interface Refusal {
	message: string;
	problems: readonly { path: string; message: string; limit?: string }[];
}

const PRIOR_LABELS: Readonly<Record<string, string>> = { middle: 'Middle', spread: 'Spread', law: 'Off' };

/** Where in what was asked a problem lies: "coefficients[1].prior.middle", "traces[0].heldOutLegs". */
function placeOf(path: string): { list: string; at: number; part: string } | null {
	const [, list, at, part = ''] = /^(coefficients|traces)\[(\d+)\]\.?(?:prior\.)?(\w*)/.exec(path) ?? [];
	return list ? { list, at: Number(at), part } : null;
}

/** Every problem once, at the box that it is about and in words that say which one that is. */
export function listFitProblems(
	{ message, problems }: Refusal,
	traceIds: readonly number[],
	choices: readonly FitChoice[]
): FieldProblem[] {
	if (problems.length === 0) return [{ path: '', message }];
	const told = problems.map((problem): FieldProblem => {
		const place = placeOf(problem.path);
		if (!place) return { path: problem.path === 'name' ? 'name' : '', message: problem.message };
		if (place.list === 'traces') return { path: `held.${traceIds[place.at]}`, message: problem.message };
		const choice = choices[place.at];
		const label = PRIOR_LABELS[place.part];
		if (!choice || !label) return { path: '', message: problem.message };
		const said = problem.limit ? `${label} must be ${problem.limit}.` : problem.message;
		return { path: `${pathOf(choice)}.${place.part}`, message: `${choice.meaning}: ${said}` };
	});
	return told.filter(
		({ path, message: said }, at) =>
			told.findIndex((each) => each.path === path && each.message === said) === at
	);
}
