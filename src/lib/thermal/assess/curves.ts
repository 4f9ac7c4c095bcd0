import type { MinuteSeries } from '../types';
import type { AssessmentCurves } from './types';

const MOST_POINTS = 300;
/** Steps that divide the hour or the day, min. */
const STEPS_MIN = [1, 2, 5, 10, 15, 20, 30, 60, 120, 240, 360] as const;

function chooseStepMin(count: number): number {
	return STEPS_MIN.find((step) => (count - 1) / step + 1 <= MOST_POINTS) ?? STEPS_MIN.at(-1)!;
}

/** Thins the minute grid to what can be drawn. */
export function thinCurves(minutes: MinuteSeries): AssessmentCurves {
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
		caseC: thin(nodes.case),
		cellsC: thin(nodes.cells),
		boardC: thin(nodes.board),
		soc: thin(soc)
	};
}
