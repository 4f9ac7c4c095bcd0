import { describe, expect, it } from 'vitest';
import { parseForm } from '../format/form-values';
import { UNKNOWN, askedFields, findStep, firstOpenStep, mergeStep, stepSchema } from './survey-step';

const exhaust = findStep('under-bonnet', 'exhaust')!;
const tray = findStep('under-bonnet', 'tray')!;

const TYPED = {
	exhaustFacing: 'at-an-angle',
	exhaustGapMm: '18 cm',
	exhaustSeenWidthMm: '7 in',
	exhaustSeenHeightMm: UNKNOWN,
	exhaustBatterySide: 'end'
};
const readExhaust = (changes: Record<string, string> = {}) => {
	const values = { ...TYPED, ...changes };
	return parseForm(stepSchema(exhaust.question, 'under-bonnet', values), values);
};
const errorsOf = (changes: Record<string, string>) => {
	const answer = readExhaust(changes);
	return 'errors' in answer ? answer.errors : [];
};

describe('the steps of a survey', () => {
	it('say where one stands and what comes next', () => {
		expect(exhaust).toMatchObject({
			place: 2,
			total: 7,
			previous: 'place',
			next: 'engine',
			nextWords: 'engine'
		});
		expect(findStep('under-bonnet', 'shield')).toMatchObject({
			...{ place: 7, next: 'check', nextWords: 'check your answers' }
		});
	});

	it('are only those that the kind of place is asked', () => {
		expect(findStep('cabin', 'exhaust')).toBeNull();
		expect(findStep('under-bonnet', 'no-such')).toBeNull();
	});

	it('go on at the first question without an answer', () => {
		expect(firstOpenStep({ positionKind: 'cabin' })).toBe('cooling');
		expect(firstOpenStep({ positionKind: 'cabin', enclosureCooling: UNKNOWN })).toBe('sun');
		const all = { positionKind: 'cabin', enclosureCooling: UNKNOWN, enclosureSun: 'shaded' } as const;
		expect(firstOpenStep(all)).toBe('check');
	});
});

describe('the form of a step', () => {
	it('reads lengths as people write them, and "unknown" as an answer', () => {
		expect(readExhaust()).toEqual({
			data: {
				exhaustFacing: 'at-an-angle',
				exhaustGapMm: 180,
				exhaustSeenWidthMm: 177.8,
				exhaustSeenHeightMm: 'unknown',
				exhaustBatterySide: 'end'
			}
		});
	});

	it('asks for each answer that is missing', () => {
		expect(errorsOf({ exhaustFacing: '', exhaustGapMm: '' })).toEqual([
			{
				path: 'exhaustFacing',
				message: 'How the exhaust faces it is missing.'
			},
			{
				path: 'exhaustGapMm',
				message: 'Gap to the exhaust is missing.'
			}
		]);
	});

	it('says the limit that a length is beyond, and what is no length', () => {
		expect(errorsOf({ exhaustGapMm: '5 m', exhaustSeenWidthMm: 'a hand' })).toEqual([
			{ path: 'exhaustGapMm', message: 'Gap to the exhaust must be at most 2000 mm.' },
			{
				path: 'exhaustSeenWidthMm',
				message: 'Width of hot pipe in view must be a number of mm from 10 to 1500.'
			}
		]);
	});

	it('does not ask how large or near a hidden exhaust is, whatever stands in those boxes', () => {
		const hidden = { exhaustFacing: 'hidden', exhaustGapMm: 'a hand', exhaustBatterySide: '' };
		expect(errorsOf(hidden)).toEqual([]);
		expect(askedFields(exhaust.question, 'under-bonnet', { ...TYPED, ...hidden })).toEqual(['exhaustFacing']);
	});

	it('asks what is under the tray only in an engine bay', () => {
		expect(askedFields(tray.question, 'under-bonnet', {})).toContain('trayUnderside');
		expect(askedFields(tray.question, 'chassis-rail', {})).not.toContain('trayUnderside');
	});

	it('changes the answers of its own page alone, and leaves what it does not ask as it was', () => {
		const before = { positionKind: 'under-bonnet', bayPlace: 'middle', exhaustGapMm: 150 } as const;
		expect(mergeStep(before, exhaust.question, { exhaustFacing: 'hidden' })).toEqual({
			...before,
			exhaustFacing: 'hidden'
		});
	});
});
