import type { ParsedMail } from 'mailparser';
import { inTransaction } from '../../src/lib/server/db/transaction';
import { OutgoingMail } from '../../src/lib/server/db/models';
import { env } from '../../src/lib/server/env';
import { listKeptLetters, readKeptLetter } from '../../src/lib/server/mail/mailbox-folder';
import { postLetter, sendDue } from '../../src/lib/server/mail/outbox';

/** Puts a plain letter into the outbox and gives back its row. */
export async function post(
	workshopId: number,
	recipient: string,
	textBody = 'Hello.',
	htmlBody = '<p>Hello.</p>'
): Promise<OutgoingMail> {
	await inTransaction((transaction) =>
		postLetter(
			{
				kind: 'sheet',
				workshopId,
				recipient,
				subject: 'A day at 45 °C',
				textBody,
				htmlBody
			},
			transaction
		)
	);
	return (await OutgoingMail.findOne({ where: { workshopId, recipient }, order: [['id', 'DESC']] }))!;
}

/** Sends all that waits, and gives what the mail server received for one address, the newest first. */
export async function receive(recipient: string): Promise<ParsedMail[]> {
	await sendDue();
	const kept = await listKeptLetters(env().MAILBOX_DIR!, 500);
	const rows = await OutgoingMail.findAll({ where: { recipient }, attributes: ['messageId'] });
	const ids = new Set(rows.map(({ messageId }) => messageId));
	return Promise.all(
		kept.filter(({ messageId }) => ids.has(messageId)).map(({ file }) => readKeptLetter(file))
	);
}
