import { formatDateTime } from '$lib/format/dates';
import { ERASED } from '$lib/schemas/erasures';
import type { SheetStatus } from '$lib/schemas/sheets';

/** What became of the letter. */
export function sayLetter({ mail, mailSentAt, mailError, mailAttempts }: SheetStatus): string {
	if (mail === 'sent') return mailSentAt ? `sent ${formatDateTime(mailSentAt)}` : 'sent';
	if (mail === 'failed') return 'not sent';
	if (mail === 'unsure') return 'may have arrived';
	return mailAttempts > 0 && mailError ? 'waiting for its next try' : 'waiting to be sent';
}

/** The one word for the whole sheet that stands first. */
export function saySheetState(sheet: SheetStatus): string {
	if (sheet.acknowledgedAt) return sheet.withdrawnAt ? 'Acknowledged, then withdrawn' : 'Acknowledged';
	if (sheet.withdrawnAt) return 'Withdrawn';
	if (sheet.mail === 'failed') return 'Letter not sent';
	if (sheet.linkFirstOpenedAt) return 'Opened, not acknowledged';
	if (sheet.mail === 'unsure') return 'May have arrived: ask';
	return sheet.mail === 'sent' ? 'Sent, not opened' : 'On its way';
}

/** Whom it went to; the address goes with the customer's data. */
export const sayReader = ({ sentTo }: SheetStatus): string => sentTo || ERASED;

/** To whom, by whom and when. */
export const saySending = (sheet: SheetStatus): string =>
	`To ${sayReader(sheet)} by ${sheet.sentBy}, ${formatDateTime(sheet.createdAt)}`;

/** The sheet's story as a list of figures. */
export function listSheetFacts(sheet: SheetStatus): { label: string; value: string; note?: string }[] {
	const { mailError, linkFirstOpenedAt, acknowledgedAt, acknowledgedBy, withdrawnAt } = sheet;
	return [
		{ label: 'Letter', value: sayLetter(sheet), ...(mailError ? { note: mailError } : {}) },
		{
			label: 'Link first opened',
			value: linkFirstOpenedAt ? formatDateTime(linkFirstOpenedAt) : 'not yet',
			...(linkFirstOpenedAt && !acknowledgedAt
				? { note: 'Some mail programs open links by themselves: only the acknowledgement is a person.' }
				: {})
		},
		{
			label: 'Acknowledged',
			value: acknowledgedAt ? `by ${acknowledgedBy}, ${formatDateTime(acknowledgedAt)}` : 'not yet'
		},
		...(withdrawnAt ? [{ label: 'Withdrawn', value: formatDateTime(withdrawnAt) }] : [])
	];
}
