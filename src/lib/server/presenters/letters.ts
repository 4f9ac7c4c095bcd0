import type { LetterLine, LetterRow } from '$lib/schemas/mailbox';
import type { OutgoingMail } from '../db/models';

const ADDRESS_ALONE = /^https?:\/\/\S+$/;

/** The part of a message id that is safe and enough in an address. */
export const shortMessageId = (messageId: string): string => messageId.replace(/^<|@.*$/g, '');

export function presentLetterRow({
	messageId,
	recipient,
	subject,
	sentAt,
	createdAt
}: OutgoingMail): LetterRow {
	return {
		messageId: shortMessageId(messageId),
		recipient,
		subject,
		receivedAt: (sentAt ?? createdAt).toISOString()
	};
}

/** A letter's text line by line; only an address of this installation becomes a link. */
export function presentLetterLines(text: string, origin: string): LetterLine[] {
	return text
		.split(/\r?\n/)
		.map((line) => line.trim())
		.filter((line) => line !== '')
		.map((line) =>
			ADDRESS_ALONE.test(line) && new URL(line).origin === origin
				? { kind: 'link', href: line }
				: { kind: 'words', text: line }
		);
}
