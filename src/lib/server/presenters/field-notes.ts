import { listHeatDifferences } from '$lib/format/fitted';
import { sayUseLimit } from '$lib/format/heat-limits';
import type { FieldFinding, FieldNoteView } from '$lib/schemas/field-notes';
import type { Assessment, FieldNote, FieldNoteStrike, Installation } from '../db/models';

type Kept = 'id' | 'installationId' | 'kind' | 'notedOn' | 'data' | 'finding' | 'engineVersion' | 'createdBy';

/** A note with what is found of it by what its battery is held against now. */
export interface JudgedNote extends Pick<FieldNote, Kept> {
	/** When that was found. */
	learntAt: Date;
	/** What was found when it was noted, where that does not count any more. */
	findingThen: FieldFinding | null;
}

/** What has become of a note since. */
interface Standing {
	strike: FieldNoteStrike | null;
	restsOn: Pick<FieldNote, 'id' | 'notedOn'> | null;
	isNotedAnew: boolean;
}

/** By what the notes of a battery are judged, and what of it is not what was fitted. */
export function presentJudge(
	{ inputs: { battery } }: Assessment,
	installation: Installation
): FieldNoteView['judgedBy'] {
	return {
		battery: `${battery.maker} ${battery.model}, which ${sayUseLimit(battery)}`,
		otherwise: listHeatDifferences(installation).map(({ key, label, fitted }) => ({ key, label, fitted }))
	};
}

export function presentFieldNote(
	{ id, kind, notedOn, createdBy, data, finding, findingThen, engineVersion }: JudgedNote,
	{ strike, restsOn, isNotedAnew }: Standing,
	around: Pick<FieldNoteView, 'judgedBy' | 'doubts'> & { nameOf: (personId: number) => string }
): FieldNoteView {
	const { nameOf, judgedBy, doubts } = around;
	return {
		...{ id, kind, notedOn, notedBy: nameOf(createdBy), data, finding: finding ?? null, engineVersion },
		...{ findingThen: findingThen ?? null, judgedBy, doubts },
		struck: strike && {
			...{ by: nameOf(strike.createdBy), at: strike.createdAt.toISOString(), reason: strike.reason }
		},
		restsOnStruck: restsOn && { noteId: restsOn.id, notedOn: restsOn.notedOn, isNotedAnew }
	};
}
