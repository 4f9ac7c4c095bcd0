import { describe, expect, it } from 'vitest';
import { sayFactorReach, sayFactorWaiting } from './factor-words';

const OTHERS = [
	{ name: 'Ada', role: 'engineer' as const },
	{ name: 'Bo', role: 'manager' as const }
];

describe('whom the rule of the second factor reaches', () => {
	it('is said with names before it is in force', () => {
		expect(sayFactorReach(OTHERS)).toContain('nothing but the page that sets it up');
		expect(sayFactorReach(OTHERS)).toMatch(/Today that is Ada \(engineer\) and Bo \(manager\)\.$/);
		expect(sayFactorReach([])).toBe('All managers and engineers have theirs: nobody is held up.');
	});

	it('is said while it is in force', () => {
		expect(sayFactorWaiting(OTHERS)).toBe('Not set up yet: Ada (engineer) and Bo (manager).');
		expect(sayFactorWaiting([])).toBe('All of them have it.');
	});
});
