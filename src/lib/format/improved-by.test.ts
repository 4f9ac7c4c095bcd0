import { describe, expect, it } from 'vitest';
import { SCENARIO_FIELDS } from '../thermal';
import { improvedBy } from './improved-by';

describe('what would make a coefficient better known', () => {
	const fields = SCENARIO_FIELDS.filter(({ group }) => group !== 'legs');

	it.each(fields.map(({ group, key }) => `${group}.${key}`))('is said of %s', (path) => {
		expect(improvedBy(path)).toMatch(/^[A-Z].{15,}\.$/);
	});

	it('is said of a field before it is said of its group', () => {
		expect(improvedBy('position.exhaustView')).toContain('gap');
		expect(improvedBy('position.airExposure')).toContain('thermometer');
		expect(improvedBy('nothing.known')).toBe('');
	});
});
