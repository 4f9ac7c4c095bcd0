import { describe, expect, it } from 'vitest';
import { REGION_KEYS, REGIONS, sayRegion } from './caution-regions';

describe('the rules of a region', () => {
	it.each(REGION_KEYS)(
		'are named for %s, said to be from memory, and left to whoever does the work',
		(key) => {
			const { title, text } = sayRegion(key);
			expect(title).toBe(`Rules in ${REGIONS[key].label}`);
			for (const { name } of REGIONS[key].rules) expect(text).toContain(name);
			const ends =
				REGIONS[key].rules.length > 0 ? /from memory.*whoever does the work looks up/ : /^Ask which rules/;
			expect(text).toMatch(ends);
		}
	);
});
