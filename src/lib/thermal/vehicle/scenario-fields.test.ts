import { describe, expect, it } from 'vitest';
import { SCENARIO_FIELDS } from './scenario-fields';

describe('what a field means', () => {
	const numbers = SCENARIO_FIELDS.filter(({ kind }) => kind === 'number');

	it('is said without the field before it: it stands alone in a list', () => {
		const bare = numbers.filter(({ meaning }) => /\b(to|of|from|in) it\b/.test(meaning));
		expect(bare.map(({ group, key }) => `${group}.${key}`)).toEqual([]);
	});

	it('tells what grows with the speed from one another', () => {
		const meanings = numbers.filter(({ key }) => /PerS/.test(key)).map(({ meaning }) => meaning);
		expect(meanings.length).toBeGreaterThan(5);
		expect(new Set(meanings).size).toBe(meanings.length);
	});
});
