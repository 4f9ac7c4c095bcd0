import { describe, expect, it } from 'vitest';
import {
	biot,
	chargingAirFlowLPerS,
	contactResistanceKPerW,
	EngineInputError,
	filmResistanceKPerW,
	gassingCurrentMaPerAh,
	hydrogenAirFlowM3PerH,
	layerResistanceKPerW,
	parallelResistanceKPerW,
	planeWallRoot,
	planeWallShare,
	seriesResistanceKPerW,
	soakPeak,
	sparkFreeDistanceMm,
	timeToReach,
	tractionAirFlowM3PerH,
	tubeResistanceKPerW,
	twoBodyTimeConstantsS,
	ventOpeningCm2,
	waveResponse
} from '../../src/lib/thermal/correlations';

const CELLS = { cells: 6, gassingMaPerAh: 8, capacityAh: 100 };

describe('fresh air as it must behave', () => {
	it('grows with cells, current and capacity alike', () => {
		const flow = hydrogenAirFlowM3PerH(CELLS);
		expect(hydrogenAirFlowM3PerH({ ...CELLS, cells: 12 })).toBeCloseTo(2 * flow, 12);
		expect(hydrogenAirFlowM3PerH({ ...CELLS, capacityAh: 300 })).toBeCloseTo(3 * flow, 12);
		expect(hydrogenAirFlowM3PerH({ ...CELLS, gassingMaPerAh: 4 })).toBeCloseTo(flow / 2, 12);
	});

	it('keeps hydrogen below 4 % with a margin of five: what the cells make is 1/120 of it, but for the rounding', () => {
		const hydrogenM3PerH = (0.42e-3 * 6 * 8 * 100) / 1000;
		expect(hydrogenAirFlowM3PerH(CELLS) / hydrogenM3PerH).toBeCloseTo(120, -1);
	});

	it('asks for more while charging quickly than while kept full, and for more from vented cells', () => {
		for (const battery of ['vented lead-acid', 'valve-regulated lead-acid', 'nickel-cadmium'] as const) {
			expect(gassingCurrentMaPerAh(battery, 'boost')).toBeGreaterThan(
				gassingCurrentMaPerAh(battery, 'float')
			);
		}
		expect(gassingCurrentMaPerAh('vented lead-acid', 'float')).toBeGreaterThan(
			gassingCurrentMaPerAh('valve-regulated lead-acid', 'float')
		);
	});

	it('opens for 0.1 m/s: the air passes through one opening in an hour', () => {
		expect(ventOpeningCm2(1) * 1e-4 * 0.1 * 3600).toBeCloseTo(1, 1);
	});

	it('keeps sparks twice as far from eight times the battery', () => {
		expect(sparkFreeDistanceMm(8, 800)).toBeCloseTo(2 * sparkFreeDistanceMm(8, 100), 9);
	});
});

describe('resistances as they must behave', () => {
	it('of a thin tube are those of a flat layer of its area', () => {
		const tube = tubeResistanceKPerW(0.5, 0.5 + 1e-6, 0.2, 2);
		expect(tube / layerResistanceKPerW(1e-6, 0.2, 2 * Math.PI * 0.5 * 2)).toBeCloseTo(1, 5);
	});

	it('side by side lie below the smallest, one behind the other above the largest', () => {
		const parts = [0.3, 0.05, 1.2];
		expect(parallelResistanceKPerW(parts)).toBeLessThan(0.05);
		expect(seriesResistanceKPerW(parts)).toBeGreaterThan(1.2);
		expect(parallelResistanceKPerW([0.7])).toBeCloseTo(seriesResistanceKPerW([0.7]), 15);
	});

	it('vanish for a perfect joint', () => {
		expect(contactResistanceKPerW(0, 0.01)).toBe(0);
	});
});

describe('a wall in a film', () => {
	it('has the root of its equation, √Bi for hardly any film and π/2 for one without limit', () => {
		for (const biotNumber of [1e-3, 0.1, 1, 10, 1000]) {
			const root = planeWallRoot(biotNumber);
			expect((root * Math.tan(root)) / biotNumber).toBeCloseTo(1, 9);
		}
		expect(planeWallRoot(1e-8) / 1e-4).toBeCloseTo(1, 6);
		expect(planeWallRoot(1e6)).toBeCloseTo(Math.PI / 2, 5);
	});

	it('cools as one lump with little film: θ = exp(−Bi Fo)', () => {
		const share = planeWallShare({ biotNumber: 1e-5, fourierNumber: 1e4, depthShare: 0.5 });
		expect(share).toBeCloseTo(Math.exp(-0.1), 5);
	});

	it('is nearest to the fluid at its surface, and comes nearer with time', () => {
		const at = (depthShare: number, fourierNumber: number) =>
			planeWallShare({ biotNumber: 2, fourierNumber, depthShare });
		expect(at(1, 0.5)).toBeLessThan(at(0.5, 0.5));
		expect(at(0.5, 0.5)).toBeLessThan(at(0, 0.5));
		expect(at(0, 2)).toBeLessThan(at(0, 0.5));
	});
});

