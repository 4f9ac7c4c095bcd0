import { describe, expect, it } from 'vitest';
import { cargoArea, hotSide, inputsFor } from '../../../../tests/support/survey-inputs';
import { buildScenario, DAY_PLAN_TEMPLATES, type SurveyAnswers, type SurveyInputs } from '../survey';
import { ambientTempC, parseScenario, runScenario, ScenarioError } from '../index';
import type { ScenarioInput } from '../types';
import { assessScenario, type AssessOptions } from './assess-scenario';
import type { DoneAssessment, HeatSource } from './types';

function assess(input: ScenarioInput, options?: AssessOptions): DoneAssessment {
	const assessment = assessScenario(input, options);
	if (assessment.status === 'failed') throw new Error(assessment.reason);
	return assessment;
}

const assessMount = (survey: SurveyAnswers, changes?: Partial<SurveyInputs>) =>
	assess(buildScenario(inputsFor(survey, changes)).scenario);

const kelvinOf = ({ ledger }: DoneAssessment, source: HeatSource) =>
	ledger.find((entry) => entry.source === source)!.kelvin;

const DAY: ScenarioInput = {
	legs: [
		{ minutes: 240, engineOn: true, speedKmh: 90 },
		{ minutes: 60 },
		{ minutes: 240, engineOn: true, speedKmh: 90 },
		{ minutes: 600, loadA: 4 }
	]
};

describe('mounts on a hot touring day', () => {
	const hot = assessMount(hotSide);
	const wrapped = (shieldPlace: SurveyAnswers['shieldPlace']) =>
		assessMount({ ...hotSide, shieldKind: 'reflective-wrap', shieldFinish: 'bright', shieldPlace });

	it('on the hot side go dark late in the afternoon and come back by themselves hours after the stop', () => {
		expect(hot.verdict).toBe('cuts-out');
		expect(hot.cutAtHour).toBeGreaterThan(15);
		expect(hot.cutAtHour).toBeLessThan(19);
		const campAtHour = hot.legs.at(-1)!.fromHour;
		expect(hot.resetAtHour! - campAtHour).toBeGreaterThan(1);
		expect(hot.backByItself).toBe(true);
		expect(hot.headroomK).toBeLessThan(0);
	});

	it('peak hours after the hottest hour of the day', () => {
		expect(hot.peakAtHour).toBeGreaterThan(16);
	});

	it('ride the same day out in the cargo area', () => {
		const cargo = assessMount(cargoArea);
		expect(cargo.verdict).toBe('rides-it-out');
		expect(cargo).toMatchObject({ cutAtHour: null, resetAtHour: null, backByItself: false, darkHours: 0 });
	});

	it('gain many kelvin from a wrap on the side that faces the exhaust', () => {
		expect(hot.peakCellsC - wrapped('exhaust-side').peakCellsC).toBeGreaterThan(8);
	});

	it('gain nothing from a wrap on a side that faces nothing hot: there it only keeps heat in', () => {
		const gainK = hot.peakCellsC - wrapped('cool-side').peakCellsC;
		expect(gainK).toBeLessThan(0.5);
		expect(gainK).toBeGreaterThan(-4);
	});

	it('change by almost nothing with a wrap when they see neither exhaust nor engine', () => {
		const unseen: SurveyAnswers = { ...hotSide, exhaustFacing: 'hidden', engineFacing: 'hidden' };
		const bare = assessMount(unseen).peakCellsC;
		const covered = assessMount({
			...unseen,
			shieldKind: 'reflective-wrap',
			shieldPlace: 'cool-side'
		}).peakCellsC;
		expect(Math.abs(bare - covered)).toBeLessThan(1.5);
	});

	it('come back sooner with the bonnet up at camp', () => {
		const { dayPlan } = inputsFor(hotSide);
		const legs = dayPlan.legs.map((leg) => ({ ...leg, bonnetOpen: leg.kind === 'camp' }));
		const open = assessMount(hotSide, { dayPlan: { ...dayPlan, legs } });
		expect(open.resetAtHour).toBeLessThan(hot.resetAtHour! - 0.1);
	});

	it.each(DAY_PLAN_TEMPLATES.map((template) => [template.id, template.plan] as const))(
		'can be assessed on the day "%s", under the bonnet and inside',
		(_, dayPlan) => {
			expect(assessMount(hotSide, { dayPlan }).endHour).toBeGreaterThan(24);
			expect(assessMount(cargoArea, { dayPlan }).verdict).toBe('rides-it-out');
		}
	);
});

