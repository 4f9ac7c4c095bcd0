import { describe, expect, it } from 'vitest';
import type { AssessmentInputs, AssessmentView } from '$lib/schemas/assessments';
import { assessScenario } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { DAY_PLAN_TEMPLATES, buildScenario, type SurveyAnswers } from '$lib/thermal/survey';
import { presentReport } from './reports';

const HOT_CORNER: SurveyAnswers = {
	...{ positionKind: 'under-bonnet', bayPlace: 'firewall-exhaust', exhaustFacing: 'square-on' },
	...{ exhaustGapMm: 60, exhaustSeenWidthMm: 400, exhaustSeenHeightMm: 'unknown' },
	...{ exhaustBatterySide: 'long-side', airPath: 'closed-corner' }
};
const BATTERY: AssessmentInputs['battery'] = {
	...{ maker: 'Cindervale', model: 'Ridge 100', chemistry: 'lithium-iron-phosphate', capacityAh: 100 },
	...{ lengthMm: 320, widthMm: 165, heightMm: 215, massKg: 12.85, internalResistanceMohm: 12 },
	...{ maxChargeA: 50, sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75 },
	...{ dischargeResetC: 62, cutDelayS: 0, autoReset: true, underBonnet: 'silent' },
	...{ underBonnetWords: '', dataSheet: 'Invented for the tests' }
};

const AGM: Partial<AssessmentInputs['battery']> = {
	...{ chemistry: 'lead-acid-agm', massKg: 28, internalResistanceMohm: 5, maxChargeA: 25 },
	...{ sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: false }
};

function makeView(changes: { battery?: Partial<AssessmentInputs['battery']>; survey?: SurveyAnswers } = {}) {
	const battery = { ...BATTERY, ...changes.battery };
	const survey = changes.survey ?? HOT_CORNER;
	const vehicle: AssessmentInputs['vehicle'] = {
		...{ make: 'Marlow', model: 'Ridge', modelYear: 2019, registration: '', engineLayout: 'inline' },
		...{ massKg: 3100, dragAreaM2: 1.35, towMassKg: 1800, towDragAreaM2: 1 }
	};
	const hotDay = { hotDayMaxC: 44, dailyRangeK: 15, sunPeakWPerM2: 1050 };
	const place = { name: 'Salt Lake', region: '', latitudeDeg: -28, longitudeDeg: 137, altitudeM: 20 };
	const dayPlan = DAY_PLAN_TEMPLATES[0]!.plan;
	const built = buildScenario({
		...{ vehicle, battery, survey, dayPlan, hotDay },
		...{ altitudeM: place.altitudeM, coefficients: {} }
	});
	const result = assessScenario(built.scenario, {
		legKinds: dayPlan.legs.map(({ kind }) => kind),
		heatLimits: heatLimitsOf(battery)
	});
	if (result.status === 'failed') throw new Error(result.reason);
	return {
		...{ id: 7, engineVersion: result.engineVersion, inputsSha256: 'ab'.repeat(32), assessedBy: 'Noor' },
		createdAt: '2026-01-08T03:00:00.000Z',
		inputs: {
			...{ jobNumber: 3, customerName: 'Ilse Tarn', vehicle, battery, dayPlan, hotDay, ...built },
			mount: { letter: 'A', name: 'Guard', survey },
			place: { ...place, ...hotDay, climateZone: 'BWh', source: 'Invented' },
			book: { number: 1, name: 'Defaults', coefficients: {} }
		},
		result
	} as unknown as AssessmentView;
}

const valueOf = (lines: { label: string; value: string }[], label: string) =>
	lines.find((line) => line.label === label)?.value.replace(/\u202F/g, ' ');

