import { describe, expect, it } from 'vitest';
import type { AssessmentInputs, AssessmentResult } from '$lib/schemas/assessments';
import { writeSheetContent, type SheetSource } from './sheet-content';

const LEG = { engineOn: true, speedKmh: 60, surface: 'corrugated', bonnetOpen: false } as const;
/** Quarter hours from 07:00 to 21:00; outside it is hottest at 14:00. */
const ambientC = Array.from({ length: 57 }, (_, index) => 42 - Math.abs(index / 4 - 7));

const RESULT = {
	verdict: 'cuts-out',
	headroomK: -0.5,
	...{ cutAtHour: 16.85, resetAtHour: 20.8667, backByItself: true, darkHours: 4.0167 },
	darkSpans: [{ fromHour: 16.85, toHour: 20.8667, open: false }],
	chargeSpans: [],
	...{ chargeMissedAh: 0, chargeMissedHours: 0, peakCellsC: 80.5, peakAtHour: 17.05 },
	curves: {
		startHour: 7,
		stepMin: 15,
		ambientC,
		bayC: [],
		airC: [],
		caseC: [],
		cellsC: [],
		boardC: [],
		soc: []
	},
	legs: [
		{ ...LEG, kind: 'drive', fromHour: 7, toHour: 18.9 },
		{ ...LEG, kind: 'camp', fromHour: 18.9, toHour: 21 }
	]
} as unknown as AssessmentResult;

const INPUTS = {
	jobNumber: 412,
	customerName: 'Ilse Tarn',
	vehicle: { make: 'Farrow', model: 'Drover', modelYear: 2019, towMassKg: 1500 },
	battery: {
		...{ maker: 'Emberlow', model: 'Slab 100', chemistry: 'lithium-iron-phosphate', capacityAh: 100 },
		...{ sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 80, dischargeResetC: 57 },
		...{ cutDelayS: 5, autoReset: true, underBonnet: 'allowed', underBonnetWords: '' }
	},
	mount: { letter: 'B', name: 'Rear corner', survey: { positionKind: 'under-bonnet' } },
	dayPlan: { startHour: 7, legs: [{ kind: 'drive', minutes: 380, towing: true }] },
	place: { name: 'Salt Lake' },
	hotDay: { hotDayMaxC: 42 }
} as unknown as AssessmentInputs;

/** As little as a sheet says of it: its own words have tests beside them. */
const BESIDE = {
	outlook: {
		day: { cutOutShare: 0.55 },
		year: { year: { low: 4, middle: 9, high: 16 } },
		remedies: { least: null, moneyPerHour: 100 },
		envelope: { points: [], plannedHours: 8, triedC: [10, 56] },
		influences: { ranking: [] },
		...{ life: null, lifeProblem: null, cable: null, cableProblem: null }
	} as unknown as SheetSource['beside']['outlook'],
	year: { months: [], daysOnRoad: [48], basis: '' },
	elsewhere: []
};

function write(
	changes: Partial<SheetSource> = {},
	result: Partial<AssessmentResult> = {},
	battery: Partial<AssessmentInputs['battery']> = {}
) {
	const content = writeSheetContent({
		workshop: { name: 'Wattle & Wire', address: '', phone: '00 0000 0101', email: '' },
		preparedBy: 'Noor Pellegrin',
		preparedAt: new Date('2026-03-04T12:00:00Z'),
		assessmentId: 7,
		customerName: INPUTS.customerName,
		preDrill: null,
		inputs: { ...INPUTS, battery: { ...INPUTS.battery, ...battery } },
		result: { ...RESULT, ...result },
		override: null,
		cautions: null,
		others: [],
		beside: BESIDE,
		...changes
	});
	return JSON.parse(JSON.stringify(content).replace(/\u202F/g, ' ')) as typeof content;
}
const STAYS_ON = { cutAtHour: null, resetAtHour: null, darkHours: 0, darkSpans: [] };
const figure = (content: ReturnType<typeof write>, label: string) =>
	content.figures.find((each) => each.label === label)?.value;

