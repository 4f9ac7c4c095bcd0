import { expect, it } from 'vitest';

/** How far a published value can be trusted: what was read, worked out, remembered, or is only custom. */
export const STANDINGS = [
	'read in the source',
	'worked from the published equation',
	'from memory',
	'common practice'
] as const;

/** A value from outside the project, and how near to it we have to come. */
export interface PublishedValue {
	/** What is checked, in words: unique among all checks. */
	name: string;
	/** Authors, title, edition or year. */
	source: string;
	/** Table, example, equation or section there. */
	place: string;
	standing: (typeof STANDINGS)[number];
	expected: number;
	/** Unit of the value; empty for a plain number. */
	unit: string;
	tolerance: { absolute: number } | { relative: number };
	/** Why the tolerance is as wide as it is. */
	because: string;
}

/** What the report prints of a check; `computed` is null when the computation threw. */
export interface CheckResult extends PublishedValue {
	computed: number | null;
}

declare module 'vitest' {
	interface TaskMeta {
		published?: CheckResult;
	}
}

/** The deviation that the tolerance allows, in the unit of the value. */
export function allowedDeviation({ expected, tolerance }: PublishedValue): number {
	return 'absolute' in tolerance ? tolerance.absolute : tolerance.relative * Math.abs(expected);
}

/** One test that holds a computed value to a published one, and keeps both for the report of `npm run reference`. */
export function checkAgainst(published: PublishedValue, compute: () => number): void {
	it(`${published.name} (${published.source}, ${published.place})`, ({ task }) => {
		task.meta.published = { ...published, computed: null };
		const computed = compute();
		task.meta.published.computed = computed;
		expect(Math.abs(computed - published.expected)).toBeLessThanOrEqual(allowedDeviation(published));
	});
}
