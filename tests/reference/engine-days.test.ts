import { describe, expect, it } from 'vitest';
import { parseScenario, simulateScenario, type BmsEvent, type NodeName } from '../../src/lib/thermal';
import { ENGINE_CASES } from './support/cases';
import { completeCase, LEG_DEFAULTS, MODEL_DEFAULTS, type CaseInput } from './support/defaults';
import type { ReferenceIntegrator } from './support/integrator';
import { integrateWithMathjs } from './support/mathjs';
import { integrateWithOdex } from './support/odex';
import { MODEL_STATE } from './support/model-equations';
import { runReference, type ReferenceRun } from './support/reference-run';

/**
 * The two that the thermal model asks for, and one for the state of charge, to which comes what flows while one of the two
 * has had its event and the other has not.
 */
const NODE_TOLERANCE_K = 0.05;
const EVENT_TOLERANCE_S = 5;
const SOC_TOLERANCE = 1e-5;
const RUN_TIMEOUT_MS = 120_000;

/** Tight enough that tightening further moves no node by more than a ten-thousandth of the tolerance above. */
const ODEX = integrateWithOdex(1e-8);
/** The tolerance of this one is in K/s; its steps are held short by stability. */
const MATHJS = integrateWithMathjs(1e-5, 60);

function runEngine(input: unknown) {
	const result = simulateScenario(input);
	if (result.status === 'failed') throw new Error(result.reason);
	return result;
}

function compare(input: CaseInput, reference: ReferenceRun): void {
	const { report, minutes } = runEngine(input);
	expect(minutes.count).toBe(reference.minutes.length);
	let furthestK = 0;
	let furthestSoc = 0;
	reference.minutes.forEach((state, minute) => {
		MODEL_STATE.forEach((name, k) => {
			const difference = Math.abs(
				(name === 'soc' ? minutes.soc : minutes.nodes[name as NodeName])[minute]! - state[k]!
			);
			expect(difference).not.toBeNaN();
			if (name === 'soc') furthestSoc = Math.max(furthestSoc, difference);
			else furthestK = Math.max(furthestK, difference);
		});
	});
	expect(furthestK).toBeLessThan(NODE_TOLERANCE_K);
	const apartS = compareEvents(report.events, reference.events);
	const { charger, battery } = parseScenario(input);
	const highestA = Math.max(charger.maxA, ...input.legs.map(({ loadA }) => loadA ?? 0));
	const socTolerance = SOC_TOLERANCE + (highestA * apartS) / (3600 * battery.capacityAh);
	expect(furthestSoc).toBeLessThan(socTolerance);
	expect(Math.abs(report.end.cells - reference.end[MODEL_STATE.indexOf('cells')]!)).toBeLessThan(
		NODE_TOLERANCE_K
	);
	expect(Math.abs(report.end.soc - reference.end[MODEL_STATE.indexOf('soc')]!)).toBeLessThan(socTolerance);
	expect(report.energy.maxRelativeImbalance).toBeLessThan(1e-6);
}

/** Tells how far apart they are at most, s. */
function compareEvents(events: readonly BmsEvent[], expected: ReferenceRun['events']): number {
	const kinds = ({ side, kind }: { side: string; kind: string }) => `${side} ${kind}`;
	expect(events.map(kinds)).toEqual(expected.map(kinds));
	const apartS = Math.max(0, ...events.map(({ hour }, k) => Math.abs(hour - expected[k]!.hour) * 3600));
	expect(apartS).toBeLessThan(EVENT_TOLERANCE_S);
	return apartS;
}

it("has the thermal model's defaults in its table of fields", () => {
	const parsed = parseScenario({ shield: {}, legs: [{ minutes: 1 }] });
	expect(parsed).toEqual({ ...MODEL_DEFAULTS, legs: [{ minutes: 1, ...LEG_DEFAULTS }] });
});

