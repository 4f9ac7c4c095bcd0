import { describe, expect, it } from 'vitest';
import { inventTrace } from '../../../../tests/support/invent-trace';
import { finishWork } from '../uncertainty/finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import { holdTrace, type FitChannel, type FitTrace } from './index';

const DAY = parseScenario({
	climate: { tMax: 38 },
	start: { hour: 9, soc: 0.6 },
	legs: [
		{ minutes: 90, engineOn: true, speedKmh: 70, loadA: 4 },
		{ minutes: 180, loadA: 4 }
	]
});
const EFFORT = { samples: 32, seed: 3 };

function invent(channels: readonly FitChannel[], byK = 0): FitTrace {
	const noise = { sdK: 0.01, keepsAMinute: 0 };
	const trace = inventTrace({ scenario: DAY, channels, noise, seed: 5, everyMin: 5 });
	for (const channel of channels) trace.channels[channel] = trace.channels[channel]!.map((c) => c + byK);
	return trace;
}
const hold = (trace: FitTrace) => finishWork(holdTrace({ trace, scenario: DAY }, EFFORT));

describe('a trace held against what had been predicted of its day', () => {
	it('lies where the prediction lies when the day went as the model has it', () => {
		const held = hold(invent(['cellC']))!;
		expect(held.place).toBe('cells');
		expect(Math.abs(held.error!)).toBeLessThan(0.1);
		expect(Math.sqrt(held.meanSquare)).toBeLessThan(0.15);
		expect(held.stand).toBe('inside');
		expect([held.low < held.predicted, held.predicted < held.high]).toEqual([true, true]);
		expect(hold(invent(['cellC']))).toEqual(held);
	});

	it('is off by what somebody put on top in the middle of the day', () => {
		const trace = invent(['cellC']);
		// From the second hour on: 40 K hotter than any draw.
		trace.channels.cellC = trace.channels.cellC!.map((c, at) => (trace.timeS[at]! < 7200 ? c : c + 40));
		const held = hold(trace)!;
		const share = trace.timeS.filter((time) => time >= 7200).length / trace.timeS.length;
		expect(held.error).toBeCloseTo(40 * share, 0);
		expect(held.meanSquare).toBeCloseTo(1600 * share, -1);
		expect(held.stand).toBe('above');
		expect(held.deviations).toBeGreaterThan(2);
	});

	it('is far off where single hours are, though the mean is right by chance', () => {
		const right = hold(invent(['cellC']))!;
		const trace = invent(['cellC']);
		// Twenty kelvin above for the second hour, as much below for the third.
		trace.channels.cellC = trace.channels.cellC!.map((c, at) => {
			const hour = Math.floor(trace.timeS[at]! / 3600);
			return c + (hour === 1 ? 20 : hour === 2 ? -20 : 0);
		});
		const held = hold(trace)!;
		expect(Math.abs(held.error!)).toBeLessThan(0.5);
		expect(held.stand).toBe('inside');
		expect(held.misfit).toBeGreaterThan(right.misfit + 3);
	});

	it('of a drive alone is held with every draw, for its length is no unknown', () => {
		const drive = parseScenario({ ...DAY, legs: [DAY.legs[0]!] });
		const noise = { sdK: 0.01, keepsAMinute: 0 };
		const trace = inventTrace({ scenario: drive, channels: ['cellC'], noise, seed: 5, everyMin: 5 });
		expect(finishWork(holdTrace({ trace, scenario: drive }, EFFORT))).not.toBeNull();
	});

	it('gives way after each leg of each run, however long the trace is', () => {
		const shares = [...holdTrace({ trace: invent(['cellC']), scenario: DAY }, EFFORT)];
		expect(shares).toHaveLength((1 + EFFORT.samples) * DAY.legs.length + EFFORT.samples);
		expect(shares).toEqual(shares.toSorted((a, b) => a - b));
		expect([shares[0], shares.at(-1)]).toEqual([0, 1]);
	});

	it('is read at the measured place that is nearest to the cells', () => {
		expect(hold(invent(['bayAirC', 'caseC', 'boardC']))!.place).toBe('board');
		expect(hold(invent(['bayAirC', 'caseC']))!.place).toBe('case');
		expect(hold(invent(['bayAirC']))).toBeNull();
	});

	it('is refused where no model could be held against it', () => {
		const trace = invent(['cellC']);
		expect(() => hold({ ...trace, startedAtHour: 25 })).toThrow(/startedAtHour/);
	});
});
