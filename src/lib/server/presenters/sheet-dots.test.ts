import { describe, expect, it } from 'vitest';
import { writeSheetDots } from './sheet-dots';

const LFP = 'lithium-iron-phosphate';
const daysFrom = (firstC: number): number[] => Array.from({ length: 50 }, (_, k) => firstC + k * 0.4);
const plain = (text: string): string => text.replace(/\u202F/g, ' ');

describe('the fifty days on the customer’s page', () => {
	it('say how many of them are beyond the limit, and the numbers beside the picture', () => {
		const dots = writeSheetDots({ hottest: { limitC: 75, daysC: daysFrom(60) } }, LFP)!;
		expect(dots.sentence).toContain('On 12 of 50 the battery gets hot enough to switch itself off');
		expect(dots.figures.map(({ value }) => plain(value))).toEqual(['62 °C', '70 °C', '78 °C']);
	});

	it('never say never', () => {
		const { sentence } = writeSheetDots({ hottest: { limitC: 99, daysC: daysFrom(60) } }, LFP)!;
		expect(sentence).toContain('On none of these 50');
		expect(sentence).toContain('seldom, not never');
	});

	it('speak of the maker’s limit where nothing switches the battery off', () => {
		const dots = writeSheetDots({ hottest: { limitC: 50, daysC: daysFrom(60) } }, 'lead-acid-agm')!;
		expect(dots.sentence).toContain('On all 50 the battery gets hotter than its maker allows');
		expect(dots.limitWords).not.toContain('switches');
	});

	it('are left out where an estimate of before has none', () => {
		expect(writeSheetDots({}, LFP)).toBeNull();
	});
});
