import type { MinuteSeries, Scenario } from '../types';
import { sunWPerM2 } from '../vehicle/climate';
import type { AssessmentCurves } from './types';

const MOST_POINTS = 300;
/** Steps that divide the hour or the day, min. */
const STEPS_MIN = [1, 2, 5, 10, 15, 20, 30, 60, 120, 240, 360] as const;

function chooseStepMin(count: number): number {
	return STEPS_MIN.find((step) => (count - 1) / step + 1 <= MOST_POINTS) ?? STEPS_MIN.at(-1)!;
}

/** The air around the battery: mixed from outside, bay and enclosure as the position has it, over a road in the sun. */
function mixLocalAir(
	{ position, climate }: Scenario,
	{ nodes, ambient, startHour, count }: MinuteSeries
): Float64Array {
	const { bayAirFraction, enclosureFraction, roadUplift } = position;
	const air = new Float64Array(count);
	for (let minute = 0; minute < count; minute++) {
		const outsideC = ambient[minute]!;
		const sun = sunWPerM2(startHour + minute / 60, climate);
		air[minute] =
			outsideC +
			bayAirFraction * (nodes.bay[minute]! - outsideC) +
			enclosureFraction * (nodes.enclosure[minute]! - outsideC) +
			(roadUplift * sun) / 1000;
	}
	return air;
}

/** The hottest that the air around the battery gets, on the grid of minutes, °C. */
export function findHottestAirC(scenario: Scenario, minutes: MinuteSeries): number {
	return mixLocalAir(scenario, minutes).reduce((hottest, airC) => Math.max(hottest, airC), -Infinity);
}

/** Thins the minute grid to what can be drawn. */
export function thinCurves(scenario: Scenario, minutes: MinuteSeries): AssessmentCurves {
	const stepMin = chooseStepMin(minutes.count);
	const thin = (series: Float64Array): number[] => {
		const values: number[] = [];
		for (let at = 0; at < minutes.count; at += stepMin) values.push(Math.round(series[at]! * 100) / 100);
		return values;
	};
	const { nodes, ambient, soc, startHour } = minutes;
	return {
		startHour,
		stepMin,
		ambientC: thin(ambient),
		bayC: thin(nodes.bay),
		airC: thin(mixLocalAir(scenario, minutes)),
		caseC: thin(nodes.case),
		cellsC: thin(nodes.cells),
		boardC: thin(nodes.board),
		soc: thin(soc)
	};
}