describe('an assessment in words', () => {
	it('gives the figures of a day that cuts out', () => {
		const view = makeView();
		const report = presentReport(view);
		expect(report.headline).toBe('Cuts out');
		expect(valueOf(report.figures, 'Headroom')).toMatch(/^−\d+\.\d K$/);
		expect(valueOf(report.figures, 'Goes dark')).toMatch(/^\d\d:\d\d$/);
		expect(valueOf(report.figures, 'Comes back')).toMatch(/^\d\d:\d\d/);
		expect(valueOf(report.figures, 'Charge missed')).toMatch(/ Ah$/);
	});

	it('gives the figures of a day that rides it out', () => {
		const survey: SurveyAnswers = {
			positionKind: 'cabin',
			enclosureCooling: 'cooled',
			enclosureSun: 'shaded'
		};
		const report = presentReport(makeView({ survey }));
		expect(report.headline).toBe('Rides it out');
		expect(valueOf(report.figures, 'Goes dark')).toBe('not on this day');
		expect(valueOf(report.figures, 'Comes back')).toBe('stays on');
		expect(valueOf(report.figures, 'Dark in all')).toBe('none');
		expect(report.maker).toBeNull();
	});

	it('says that a battery which needs a hand does not come back', () => {
		const { figures } = presentReport(makeView({ battery: { autoReset: false } }));
		const back = figures.find(({ label }) => label === 'Comes back');
		expect(back).toMatchObject({ value: 'not within the plan', note: expect.stringContaining('somebody') });
	});

	it('says where the months come from and how often the customer is out, where that was kept', () => {
		const { inputs, ...view } = makeView();
		const touring = {
			months: Array.from({ length: 12 }, () => ({ meanMaxC: 30, spreadK: 3 })),
			daysOnRoad: Array<number>(12).fill(4),
			basis: 'Entered for the place: our own log'
		};
		const { hotDay } = presentReport({ ...view, inputs: { ...inputs, touring } });
		expect(valueOf(hotDay, 'Months of the year')).toBe('Entered for the place: our own log');
		expect(valueOf(hotDay, 'On the road')).toBe('4 days each month');
		const before = presentReport({ ...view, inputs });
		expect(valueOf(before.hotDay, 'On the road')).toBeUndefined();
		expect(before.hotDay).toHaveLength(hotDay.length - 2);
	});

	it('gives the limits, the charging voltage and the gas of a battery that nothing switches off', () => {
		const report = presentReport(makeView({ battery: AGM }));
		expect(report.headline).toBe('Gets too hot');
		expect(valueOf(report.figures, 'Headroom')).toMatch(/^−\d+\.\d K$/);
		expect(valueOf(report.figures, 'Too hot')).toMatch(/ from \d\d:\d\d/);
		expect(valueOf(report.figures, 'Charging voltage at the hottest')).toMatch(/^1[23]\.\d V$/);
		expect(valueOf(report.figures, 'Fresh air for its hydrogen')).toBe('0.24 m³/h');
		expect(valueOf(report.battery, 'Use')).toBe('up to 60 °C; it has no BMS');
		expect(valueOf(report.battery, 'Rated life')).toBe('6 years at 25 °C');
		const said = JSON.stringify([report.sentence, report.figures, report.battery]);
		expect(said).not.toMatch(/\bdark\b|cut.?off|[Cc]omes back|BMS measures/);
	});

	it('works the charging voltage out before the reader’s eyes', () => {
		const view = makeView({ battery: AGM });
		const line = presentReport(view).figures.find(({ label }) => label.startsWith('Charging voltage'));
		const kelvin = Math.round(view.result.peakCellsC - 25);
		expect(line?.note?.replace(/\u202F/g, ' ')).toContain(
			`Usually 14.4 V at 25 °C, and 6 cells × −4 mV/K × ${kelvin} K`
		);
		expect(line?.note).toContain('the charger stays at');
		const seen = presentReport(makeView({ battery: { ...AGM, compensatesCharge: true } })).figures;
		expect(JSON.stringify(seen)).toContain('the charger follows');
	});

	it('tells an answer from a value that was assumed', () => {
		const lines = presentReport(makeView()).survey.flatMap((question) => question.lines);
		expect(valueOf(lines, 'Gap to the exhaust')).toBe('60 mm');
		expect(valueOf(lines, 'Height of hot pipe in view')).toBe('Not known: 150 mm assumed');
		expect(valueOf(lines, 'Gap to the engine')).toBe('Not answered: 100 mm assumed');
	});

	it('writes numbers of the model with four digits and their unit, and says which were only entered', () => {
		const { derivations } = presentReport(makeView());
		const at = (label: string) => derivations.find((each) => each.label === label);
		expect(at('Surface of the case')).toMatchObject({ value: '0.2613 m²', isEntered: false });
		expect(at('Heat capacity of the cells')?.value).toBe('11190 J/K');
		expect(at('Mass of the loaded vehicle')).toMatchObject({ value: '3100 kg', isEntered: true });
		expect(at('How much of the enclosure air reaches the battery')?.value).toBe('0');
	});

	it.each([
		['excluded', /^Against/],
		['silent', /^Without/],
		['conditional', /^Only on/]
	] as const)('cautions under a bonnet when the maker’s word is "%s"', (underBonnet, title) => {
		const battery = { underBonnet, underBonnetWords: 'Not above 60 °C.' };
		const { maker } = presentReport(makeView({ battery }));
		expect(maker?.title).toMatch(title);
		expect(maker?.text).toContain('“Not above 60 °C.”');
	});

	it('cautions about nothing when the maker allows it', () => {
		expect(presentReport(makeView({ battery: { underBonnet: 'allowed' } })).maker).toBeNull();
	});

	it('names the versions that made it', () => {
		const { versions } = presentReport(makeView());
		expect(valueOf(versions, 'Assessment')).toBe('7');
		expect(valueOf(versions, 'Coefficient book')).toBe('1, Defaults');
		expect(valueOf(versions, 'Hash of the inputs (SHA-256)')).toBe('ab'.repeat(32));
	});
});
