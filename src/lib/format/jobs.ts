import type { AssessedPart, JobStage } from '../schemas/jobs';
import { joinWords } from './join-words';

/** How far a job has come, as a table says it. */
export const STAGE_WORDS: Record<JobStage, string> = {
	survey: 'being surveyed',
	assessed: 'assessed',
	recommended: 'recommended',
	sent: 'sheet sent',
	acknowledged: 'acknowledged'
};

const PART_WORDS: Record<AssessedPart, string> = {
	vehicle: 'the vehicle',
	battery: 'the battery',
	place: 'the place',
	'hot-day': 'the hot day',
	touring: 'the months or the days on the road',
	'day-plan': 'the day plan',
	cable: 'the proposed cable or fuse',
	survey: 'the survey',
	book: 'the coefficient book',
	engine: 'the engine'
};

/** "the battery, the hot day and the day plan". */
export function sayParts(parts: readonly AssessedPart[]): string {
	return joinWords(parts.map((part) => PART_WORDS[part]));
}

/** "mount B", "mounts A, B and C". */
export function sayMounts(letters: readonly string[]): string {
	return `${letters.length === 1 ? 'mount' : 'mounts'} ${joinWords(letters)}`;
}

export const sayOpenQuestions = (count: number): string =>
	count === 1 ? '1 question waits' : `${count} questions wait`;
