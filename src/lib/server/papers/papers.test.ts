import { describe, expect, it } from 'vitest';
import { isCut } from './fonts';
import { drawLedger } from './ledger-picture';
import { inColumns, linesIn } from './parts';
import { layHalosBelow } from './ribbon-picture';

describe('columns of a paper', () => {
	const items = Array.from({ length: 9 }, (_, index) => ({ content: { text: `${index}` }, weight: 1 }));
	const stacksOf = (columns: ReturnType<typeof inColumns>) =>
		(columns as { columns: { stack: { text: string }[] }[] }).columns.map(({ stack }) =>
			stack.map(({ text }) => text).join('')
		);

	it('are about as high as each other, and keep the order', () => {
		expect(stacksOf(inColumns(items, 3))).toEqual(['012', '345', '678']);
		const heavy = [{ content: { text: 'x' }, weight: 9 }, ...items];
		expect(stacksOf(inColumns(heavy, 2))).toEqual(['x', '012345678']);
	});

	it('lose nothing when there is less than a column', () => {
		expect(stacksOf(inColumns(items.slice(0, 1), 3)).join('')).toBe('0');
		expect(stacksOf(inColumns([], 2))).toEqual(['', '']);
	});

	it('count lines by characters, at least one', () => {
		expect([linesIn('', 40), linesIn('a'.repeat(40), 40), linesIn('a'.repeat(41), 40)]).toEqual([1, 1, 2]);
	});
});

describe('pictures of a paper', () => {
	it('have the halo of words below the words', () => {
		const text =
			'<text x="1" fill="#000000" stroke="#FFFFFF" stroke-width="3" paint-order="stroke">bay air</text>';
		const plain = '<text x="1" fill="#000000">bay air</text>';
		expect(layHalosBelow(`<g>${text}</g>`)).toBe(`<g>${text}${plain}</g>`);
		expect(layHalosBelow(`<g>${plain}</g>`)).toBe(`<g>${plain}</g>`);
	});

	it('tell the shares of heat apart without colour', () => {
		const { bar, rows, whole } = drawLedger([
			{ source: 'exhaust', watts: 12, kelvin: 10 },
			{ source: 'bay-air', watts: 4, kelvin: 5 },
			{ source: 'outside-air', watts: -9, kelvin: -3 }
		]);
		expect(rows.map(({ words }) => words)).toEqual(['Exhaust', 'Bay air', 'Outside air']);
		expect(new Set(rows.map(({ key }) => key)).size).toBe(3);
		expect(rows[2]!.key).toBeNull();
		expect(whole).toContain('12');
		expect(new Set(bar.match(/#[0-9a-f]{6}/g))).toEqual(new Set(['#000000']));
	});
});

describe('the setter of documents', () => {
	it('may open what was cut for it, and nothing else', () => {
		expect(isCut('/tmp/soakline-fonts-Ab12/text-latin.ttf')).toBe(true);
		for (const path of ['/etc/passwd', '/tmp/soakline-fonts-Ab12/../../etc/x.ttf', 'text-latin.ttf'])
			expect(isCut(path)).toBe(false);
	});
});
