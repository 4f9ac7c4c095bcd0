import { describe, expect, it } from 'vitest';
import { battery, cargoArea, hotSide, inputsFor } from '../../../../tests/support/survey-inputs';
import { EngineInputError } from '../correlations/require';
import type { Scenario } from '../types';
import { coefficientDefaults, parseScenario } from '../index';
import { buildScenario } from './build-scenario';
import { POSITION_KINDS, type SurveyAnswers, type SurveyInputs } from './types';

const AGM: SurveyInputs['battery'] = {
	...{ ...battery, chemistry: 'lead-acid-agm', massKg: 30, internalResistanceMohm: 5 },
	...{ sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: true }
};

function build(survey: SurveyAnswers, changes: Partial<SurveyInputs> = {}): Scenario {
	return parseScenario(buildScenario(inputsFor(survey, changes)).scenario);
}

describe('a scenario from a survey', () => {
	it.each(POSITION_KINDS)('can be run for a position %s that nobody has surveyed yet', (positionKind) => {
		expect(() => build({ positionKind })).not.toThrow();
	});

	it('takes the surfaces of the battery from its three dimensions, the base left out', () => {
		const { caseArea, topArea } = build(hotSide).battery;
		// 0.33 × 0.172 = 0.05676; 2 × 0.215 × (0.33 + 0.172) = 0.21586.
		expect(topArea).toBeCloseTo(0.05676, 10);
		expect(caseArea).toBeCloseTo(0.27262, 10);
	});

	it('calls the longer side long, whichever way round the data sheet has them', () => {
		const turned = { ...battery, lengthMm: battery.widthMm, widthMm: battery.lengthMm };
		expect(build(hotSide, { battery: turned })).toEqual(build(hotSide));
	});

	it('turns mass into heat capacity at 1100 J/kgK in all', () => {
		const { caseHeatCapacity, cellHeatCapacity, boardHeatCapacity } = build(hotSide).battery;
		expect(caseHeatCapacity + cellHeatCapacity + boardHeatCapacity).toBeCloseTo(12.6 * 1100, 6);
		expect(cellHeatCapacity / caseHeatCapacity).toBeCloseTo(11000 / 2500, 10);
	});

	it('sets the latches of a battery without a BMS where nothing reaches them, and says so', () => {
		const built = buildScenario(inputsFor(hotSide, { battery: AGM }));
		const { bms, battery: group, charger } = parseScenario(built.scenario);
		expect(bms).toMatchObject({ charge: { cut: 1000, reset: 999 }, discharge: { cut: 1000, reset: 999 } });
		expect(group).toMatchObject({ boardR: 0, r25: 0.005, activationK: 1000 });
		expect(charger.taperSoc).toBe(0.8);
		const cut = built.derivations.find(({ path }) => path === 'bms.discharge.cut');
		expect(cut?.basis).toMatch(/no BMS.*nothing is ever cut off/);
	});

	it('gives lead-acid its own heat capacity, and its wet cells more contact with the case', () => {
		const [dry, wet] = [build(hotSide), build(hotSide, { battery: AGM })];
		const { caseHeatCapacity, cellHeatCapacity, boardHeatCapacity } = wet.battery;
		expect(caseHeatCapacity + cellHeatCapacity + boardHeatCapacity).toBeCloseTo(30 * 780, 6);
		expect(wet.battery.caseCellConductance).toBeCloseTo(2 * dry.battery.caseCellConductance, 10);
	});

	it('writes no value of the chemistry where it is the model’s own default', () => {
		const paths = buildScenario(inputsFor(hotSide)).derivations.map(({ path }) => path);
		expect(paths).not.toContain('battery.activationK');
		expect(paths).not.toContain('charger.taperSoc');
		expect(paths).not.toContain('battery.boardR');
	});

	it('takes the BMS limits from the data sheet as they are', () => {
		const { bms } = build(hotSide);
		expect(bms).toEqual({
			sensor: 'cells',
			charge: { cut: 65, reset: 55 },
			discharge: { cut: 75, reset: 62 },
			cutDelayS: 0,
			autoReset: true
		});
	});

	it('charges with no more than the battery takes, and says so', () => {
		const built = buildScenario(inputsFor(hotSide, { battery: { ...battery, maxChargeA: 20 } }));
		expect(built.scenario.charger).toEqual({ maxA: 20 });
		expect(built.assumptions.join(' ')).toContain('20 A');
	});

	it('tows only on the legs that tow', () => {
		const { legs } = build(hotSide);
		expect(legs.map(({ towMassKg }) => towMassKg > 0)).toEqual(
			inputsFor(hotSide).dayPlan.legs.map(({ towing }) => towing)
		);
		expect(legs[0]).toMatchObject({ towMassKg: 1800, towDragAreaM2: 0.6 });
	});

	it('thins the air with altitude as the standard atmosphere does', () => {
		// ISO 2533, table: 89 874.6 Pa at 1000 m.
		expect(build(hotSide, { altitudeM: 1000 }).climate.pressurePa).toBeCloseTo(89_875, -1);
	});

	it('lays the book in force under what was derived', () => {
		const coefficients = { bay: { share: 0.5 }, position: { exhaustView: 0.2 } };
		const scenario = build(hotSide, { coefficients });
		expect(scenario.bay.share).toBe(0.5);
		expect(scenario.position.exhaustView).toBeCloseTo(build(hotSide).position.exhaustView, 12);
	});

	it('comes out the same with a book of the defaults as without a book', () => {
		const coefficients = coefficientDefaults();
		expect(build(hotSide, { coefficients })).toEqual(build(hotSide));
	});

	it('has no shield from the book alone', () => {
		expect(build(hotSide, { coefficients: { shield: { area: 0.2 } } }).shield).toBeNull();
	});

	it('refuses a battery without height', () => {
		const flat = { ...battery, heightMm: 0 };
		expect(() => build(hotSide, { battery: flat })).toThrow(EngineInputError);
	});

	it('refuses an altitude outside the standard atmosphere', () => {
		expect(() => build(hotSide, { altitudeM: 20_000 })).toThrow(/altitudeM is 20000/);
	});
});