describe('lumped bodies', () => {
	it('follow a slow wave wholly and a quick one not at all, a quarter of it late', () => {
		expect(waveResponse(1, 1e6).height).toBeCloseTo(1, 9);
		expect(waveResponse(1, 1e6).lag).toBeCloseTo(1, 6);
		expect(waveResponse(1e6, 1).height).toBeLessThan(1e-6);
		expect(waveResponse(1e6, 1).lag).toBeCloseTo(0.25, 6);
	});

	it('peak where body and surroundings meet: the body stops warming there', () => {
		const soak = { surroundingsK: 40, surroundingsTime: 0.7, bodyK: 5, bodyTime: 3 };
		const { excessK, time } = soakPeak(soak);
		expect(excessK).toBeCloseTo(40 * Math.exp(-time / 0.7), 9);
		expect(soakPeak({ ...soak, bodyTime: 0.1 }).excessK).toBeGreaterThan(excessK);
		expect(soakPeak({ ...soak, bodyK: 50 })).toEqual({ excessK: 50, time: 0 });
	});

	it('have the time constants of one body when they hang together tightly, or hardly at all', () => {
		expect(twoBodyTimeConstantsS([3000, 5000], 1e9, [1, 3])[0]).toBeCloseTo(2000, 3);
		const [long, short] = twoBodyTimeConstantsS([3000, 5000], 1e-9, [1, 1]);
		expect(long).toBeCloseTo(5000, 3);
		expect(short).toBeCloseTo(3000, 3);
	});

	it('take as long to warm as to cool, and no time to stay', () => {
		expect(timeToReach(2, 20, 50, 60)).toBeCloseTo(timeToReach(2, 60, 30, 20), 12);
		expect(timeToReach(2, 20, 20, 60)).toBe(0);
	});
});

describe('mounting outside its range', () => {
	it.each([
		['a battery without cells', () => hydrogenAirFlowM3PerH({ ...CELLS, cells: 0 }), 'cells', 0],
		['more cells than a battery has', () => hydrogenAirFlowM3PerH({ ...CELLS, cells: 201 }), 'cells', 201],
		[
			'a current beyond all',
			() => hydrogenAirFlowM3PerH({ ...CELLS, gassingMaPerAh: 101 }),
			'gassingMaPerAh',
			101
		],
		[
			'a battery of a power station',
			() => hydrogenAirFlowM3PerH({ ...CELLS, capacityAh: 6000 }),
			'capacityAh',
			6000
		],
		['an opening for no air', () => ventOpeningCm2(0), 'airFlowM3PerH', 0],
		['a distance for no gas', () => sparkFreeDistanceMm(0, 100), 'gassingMaPerAh', 0],
		['traction beyond the table', () => tractionAirFlowM3PerH(6, 11, 100), 'gassingAPer100Ah', 11],
		['a charger beyond all', () => chargingAirFlowLPerS(6, 1001), 'chargeA', 1001],
		['a layer of nothing', () => layerResistanceKPerW(0, 1, 1), 'thicknessM', 0],
		['a tube inside out', () => tubeResistanceKPerW(0.02, 0.01, 1, 1), 'outerRadiusM', 0.01],
		['a film of no area', () => filmResistanceKPerW(10, 0), 'areaM2', 0],
		['a joint below nothing', () => contactResistanceKPerW(-1, 1), 'contactM2KPerW', -1],
		['no resistances at all', () => seriesResistanceKPerW([]), 'resistances', 0],
		['a short circuit for heat', () => parallelResistanceKPerW([1, 0]), 'resistanceKPerW', 0],
		['a body that conducts nothing', () => biot(10, 0.1, 0), 'conductivityWPerMK', 0],
		['a film without limit', () => planeWallRoot(1e7), 'biotNumber', 1e7],
		[
			'a time too short for one term',
			() => planeWallShare({ biotNumber: 1, fourierNumber: 0.1, depthShare: 0 }),
			'fourierNumber',
			0.1
		],
		[
			'a place beyond the surface',
			() => planeWallShare({ biotNumber: 1, fourierNumber: 1, depthShare: 1.1 }),
			'depthShare',
			1.1
		],
		['a reset that the air never allows', () => timeToReach(4, 65, 55, 55), 'targetC', 55],
		['a target away from the air', () => timeToReach(4, 65, 70, 40), 'targetC', 70],
		['a wave without a period', () => waveResponse(4, 0), 'period', 0],
		[
			'a body that follows as its surroundings do',
			() => soakPeak({ surroundingsK: 50, surroundingsTime: 2, bodyK: 0, bodyTime: 2 }),
			'bodyTime',
			2
		],
		['two bodies shut off from the air', () => twoBodyTimeConstantsS([1, 1], 1, [0, 0]), 'toAirWPerK', 0]
	] as const)('is refused with name and value: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(expect.objectContaining({ input, value }) as Error);
	});
});
