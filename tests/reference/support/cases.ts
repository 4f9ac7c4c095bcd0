import type { CaseInput } from './defaults';

const TOURING: CaseInput['legs'] = [
	{ minutes: 180, engineOn: true, speedKmh: 95, loadA: 4 },
	{ minutes: 30, loadA: 6 },
	{ minutes: 150, engineOn: true, speedKmh: 45, surface: 'corrugated', gradePercent: 1, loadA: 4 },
	{ minutes: 45, loadA: 6 },
	{ minutes: 180, engineOn: true, speedKmh: 80, surface: 'gravel', loadA: 4 },
	{ minutes: 855, loadA: 8 }
];

/** Beside the exhaust, little air, a hot day with the sun on the road. */
const HOT_SIDE = {
	bayAirFraction: 1,
	exhaustView: 0.03,
	engineView: 0.1,
	airExposure: 0.05,
	guardFraction: 0.9
};
const LOW_LIMITS = { charge: { cut: 55, reset: 48 }, discharge: { cut: 60, reset: 52 } };

/** Days that between them use every part of the model. */
export const ENGINE_CASES: readonly { name: string; input: CaseInput }[] = [
	{ name: 'the default hot day', input: { legs: TOURING } },
	{ name: 'a shield beside the exhaust', input: { position: HOT_SIDE, shield: {}, legs: TOURING } },
	{ name: 'the same side without the shield', input: { position: HOT_SIDE, legs: TOURING } },
	{
		name: 'towing on sand',
		input: {
			position: HOT_SIDE,
			bms: LOW_LIMITS,
			start: { hour: 9.5, soc: 0.8 },
			legs: [
				{ minutes: 40, engineOn: true, speedKmh: 30, surface: 'sand', towMassKg: 2000, towDragAreaM2: 1.2 },
				{ minutes: 35, engineOn: true, speedKmh: 15, surface: 'rock', gradePercent: 8, towMassKg: 2000 },
				{ minutes: 20, engineOn: true },
				{ minutes: 600, loadA: 3 }
			]
		}
	},
	{
		name: 'a cabin with cooling',
		input: {
			position: { bayAirFraction: 0, enclosureFraction: 1, exhaustView: 0, engineView: 0, bonnetView: 0 },
			enclosure: { coolGain: 150 },
			start: { hour: 7, soc: 0.5 },
			legs: [
				{ minutes: 120, engineOn: true, speedKmh: 100 },
				{ minutes: 90 },
				{ minutes: 240, engineOn: true, speedKmh: 70 },
				{ minutes: 400, loadA: 5 }
			]
		}
	},
	{
		name: 'bonnet open at camp',
		input: {
			position: HOT_SIDE,
			bms: LOW_LIMITS,
			start: { hour: 10, soc: 0.6 },
			legs: [
				{ minutes: 300, engineOn: true, speedKmh: 60, surface: 'gravel' },
				{ minutes: 120, bonnetOpen: true, loadA: 8 },
				{ minutes: 240, loadA: 8 }
			]
		}
	},
	{
		name: 'the board as sensor',
		input: {
			position: HOT_SIDE,
			bms: { ...LOW_LIMITS, sensor: 'board' },
			battery: { boardR: 0.004 },
			legs: TOURING
		}
	},
	{
		name: 'the hotter of cells and board',
		input: {
			position: HOT_SIDE,
			bms: { ...LOW_LIMITS, sensor: 'hotter' },
			battery: { boardR: 0.002 },
			legs: TOURING
		}
	},
	{
		name: 'a cut that waits ten minutes',
		input: { position: HOT_SIDE, bms: { ...LOW_LIMITS, sensor: 'board', cutDelayS: 600 }, legs: TOURING }
	},
	{
		name: 'a latch that needs somebody',
		input: { position: HOT_SIDE, bms: { ...LOW_LIMITS, autoReset: false }, legs: TOURING }
	},
	{
		name: 'tapering to full',
		input: {
			start: { hour: 8, soc: 0.93 },
			legs: [
				{ minutes: 200, engineOn: true, speedKmh: 50, loadA: 10 },
				{ minutes: 60, loadA: 20 },
				{ minutes: 200, engineOn: true, speedKmh: 50, loadA: 39 }
			]
		}
	},
	{
		name: 'full at the start',
		input: { start: { hour: 8, soc: 1 }, legs: [{ minutes: 100, engineOn: true, speedKmh: 90 }] }
	},
	{
		name: 'run empty and charged again',
		input: {
			start: { hour: 20, soc: 0.04 },
			legs: [
				{ minutes: 90, loadA: 5 },
				{ minutes: 30, engineOn: true, speedKmh: 60, loadA: 60 },
				{ minutes: 60, engineOn: true, speedKmh: 60, loadA: 10 },
				{ minutes: 400, loadA: 5 }
			]
		}
	},
	{
		name: 'two days over midnight',
		input: {
			position: HOT_SIDE,
			bms: LOW_LIMITS,
			start: { hour: 13.25, soc: 0.4 },
			legs: [
				{ minutes: 300.5, engineOn: true, speedKmh: 85 },
				{ minutes: 800, loadA: 4 },
				{ minutes: 420, engineOn: true, speedKmh: 40, surface: 'rock', loadA: 45 },
				{ minutes: 1359.5, loadA: 2 }
			]
		}
	},
	{
		name: 'both latches open at the start',
		input: {
			bms: { charge: { cut: 30, reset: 26 }, discharge: { cut: 32, reset: 28 } },
			start: { hour: 20, soc: 0.7 },
			legs: [{ minutes: 900, loadA: 10 }]
		}
	},
	{
		name: 'both latches with one limit',
		input: {
			position: HOT_SIDE,
			bms: { sensor: 'board', charge: { cut: 55, reset: 50 }, discharge: { cut: 55, reset: 50 } },
			legs: TOURING
		}
	},
	{
		name: 'thin air, no fan, a shield in the cold',
		input: {
			climate: { tMax: 5, dailyRange: 20, sunPeak: 600, pressurePa: 70000, skyDropK: 25 },
			bay: { fanFlow: 0 },
			shield: { area: 0.277, coverage: 1, emissivityOut: 0.3, emissivityIn: 0.8, heatCapacity: 60 },
			position: { ...HOT_SIDE, roadUplift: 6 },
			start: { hour: 0, soc: 0.2 },
			legs: [
				{ minutes: 25, engineOn: true },
				{ minutes: 200, engineOn: true, speedKmh: 110, gradePercent: -3 },
				{ minutes: 500, engineOn: true, speedKmh: 20, gradePercent: 12 },
				{ minutes: 300 }
			]
		}
	}
];
