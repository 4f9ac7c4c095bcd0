import { type LeftOut, type Reading } from '$lib/schemas/accuracy';
import { NO_ZONE } from '$lib/schemas/review';

/** A row as it was read; figures may come as text. */
export type StoredReading = Record<string, string | number | null>;

/** A measurement beside what was predicted of it, as it may be shown. */
export function presentReading(stored: StoredReading): Reading {
	const number = (name: string): number => Number(stored[name]);
	const optional = (name: string): number | null => (stored[name] === null ? null : number(name));
	const text = (name: string): string => String(stored[name] ?? '');
	return {
		id: number('id'),
		kind: text('kind') as Reading['kind'],
		readOn: text('readOn'),
		jobId: number('jobId'),
		jobNumber: number('jobNumber'),
		mountId: number('mountId'),
		mount: `${text('letter')}: ${text('name')}`,
		assessmentId: number('assessmentId'),
		book: number('book'),
		zone: text('zone') || NO_ZONE,
		position: text('position') as Reading['position'],
		measured: optional('measured'),
		label:
			stored.kind === 'label'
				? { place: text('place'), turnedC: optional('turnedC'), notTurnedC: optional('notTurnedC') }
				: null,
		trace:
			stored.kind === 'trace'
				? { id: number('traceId'), name: text('traceName'), place: text('tracePlace') }
				: null,
		predicted: number('predicted'),
		low: number('low'),
		high: number('high'),
		error: optional('error'),
		deviations: number('deviations'),
		stand: text('stand') as Reading['stand'],
		chance: optional('chance'),
		observedDays: optional('observedDays'),
		isEnteredLater: number('isEnteredLater') === 1,
		leftOut: (text('leftOut') || null) as LeftOut | null
	};
}
