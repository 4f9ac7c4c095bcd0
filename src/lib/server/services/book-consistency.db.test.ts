import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { Coefficient, CoefficientBook } from '../db/models';
import { assessJob } from './assessments';
import { changeCoefficient, draftBook, moveBook } from './book-changes';
import { bookInForce, getBook } from './books';

useTestDatabase();

const OPEN = { group: 'engine', key: 'thermostatOpen' };
const FULL = { group: 'engine', key: 'thermostatFull' };
const SAID = { origin: 'judgement', source: 'Another thermostat.' } as const;

/** A draft whose thermostat begins to open above where it is fully open. */
async function makeContradictory() {
	const crew = await makeCrew();
	const { jobId } = await makeAssessableJob(crew.installer);
	const mount = { engineLayout: 'inline', positionKind: 'under-bonnet' } as const;
	const { id: fromBookId } = await bookInForce(crew.installer, mount);
	const { id, version } = await draftBook(crew.engineer, { fromBookId, name: 'Warm', note: '' });
	const draft = await changeCoefficient(crew.engineer, id, OPEN, { ...SAID, value: 99, version });
	return { crew, jobId, draft };
}

describe('a draft whose values contradict each other', () => {
	it('keeps the value, and says what contradicts what', async () => {
		const { draft } = await makeContradictory();
		expect(draft.contradictions).toEqual([
			{
				paths: ['engine.thermostatFull', 'engine.thermostatOpen'],
				value: 95,
				limit: 'above engine.thermostatOpen, 99 °C',
				message:
					'Engine temperature at which the thermostat is fully open (engine.thermostatFull) is 95 °C: it must be above engine.thermostatOpen, 99 °C.'
			}
		]);
	});

	it('does not go on trial until the other of the two is changed as well', async () => {
		const { crew, draft } = await makeContradictory();
		const early = moveBook(crew.engineer, draft.id, { to: 'on-trial', version: draft.version });
		await expect(early).rejects.toMatchObject({
			code: 'conflict',
			message: expect.stringContaining('above engine.thermostatOpen, 99 °C') as string,
			problems: [{ path: 'engine.thermostatFull', value: 95, limit: 'above engine.thermostatOpen, 99 °C' }]
		});
		expect(await getBook(crew.engineer, draft.id)).toMatchObject({ state: 'draft' });
		const change = { ...SAID, value: 108, version: draft.version };
		const mended = await changeCoefficient(crew.engineer, draft.id, FULL, change);
		expect(mended.contradictions).toEqual([]);
		const trial = await moveBook(crew.engineer, draft.id, { to: 'on-trial', version: mended.version });
		await moveBook(crew.manager, draft.id, { to: 'in-force', version: trial.version });
	});

	it('can be withdrawn, and a new one begun from it to mend them', async () => {
		const { crew, draft } = await makeContradictory();
		await moveBook(crew.engineer, draft.id, { to: 'withdrawn', version: draft.version });
		const next = await draftBook(crew.engineer, { fromBookId: draft.id, name: 'Mended', note: '' });
		expect(next.contradictions).toHaveLength(1);
	});

	it('does not come into force from trial either, and the workshop goes on assessing', async () => {
		const { crew, jobId, draft } = await makeContradictory();
		await CoefficientBook.update({ state: 'on-trial' }, { where: { id: draft.id } });
		const late = moveBook(crew.manager, draft.id, { to: 'in-force', version: draft.version });
		await expect(late).rejects.toMatchObject({ code: 'conflict', problems: [{ value: 95 }] });
		expect(await assessJob(crew.installer, jobId)).toHaveLength(2);
	}, 60_000);

	it('is told of a value beyond its own limits as well, however it came there', async () => {
		const { crew, draft } = await makeContradictory();
		const where = { bookId: draft.id, fieldGroup: 'bay', fieldKey: 'share' };
		await Coefficient.update({ value: 40 }, { where });
		expect((await getBook(crew.engineer, draft.id)).contradictions).toMatchObject([
			{ paths: ['bay.share'], value: 40 }
		]);
	});
});
