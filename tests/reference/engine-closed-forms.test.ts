import { describe, expect, it } from 'vitest';
import type { NetworkDescription, NetworkLink } from '../../src/lib/thermal/network/description';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { temperaturesOf } from './support/lumped-body';

/** Exact solutions of one and two nodes, worked with full precision. */
const CLOSED: Omit<PublishedValue, 'name' | 'place' | 'expected'> = {
	source: 'Closed forms, worked with full precision',
	standing: 'worked from the published equation',
	unit: '°C',
	tolerance: { absolute: 5e-5 },
	because: 'worked to four decimals'
};

const link = (from: string, to: string, conductanceWPerK: number): NetworkLink => ({
	name: `${from} to ${to}`,
	kind: 'conductance',
	from,
	to,
	conductanceWPerK
});

describe('two isolated masses', () => {
	const network: NetworkDescription = {
		nodes: [
			{ name: 'one', kind: 'stored', heatCapacityJPerK: 20_000 },
			{ name: 'other', kind: 'stored', heatCapacityJPerK: 12_000 }
		],
		links: [link('one', 'other', 4)],
		sources: []
	};
	const masses = { ...CLOSED, place: 'two masses, one exponential of 1875 s' };
	const at = (timeS: number) =>
		temperaturesOf(network, { startC: { one: 80, other: 30 }, timesS: [timeS] })[0]!;

	checkAgainst(
		{ ...masses, name: 'L9 the warmer mass after 1800 s', expected: 68.4292 },
		() => at(1800).one!
	);
	checkAgainst(
		{ ...masses, name: 'L9 the cooler mass after 1800 s', expected: 49.2846 },
		() => at(1800).other!
	);
	checkAgainst({ ...masses, name: 'L9 where the two meet', expected: 61.25 }, () => at(60_000).one!);
	checkAgainst(
		{
			...masses,
			name: 'L9 their time constant',
			expected: 1875,
			unit: 's',
			tolerance: { absolute: 0.05 },
			because: 'read off two temperatures that are good to 1e-5 K'
		},
		() => {
			const [early, late] = [600, 2400].map((timeS) => at(timeS).one! - at(timeS).other!);
			return 1800 / Math.log(early! / late!);
		}
	);
});

describe('a battery beside a bay that cools down', () => {
	const pair = (heatW: number): NetworkDescription => ({
		nodes: [
			{ name: 'bay', kind: 'stored', heatCapacityJPerK: 10_000 },
			{ name: 'battery', kind: 'stored', heatCapacityJPerK: 12_000 },
			{ name: 'air', kind: 'fixed', tempC: 40 }
		],
		links: [link('bay', 'battery', 5), link('bay', 'air', 2)],
		sources: [{ name: 'own heat', kind: 'heat', node: 'battery', heatW }]
	});
	const at = (heatW: number, timeS: number) =>
		temperaturesOf(pair(heatW), { startC: { bay: 90, battery: 30 }, timesS: [timeS] })[0]!;
	const soak = { ...CLOSED, place: 'two nodes and air, two exponentials of 965.020 s and 12 434.980 s' };

	for (const [timeS, bayC, batteryC] of [
		[600, 71.9899, 40.9989],
		[1800, 56.522, 49.3301],
		[3600, 50.1545, 50.8575],
		[7200, 46.9479, 48.5682],
		[14_400, 43.8818, 44.8102]
	] as const) {
		checkAgainst({ ...soak, name: `L10 the bay after ${timeS} s`, expected: bayC }, () => at(0, timeS).bay!);
		checkAgainst(
			{ ...soak, name: `L10 the battery after ${timeS} s`, expected: batteryC },
			() => at(0, timeS).battery!
		);
	}
	for (const [what, timeS, bayC, batteryC] of [
		['after an hour', 3600, 50.7257, 52.0362],
		['in the end', 200_000, 43, 44.2]
	] as const) {
		const heated = { ...soak, place: 'the same with 6 W in the battery' };
		checkAgainst({ ...heated, name: `L11 the bay ${what}`, expected: bayC }, () => at(6, timeS).bay!);
		checkAgainst(
			{ ...heated, name: `L11 the battery that makes 6 W ${what}`, expected: batteryC },
			() => at(6, timeS).battery!
		);
	}
});

describe('a battery of four hours in air that changes', () => {
	const single: NetworkDescription = {
		nodes: [
			{ name: 'battery', kind: 'stored', heatCapacityJPerK: 4 * 3600 },
			{ name: 'air', kind: 'fixed', tempC: 0 }
		],
		links: [link('air', 'battery', 1)],
		sources: []
	};
	const follow = (startC: number, timesS: number[], airC: (timeS: number) => number) =>
		temperaturesOf(single, {
			startC: { battery: startC },
			timesS,
			fixedC: (timeS) => ({ air: airC(timeS) })
		}).map((row) => row.battery!);

	const soak = { ...CLOSED, place: 'two exponentials of 1.2 h and 4 h', tolerance: { absolute: 1e-3 } };
	const cooling = () => {
		const everySecond = Array.from({ length: 8001 }, (_, k) => k);
		const temps = follow(15, everySecond, (timeS) => 55 * Math.exp(-timeS / (1.2 * 3600)));
		const peak = Math.max(...temps);
		return { peak, hour: temps.indexOf(peak) / 3600 };
	};
	checkAgainst(
		{
			...soak,
			name: 'L12 peak above the air after the stop',
			expected: 19.904,
			unit: 'K',
			because: 'worked to three decimals'
		},
		() => cooling().peak
	);
	checkAgainst(
		{
			...soak,
			name: 'L12 hour of that peak',
			expected: 1.2197,
			unit: 'h',
			because: 'looked for to the second, 3e-4 h'
		},
		() => cooling().hour
	);

	/** The first Fourier component over a whole day gives height and lag without looking for the top. */
	const wave = () => {
		const day = 24 * 60;
		const minutes = Array.from({ length: day }, (_, k) => (5 * day + k) * 60);
		const temps = follow(0, minutes, (timeS) => Math.sin((2 * Math.PI * timeS) / 86_400));
		const part = (turn: (angle: number) => number) =>
			temps.reduce((sum, temp, k) => sum + temp * turn((2 * Math.PI * k) / day), 0) * (2 / day);
		const [along, across] = [part(Math.sin), part(Math.cos)];
		return { height: Math.hypot(along, across), lagH: (Math.atan2(-across, along) * 12) / Math.PI };
	};
	const daily = { ...CLOSED, place: 'first-order lag of 4 h on a wave of 24 h' };
	checkAgainst(
		{
			...daily,
			name: 'L13 height of a daily wave',
			expected: 0.69062,
			unit: '',
			tolerance: { absolute: 5e-6 },
			because: 'worked to five decimals'
		},
		() => wave().height
	);
	checkAgainst({ ...daily, name: 'L13 lag of a daily wave', expected: 3.088, unit: 'h' }, () => wave().lagH);

	for (const [airC, hours] of [
		[40, 2.0433],
		[50, 4.3944]
	] as const) {
		checkAgainst(
			{
				...CLOSED,
				name: `L14 from 65 °C to a reset at 55 °C in air of ${airC} °C, after ${hours} h`,
				place: 'one exponential of 4 h',
				expected: 55,
				tolerance: { absolute: 1e-3 },
				because: 'the hours are worked to four decimals, which is 4e-4 K'
			},
			() => follow(65, [hours * 3600], () => airC)[0]!
		);
	}

	it('never falls to 55 °C in air of 55 °C', () => {
		expect(follow(65, [50 * 3600], () => 55)[0]).toBeGreaterThan(55);
	});
});