describe('what the survey sees', () => {
	it('sees nothing of what is hidden', () => {
		const { position } = build({ ...hotSide, exhaustFacing: 'hidden', engineFacing: 'hidden' });
		expect(position).toMatchObject({ exhaustView: 0, engineView: 0 });
	});

	it('sees half as much at an angle', () => {
		const square = build(hotSide).position.exhaustView;
		const angled = build({ ...hotSide, exhaustFacing: 'at-an-angle' }).position.exhaustView;
		expect(angled).toBeCloseTo(square / 2, 12);
	});

	it('sees less across a larger gap', () => {
		const views = [60, 120, 240, 480].map(
			(exhaustGapMm) => build({ ...hotSide, exhaustGapMm }).position.exhaustView
		);
		expect(views).toEqual([...views].sort((a, b) => b - a));
		expect(new Set(views).size).toBe(4);
	});

	it('never sees more exhaust than there is', () => {
		const { position, exhaust } = build(
			{
				...hotSide,
				exhaustGapMm: 10,
				exhaustSeenWidthMm: 1500,
				exhaustSeenHeightMm: 1000,
				exhaustBatterySide: 'long-side'
			},
			{ battery: { ...battery, lengthMm: 1200, heightMm: 900 } }
		);
		expect(position.exhaustView).toBe(exhaust.area);
	});

	it('weakens the bonnet with a lining', () => {
		const bare = build(hotSide).position.bonnetView;
		expect(build({ ...hotSide, bonnetLining: 'lined' }).position.bonnetView).toBeCloseTo(0.3 * bare, 12);
	});
});

