import { readLegNumbers } from '$lib/format/fits';
import { parseDecimal } from '$lib/format/parse';
import type { FitChoice } from '$lib/schemas/fits';

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
