import { describe, expect, it } from 'vitest';
import { cargoArea, hotSide, inputsFor } from '../../../../tests/support/survey-inputs';
import type { HeatLimits } from '../chemistries/guard';
import { heatLimitsOf } from '../chemistries/guard';
import { buildScenario } from '../survey/build-scenario';
import type { SurveyAnswers, SurveyInputs } from '../survey/types';
import { copyScenario, PRIORS } from '../uncertainty';
import { parseScenario } from '../vehicle/parse-scenario';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { assessScenario } from './assess-scenario';
import { watchUseLimit } from './heat-limits';
import { judgeHeat } from './verdict';
import type { DoneAssessment } from './types';

const AGM: SurveyInputs['battery'] = {
	...{ chemistry: 'lead-acid-agm', capacityAh: 100, lengthMm: 330, widthMm: 172, heightMm: 220 },
	...{ massKg: 30, internalResistanceMohm: 4, maxChargeA: 30 },
	...{ sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: false }
};

function assess(survey: SurveyAnswers, changes: Partial<HeatLimits> = {}): DoneAssessment {
	const inputs = inputsFor(survey, { battery: { ...AGM, ...changes } });
	const { scenario } = buildScenario(inputs);
	const answer = assessScenario(scenario, { heatLimits: heatLimitsOf(inputs.battery) });
	if (answer.status === 'failed') throw new Error(answer.reason);
	return answer;
}

describe('a day of a battery that nothing switches off', () => {
	const hot = assess(hotSide);

	it('has no cut-off, no dark hour and no charge lost, however hot it gets', () => {
		expect(hot.peakCellsC).toBeGreaterThan(60);
		expect(hot).toMatchObject({
			events: [],
			darkSpans: [],
			darkHours: 0,
			chargeSpans: [],
			chargeMissedAh: 0
		});
		expect(hot.cutAtHour).toBeNull();
	});

	it('is too hot above the limit of use, by as much as the headroom says', () => {
		expect(hot.verdict).toBe('cuts-out');
		expect(hot.headroomK).toBeCloseTo(60 - hot.peakCellsC, 10);
		expect(hot.chargeHeadroomK).toBeCloseTo(50 - hot.peakCellsC, 10);
	});

	it('says from when and for how long, as the curve of the cells does', () => {
		const { cellsC, startHour, stepMin } = hot.curves;
		const above = cellsC.filter((tempC) => tempC > 60).length * (stepMin / 60);
		const first = startHour + (cellsC.findIndex((tempC) => tempC > 60) * stepMin) / 60;
		expect(Math.abs(hot.leadAcid!.hoursAboveUseLimit - above)).toBeLessThanOrEqual(stepMin / 60);
		expect(first - hot.leadAcid!.tooHotAtHour!).toBeGreaterThanOrEqual(-0.01);
		expect(first - hot.leadAcid!.tooHotAtHour!).toBeLessThanOrEqual(stepMin / 60);
	});

	it('asks the charger for less voltage, the hotter it gets', () => {
		const { compensatedChargeV, uncompensatedChargeV } = hot.leadAcid!;
		expect(uncompensatedChargeV).toBeCloseTo(14.4, 12);
		expect(compensatedChargeV).toBeCloseTo(14.4 - 0.024 * (hot.peakCellsC - 25), 6);
	});

	it('carries its limits, what its gas needs and what its charger does', () => {
		expect(hot.leadAcid).toMatchObject({ useLimitC: 60, chargeLimitC: 50, chargerCompensates: false });
		expect(hot.leadAcid!.freshAirM3PerH).toBeCloseTo(0.24, 12);
		expect(hot.leadAcid!.openingCm2).toBeCloseTo(6.72, 12);
	});

	it('runs close when it is charged above the limit of charging, though it may be used there', () => {
		const roomy = assess(hotSide, { highestUseC: 120 });
		expect(roomy.leadAcid!.hoursAboveChargeLimit).toBeGreaterThan(0);
		expect(roomy.leadAcid!.tooHotAtHour).toBeNull();
		expect(roomy.verdict).toBe('runs-close');
	});

	it('rides it out where it stays cool enough for both', () => {
		const mild = assess(cargoArea, { highestChargeC: 80, highestUseC: 90 });
		expect(mild.verdict).toBe('rides-it-out');
		expect(mild.leadAcid).toMatchObject({
			tooHotAtHour: null,
			hoursAboveUseLimit: 0,
			hoursAboveChargeLimit: 0
		});
	});

	it('leaves a battery with a BMS as it was', () => {
		const { scenario } = buildScenario(inputsFor(hotSide));
		const answer = assessScenario(scenario, { heatLimits: heatLimitsOf(inputsFor(hotSide).battery) });
		expect(answer).toEqual(assessScenario(scenario));
		expect(Object.keys(answer)).not.toContain('leadAcid');
	});
});

describe('a day that is watched for its limit', () => {
	const watch = (survey: SurveyAnswers) => {
		const inputs = inputsFor(survey, { battery: AGM });
		const scenario = parseScenario(buildScenario(inputs).scenario);
		const watched = watchUseLimit(scenario, heatLimitsOf(inputs.battery));
		return { plain: new OutcomeRunner().run(scenario), watched: new OutcomeRunner().run(watched) };
	};

	it('counts as cut out where the limit is passed, with about the same peak', () => {
		const { plain, watched } = watch(hotSide);
		expect(plain.cutsOut).toBe(false);
		expect(watched.cutsOut).toBe(true);
		expect(Math.abs(watched.peakSensorC - plain.peakSensorC)).toBeLessThan(0.2);
	});

	it('is the same day to the last digit where the limit is not reached', () => {
		const { plain, watched } = watch({
			positionKind: 'cabin',
			enclosureCooling: 'cooled',
			enclosureSun: 'shaded'
		});
		expect(watched).toEqual(plain);
	});

	it('has no BMS whose readings or thresholds could be off', () => {
		const inputs = inputsFor(hotSide, { battery: AGM });
		const watched = watchUseLimit(
			parseScenario(buildScenario(inputs).scenario),
			heatLimitsOf(inputs.battery)
		);
		const off = copyScenario(watched);
		PRIORS.find(({ key }) => key === 'sensor')!.apply(off, (value) => value + 1.5);
		expect(off.bms).toEqual(watched.bms);
	});

	it('is left as it is for a battery with a BMS', () => {
		const scenario = parseScenario(buildScenario(inputsFor(hotSide)).scenario);
		expect(watchUseLimit(scenario, null)).toBe(scenario);
	});
});

describe('the verdict by limits', () => {
	it.each([
		[-0.1, 0, 'cuts-out'],
		[0, 0, 'runs-close'],
		[4.9, 0, 'runs-close'],
		[5, 0, 'rides-it-out'],
		[20, 0.1, 'runs-close'],
		[-3, 2, 'cuts-out']
	] as const)('with %d K of headroom and %d h charged too hot is %s', (headroomK, hours, verdict) => {
		expect(judgeHeat({ chargedTooHot: hours > 0 }, headroomK)).toBe(verdict);
	});
});
