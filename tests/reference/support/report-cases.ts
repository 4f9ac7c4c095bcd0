import { expect, it } from 'vitest';
import { checkAgainst, type PublishedValue } from './check-against';
import { readText } from './reference-data';

/** A published value with the formula that must give it, and what the formula takes. */
export interface PublishedCase extends PublishedValue {
	formula: string;
	/** In the order in which the formula takes them. */
	inputs: unknown[];
}

export type Formula = (...inputs: never[]) => number;

/** The cases of one file; their sources stand in `sources.json`, once each, and are called by a short name. */
export function readPublishedCases(file: string): PublishedCase[] {
	const sources = JSON.parse(readText('handbook-cases/sources.json')) as Record<string, string>;
	const cases = JSON.parse(readText(`handbook-cases/${file}.json`)) as PublishedCase[];
	return cases.map((published) => {
		const source = sources[published.source];
		if (source === undefined) throw new Error(`${file}.json has an unknown source: ${published.source}`);
		return { ...published, source };
	});
}

/** One check for each case of a file, and one test that no formula is left without a case. */
export function checkCases(file: string, formulas: Readonly<Record<string, Formula>>): void {
	const cases = readPublishedCases(file);
	for (const { formula, inputs, ...published } of cases) {
		checkAgainst(published, () => {
			const compute = formulas[formula];
			if (!compute) throw new Error(`No formula is called "${formula}".`);
			return compute(...(inputs as never[]));
		});
	}
	it(`${file}.json leaves no formula without a case`, () => {
		expect([...new Set(cases.map(({ formula }) => formula))].sort()).toEqual(Object.keys(formulas).sort());
	});
}
