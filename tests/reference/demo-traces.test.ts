import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { makeFiles } from '../../reference-data/demo-traces/make';

const read = (name: string): string =>
	readFileSync(new URL(`../../reference-data/demo-traces/${name}`, import.meta.url), 'utf8');

describe('the traces of the demo', () => {
	it('are what their script makes of the seeds, to the last digit', () => {
		const files = makeFiles();
		expect(Object.keys(files)).toEqual(['trace-1.csv', 'trace-2.csv', 'trace-3.csv', 'truth.json']);
		for (const [name, text] of Object.entries(files)) expect(read(name) === text, name).toBe(true);
	});

	it('say of themselves that nobody measured them', () => {
		expect(read('SOURCE.md')).toContain('Nobody measured this');
		expect(JSON.parse(read('truth.json'))).toMatchObject({ synthetic: true });
	});
});
