import { describe, expect, it } from 'vitest';
import type { RerunProgress } from '../schemas/reruns';
import { sayChanged, sayHowFar, sayOccasion } from './reruns';

const PROGRESS: RerunProgress = {
	...{ state: 'running', total: 90, waiting: 78, done: 12, passedOver: 0, failed: 0, changed: 0, untold: 0 }
};

describe('a re-run in words', () => {
	it('says why it was begun', () => {
		expect(sayOccasion({ bookNumber: 3, occasion: 'in-force' })).toBe('Book 3 came into force');
		expect(sayOccasion({ bookNumber: 3, occasion: 'withdrawn' })).toBe('Book 3 was withdrawn');
	});

	it('says how far it is, and what it left out', () => {
		expect(sayHowFar(PROGRESS)).toBe('12 of 90 mounts');
		expect(sayHowFar({ ...PROGRESS, total: 1, waiting: 0, done: 1 })).toBe('1 mount');
		expect(sayHowFar({ ...PROGRESS, waiting: 0, passedOver: 2, failed: 1 })).toBe(
			'90 mounts, 2 passed over, 1 could not be run'
		);
	});

	it('says what changed, and whether everybody knows', () => {
		expect(sayChanged(PROGRESS)).toBe('No verdict changed');
		expect(sayChanged({ ...PROGRESS, changed: 1, untold: 1 })).toBe('1 verdict changed, 1 still to be told');
		expect(sayChanged({ ...PROGRESS, changed: 4 })).toBe('4 verdicts changed, everybody told');
	});

	it('puts mounts that could not be run before what changed', () => {
		expect(sayChanged({ ...PROGRESS, total: 20, waiting: 0, done: 0, failed: 20 })).toBe(
			'20 mounts could not be run, so their verdicts are not known'
		);
		expect(sayChanged({ ...PROGRESS, failed: 1 })).toBe(
			'1 mount could not be run; of the others, no verdict changed'
		);
		expect(sayChanged({ ...PROGRESS, failed: 2, changed: 1, untold: 1 })).toBe(
			'2 mounts could not be run; of the others, 1 verdict changed, 1 still to be told'
		);
	});
});