describe('the customer’s page', () => {
	it('says first what happens to the fridge, when and for how long', () => {
		const content = write();
		expect(content.headline).toBe('Cuts out');
		expect(content.summary).toBe(
			'The fridge goes dark at 16:51, two hours before camp, and comes back by itself at 20:52.'
		);
		expect(figure(content, 'Fridge dark')).toBe('4 h 1 min, from 16:51 to 20:52');
		expect(figure(content, 'Hottest inside the battery')).toBe('81 °C at 17:03');
		expect(figure(content, 'Room to spare before that')).toBe('none');
	});

	it('says for which day, and that another day is another answer', () => {
		expect(write().paragraphs[0]).toBe(
			'This is for one hot day at Salt Lake: 42 °C outside at its hottest, off at 07:00, 6 h 20 min on the road, towing, camp at 18:54. A hotter or longer day is harder on the battery, a milder one easier.'
		);
	});

	it('says how much later than the day the battery is hottest, where a bonnet makes it so', () => {
		expect(write().paragraphs[1]).toMatch(/^The battery is at its hottest about three hours after/);
		expect(write({}, { peakAtHour: 14.5 }).paragraphs.join(' ')).not.toContain('after the hottest hour');
	});

	it('says whether somebody has to switch it on again', () => {
		expect(write().paragraphs.at(-1)).toContain('switches on again by itself once it has cooled to 57 °C');
		const byHand = write({}, {}, { autoReset: false });
		expect(byHand.paragraphs.at(-1)).toContain('It does not switch on again by itself');
	});

	it('names who decided against the verdict, and why', () => {
		const override = { decidedBy: 'Ilse Tarn', reason: 'A duct follows.' };
		const content = write({ override });
		expect(content.override).toEqual(override);
		expect(content.advice).toContain('by a decision that is written here');
	});

	it('recommends plainly where it rides it out, and with a warning where it runs close', () => {
		const good = write({}, { ...STAYS_ON, verdict: 'rides-it-out', headroomK: 14.2 });
		expect(good.advice).toBe('We recommend this position.');
		expect(figure(good, 'Fridge dark')).toBe('not at all');
		expect(figure(good, 'Room to spare before that')).toBe('14 degrees');
		const close = write({}, { ...STAYS_ON, verdict: 'runs-close', headroomK: 0.6 });
		expect(close.advice).toContain('with little to spare');
		expect(figure(close, 'Room to spare before that')).toBe('less than 1 degree');
	});

	it('says how often, and what would help', () => {
		const { outlook } = write();
		expect(outlook?.map(({ label }) => label)).toEqual(['How often', 'What would make it safer']);
		expect(outlook?.[0]?.text).toMatch(/^On about 11 of 20 days like this the fridge goes dark\./);
	});

	it('says first what the maker says about a place under the bonnet', () => {
		const words = 'Not for engine bays.';
		const { paragraphs } = write({}, {}, { underBonnet: 'excluded', underBonnetWords: words });
		expect(paragraphs[0]).toMatch(/^Against the maker’s word\..*“Not for engine bays\.”$/);
		const inCabin = { ...INPUTS.mount, survey: { positionKind: 'cabin' } } as AssessmentInputs['mount'];
		const cabin = write({ inputs: { ...INPUTS, mount: inCabin } });
		expect(cabin.paragraphs.join(' ')).not.toContain('maker');
	});

	it.each(['rides-it-out', 'runs-close', 'cuts-out'] as const)(
		'never recommends what the maker does not allow, but says that somebody decided it (%s)',
		(verdict) => {
			const { advice } = write({}, { ...STAYS_ON, verdict }, { underBonnet: 'excluded' });
			expect(advice).not.toContain('We recommend');
			expect(advice).toContain('The battery’s maker does not allow it under the bonnet');
			expect(advice).toContain('by a decision that is written here');
		}
	);

	it('recommends elsewhere, whatever the maker says about the bonnet', () => {
		const mount = { ...INPUTS.mount, survey: { positionKind: 'cabin' } } as AssessmentInputs['mount'];
		const battery = { ...INPUTS.battery, underBonnet: 'excluded' as const };
		const { advice } = write(
			{ inputs: { ...INPUTS, mount, battery } },
			{ ...STAYS_ON, verdict: 'rides-it-out' }
		);
		expect(advice).toBe('We recommend this position.');
	});

	it('says what the check before drilling left open', () => {
		const item = (label: string, state: 'failed' | 'unanswered', note = '') => ({
			...{ key: label, label, state, note }
		});
		const open = [
			...[item('Clearances', 'unanswered'), item('Fuse', 'failed', 'None yet.')],
			item('Terminals', 'unanswered')
		];
		const check = { open, signedBy: null, signedAt: null };
		expect(write({ preDrill: check }).beforeDrilling).toEqual([
			'Fuse: not in order yet. None yet.',
			'Not looked at yet: clearances and terminals.'
		]);
		const failed = ['Fuse', 'Air', 'Hold-down', 'Terminals', 'Cable run'].map((label) =>
			item(label, 'failed', 'None.')
		);
		expect(write({ preDrill: { ...check, open: failed } }).beforeDrilling).toEqual([
			'Fuse: not in order yet. None.',
			'Air: not in order yet. None.',
			'Hold-down: not in order yet. None.',
			'Not in order yet either: terminals and cable run.'
		]);
		expect(write({ preDrill: { ...check, open: [] } }).beforeDrilling).toEqual([]);
	});

	it('counts every dark stretch of the day', () => {
		const span = { fromHour: 12, toHour: 14, open: false };
		const twice = write({}, { darkHours: 6, darkSpans: [span, { ...span, fromHour: 15, toHour: 19 }] });
		expect(figure(twice, 'Fridge dark')).toBe('6 h in all, first at 16:51');
	});

	it('says where the battery measures when that is not the cells', () => {
		const labels = (sensor: 'board' | 'hotter') =>
			write({}, {}, { sensor }).figures.map(({ label }) => label);
		expect(labels('board')).toContain('Switches itself off when its electronics reach');
		expect(labels('hotter')).toContain('Switches itself off when its cells or electronics reach');
	});

	it('keeps what the picture is drawn from, and the cautions in their words', () => {
		const { ribbon, cautions } = write();
		expect(ribbon).toMatchObject({
			...{ curves: RESULT.curves, legs: RESULT.legs, darkSpans: RESULT.darkSpans, peakAtHour: 17.05 },
			limits: { dischargeCutC: 80, dischargeResetC: 57, chargeCutC: 60, chargeResetC: 50 }
		});
		expect(cautions.map(({ title }) => title)).toContain('An estimate, not a certificate');
		expect(cautions.map(({ title }) => title)).toContain('Toxic and flammable gas');
	});

	describe('of a battery that nothing switches off', () => {
		const LEAD_ACID: NonNullable<AssessmentResult['leadAcid']> = {
			...{ useLimitC: 60, chargeLimitC: 50, tooHotAtHour: 16.85, hoursAboveUseLimit: 2 },
			...{ hoursAboveChargeLimit: 3.5, peakChargingC: 63, chargerCompensates: false },
			...{ compensatedChargeV: 13.4, uncompensatedChargeV: 14.4 },
			...{ freshAirM3PerH: 0.24, openingCm2: 6.72, sparkFreeMm: 267 }
		};
		const AGM: Partial<AssessmentInputs['battery']> = {
			...{ chemistry: 'lead-acid-agm', highestChargeC: 50, highestUseC: 60 },
			...{ ratedLifeYears: 6, compensatesCharge: false }
		};
		const writeAgm = (result: Partial<AssessmentResult> = {}) =>
			write({}, { ...STAYS_ON, peakCellsC: 66, headroomK: -6, leadAcid: LEAD_ACID, ...result }, AGM);

		it('says when it gets too hot, and that the fridge stays on', () => {
			const content = writeAgm();
			expect(content).toMatchObject({ headline: 'Gets too hot', chemistry: 'lead-acid-agm' });
			expect(content.summary).toContain('Nothing switches it off: the fridge stays on');
			expect(content.advice).toContain('hotter here than its maker allows. It goes ahead all the same');
			expect(figure(content, 'Its maker allows up to')).toBe('60 °C');
			expect(figure(content, 'Hotter than that')).toBe('2 h, from 16:51');
			expect(figure(content, 'Charged hotter than allowed')).toBe('3 h 30 min');
			expect(content.ribbon.limits).toEqual({ highestUseC: 60, highestChargeC: 50 });
		});

		it('says what its charger and its gas ask for', () => {
			const told = writeAgm().paragraphs.join(' ');
			expect(told).toContain('about 13.4 V instead of 14.4 V. Its charger does not see to that by itself');
			expect(told).toContain('two openings to the outside of at least 7 cm² each, one low and one high');
			const compensated = writeAgm({ leadAcid: { ...LEAD_ACID, chargerCompensates: true } });
			expect(compensated.paragraphs.join(' ')).toContain('Its charger sees to that by itself');
		});

		it('warns of its own gas, not of lithium’s', () => {
			const titles = writeAgm().cautions.map(({ title }) => title);
			expect(titles).toContain('Sealed is not gas-tight');
			expect(titles).not.toContain('Toxic and flammable gas');
		});

		it.each(['rides-it-out', 'runs-close', 'cuts-out'] as const)(
			'says nothing of the dark and no word of the trade (%s)',
			(verdict) => {
				const { summary, paragraphs, advice, figures } = writeAgm({ verdict });
				const all = [
					summary,
					...paragraphs,
					advice,
					...figures.flatMap(({ label, value }) => [label, value])
				];
				expect(all.join(' ')).not.toMatch(
					/\bBMS\b|headroom|\bcells?\b|\breset\b|\bK\b|\bAh\b|verdict|assess/i
				);
				expect(all.join(' ')).not.toMatch(/\bdark\b|switches itself off|comes back/i);
			}
		);
	});

	it.each(['rides-it-out', 'runs-close', 'cuts-out'] as const)(
		'uses no word of the trade (%s)',
		(verdict) => {
			const { summary, paragraphs, advice, figures } = write({}, { verdict, ...STAYS_ON, headroomK: 5 });
			const all = [summary, ...paragraphs, advice, ...figures.flatMap(({ label, value }) => [label, value])];
			expect(all.join(' ')).not.toMatch(/\bBMS\b|headroom|\bcells?\b|\breset\b|\bK\b|\bAh\b|verdict|assess/i);
		}
	);
});
