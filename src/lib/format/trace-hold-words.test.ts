import { describe, expect, it } from 'vitest';
import { sayHolding, sayHoldProgress } from './trace-hold-words';

describe('what is being worked out', () => {
	it('is said of one trace and of several', () => {
		expect(sayHolding(1)).toMatch(/^1 trace is not in these figures yet: how it lies beside/);
		expect(sayHolding(3)).toMatch(/^3 traces are not in these figures yet: how they lie beside/);
		expect(sayHolding(3)).toMatch(/is being worked out\.$/);
	});

	it('is said with how far it is', () => {
		expect(sayHoldProgress(0.25)).toMatch(/is being worked out: 25\s%$/);
	});
});
