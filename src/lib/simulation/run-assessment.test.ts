import { describe, expect, it } from 'vitest';
import { DEFAULT_SAMPLE } from './testing/sample-inputs';
import { runAssessment } from './run-assessment';

describe('a run from tape-measure answers', () => {
	it('comes out as an assessment with the plan’s own legs', () => {
		const outcome = runAssessment(DEFAULT_SAMPLE);
		expect(outcome.status).toBe('done');
		expect(outcome.status === 'done' && outcome.legs.map(({ kind }) => kind)).toEqual([
			'drive',
			'stop',
			'camp'
		]);
	});

	it('is refused with path and message when the inputs cannot be', () => {
		const vehicle = { ...DEFAULT_SAMPLE.vehicle, massKg: -1 };
		expect(runAssessment({ ...DEFAULT_SAMPLE, vehicle })).toMatchObject({
			status: 'refused',
			path: expect.stringContaining('massKg'),
			message: expect.stringContaining('must be')
		});
	});

	it('can be sent from a worker and arrives the same', () => {
		const outcome = runAssessment(DEFAULT_SAMPLE);
		expect(structuredClone(outcome)).toEqual(outcome);
	});
});
