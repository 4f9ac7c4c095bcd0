import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { CAUTION_TEXT_VERSION, CAUTIONS, listCautions } from './cautions';

describe('the cautions', () => {
	it('stand under ids of their own', () => {
		expect(new Set(CAUTIONS.map((caution) => caution.id)).size).toBe(CAUTIONS.length);
	});

	const idsFor = (chemistry: string) => listCautions(chemistry).map((caution) => caution.id);

	it('warn of gas from a failing cell where the battery is lithium, and of hydrogen always', () => {
		const always = CAUTIONS.filter(({ when }) => when === 'always').map(({ id }) => id);
		expect(idsFor('lithium-iron-phosphate').toSorted()).toEqual([...always, 'failing-lithium'].toSorted());
		expect(idsFor('lead-acid-agm')).toContain('hydrogen');
		expect(idsFor('lead-acid-agm')).not.toContain('failing-lithium');
	});

	it('tell each kind of battery apart', () => {
		expect(idsFor('lithium-nickel-manganese-cobalt')).toContain('fierce-fire');
		expect(idsFor('lithium-titanate')).not.toContain('fierce-fire');
		expect(idsFor('lead-acid-flooded')).toEqual(
			expect.arrayContaining(['vent-flooded', 'hot-charge', 'acid'])
		);
		expect(idsFor('lead-acid-gel')).toContain('vent-valve-regulated');
		expect(idsFor('lead-acid-gel')).not.toContain('acid');
	});

	it('are those that always hold where no battery is chosen yet', () => {
		expect(idsFor('')).toEqual(CAUTIONS.filter(({ when }) => when === 'always').map(({ id }) => id));
	});

	it('do not change without a new version of the text', () => {
		const sha256 = createHash('sha256').update(JSON.stringify(CAUTIONS)).digest('hex').slice(0, 12);
		expect({ version: CAUTION_TEXT_VERSION, sha256 }).toEqual({ version: 2, sha256: '87fd386d2b24' });
	});
});