describe.each<[string, ReferenceIntegrator]>([
	['odex', ODEX],
	['mathjs', MATHJS]
])('days against the equations of the page integrated by %s', (_name, integrate) => {
	it.each(ENGINE_CASES)(
		'$name',
		({ input }) => compare(input, runReference(completeCase(input), integrate)),
		RUN_TIMEOUT_MS
	);
});

it('covers cuts and resets of both latches in its table of days', () => {
	const kinds = new Set(
		ENGINE_CASES.flatMap(({ input }) =>
			runEngine(input).report.events.map(({ side, kind }) => `${side} ${kind}`)
		)
	);
	expect([...kinds].sort()).toEqual(['charge cut', 'charge reset', 'discharge cut', 'discharge reset']);
});

describe('a sensor that grazes its cut', () => {
	const { input } = ENGINE_CASES.find(({ name }) => name === 'the same side without the shield')!;
	const withCut = (cut: number): CaseInput => ({
		...input,
		bms: { charge: { cut: 300, reset: 299 }, discharge: { cut, reset: cut - 5 } }
	});
	const peak = runEngine(withCut(300)).report.peakCellsC;

	it(
		'cuts when the peak is a hundredth of a kelvin above, at the same second as the reference',
		() => {
			const grazing = withCut(peak - 0.01);
			const reference = runReference(completeCase(grazing), ODEX);
			expect(reference.events.map(({ kind }) => kind)).toEqual(['cut', 'reset']);
			compareEvents(runEngine(grazing).report.events, reference.events);
		},
		RUN_TIMEOUT_MS
	);

	it(
		'does not cut when the peak is a hundredth of a kelvin below',
		() => {
			const grazing = withCut(peak + 0.01);
			expect(runReference(completeCase(grazing), ODEX).events).toEqual([]);
			expect(runEngine(grazing).report.events).toEqual([]);
		},
		RUN_TIMEOUT_MS
	);
});

describe('a sensor that stands exactly at its cut at the start', () => {
	const atCut = (cutDelayS: number): CaseInput => ({
		start: { hour: 14, soc: 0.5 },
		bms: { discharge: { cut: 42, reset: 30 }, charge: { cut: 60, reset: 50 }, cutDelayS },
		legs: [{ minutes: 30, loadA: 5 }]
	});

	it('opens at once', () => {
		const { report, minutes } = runEngine(atCut(0));
		expect(report.events).toEqual([{ side: 'discharge', kind: 'cut', hour: 14 }]);
		expect(minutes.currentA[0]).toBe(0);
	});

	it('opens after the delay when there is one', () => {
		const { report } = runEngine(atCut(300));
		expect(report.events).toHaveLength(1);
		expect(report.events[0]!.hour).toBeCloseTo(14 + 300 / 3600, 9);
	});
});

describe('a delay that is broken off', () => {
	const { input } = ENGINE_CASES.find(({ name }) => name === 'the same side without the shield')!;
	const hot = { charge: { cut: 300, reset: 299 }, discharge: { cut: 72.5, reset: 60 } };

	it(
		'does not open a latch whose sensor is above the cut for a shorter time',
		() => {
			const first = runEngine({ ...input, bms: hot }).report.events[0]!;
			const { minutes } = runEngine({ ...input, bms: { ...hot, cutDelayS: 86_400 } });
			const above = minutes.nodes.cells.filter((temp) => temp >= 72.5).length;
			expect(first.kind).toBe('cut');
			expect(above).toBeGreaterThan(5);
			const longer = runEngine({ ...input, bms: { ...hot, cutDelayS: (above + 2) * 60 } });
			const shorter = runEngine({ ...input, bms: { ...hot, cutDelayS: (above - 2) * 60 } });
			expect(longer.report.events).toEqual([]);
			expect(shorter.report.events[0]).toMatchObject({ side: 'discharge', kind: 'cut' });
			expect(shorter.report.events[0]!.hour).toBeCloseTo(first.hour + (above - 2) / 60, 4);
		},
		RUN_TIMEOUT_MS
	);
});
