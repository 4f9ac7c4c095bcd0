import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runSimulationCommand } from './lib/simulation-command';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const SPAWN_TIMEOUT_MS = 60_000;

let folder: string;
beforeAll(() => {
	folder = mkdtempSync(join(tmpdir(), 'soakline-simulate-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function spawnProgram(args: string[], input?: string) {
	const options = { cwd: ROOT, encoding: 'utf8' as const, input };
	return spawnSync(process.execPath, ['--import', 'tsx', 'src/cli/simulate.ts', ...args], options);
}

const DAY = { legs: [{ minutes: 90, engineOn: true, speedKmh: 80 }, { minutes: 60 }] };

/** The engine is heated by full power and nothing takes the heat away. */
const NO_WAY_OUT = {
	vehicle: { idleFuelPowerW: 1e7, ratedFuelPowerW: 1e7 },
	engine: { heatCapacity: 1, area: 0, underStill: 0, underPerSpeed: 0, radiatorMax: 0 },
	position: { engineView: 0 },
	legs: [{ minutes: 60, engineOn: true }]
};

describe('the simulate program', () => {
	it(
		'prints one JSON object for a file',
		() => {
			const file = join(folder, 'day.json');
			writeFileSync(file, JSON.stringify(DAY));
			const { status, stdout, stderr } = spawnProgram([file]);
			expect(stderr).toBe('');
			expect(status).toBe(0);
			const report = JSON.parse(stdout);
			expect(Object.keys(report).sort()).toEqual([
				'end',
				'energy',
				'evaluations',
				'events',
				'hourly',
				'peakAtHour',
				'peakCellsC',
				'peaks',
				'steps'
			]);
			expect(report.hourly.map(({ hour }: { hour: number }) => hour)).toEqual([6, 7, 8]);
			expect(report.peaks.shield).toBeNull();
			expect(report.end.soc).toBeGreaterThan(0.55);
		},
		SPAWN_TIMEOUT_MS
	);

	it(
		'takes a scenario from standard input and refuses a bad one there with exit 2 and nothing on standard output',
		() => {
			const good = spawnProgram(['-'], JSON.stringify({ ...DAY, shield: {} }));
			expect(good.status).toBe(0);
			expect(JSON.parse(good.stdout).peaks.shield).toBeGreaterThan(20);
			const bad = spawnProgram(['-'], '{"legs":[{"minutes":60}],"battery":{"cellHeatCapacity":0}}');
			expect([bad.status, bad.stdout]).toEqual([2, '']);
			expect(JSON.parse(bad.stderr)).toEqual({
				code: 'out_of_range',
				path: 'battery.cellHeatCapacity',
				value: 0,
				limit: expect.stringContaining('at least 0.1'),
				message: expect.stringContaining('battery.cellHeatCapacity is 0')
			});
		},
		2 * SPAWN_TIMEOUT_MS
	);

	it(
		'says that a file cannot be read, with exit 2',
		() => {
			const { status, stdout, stderr } = spawnProgram([join(folder, 'nowhere.json')]);
			expect([status, stdout]).toEqual([2, '']);
			expect(JSON.parse(stderr).code).toBe('unreadable_file');
		},
		SPAWN_TIMEOUT_MS
	);

	it(
		'ends with 3 when the temperatures leave every possible range',
		() => {
			const { status, stdout, stderr } = spawnProgram(['-'], JSON.stringify(NO_WAY_OUT));
			expect([status, stdout]).toEqual([3, '']);
			expect(JSON.parse(stderr)).toMatchObject({ code: 'numerical_failure', status: 'failed' });
		},
		SPAWN_TIMEOUT_MS
	);
});

const LEG = '"legs":[{"minutes":60}]';
const MANY_LEGS = JSON.stringify({ legs: Array.from({ length: 1001 }, () => ({ minutes: 1 })) });

describe('input that is refused', () => {
	it.each([
		['text that is not JSON', '{legs', 'not_json', ''],
		['nothing at all', '', 'not_json', ''],
		['a list', '[]', 'wrong_type', ''],
		['no legs field', '{}', 'missing_field', 'legs'],
		['an empty list of legs', '{"legs":[]}', 'no_legs', 'legs'],
		['more than 1,000 legs', MANY_LEGS, 'too_many_legs', 'legs'],
		['more than 60 days', '{"legs":[{"minutes":86400},{"minutes":1}]}', 'too_long', 'legs'],
		['a leg without minutes', '{"legs":[{}]}', 'missing_field', 'legs[0].minutes'],
		['a leg of no length', '{"legs":[{"minutes":0}]}', 'out_of_range', 'legs[0].minutes'],
		['an unknown group', `{"roof":{},${LEG}}`, 'unknown_field', 'roof'],
		['an unknown field', `{"bay":{"colour":1},${LEG}}`, 'unknown_field', 'bay.colour'],
		['an unknown field of a leg', '{"legs":[{"minutes":1,"wind":2}]}', 'unknown_field', 'legs[0].wind'],
		['a prototype in disguise', `{"__proto__":{"a":1},${LEG}}`, 'unknown_field', '__proto__'],
		['a prototype inside a group', `{"bay":{"__proto__":{}},${LEG}}`, 'unknown_field', 'bay.__proto__'],
		['the constructor as a field', `{"bay":{"constructor":1},${LEG}}`, 'unknown_field', 'bay.constructor'],
		['a number too large to hold', `{"climate":{"tMax":1e400},${LEG}}`, 'not_finite', 'climate.tMax'],
		['a number as a word', `{"climate":{"tMax":"42"},${LEG}}`, 'wrong_type', 'climate.tMax'],
		['null for a number', `{"climate":{"tMax":null},${LEG}}`, 'wrong_type', 'climate.tMax'],
		['no heat capacity', `{"tray":{"heatCapacity":0},${LEG}}`, 'out_of_range', 'tray.heatCapacity'],
		['a negative area', `{"exhaust":{"area":-1},${LEG}}`, 'out_of_range', 'exhaust.area'],
		['an unknown surface', '{"legs":[{"minutes":1,"surface":"ice"}]}', 'not_a_choice', 'legs[0].surface'],
		[
			'a reset at its cut',
			`{"bms":{"charge":{"cut":60,"reset":60}},${LEG}}`,
			'inconsistent',
			'bms.charge.reset'
		],
		['a shield larger than the case', `{"shield":{"area":0.3},${LEG}}`, 'inconsistent', 'shield.area'],
		['a list for a shield', `{"shield":[],${LEG}}`, 'wrong_type', 'shield'],
		['a state of charge above full', `{"start":{"soc":1.01},${LEG}}`, 'out_of_range', 'start.soc']
	])('%s', (_name, text, code, path) => {
		const { exitCode, stdout, stderr } = runSimulationCommand(text);
		expect([exitCode, stdout]).toEqual([2, '']);
		const fault = JSON.parse(stderr);
		expect(fault).toMatchObject({ code, path });
		expect(Object.keys(fault)).toEqual(['code', 'path', 'value', 'limit', 'message']);
		expect(fault.message.length).toBeGreaterThan(10);
	});

	it('takes an absent, a null and an empty shield for none, none and the default wrap', () => {
		const shieldAtEnd = (shield: string) =>
			JSON.parse(runSimulationCommand(`{${shield}${LEG}}`).stdout).end.shield;
		expect(shieldAtEnd('')).toBeNull();
		expect(shieldAtEnd('"shield":null,')).toBeNull();
		expect(shieldAtEnd('"shield":{},')).toBeGreaterThan(0);
	});
});
