import { inTransaction } from '../../src/lib/server/db/transaction';
import { OutgoingMail } from '../../src/lib/server/db/models';
import { postLetter } from '../../src/lib/server/mail/outbox';

/** Puts a plain letter into the outbox and gives back its row. */
export async function post(
	workshopId: number,
	recipient: string,
	textBody = 'Hello.'
): Promise<OutgoingMail> {
	await inTransaction((transaction) =>
		postLetter(
			{ workshopId, recipient, subject: 'A day at 45 °C', textBody, htmlBody: '<p>Hello.</p>' },
			transaction
		)
	);
	return (await OutgoingMail.findOne({ where: { workshopId, recipient }, order: [['id', 'DESC']] }))!;
}
