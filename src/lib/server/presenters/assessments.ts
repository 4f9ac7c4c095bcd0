import type { AssessmentRow, AssessmentView } from '$lib/schemas/assessments';
import type { Assessment } from '../db/models';

/** What the row's own table does not know. */
export interface AssessmentSurroundings {
	mountLetter: string;
	mountName: string;
	bookNumber: number;
}

export function presentAssessmentRow(
	assessment: Assessment,
	{ mountLetter, mountName, bookNumber }: AssessmentSurroundings
): AssessmentRow {
	const { id, jobId, mountId, chemistry, verdict, headroomK, peakCellsC, peakAtHour } = assessment;
	const { cutAtHour, resetAtHour, darkHours, chargeMissedAh, engineVersion, createdAt } = assessment;
	return {
		...{ id, jobId, mountId, mountLetter, mountName, chemistry, verdict },
		...{ headroomK, peakCellsC, peakAtHour },
		...{ cutAtHour, resetAtHour, darkHours, chargeMissedAh, engineVersion, bookNumber },
		createdAt: createdAt.toISOString()
	};
}

/** A whole assessment: its mount is called what it was called then. */
export function presentAssessment(
	assessment: Assessment,
	more: { assessedBy: string; isCurrent: boolean; cautions: string[] }
): AssessmentView {
	const { bookId, inputs, inputsSha256, result } = assessment;
	const { letter, name } = inputs.mount;
	return {
		...presentAssessmentRow(assessment, {
			mountLetter: letter,
			mountName: name,
			bookNumber: inputs.book.number
		}),
		...{ bookId, inputs, inputsSha256, result },
		...more
	};
}
