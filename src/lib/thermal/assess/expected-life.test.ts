import { describe, expect, it } from 'vitest';
import { defaultScenario } from '../vehicle/parse-scenario';
import { expectLife } from './expected-life';

const months = Array.from({ length: 12 }, () => ({ meanMaxC: 20, spreadK: 3 }));
const daysOnRoad = Array.from({ length: 12 }, () => 0);

describe('where the models of wear were used beyond their tests', () => {
	const told = expectLife(
		defaultScenario([{ minutes: 60, loadA: 0 }]),
		{ months, daysOnRoad },
		{ law: 'lithium-iron-phosphate' }
	)!.beyondTests;

	it('is said in words and round figures, with the way that it lies', () => {
		const cool = told.find((sentence) => sentence.startsWith('Swierczynski 2015 calendar: temperature'));
		expect(cool).toMatch(/down to \d+ °C, \d+ h a year; tested from 25 to 55 °C\.$/);
		const long = told.find((sentence) => sentence.startsWith('Swierczynski 2015 calendar: time'));
		expect(long).toBe('Swierczynski 2015 calendar: time up to 10 years; tested from 0 to 2 years.');
	});

	it('never shows more than three digits, nor a name of the program', () => {
		for (const sentence of told) {
			expect(sentence).not.toMatch(/\d\.\d{4}|tempC|cRate|depthOfDischarge/);
		}
		expect(told.length).toBeGreaterThan(2);
	});
});