describe('the heat ledger', () => {
	const scenarios: [string, ScenarioInput][] = [
		['the default mount', DAY],
		['a hot-side mount', buildScenario(inputsFor(hotSide)).scenario],
		['a wrapped mount', { ...DAY, shield: {} }],
		[
			'a cooled cabin',
			buildScenario(inputsFor({ positionKind: 'cabin', enclosureCooling: 'cooled' })).scenario
		],
		['a chassis rail', buildScenario(inputsFor({ positionKind: 'chassis-rail' })).scenario],
		['legs of odd lengths', { legs: DAY.legs.map((leg) => ({ ...leg, minutes: leg.minutes + 0.37 })) }]
	];

	it.each(scenarios)('of %s sums to what the cells stand above the outside air', (_, input) => {
		const { ledger, peakCellsC, peakAtHour } = assess(input);
		const above = peakCellsC - ambientTempC(peakAtHour, parseScenario(input).climate);
		expect(Math.abs(ledger.reduce((sum, { kelvin }) => sum + kelvin, 0) - above)).toBeLessThan(0.1);
	});

	it('sums in watts to what case, cells and board take up', () => {
		const { ledger, peakAtHour } = assess(DAY);
		const input = parseScenario(DAY);
		const run = runScenario(input);
		if (run.status === 'failed') throw new Error(run.reason);
		const minute = Math.round((peakAtHour - input.start.hour) * 60);
		const { nodes } = run.minutes;
		const risePerS = (series: Float64Array) => (series[minute + 1]! - series[minute]!) / 60;
		const { caseHeatCapacity, cellHeatCapacity, boardHeatCapacity } = input.battery;
		const storedW =
			caseHeatCapacity * risePerS(nodes.case) +
			cellHeatCapacity * risePerS(nodes.cells) +
			boardHeatCapacity * risePerS(nodes.board);
		// A forward difference over one minute, in which the case moves: 1 W of some 50 W that pass.
		expect(Math.abs(ledger.reduce((sum, { watts }) => sum + watts, 0) - storedW)).toBeLessThan(1);
	});

	it('gives nothing to a source that is not there', () => {
		const assessment = assess({
			...DAY,
			position: { exhaustView: 0, engineView: 0, bonnetView: 0 },
			charger: { maxA: 0 },
			legs: DAY.legs.map((leg) => ({ ...leg, loadA: 0 }))
		});
		for (const source of ['exhaust', 'engine', 'bonnet', 'own-current', 'enclosure-air', 'road'] as const) {
			expect(kelvinOf(assessment, source)).toBe(0);
			expect(assessment.ledger.find((entry) => entry.source === source)!.watts).toBe(0);
		}
		expect(kelvinOf(assessment, 'bay-air')).toBeGreaterThan(1);
	});

	it('gives the exhaust more the more of it is seen', () => {
		const parts = [0.005, 0.01, 0.02].map((exhaustView) =>
			kelvinOf(assess({ ...DAY, position: { exhaustView } }), 'exhaust')
		);
		expect(parts[1]).toBeGreaterThan(1.5 * parts[0]!);
		expect(parts[2]).toBeGreaterThan(1.5 * parts[1]!);
	});

	it('gives the own current four times as much for twice the current, when it is all there is', () => {
		// A battery that neither changes its resistance nor fills up, in air that stays as it is.
		const alone = (loadA: number): ScenarioInput => ({
			position: { exhaustView: 0, engineView: 0, bonnetView: 0, bayAirFraction: 0, guardFraction: 0 },
			battery: { activationK: 0, capacityAh: 10_000, caseEmissivity: 1e-9 },
			climate: { dailyRange: 0 },
			legs: [{ minutes: 600, loadA }]
		});
		const [single, double] = [20, 40].map((loadA) => assess(alone(loadA)));
		expect(kelvinOf(double!, 'own-current') / kelvinOf(single!, 'own-current')).toBeCloseTo(4, 4);
		expect(single!.peakCellsC - 42).toBeCloseTo(kelvinOf(single!, 'own-current'), 3);
	});
});

