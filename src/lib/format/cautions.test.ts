import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { CAUTION_TEXT_VERSION, CAUTIONS, listCautions } from './cautions';

describe('the cautions', () => {
	it('stand under ids of their own', () => {
		expect(new Set(CAUTIONS.map((caution) => caution.id)).size).toBe(CAUTIONS.length);
	});

	it('warn of gas from a failing cell where the battery is lithium, and of hydrogen always', () => {
		const idsFor = (chemistry: string) => listCautions(chemistry).map((caution) => caution.id);
		expect(idsFor('lithium-iron-phosphate')).toEqual(CAUTIONS.map((caution) => caution.id));
		expect(idsFor('lead-acid')).toContain('hydrogen');
		expect(idsFor('lead-acid')).not.toContain('failing-lithium');
	});

	it('do not change without a new version of the text', () => {
		const sha256 = createHash('sha256').update(JSON.stringify(CAUTIONS)).digest('hex').slice(0, 12);
		expect({ version: CAUTION_TEXT_VERSION, sha256 }).toEqual({ version: 1, sha256: 'd2166f8f73ae' });
	});
});
