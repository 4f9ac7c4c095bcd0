import { describe, expect, it } from 'vitest';
import { readRanges, scriptOf, spellOut, splitByScript } from './scripts';

describe('a text on its way to paper', () => {
	it('is told apart by the part of the typeface that holds each character', () => {
		expect(splitByScript('Zoë Łucja').runs).toEqual([
			{ text: 'Zoë ', script: 'latin' },
			{ text: 'Ł', script: 'latin-ext' },
			{ text: 'ucja', script: 'latin' }
		]);
		expect(scriptOf('Ω')).toBe('greek');
		expect(scriptOf('Ж')).toBe('cyrillic');
		expect(scriptOf('ễ')).toBe('vietnamese');
	});

	it('shows that a character is missing which no part holds, and drops no more than marks without a shape', () => {
		expect(scriptOf('漢')).toBeNull();
		expect(splitByScript('a漢')).toEqual({ runs: [{ text: 'a?', script: 'latin' }], lacks: true });
		expect(splitByScript('a\ufe0f')).toEqual({ runs: [{ text: 'a', script: 'latin' }], lacks: false });
	});

	it('has an accent that was typed by itself on its letter', () => {
		expect(splitByScript('Zoe\u0308')).toEqual({ runs: [{ text: 'Zoë', script: 'latin' }], lacks: false });
	});

	it('loses no character, and joins runs of one part', () => {
		const text = 'Αθήνα 42 °C, Київ −5 °C';
		const { runs, lacks } = splitByScript(text);
		expect(lacks).toBe(false);
		expect(runs.map((run) => run.text).join('')).toBe(text);
		expect(runs.every(({ script }, index) => script !== runs[index + 1]?.script)).toBe(true);
	});

	it('reads ranges of code points, single ones too', () => {
		expect(readRanges('U+0000-00FF,U+0131')).toEqual([
			[0, 255],
			[0x131, 0x131]
		]);
	});

	it('has the spaces that the typeface has, and in words the signs that it has not', () => {
		expect(spellOut('53\u202f°C')).toBe('53\u00a0°C');
		const spelt = spellOut('I ≤ √(m/s), Pr^⅓');
		expect(spelt).toBe('I at most root of (m/s), Pr^1/3');
		expect(splitByScript(spelt).lacks).toBe(false);
	});
});
