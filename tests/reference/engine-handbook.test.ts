import { describe, expect, it } from 'vitest';
import type { NetworkDescription, NetworkLink } from '../../src/lib/thermal/network/description';
import { simulateNetwork, type NetworkRun } from '../../src/lib/thermal/network/simulate-network';

/**
 * Handbook cases that one lumped node can represent. The handbook is Incropera, DeWitt, Bergman, Lavine,
 * Fundamentals of Heat and Mass Transfer, 6th ed.; its examples are recomputed with full precision where it rounds.
 */

interface Body {
	heatCapacityJPerK: number;
	/** Boundaries: conductance in W/K or exchange area in m², and temperature. */
	films?: readonly { conductanceWPerK: number; tempC: number }[];
	radiates?: readonly { exchangeAreaM2: number; tempC: number }[];
}

function describeBody({ heatCapacityJPerK, films = [], radiates = [] }: Body): NetworkDescription {
	const ends = [...films, ...radiates].map(({ tempC }, k) => ({
		name: `boundary ${k}`,
		kind: 'fixed' as const,
		tempC
	}));
	const links = [
		...films.map(({ conductanceWPerK }) => ({ kind: 'conductance' as const, conductanceWPerK })),
		...radiates.map(({ exchangeAreaM2 }) => ({ kind: 'radiation' as const, exchangeAreaM2 }))
	].map((link, k): NetworkLink => ({ ...link, name: `link ${k}`, from: `boundary ${k}`, to: 'body' }));
	return { nodes: [{ name: 'body', kind: 'stored', heatCapacityJPerK }, ...ends], links, sources: [] };
}

function temperaturesOf(network: NetworkDescription, run: NetworkRun): Record<string, number>[] {
	const solution = simulateNetwork(network, run);
	if (solution.status === 'failed') throw new Error(solution.reason);
	return solution.temps;
}

function bodyAt(body: Body, startC: number, timesS: number[]): number[] {
	return temperaturesOf(describeBody(body), { startC: { body: startC }, timesS }).map((row) => row.body!);
}

/** When the body first passes a temperature, s, to a thousandth of the range searched. */
function timeTo(body: Body, startC: number, targetC: number, withinS: number): number {
	const timesS = Array.from({ length: 4001 }, (_, k) => (withinS * k) / 4000);
	const temps = bodyAt(body, startC, timesS);
	const after = temps.findIndex((temp) => Math.sign(temp - targetC) !== Math.sign(startC - targetC));
	const share = (targetC - temps[after - 1]!) / (temps[after]! - temps[after - 1]!);
	return timesS[after - 1]! + share * (timesS[after]! - timesS[after - 1]!);
}

function sphere(diameterM: number, densityKgPerM3: number, heatJPerKgK: number) {
	return {
		areaM2: Math.PI * diameterM ** 2,
		heatCapacityJPerK: (densityKgPerM3 * heatJPerKgK * Math.PI * diameterM ** 3) / 6
	};
}

describe('a thermocouple junction (Incropera, examples 5.1 and 5.2)', () => {
	const junction = sphere(0.70588e-3, 8500, 400);
	const film = { conductanceWPerK: 400 * junction.areaM2, tempC: 200 };

	it('reaches 199 °C in gas at 200 °C after 5.1648 s', () => {
		expect(timeTo({ ...junction, films: [film] }, 25, 199, 8)).toBeCloseTo(5.1648, 3);
	});

	it('settles at 218.73 °C when the duct walls are at 400 °C, within 1 K of it after 4.993 s', () => {
		const radiates = [{ exchangeAreaM2: 0.9 * junction.areaM2, tempC: 400 }];
		const body = { ...junction, films: [film], radiates };
		const [settled] = bodyAt(body, 25, [60]);
		expect(Math.abs(settled! - 218.73)).toBeLessThan(0.02);
		expect(Math.abs(timeTo(body, 25, settled! - 1, 8) - 4.993)).toBeLessThan(0.01);
	});
});

