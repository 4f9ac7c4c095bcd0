import type { AcknowledgementView, MySheet, SheetStatus, SheetView } from '$lib/schemas/sheets';
import type { Acknowledgement, OutgoingMail, Sheet } from '../db/models';

const isoOrNull = (moment: Date | null | undefined): string | null => moment?.toISOString() ?? null;

export function presentAcknowledgement(acknowledgement: Acknowledgement): AcknowledgementView {
	return { name: acknowledgement.name, acknowledgedAt: acknowledgement.createdAt.toISOString() };
}

/** What the shop sees of a sheet: never its link, which only the letter holds. */
export function presentSheetStatus(sheet: Sheet, letter: OutgoingMail, sentBy: string): SheetStatus {
	const { id, recommendationId, sentTo, content, acknowledgement } = sheet;
	return {
		...{ id, recommendationId, sentTo, sentBy },
		...{ mountName: content.mountName, verdict: content.verdict, chemistry: content.chemistry ?? '' },
		createdAt: sheet.createdAt.toISOString(),
		mail: letter.state,
		mailAttempts: letter.attempts,
		mailError: letter.lastError,
		mailSentAt: isoOrNull(letter.sentAt),
		linkFirstOpenedAt: isoOrNull(sheet.firstOpenedAt),
		withdrawnAt: isoOrNull(sheet.withdrawnAt),
		acknowledgedAt: isoOrNull(acknowledgement?.createdAt),
		acknowledgedBy: acknowledgement?.name ?? null
	};
}

export function presentSheet(
	{ content, contentSha256, textVersion, acknowledgement }: Sheet,
	newer: Sheet | null,
	beside: Pick<SheetView, 'questions' | 'lessons' | 'logo'>
): SheetView {
	return {
		newerSentAt: isoOrNull(newer?.createdAt),
		...{ content, contentSha256, textVersion, ...beside },
		acknowledgement: acknowledgement ? presentAcknowledgement(acknowledgement) : null
	};
}

export function presentMySheet({ id, content, createdAt, acknowledgement }: Sheet): MySheet {
	const { vehicle, mountName, verdict, chemistry = '', workshop } = content;
	return {
		...{ id, vehicle, mountName, verdict, chemistry },
		workshopName: workshop.name,
		sentAt: createdAt.toISOString(),
		acknowledgedAt: isoOrNull(acknowledgement?.createdAt)
	};
}
