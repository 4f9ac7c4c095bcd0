import { describe, expect, it } from 'vitest';
import { inventTrace } from '../../../../tests/support/invent-trace';
import type { Scenario, ScenarioInput } from '../types';
import { finishWork } from '../uncertainty/finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import {
	fitCoefficients,
	type CoefficientFitInput,
	type DoneCoefficientFit,
	type FitChannel,
	type FittedCoefficient,
	type TraceToFit
} from './index';

const DAY: ScenarioInput = {
	climate: { tMax: 38 },
	start: { hour: 9, soc: 0.6 },
	legs: [
		{ minutes: 90, engineOn: true, speedKmh: 70, loadA: 4 },
		{ minutes: 180, loadA: 4 }
	]
};
const KNOWN = parseScenario(DAY);
const TRUTH = parseScenario({ ...DAY, battery: { caseCellConductance: 3.1 } });
const CELL_PATH: FittedCoefficient = {
	group: 'battery',
	key: 'caseCellConductance',
	prior: { law: 'lognormal', middle: 2.5, spread: 0.35 }
};
const LEAK: FittedCoefficient = {
	group: 'bay',
	key: 'leakClosed',
	prior: { law: 'lognormal', middle: 20, spread: 0.4 }
};

function invent(
	channels: readonly FitChannel[] = ['bayAirC', 'caseC', 'cellC'],
	scenario: Scenario = TRUTH
): TraceToFit {
	const noise = { sdK: 0.2, keepsAMinute: 0.3 };
	return { trace: inventTrace({ scenario, channels, noise, seed: 5, everyMin: 5 }), scenario: KNOWN };
}
function fit(change: Partial<CoefficientFitInput> = {}): DoneCoefficientFit {
	const done = finishWork(
		fitCoefficients({ traces: [invent()], coefficients: [CELL_PATH], book: {}, ...change })
	);
	if (done.status === 'failed') throw new Error(done.reason);
	return done;
}

