import { GROUPINGS, type Accuracy, type Grouping, type ReadingKind } from '$lib/schemas/accuracy';

/** What the address of the page says of its list. */
export type ReadingsParams = Partial<
	Record<'kind' | 'book' | 'zone' | 'position' | 'show' | 'cursor', string | number>
>;

/** The address with what is set alone. */
export function readingsHref(params: ReadingsParams, path = '/accuracy'): string {
	const given = Object.entries(params).filter(
		([name, value]) => value !== undefined && value !== '' && !(name === 'show' && value === 'counted')
	);
	const query = new URLSearchParams(given.map(([name, value]) => [name, String(value)]));
	return query.size > 0 ? `${path}?${query}` : path;
}

/** To the list itself, which stands far down the page. */
export const toList = (params: ReadingsParams): string => `${readingsHref(params)}#readings`;

interface Choice {
	value: string;
	label: string;
}

/** What occurs, to choose from: kinds of readings, and what they are told apart by. */
export function listChoices({ temperatures, cutOuts, capacity }: Accuracy): {
	kinds: ReadingKind[];
	by: Record<Grouping, Choice[]>;
} {
	const parts = [
		...temperatures.map(({ kind, by }) => ({ kind, by })),
		...(cutOuts ? [{ kind: 'cut-out' as const, by: cutOuts.by }] : []),
		...(capacity && capacity.by.book.length > 0 ? [{ kind: 'capacity' as const, by: capacity.by }] : [])
	];
	const choicesOf = (grouping: Grouping): Choice[] => {
		const names = new Map(parts.flatMap(({ by }) => by[grouping].map(({ key, name }) => [key, name])));
		return [...names].map(([value, label]) => ({ value, label }));
	};
	return {
		kinds: parts.map(({ kind }) => kind),
		by: Object.fromEntries(GROUPINGS.map((grouping) => [grouping, choicesOf(grouping)])) as Record<
			Grouping,
			Choice[]
		>
	};
}
