import { describe, expect, it } from 'vitest';
import { makeInvented } from '../../../../../tests/support/review';
import { useTestDatabase } from '../../../../../tests/support/services';
import { reviewListQuerySchema } from '$lib/schemas/review';
import { listInstallations } from './review-list';
import { writeReviewCsv } from './review-csv';

useTestDatabase();

/** No cell of invented installations holds a comma but those in quotes, which stand behind the ones read here. */
async function readCells(person: Parameters<typeof writeReviewCsv>[0]): Promise<Record<string, string>[]> {
	let text = '';
	for await (const part of writeReviewCsv(person, reviewListQuerySchema.parse({}))) text += part;
	const [heads, ...lines] = text
		.replace(/^\uFEFF/, '')
		.trimEnd()
		.split('\r\n');
	const names = heads!.split(',');
	return lines.map((line) => Object.fromEntries(line.split(',').map((cell, at) => [names[at], cell])));
}

describe('the review as a table for other programs', () => {
	it('tells what is not known from what never goes dark, and neither from a zero', async () => {
		const person = await makeInvented(120, 7);
		const cells = await readCells(person);
		const { rows } = await listInstallations(person, reviewListQuerySchema.parse({ limit: 200 }));
		expect(new Set(rows.map(({ chance }) => chance))).toEqual(new Set(['known', 'unknown', 'never']));
		const words = { known: 'known', unknown: 'not known', never: 'no BMS' };
		expect(cells.map((row) => row['Chance of going dark'])).toEqual(rows.map(({ chance }) => words[chance]));
		for (const row of cells) {
			const isKnown = row['Chance of going dark'] === 'known';
			expect(row['Predicted dark days since fitted'] !== '').toBe(isKnown);
			expect(row['Expected dark days a year'] !== '').toBe(isKnown);
		}
	});
});