describe('a fit to a trace', () => {
	it('finds what was put in, and names what stood in the book before', () => {
		const { estimates, stopped } = fit({ book: { battery: { caseCellConductance: 2.2 } } });
		const [{ value, low, high, before }] = estimates as [DoneCoefficientFit['estimates'][number]];
		expect(stopped).toBe('converged');
		expect([low < 3.1, high > 3.1, before]).toEqual([true, true, 2.2]);
		expect(value).toBeCloseTo(3.1, 0);
	});

	it('takes what the scenario has where the book is silent', () => {
		expect(fit().estimates[0]!.before).toBe(2.5);
	});

	it('gives the same digits twice, also when something else was fitted in between', () => {
		const first = fit();
		fit({ coefficients: [LEAK] });
		expect(fit()).toEqual(first);
	});

	it('stays within bounds, and says at which it stands', () => {
		const bounded = { ...CELL_PATH, bounds: { high: 2.7 } };
		const [estimate] = fit({ coefficients: [bounded] }).estimates;
		expect(estimate).toMatchObject({ atBound: 'high', value: 2.7, high: 2.7 });
		expect(estimate!.low).toBeLessThan(2.7);
	});

	it('keeps to the table’s own range where no bounds are given', () => {
		const share: FittedCoefficient = {
			group: 'position',
			key: 'guardFraction',
			prior: { law: 'normal', middle: 0.9, spread: 5 }
		};
		const [estimate] = fit({ coefficients: [share] }).estimates;
		expect(estimate!.low).toBeGreaterThanOrEqual(0);
		expect(estimate!.high).toBeLessThanOrEqual(1);
	});

	it('believes what was believed before where the data say nothing', () => {
		// Cooling is off in this scenario: at what it is set to is seen by no thermometer.
		const unseen: FittedCoefficient = {
			group: 'enclosure',
			key: 'coolSet',
			prior: { law: 'normal', middle: 24, spread: 3 }
		};
		const { estimates, untold } = fit({ coefficients: [unseen, CELL_PATH] });
		expect(estimates[0]!.value).toBeCloseTo(24, 9);
		expect(estimates[0]!.spreadLeft).toBeCloseTo(1, 9);
		expect(estimates[0]!.high - 24).toBeGreaterThan(1.64 * 3);
		expect(untold.coefficients).toEqual([
			{ group: 'enclosure', key: 'coolSet', spreadLeft: expect.closeTo(1, 9) as number }
		]);
	});

	it('names two coefficients that the data see one combination of', () => {
		// The bay gains by area times film, whichever of the two it comes from.
		const part = (key: string, middle: number): FittedCoefficient => ({
			group: 'bonnet',
			key,
			prior: { law: 'lognormal', middle, spread: 0.8 }
		});
		const { untold } = fit({ coefficients: [part('absorptivity', 0.6), part('outStill', 8)] });
		expect(untold.pairs).toHaveLength(1);
		expect(untold.pairs[0]).toMatchObject({ first: { key: 'absorptivity' }, second: { key: 'outStill' } });
		expect(untold.pairs[0]!.correlation).toBeGreaterThan(0.95);
	});

	it('does not let a glitch move it by half of its interval', () => {
		const clean = fit().estimates[0]!;
		const traces = [invent()];
		traces[0]!.trace.channels.cellC!.fill(90, 30, 32);
		const glitched = fit({ traces }).estimates[0]!;
		expect(Math.abs(glitched.value - clean.value)).toBeLessThan((clean.high - clean.low) / 2);
		const squares = fit({ traces, options: { loss: 'squares' } }).estimates[0]!;
		expect(Math.abs(squares.value - clean.value)).toBeGreaterThan(2 * Math.abs(glitched.value - clean.value));
	});

	it('keeps legs back to test itself with', () => {
		const held = fit({ traces: [{ ...invent(), heldOutLegs: [1] }] });
		const all = fit();
		expect(held.errors.heldOutLegs!.after.all.readings).toBe(3 * 36);
		expect(held.errors.fitted.after.all.readings).toBe(3 * 18);
		expect(all.errors.heldOutLegs).toBeNull();
		expect(held.estimates[0]!.spreadLeft).toBeGreaterThan(all.estimates[0]!.spreadLeft);
	});

	it('leaves each of several traces out in turn, and of one trace none', () => {
		expect(fit().errors.leftOutTraces).toBeNull();
		const { leftOutTraces, fitted } = fit({ traces: [invent(), invent(['caseC', 'cellC'])] }).errors;
		expect(leftOutTraces!.after.all.readings).toBe(fitted.after.all.readings);
		expect(leftOutTraces!.after.byChannel.cellC!.rmsK).toBeLessThan(
			leftOutTraces!.before.byChannel.cellC!.rmsK
		);
	});

	it('says what would tell more, the most telling first: of the cells’ path a thermometer in the cells', () => {
		const { candidates } = fit({ traces: [invent(['caseC'])] });
		const channels = candidates.filter(({ kind }) => kind === 'channel');
		expect(channels[0]!.key).toBe('cellC');
		expect(candidates.map(({ meanLeft }) => meanLeft)).toEqual(
			candidates.map(({ meanLeft }) => meanLeft).sort((a, b) => a - b)
		);
		expect(candidates.every(({ widthLeft }) => widthLeft[0]! > 0 && widthLeft[0]! <= 1 + 1e-9)).toBe(true);
	});

	it('shows residuals over time and by temperature that are nearer to nothing than before', () => {
		const { residuals, byTemperature } = fit();
		expect(residuals.map(({ channel }) => channel)).toEqual(['bayAirC', 'caseC', 'cellC']);
		expect(residuals[2]!.timeS).toHaveLength(54);
		const cells = byTemperature.filter(({ channel }) => channel === 'cellC');
		expect(cells.reduce((sum, { readings }) => sum + readings, 0)).toBe(54);
		const off = (read: (bin: (typeof cells)[number]) => number) =>
			cells.reduce((sum, bin) => sum + Math.abs(read(bin)), 0);
		expect(off(({ afterK }) => afterK)).toBeLessThan(off(({ beforeK }) => beforeK) / 2);
	});

	it('lets the values of before begin where they fit best, too: a book that has the fitted ones is as near', () => {
		const traces = [invent()];
		// The first readings are off, so that from them even the right values would be.
		traces[0]!.trace.channels.cellC!.subarray(0, 2).forEach((value, at, cells) => (cells[at] = value + 3));
		const { estimates } = fit({ traces });
		const book = { battery: { caseCellConductance: estimates[0]!.value } };
		const { before, after } = fit({ traces, book }).errors.fitted;
		expect(before.all.rmsK).toBeCloseTo(after.all.rmsK, 2);
		expect(before.byChannel.cellC!.biasK).toBeCloseTo(after.byChannel.cellC!.biasK, 2);
	});

	it('names what the model does not follow, with how far off it is and what its readings stray by', () => {
		expect(fit().misfits).toEqual([]);
		const traces = [invent(['caseC', 'cellC']), invent(['caseC', 'cellC'])];
		const { trace } = traces[1]!;
		// A slow wave that no path between case and cells makes.
		trace.channels.cellC = trace.channels.cellC!.map((c, at) => c + 8 * Math.sin(trace.timeS[at]! / 900));
		const { misfits } = fit({ traces });
		expect(misfits).toMatchObject([{ trace: 1, channel: 'cellC', noiseK: expect.any(Number) as number }]);
		expect(misfits![0]!.residualK / misfits![0]!.noiseK).toBeGreaterThan(4);
	});

	it('does not hold a heat shield’s reading against a mount that has none, and says so', () => {
		const shielded = parseScenario({ ...DAY, shield: {} });
		const { unused } = fit({ traces: [invent(['exhaustShieldC', 'cellC'], shielded)] });
		expect(unused).toEqual([
			{ trace: 0, channel: 'exhaustShieldC', why: 'The scenario of this trace has no heat shield.' }
		]);
	});

	it('widens its intervals where the outside air was not measured', () => {
		const traces = [invent()];
		delete traces[0]!.trace.channels.ambientC;
		expect(fit({ traces, coefficients: [LEAK] }).estimates[0]!.spreadLeft).toBeGreaterThan(
			1.5 * fit({ coefficients: [LEAK] }).estimates[0]!.spreadLeft
		);
	});

	it('comes to an end in words where a coefficient cannot be: a thermostat that is full before it opens', () => {
		const impossible: FittedCoefficient = {
			group: 'engine',
			key: 'thermostatOpen',
			prior: { law: 'normal', middle: 99, spread: 1 }
		};
		expect(finishWork(fitCoefficients({ traces: [invent()], coefficients: [impossible], book: {} }))).toEqual(
			{
				status: 'failed',
				reason: expect.stringContaining('cannot be run with the middles of the priors') as string
			}
		);
	});
});

