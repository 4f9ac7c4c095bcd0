import { describe, expect, it } from 'vitest';
import type { HeatLimits } from '../chemistries/guard';
import { finishOutlook } from '../outlook';
import type { Scenario } from '../types';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { parseScenario } from '../vehicle/parse-scenario';
import { assessScenario } from './assess-scenario';
import { watchUseLimit } from './heat-limits';
import { judgeOutcome } from './verdict';

const runner = new OutcomeRunner();

/** Days that charge in the heat: at several temperatures, with room in the battery or hardly any, with short stops or none. */
const DAYS: Scenario[] = [16, 30, 44].flatMap((tMax) =>
	[0.4, 0.9].flatMap((soc) =>
		[0, 45].flatMap((stopMin) =>
			[42, 54].map((cut) =>
				parseScenario({
					climate: { tMax },
					start: { hour: 7, soc },
					position: { bayAirFraction: 0.9, exhaustView: 0.004, engineView: 0.02, airExposure: 0.1 },
					bms: { charge: { cut, reset: cut - 6 }, discharge: { cut: 80, reset: 70 } },
					legs: [
						{ minutes: 200, engineOn: true, speedKmh: 80, loadA: 4 },
						{ minutes: Math.max(stopMin, 1), loadA: 6 },
						{ minutes: 260, engineOn: true, speedKmh: 60, surface: 'gravel', loadA: 4 },
						{ minutes: 600, loadA: 8 }
					]
				})
			)
		)
	)
);

const LIMITS: HeatLimits = {
	...{ kind: 'heat-limits', chemistry: 'lead-acid-agm', highestChargeC: 45, highestUseC: 65 },
	...{ ratedLifeYears: 6, compensatesCharge: true }
};

describe('the verdict', () => {
	it('of a run among many is that of the assessment, charge missed to heat included', () => {
		const verdicts = DAYS.map((day) => {
			const assessed = assessScenario(day);
			if (assessed.status === 'failed') throw new Error(assessed.reason);
			const outcome = runner.run(day);
			expect(outcome.missedAh).toBeCloseTo(assessed.chargeMissedAh, 9);
			expect(judgeOutcome(day, outcome, null)).toBe(assessed.verdict);
			return assessed.verdict;
		});
		expect(new Set(verdicts).size).toBeGreaterThan(1);
	});

	it('of a battery that nothing switches off counts charging above its limit in both', () => {
		const bare = DAYS.map((day) => ({
			...day,
			bms: { ...day.bms, charge: { cut: 1000, reset: 999 }, discharge: { cut: 1000, reset: 999 } }
		}));
		const verdicts = bare.map((day) => {
			const assessed = assessScenario(day, { heatLimits: LIMITS });
			if (assessed.status === 'failed') throw new Error(assessed.reason);
			const watched = watchUseLimit(day, LIMITS);
			expect(judgeOutcome(watched, runner.run(watched), LIMITS)).toBe(assessed.verdict);
			return assessed.verdict;
		});
		expect(verdicts).toContain('runs-close');
	});
});

describe('an outlook whose air is hotter than the formulas for fuses go', () => {
	const outlookWith = (bayC: number) =>
		finishOutlook({
			// A bay that is told to hold its heat: what matters here is the air that comes of it.
			scenario: parseScenario({
				climate: { tMax: bayC },
				position: { bayAirFraction: 1 },
				bay: { maxFlow: 0.3, fanFlow: 0.1, flowPerSpeed: 0.012 },
				legs: [{ minutes: 300, engineOn: true, speedKmh: 50, gradePercent: 6, towMassKg: 2500 }]
			}),
			year: { months: Array(12).fill({ meanMaxC: 20, spreadK: 3 }), daysOnRoad: Array(12).fill(2) },
			...{ wear: { law: 'none' }, offers: [], moneyPerHour: 100, limits: null, seed: 1 },
			cable: {
				...{ areaMm2: 16, insulationC: 90, laying: 'in a tube', conductorLengthM: 6, fuseRatedA: 60 },
				...{ continuousA: 40, nominalV: 12.8, acceptedDrop: 0.04 }
			},
			effort: {
				...{ daySamples: 16, yearSamples: 2, influencePoints: 2, influenceReplicates: 2 },
				...{ remedySamples: 2, remediesTogether: 1, envelopeSamples: 0 }
			},
			mostCutOutShare: 0.05
		});

	it('is whole but for the cable, and says why', () => {
		const { cable, cableProblem, day } = outlookWith(50);
		expect(cable).toBeNull();
		expect(cableProblem).toMatch(/^airC is 1\d\d\./);
		expect(day.samples).toBe(16);
	});
});