describe('a coated panel that is cured and cooled (Incropera, example 5.3)', () => {
	/** Half of the panel: 1.5 mm behind each square metre. */
	const heatCapacityJPerK = 2770 * 875 * 1.5e-3;
	const inRoom = (film: number, tempC: number): Body => ({
		heatCapacityJPerK,
		films: [{ conductanceWPerK: film, tempC }],
		radiates: [{ exchangeAreaM2: 0.8, tempC }]
	});

	it('is at 150 °C after 123.07 s, at 174.75 °C after 300 s more, and back at 37 °C after 986.3 s', () => {
		const oven = inRoom(40, 175);
		const toCure = timeTo(oven, 25, 150, 200);
		expect(Math.abs(toCure - 123.07)).toBeLessThan(0.5);
		const [cured] = bodyAt(oven, 25, [toCure + 300]);
		expect(Math.abs(cured! - 174.75)).toBeLessThan(0.01);
		const cooling = timeTo(inRoom(10, 25), cured!, 37, 1000);
		expect(Math.abs(toCure + 300 + cooling - 986.3)).toBeLessThan(0.5);
	});
});

describe('spheres in air', () => {
	it('cools from 400 to 335 °C in 93.8 s (Incropera, example 5.5, first step)', () => {
		const ball = sphere(0.01, 3000, 1000);
		const films = [{ conductanceWPerK: 10 * ball.areaM2, tempC: 20 }];
		expect(Math.abs(timeTo({ ...ball, films }, 400, 335, 200) - 93.8)).toBeLessThan(0.1);
	});

	it('has 99 % of its way behind it after 9.94 s (Cengel, Heat Transfer, example 4-1)', () => {
		const ball = sphere(0.001, 8500, 320);
		const films = [{ conductanceWPerK: 210 * ball.areaM2, tempC: 100 }];
		expect(Math.abs(timeTo({ ...ball, films }, 0, 99, 20) - 9.94)).toBeLessThan(0.01);
	});
});

it('cools by radiation alone into deep space as the closed form says (Incropera, section 5.3)', () => {
	const heatCapacityJPerK = 2700 * 900 * 1e-3;
	const radiates = [{ exchangeAreaM2: 0.9, tempC: -273.15 }];
	const [temp] = bodyAt({ heatCapacityJPerK, radiates }, 600 - 273.15, [300]);
	expect(Math.abs(temp! + 273.15 - 348.969)).toBeLessThan(1e-3);
});