describe('where nodes begin of which nothing was measured', () => {
	const warm = () => {
		// The same day an hour later: the engine is hot when the logger is switched on.
		const whole = inventTrace({
			scenario: TRUTH,
			channels: ['bayAirC', 'cellC'],
			noise: { sdK: 0.2, keepsAMinute: 0.3 },
			seed: 6
		});
		const later = (values: Float64Array) => values.slice(90);
		const trace = {
			startedAtHour: 10.5,
			timeS: later(whole.timeS).map((time) => time - 5400),
			channels: Object.fromEntries(Object.entries(whole.channels).map(([name, v]) => [name, later(v)]))
		};
		return { trace, scenario: parseScenario({ ...DAY, legs: [{ minutes: 180, loadA: 4 }] }) };
	};
	const rmsOf = (traces: TraceToFit[]) => fit({ traces }).errors.fitted.after.byChannel.bayAirC!.rmsK;

	it('a fitted excess of the engine over the air follows the bay where a cold start cannot', () => {
		const cold = rmsOf([warm()]);
		expect(rmsOf([{ ...warm(), start: { kind: 'fitted', meanK: 30, sdK: 30 } }])).toBeLessThan(cold / 3);
	});

	it('a night of standing before the start leaves the engine a little warmer than the morning air', () => {
		const morning = invent(['caseC']);
		const stood = fit({ traces: [{ ...morning, start: { kind: 'stood', hours: 8 } }], coefficients: [LEAK] });
		const cold = fit({ traces: [morning], coefficients: [LEAK] });
		expect(stood.runs).toBeGreaterThan(cold.runs);
		expect(stood.estimates[0]!.value).not.toBe(cold.estimates[0]!.value);
	});
});

