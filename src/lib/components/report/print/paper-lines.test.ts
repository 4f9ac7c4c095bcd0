import { describe, expect, it } from 'vitest';
import type { AssessmentRow, MountOutcome } from '../../../schemas/assessments';
import type { CableReport } from '../../../schemas/outlook-reports';
import { listCableLines, listMountLines } from './paper-lines';

const plain = (text: string): string => text.replace(/\u202F/g, ' ');

describe('cable and fuse on paper', () => {
	const CABLE: CableReport = {
		...{ proposal: '16 mm²', sentence: 'It does not hold.', air: 'Held against 70 °C.' },
		...{ conductor: '', deference: '' },
		findings: [
			{ label: 'Carries it', holds: true, value: '40 A', limit: '71 A', source: '' },
			{ label: 'Holds it', holds: false, value: '40 A', limit: '38 A', source: '' }
		]
	};

	it('have a line for each check, and defer to the makers', () => {
		const lines = listCableLines(CABLE);
		expect(lines.slice(2, 4)).toEqual([
			{ label: 'Carries it', value: 'yes, 40 A of at most 71 A' },
			{ label: 'Holds it', value: 'no, 40 A of at most 38 A' }
		]);
		expect(lines.at(-1)!.value).toBe('It does not hold. The makers’ own curves come first.');
	});

	it('say when none has been proposed', () => {
		expect(listCableLines(null)).toEqual([{ label: 'Proposed', value: 'none' }]);
	});
});

describe('the other mounts on paper', () => {
	const assessment = { verdict: 'cuts-out', headroomK: -3.4, darkHours: 2.5 } as AssessmentRow;
	const mount = (changes: Partial<AssessmentRow> | null): MountOutcome => ({
		...{ mountId: 2, letter: 'B', name: 'Guard', surveyComplete: true },
		assessment: changes && { ...assessment, ...changes }
	});
	const sayOnly = (changes: Partial<AssessmentRow> | null): string =>
		plain(listMountLines([mount(changes)])[0]!.value);

	it('say verdict, headroom and dark hours in a line', () => {
		expect(sayOnly({ chemistry: 'lithium-iron-phosphate' })).toBe(
			'cuts out, headroom −3.4 K, dark 2 h 30 min'
		);
		expect(sayOnly({ chemistry: 'lithium-iron-phosphate', darkHours: 0 })).toMatch(/dark none$/);
		expect(sayOnly(null)).toBe('not assessed');
	});

	it('tell of no dark where nothing switches the battery off', () => {
		expect(sayOnly({ chemistry: 'lead-acid-agm' })).toBe('gets too hot, headroom −3.4 K');
	});
});
