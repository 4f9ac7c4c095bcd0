import { describe, expect, it } from 'vitest';
import { readRanges, scriptOf, splitByScript, widenSpaces } from './scripts';

describe('a text on its way to paper', () => {
	it('is told apart by the part of the typeface that holds each character', () => {
		expect(splitByScript('Zoë Łucja')).toEqual([
			{ text: 'Zoë ', script: 'latin' },
			{ text: 'Ł', script: 'latin-ext' },
			{ text: 'ucja', script: 'latin' }
		]);
		expect(scriptOf('Ω')).toBe('greek');
		expect(scriptOf('Ж')).toBe('cyrillic');
		expect(scriptOf('ễ')).toBe('vietnamese');
	});

	it('keeps a character that no part holds, with the usual ones', () => {
		expect(scriptOf('漢')).toBeNull();
		expect(splitByScript('a漢')).toEqual([{ text: 'a漢', script: 'latin' }]);
	});

	it('loses no character, and joins runs of one part', () => {
		const text = 'Αθήνα 42 °C, Київ −5 °C';
		const runs = splitByScript(text);
		expect(runs.map((run) => run.text).join('')).toBe(text);
		expect(runs.every(({ script }, index) => script !== runs[index + 1]?.script)).toBe(true);
	});

	it('reads ranges of code points, single ones too', () => {
		expect(readRanges('U+0000-00FF,U+0131')).toEqual([
			[0, 255],
			[0x131, 0x131]
		]);
	});

	it('has the spaces that the typeface has', () => {
		expect(widenSpaces('53\u202f°C')).toBe('53\u00a0°C');
	});
});