describe('shields', () => {
	const wrap: SurveyAnswers = { ...hotSide, shieldKind: 'reflective-wrap', shieldFinish: 'bright' };

	it('cover the area of the side that they stand on', () => {
		expect(build({ ...wrap, shieldPlace: 'exhaust-side' }).shield?.area).toBeCloseTo(0.33 * 0.215, 12);
	});

	it('cover nine tenths of the view when they cover both hot sides, and none of it on the cool side', () => {
		expect(build({ ...wrap, shieldPlace: 'both-hot-sides' }).shield?.coverage).toBeCloseTo(0.9, 12);
		expect(build({ ...wrap, shieldPlace: 'cool-side' }).shield?.coverage).toBe(0);
	});

	it('never cover more than the case has', () => {
		const top: SurveyAnswers = { ...wrap, shieldPlace: 'both-hot-sides', exhaustBatterySide: 'long-side' };
		const tall = { ...battery, lengthMm: 1000, widthMm: 50, heightMm: 1000 };
		const scenario = build({ ...top, engineBatterySide: 'long-side' }, { battery: tall });
		expect(scenario.shield!.area).toBeLessThanOrEqual(scenario.battery.caseArea);
	});

	it('let less through across a wider gap behind a plate, down to what moving air carries', () => {
		const gapOf = (shieldStandOffMm: number) =>
			build({ ...wrap, shieldKind: 'stand-off-plate', shieldPlace: 'exhaust-side', shieldStandOffMm }).shield!
				.gap;
		expect(gapOf(5)).toBeCloseTo(0.028 / 0.005, 10);
		expect(gapOf(100)).toBe(2);
	});
});

describe('trays', () => {
	it('store what their sheet weighs', () => {
		// Steel 7832 kg/m³ and 434 J/kgK over 0.37 × 0.21 m of 3 mm.
		expect(build(hotSide).tray.heatCapacity).toBeCloseTo(7832 * 434 * 0.37 * 0.21 * 0.003, 6);
	});

	it('hold the battery apart with a mat', () => {
		const conductance = (trayMat: 'none' | 'rubber' | 'foam') =>
			build({ ...hotSide, trayMat }).tray.caseConductance;
		expect(conductance('none')).toBeGreaterThan(conductance('rubber'));
		expect(conductance('rubber')).toBeGreaterThan(conductance('foam'));
	});
});

describe('assumptions and reasons', () => {
	it('are two standing sentences when everything was answered', () => {
		expect(buildScenario(inputsFor(cargoArea)).assumptions).toHaveLength(2);
	});

	it('name the answer that is not known and what was taken', () => {
		const { assumptions } = buildScenario(inputsFor({ ...hotSide, exhaustGapMm: 'unknown' }));
		expect(assumptions[0]).toBe('Gap to the exhaust: not known. Assumed: 150\u202Fmm.');
	});

	it('say once what a question without any answer takes', () => {
		const { assumptions } = buildScenario(inputsFor({ positionKind: 'under-bonnet' }));
		expect(assumptions).toHaveLength(7 + 2);
		expect(assumptions[1]).toMatch(
			/^What does it see of the exhaust\? Not yet answered\. Assumed: A patch of/
		);
	});

	it('say the same as the scenario has for each answer that is assumed', () => {
		const assumed = build({ positionKind: 'chassis-rail' });
		const answered = build({
			positionKind: 'chassis-rail',
			exhaustFacing: 'square-on',
			exhaustGapMm: 150,
			exhaustSeenWidthMm: 300,
			exhaustSeenHeightMm: 150,
			exhaustBatterySide: 'long-side',
			airPath: 'closed-corner',
			roadHeat: 'open-to-bitumen',
			trayMaterial: 'steel',
			trayThicknessMm: 3,
			trayLengthMm: 370,
			trayWidthMm: 212,
			trayMat: 'none',
			shieldKind: 'none'
		});
		expect(assumed).toEqual(answered);
	});

	it('give a reason for each derived value, once', () => {
		const { derivations } = buildScenario(inputsFor(hotSide));
		expect(derivations.every(({ basis, label }) => basis.length > 10 && label.length > 3)).toBe(true);
		expect(new Set(derivations.map(({ path }) => path)).size).toBe(derivations.length);
	});

	it('write the view formula out with its numbers and its source', () => {
		const { derivations } = buildScenario(inputsFor(hotSide));
		const view = derivations.find(({ path }) => path === 'position.exhaustView');
		expect(view?.basis).toMatch(/Patch 0\.063 m² × view factor 0\.\d+ × 1 .* gap 0\.12 m: .*Table 13\.2/);
	});
});
