import type { FieldNoteInput } from '$lib/schemas/field-notes';
import { parseScenario, type Scenario } from '$lib/thermal';
import { watchUseLimit } from '$lib/thermal/assess';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import type { FieldReading } from '$lib/thermal/field';
import type { Assessment } from '../db/models';

/** Of a label that turns at a temperature, K: 1 K to 2 K are usual, from memory. */
const LABEL_WITHIN_K = 1.5;

type LabelData = Extract<FieldNoteInput, { kind: 'peak-label' }>;

/** The mount on a day as hot as was said. */
export function scenarioOn({ inputs }: Assessment, hottestDayC: number): Scenario {
	const scenario = parseScenario(inputs.scenario);
	const watched = watchUseLimit(scenario, heatLimitsOf(inputs.battery));
	return { ...watched, climate: { ...watched.climate, tMax: hottestDayC } };
}

export function labelOf({
	place,
	turnedC,
	notTurnedC
}: LabelData): Extract<FieldReading, { kind: 'peak-label' }> {
	return { kind: 'peak-label', place, turnedC, notTurnedC, withinK: LABEL_WITHIN_K };
}

/** What a note says to the model; null for what says nothing of heat. */
export function readingOf(data: FieldNoteInput): FieldReading | null {
	if (data.kind === 'peak-label') return labelOf(data);
	if (data.kind !== 'cut-out') return null;
	const { wentDarkHour, cameBackHour, withinHours } = data;
	return { kind: 'cut-out', report: { wentDarkHour, cameBackHour, withinHours } };
}