describe('the verdict', () => {
	const { peakSensorC } = assess(DAY);
	const withCut = (cut: number) =>
		assess({ ...DAY, bms: { discharge: { cut, reset: cut - 5 }, charge: { cut: 90, reset: 80 } } });

	it('rides it out with 5 K to spare and runs close with less', () => {
		expect(withCut(peakSensorC + 5.1)).toMatchObject({ verdict: 'rides-it-out' });
		expect(withCut(peakSensorC + 4.9)).toMatchObject({ verdict: 'runs-close', cutAtHour: null });
	});

	it('cuts out as soon as the latch opens', () => {
		expect(withCut(peakSensorC - 0.1).verdict).toBe('cuts-out');
	});

	it('runs close when only a delay kept the latch shut', () => {
		const bms = { discharge: { cut: peakSensorC - 0.01, reset: 30 }, cutDelayS: 3600 };
		const assessment = assess({ ...DAY, bms: { ...bms, charge: { cut: 90, reset: 80 } } });
		expect(assessment.verdict).toBe('runs-close');
		// The two runs stop at different instants: they agree as far as the steps are true.
		expect(assessment.headroomK).toBeCloseTo(-0.01, 3);
	});

	it('runs close when heat stopped the charging for part of the day', () => {
		const bms = { discharge: { cut: 90, reset: 80 }, charge: { cut: 35, reset: 30 } };
		const assessment = assess({ ...DAY, bms });
		expect(assessment.verdict).toBe('runs-close');
		expect(assessment.chargeMissedAh).toBeGreaterThan(1);
	});

	it('measures the board where the BMS watches the board', () => {
		const assessment = assess({ ...DAY, bms: { sensor: 'board' } });
		expect(assessment.headroomK).toBeCloseTo(75 - assessment.peaks.board, 9);
	});
});

describe('what is missed and for how long', () => {
	it('is no more charge than the battery could have held', () => {
		const shut = { charge: { cut: -20, reset: -30 } };
		const assessment = assess({ start: { soc: 0.8 }, bms: shut, legs: [{ minutes: 600, engineOn: true }] });
		// 20 Ah to full; the taper comes within a hundredth of that in ten hours.
		expect(assessment.chargeMissedAh).toBeGreaterThan(19.9);
		expect(assessment.chargeMissedAh).toBeLessThanOrEqual(20);
		expect(assessment.chargeMissedHours).toBeLessThan(2);
	});

	it('is nothing with the engine off', () => {
		const shut = { charge: { cut: -20, reset: -30 } };
		expect(assess({ bms: shut, legs: [{ minutes: 600 }] })).toMatchObject({
			chargeMissedAh: 0,
			chargeMissedHours: 0
		});
	});

	it('stays open at the end when nobody resets it', () => {
		const bms = { discharge: { cut: 30, reset: 25 }, autoReset: false };
		const assessment = assess({ ...DAY, bms });
		expect(assessment.darkSpans).toEqual([
			{ fromHour: assessment.cutAtHour, toHour: assessment.endHour, open: true }
		]);
		expect(assessment).toMatchObject({ resetAtHour: null, backByItself: false });
		expect(assessment.darkHours).toBeCloseTo(assessment.endHour - assessment.cutAtHour!, 12);
	});
});

describe('what is drawn', () => {
	it('has at most 300 points on whole minutes, rounded to a hundredth', () => {
		const { curves, endHour } = assess(DAY);
		expect(curves.cellsC.length).toBeLessThanOrEqual(300);
		const drawnHours = ((curves.cellsC.length - 1) * curves.stepMin) / 60;
		expect(endHour - curves.startHour - drawnHours).toBeLessThan(curves.stepMin / 60);
		expect(curves.cellsC.every((value) => Math.abs(value * 100 - Math.round(value * 100)) < 1e-9)).toBe(true);
		expect(
			new Set(
				[curves.bayC, curves.airC, curves.caseC, curves.boardC, curves.soc, curves.ambientC].map(
					(c) => c.length
				)
			)
		).toEqual(new Set([curves.cellsC.length]));
	});

	it('lays the legs end to end and keeps what they are to people', () => {
		const { legs, endHour } = assess(DAY, { legKinds: ['drive', 'stop', 'drive', 'camp'] });
		expect(legs.map(({ kind }) => kind)).toEqual(['drive', 'stop', 'drive', 'camp']);
		expect(legs.map(({ fromHour }) => fromHour)).toEqual([6, 10, 11, 15]);
		expect(endHour).toBe(25);
	});
});

describe('a bad scenario', () => {
	it('is refused before anything is run', () => {
		expect(() => assessScenario({ legs: [] })).toThrow(ScenarioError);
	});

	it('gives the same digits each time', () => {
		expect(assess(DAY)).toEqual(assess(DAY));
	});
});