describe('the work', () => {
	it('says how far it is, never less than before, and ends when it is broken off', () => {
		const work = fitCoefficients({ traces: [invent()], coefficients: [CELL_PATH], book: {} });
		const shares: number[] = [];
		for (let step = work.next(); !step.done; step = work.next()) shares.push(step.value);
		expect(shares.length).toBeGreaterThan(20);
		expect(shares).toEqual([...shares].sort((a, b) => a - b));
		expect(shares.at(-1)!).toBeLessThanOrEqual(1);
		const broken = fitCoefficients({ traces: [invent()], coefficients: [CELL_PATH], book: {} });
		broken.next();
		expect(broken.return({ status: 'failed', reason: 'Broken off.' })).toMatchObject({ done: true });
		expect(broken.next()).toEqual({ done: true, value: undefined });
	});
});

describe('a fit that cannot be is refused with the place of the fault', () => {
	const refuse = (change: Partial<CoefficientFitInput>, message: string) =>
		expect(() => fit(change)).toThrow(message);
	const spoilt = (spoil: (trace: TraceToFit) => void): Partial<CoefficientFitInput> => {
		const traces = [invent(), invent()];
		spoil(traces[1]!);
		return { traces };
	};

	it.each<[string, Partial<CoefficientFitInput>, string]>([
		['no traces', { traces: [] }, 'traces.length is 0: it must be at least 1.'],
		['no coefficients', { coefficients: [] }, 'coefficients.length is 0'],
		[
			'a channel of another length',
			spoilt(({ trace }) => (trace.channels.cellC = new Float64Array(3))),
			'traces[1].trace.channels.cellC.length is 3: it must be 54'
		],
		[
			'an infinite reading',
			spoilt(({ trace }) => (trace.channels.caseC![7] = Infinity)),
			'traces[1].trace.channels.caseC[7] is Infinity'
		],
		[
			'times that are not even',
			spoilt(({ trace }) => (trace.timeS[4] = trace.timeS[3]!)),
			'traces[1].trace.timeS[4] is 1050: it must be evenly spaced'
		],
		[
			'a trace without a temperature',
			spoilt(({ trace }) => (trace.channels = { ambientC: trace.channels.ambientC! })),
			'traces[1].trace.channels is 0: it must be at least 10 readings'
		],
		[
			'a start at no hour',
			spoilt(({ trace }) => (trace.startedAtHour = 25)),
			'traces[1].trace.startedAtHour is 25'
		],
		[
			'a leg that is not there',
			spoilt((trace) => (trace.heldOutLegs = [2])),
			'traces[1].heldOutLegs[0] is 2: it must be a leg, 0 to 1.'
		],
		[
			'nothing left to fit',
			spoilt((trace) => (trace.heldOutLegs = [0, 1])),
			'traces[1].trace is 0: it must be with readings within the legs that are fitted.'
		],
		[
			'a start that was stood for too long',
			spoilt((trace) => (trace.start = { kind: 'stood', hours: 100 })),
			'traces[1].start.hours is 100'
		],
		[
			'a field that is none',
			{ coefficients: [CELL_PATH, { ...CELL_PATH, key: 'colour' }] },
			'coefficients[1] battery.colour'
		],
		['the same twice', { coefficients: [LEAK, LEAK] }, 'coefficients[1] is NaN: it must be another'],
		[
			'a prior without spread',
			{ coefficients: [{ ...LEAK, prior: { ...LEAK.prior, spread: 0 } }] },
			'coefficients[0].prior.spread is 0'
		],
		[
			'a middle that its law does not reach',
			{ coefficients: [{ ...LEAK, prior: { law: 'logit-normal', middle: 20, spread: 1 } }] },
			'coefficients[0].prior.middle is 20: it must be above 0 and below 1.'
		],
		[
			'bounds out of order',
			{ coefficients: [{ ...LEAK, bounds: { low: 30, high: 10 } }] },
			'coefficients[0].bounds.low is 30: it must be below 10.'
		],
		[
			'a middle outside its bounds',
			{ coefficients: [{ ...LEAK, bounds: { low: 25 } }] },
			'coefficients[0].prior.middle is 20'
		],
		[
			'a shield that no mount has',
			{ coefficients: [{ group: 'shield', key: 'gap', prior: { law: 'lognormal', middle: 10, spread: 1 } }] },
			'coefficients[0] shield.gap'
		],
		['sensors that are perfect', { options: { leastSdK: 0 } }, 'options.leastSdK is 0'],
		[
			'air that is known exactly',
			{ options: { airError: { sdK: 0, alikeMin: 15 } } },
			'options.airError.sdK is 0'
		]
	])('%s', (_, change, message) => refuse(change, message));
});
