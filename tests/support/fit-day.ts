import { parseScenario, type Scenario, type ScenarioInput } from '../../src/lib/thermal';
import { inventTrace } from './invent-trace';

/** What is true of the vehicle, and not what the book says. */
export const TRUE_CONDUCTANCE = 4;
const START_HOUR = 8;
const LEGS = [
	{ minutes: 60, loadA: 4 },
	{ minutes: 150, engineOn: true, speedKmh: 80, loadA: 4 },
	{ minutes: 210, loadA: 4 }
];
const MINUTES = LEGS.reduce((sum, { minutes }) => sum + minutes, 0);
const twoDigits = (value: number): string => String(value).padStart(2, '0');

function speedAt(minute: number): number {
	let begun = 0;
	const leg = LEGS.find(({ minutes }) => (begun += minutes) > minute);
	return leg?.speedKmh ?? 0;
}

/** The file that a logger would have written of a day of this vehicle. */
function writeDay(scenario: Scenario, seed: number): string {
	const noise = { sdK: 0.2, keepsAMinute: 0.3 };
	const { channels } = inventTrace({
		...{ scenario, seed, noise, withCurrent: true },
		channels: ['bayAirC', 'caseC', 'cellC']
	});
	const { ambientC, bayAirC, caseC, cellC, currentA } = channels;
	const rows = Array.from({ length: MINUTES }, (_, minute) => {
		const at = START_HOUR * 60 + minute;
		const time = `2026-02-03 ${twoDigits(Math.floor(at / 60))}:${twoDigits(at % 60)}:00`;
		const values = [ambientC!, bayAirC!, caseC!, cellC!, currentA!].map((each) => each[minute]!.toFixed(2));
		return [time, ...values, speedAt(minute)].join(',');
	});
	const head = 'Time,Ambient (°C),Bay air (°C),Case (°C),Cell (°C),Current (A),Speed (km/h)';
	return [head, ...rows, ''].join('\n');
}

/** The same vehicle and mount on the day that was driven, with the battery as it truly is. */
function trueDay(scenario: ScenarioInput): Scenario {
	return parseScenario({
		...scenario,
		battery: { ...scenario.battery, caseCellConductance: TRUE_CONDUCTANCE },
		start: { ...scenario.start, hour: START_HOUR },
		legs: LEGS
	});
}

/** The file of such a day at a mount that was assessed with this scenario. */
export const writeTrueDay = (scenario: ScenarioInput, seed: number): string =>
	writeDay(trueDay(scenario), seed);
