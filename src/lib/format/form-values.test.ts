import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { batteryInputSchema } from '../schemas/batteries';
import { dayPlanInputSchema } from '../schemas/day-plans';
import { measure, optionalEmail, wholeNumber, words } from '../schemas/fields';
import { formShape, parseForm, toFormValues } from './form-values';

const bench = z.object({
	name: words('Name', 20),
	email: optionalEmail('E-mail'),
	gapMm: measure('Gap', 'mm', 0, 2_000),
	tempC: measure('Hottest', '°C', -60, 160),
	year: wholeNumber('Year', 1950, 2050),
	facing: z.enum(['square', 'angled']).meta({ label: 'How it faces' }),
	spareMm: z
		.union([measure('Spare', 'mm', 0, 100), z.literal('unknown')])
		.optional()
		.meta({ label: 'Spare', unit: 'mm' }),
	lostC: measure('Lost', '°C', 0, 100).nullable(),
	wrapped: z.boolean().meta({ label: 'Wrapped' }),
	read: z.literal(true, { error: 'Tick the box.' })
});

const TYPED = {
	name: 'Mount B',
	email: '',
	gapMm: '7 in',
	tempC: '−5',
	year: '2019',
	facing: 'angled',
	spareMm: '',
	lostC: '',
	read: 'true'
};

const errorsOf = (changes: Record<string, string>) => {
	const answer = parseForm(bench, { ...TYPED, ...changes });
	return 'errors' in answer ? answer.errors : [];
};

describe('parseForm', () => {
	it('reads numbers as people write them, ticks, choices and empty boxes', () => {
		expect(parseForm(bench, TYPED)).toEqual({
			data: {
				name: 'Mount B',
				email: '',
				gapMm: 177.8,
				tempC: -5,
				year: 2019,
				facing: 'angled',
				spareMm: undefined,
				lostC: null,
				wrapped: false,
				read: true
			}
		});
	});

	it.each([
		['45,2', 45.2],
		['45.2', 45.2],
		['−5', -5],
		['114 °F', 45.5556],
		['45 C', 45]
	])('takes a temperature written "%s"', (text, tempC) => {
		const answer = parseForm(bench, { ...TYPED, tempC: text });
		expect('data' in answer && answer.data.tempC).toBeCloseTo(tempC, 3);
	});

	it('keeps what was typed, word for word, beside the errors', () => {
		const answer = parseForm(bench, { ...TYPED, gapMm: 'a hand', name: ' x ' });
		expect(answer).toEqual({
			errors: [{ path: 'gapMm', message: 'Gap must be a number of mm from 0 to 2000.' }],
			values: { ...TYPED, gapMm: 'a hand', name: ' x ', wrapped: false, read: true }
		});
	});

	it('names every wrong field by its label, in the order of the form', () => {
		expect(errorsOf({ name: '', gapMm: '5000', tempC: '', facing: '', year: '12 kg', read: '' })).toEqual([
			{ path: 'name', message: 'Name is missing.' },
			{ path: 'gapMm', message: 'Gap must be at most 2000 mm.' },
			{ path: 'tempC', message: 'Hottest is missing.' },
			{ path: 'year', message: 'Year must be a number from 1950 to 2050.' },
			{ path: 'facing', message: 'How it faces is missing.' },
			{ path: 'read', message: 'Tick the box.' }
		]);
	});

	it('refuses a choice that is not one, and a unit of another kind', () => {
		expect(errorsOf({ facing: 'sideways', gapMm: '20 kg' })).toEqual([
			{ path: 'gapMm', message: 'Gap must be a number of mm from 0 to 2000.' },
			{ path: 'facing', message: 'How it faces: choose one of the answers.' }
		]);
	});

	it('lets a word stand where a field takes one in place of a number', () => {
		const answer = parseForm(bench, { ...TYPED, spareMm: 'unknown' });
		expect('data' in answer && answer.data.spareMm).toBe('unknown');
		expect(errorsOf({ spareMm: 'perhaps' })).toEqual([
			{ path: 'spareMm', message: 'Spare must be a number of mm from 0 to 100.' }
		]);
	});

	it('takes a file for no text', () => {
		const answer = parseForm(bench, { ...TYPED, name: new File(['x'], 'x.txt') });
		expect('errors' in answer && answer.errors[0]?.message).toBe('Name is missing.');
	});

	it('checks what only the whole form can tell', () => {
		const answer = parseForm(batteryInputSchema, { ...BATTERY_TYPED, dischargeResetC: '95' });
		expect(answer).toMatchObject({
			errors: [{ path: 'dischargeResetC', message: 'Comes back at must be below 80 °C, where it stops.' }]
		});
	});
});