describe('closed forms of one and two nodes (recomputed from the exact solutions)', () => {
	const pair = (links: NetworkLink[], heatW = 0): NetworkDescription => ({
		nodes: [
			{ name: 'bay', kind: 'stored', heatCapacityJPerK: 10_000 },
			{ name: 'battery', kind: 'stored', heatCapacityJPerK: 12_000 },
			{ name: 'air', kind: 'fixed', tempC: 40 }
		],
		links,
		sources: [{ name: 'own heat', kind: 'heat', node: 'battery', heatW }]
	});
	const link = (from: string, to: string, conductanceWPerK: number): NetworkLink => ({
		name: `${from} to ${to}`,
		kind: 'conductance',
		from,
		to,
		conductanceWPerK
	});
	const soaking = [link('bay', 'battery', 5), link('bay', 'air', 2)];
	const startC = { bay: 90, battery: 30 };

	it('lets two isolated masses meet at 61.25 °C', () => {
		const network: NetworkDescription = {
			nodes: [
				{ name: 'one', kind: 'stored', heatCapacityJPerK: 20_000 },
				{ name: 'other', kind: 'stored', heatCapacityJPerK: 12_000 }
			],
			links: [link('one', 'other', 4)],
			sources: []
		};
		const run = { startC: { one: 80, other: 30 }, timesS: [1800, 60_000] };
		const [later, last] = temperaturesOf(network, run);
		expect(later!.one).toBeCloseTo(68.4292, 4);
		expect(later!.other).toBeCloseTo(49.2846, 4);
		expect(last!.one).toBeCloseTo(61.25, 4);
	});

	it.each([
		[600, 71.9899, 40.9989],
		[1800, 56.522, 49.3301],
		[3600, 50.1545, 50.8575],
		[7200, 46.9479, 48.5682],
		[14_400, 43.8818, 44.8102]
	])('soaks a battery from the bay beside it: after %d s', (timeS, bayC, batteryC) => {
		const [row] = temperaturesOf(pair(soaking), { startC, timesS: [timeS] });
		expect(row!.bay).toBeCloseTo(bayC, 4);
		expect(row!.battery).toBeCloseTo(batteryC, 4);
	});

	it('holds 43.0 and 44.2 °C in the end when the battery makes 6 W itself', () => {
		const [hour, end] = temperaturesOf(pair(soaking, 6), { startC, timesS: [3600, 200_000] });
		expect(hour!.bay).toBeCloseTo(50.7257, 4);
		expect(hour!.battery).toBeCloseTo(52.0362, 4);
		expect(end!.bay).toBeCloseTo(43, 4);
		expect(end!.battery).toBeCloseTo(44.2, 4);
	});

	const single: NetworkDescription = {
		nodes: [
			{ name: 'battery', kind: 'stored', heatCapacityJPerK: 4 * 3600 },
			{ name: 'air', kind: 'fixed', tempC: 0 }
		],
		links: [link('air', 'battery', 1)],
		sources: []
	};
	const minutes = (from: number, to: number) =>
		Array.from({ length: to - from + 1 }, (_, k) => (from + k) * 60);

	it('peaks 19.904 K above the air 1.2197 h after the stop, while the air itself cools down', () => {
		const timesS = Array.from({ length: 8001 }, (_, k) => k);
		const temps = temperaturesOf(single, {
			startC: { battery: 15 },
			timesS,
			fixedC: (timeS) => ({ air: 55 * Math.exp(-timeS / (1.2 * 3600)) })
		}).map((row) => row.battery!);
		const peak = Math.max(...temps);
		expect(Math.abs(peak - 19.904)).toBeLessThan(1e-3);
		expect(Math.abs(temps.indexOf(peak) / 3600 - 1.2197)).toBeLessThan(1e-3);
	});

	it('follows a daily wave with 0.69062 of its height, 3.0880 h late', () => {
		const day = 24 * 60;
		const temps = temperaturesOf(single, {
			startC: { battery: 0 },
			timesS: minutes(5 * day, 6 * day),
			fixedC: (timeS) => ({ air: Math.sin((2 * Math.PI * timeS) / 86_400) })
		}).map((row) => row.battery!);
		// The first Fourier component over a whole day gives height and lag without looking for the top.
		const wave = (turn: (angle: number) => number) =>
			temps.slice(0, day).reduce((sum, temp, k) => sum + temp * turn((2 * Math.PI * k) / day), 0) * (2 / day);
		const along = wave(Math.sin);
		const across = wave(Math.cos);
		expect(Math.hypot(along, across)).toBeCloseTo(0.69062, 5);
		expect((Math.atan2(-across, along) * 12) / Math.PI).toBeCloseTo(3.088, 4);
	});

	it.each([
		[40, 2.0433],
		[50, 4.3944]
	])('falls from a cut at 65 to a reset at 55 °C in air of %d °C after %d h', (airC, hours) => {
		const [temp] = temperaturesOf(single, {
			startC: { battery: 65 },
			timesS: [hours * 3600],
			fixedC: () => ({ air: airC })
		}).map((row) => row.battery!);
		expect(Math.abs(temp! - 55)).toBeLessThan(1e-3);
	});

	it('never falls to 55 °C in air of 55 °C', () => {
		const run = { startC: { battery: 65 }, timesS: [50 * 3600], fixedC: () => ({ air: 55 }) };
		expect(temperaturesOf(single, run)[0]!.battery).toBeGreaterThan(55);
	});
});