const BATTERY_TYPED = {
	maker: 'Lumen Yard',
	model: 'A100',
	chemistry: 'lithium-iron-phosphate',
	capacityAh: '100 Ah',
	lengthMm: '330',
	widthMm: '172',
	heightMm: '220',
	massKg: '12,5',
	internalResistanceMohm: '4',
	maxChargeA: '50 A',
	sensor: 'cells',
	chargeCutC: '60',
	chargeResetC: '50',
	dischargeCutC: '80',
	dischargeResetC: '57',
	cutDelayS: '5 s',
	autoReset: 'on',
	highestChargeC: '',
	highestUseC: '',
	ratedLifeYears: '',
	compensatesCharge: '',
	underBonnet: 'silent',
	underBonnetWords: '',
	dataSheet: ''
};

describe('lists in a form', () => {
	const leg = {
		kind: 'drive',
		minutes: 90,
		speedKmh: 60,
		surface: 'gravel',
		gradePercent: -1.5,
		towing: true
	};
	const plan = {
		name: 'Hot day',
		startHour: 7.5,
		startSoc: 0.6,
		chargerMaxA: 40,
		legs: [
			{ ...leg, engineOn: true, bonnetOpen: false, loadA: 5 },
			{
				...leg,
				kind: 'camp',
				minutes: 600,
				speedKmh: 0,
				towing: false,
				engineOn: false,
				bonnetOpen: true,
				loadA: 4.5
			}
		]
	} as z.input<typeof dayPlanInputSchema>;

	it('come back as they went out', () => {
		const values = toFormValues(dayPlanInputSchema, plan);
		expect(values['legs.1.minutes']).toBe('600');
		expect(parseForm(dayPlanInputSchema, values)).toEqual({ data: plan });
	});

	it('are counted without the gaps that a removed row leaves', () => {
		const values = toFormValues(dayPlanInputSchema, plan);
		const moved = Object.fromEntries(
			Object.entries(values).map(([name, value]) => [name.replace('legs.1.', 'legs.7.'), value])
		);
		const answer = parseForm(dayPlanInputSchema, { ...moved, 'legs.7.minutes': 'all night' });
		expect('errors' in answer && answer.errors).toEqual([
			{ path: 'legs.1.minutes', message: 'Length must be a number of min from 1 to 1440.' }
		]);
	});

	it('take hours where minutes are stored', () => {
		const answer = parseForm(dayPlanInputSchema, {
			...toFormValues(dayPlanInputSchema, plan),
			'legs.0.minutes': '1.5 h'
		});
		expect('data' in answer && answer.data.legs[0]?.minutes).toBeCloseTo(90, 9);
	});
});

describe('formShape', () => {
	it('has text for numbers and choices, and ticks for yes or no', () => {
		expect(formShape(bench).parse({})).toEqual({
			name: '',
			email: '',
			gapMm: '',
			tempC: '',
			year: '',
			facing: '',
			spareMm: '',
			lostC: '',
			wrapped: false,
			read: false
		});
	});

	it('takes a refined schema as well', () => {
		expect(Object.keys(formShape(batteryInputSchema).shape)).toEqual(Object.keys(BATTERY_TYPED));
	});
});

describe('a number that goes out and comes back', () => {
	const one = z.object({
		tempC: measure('Hottest', '°C', -1e3, 1e3),
		gapMm: measure('Gap', 'mm', -1e6, 1e6)
	});

	it('is the same number', () => {
		fc.assert(
			fc.property(
				fc.double({ min: -1e3, max: 1e3, noNaN: true }),
				fc.integer({ min: -1e6, max: 1e6 }),
				(tempC, gapMm) => {
					const answer = parseForm(one, toFormValues(one, { tempC, gapMm }));
					expect('data' in answer && answer.data.gapMm).toBe(gapMm + 0);
					expect('data' in answer && Math.abs(answer.data.tempC - tempC)).toBeLessThan(1e-8);
				}
			)
		);
	});

	it('is within 0.05 K when it was shown in degrees Fahrenheit to one decimal', () => {
		const errorK = (tempC: number): number => {
			const shown = `${(tempC * 1.8 + 32).toFixed(1)} °F`.replace('-', '−');
			const answer = parseForm(one, { tempC: shown, gapMm: '0' });
			return 'data' in answer ? Math.abs(answer.data.tempC - tempC) : Infinity;
		};
		const temperatures = fc.sample(fc.double({ min: -60, max: 160, noNaN: true }), 10_000);
		expect(Math.max(...temperatures.map(errorK))).toBeLessThanOrEqual(0.05);
	}, 60_000);
});
