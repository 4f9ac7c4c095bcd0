import { OutgoingMail } from '../../src/lib/server/db/models';

/** The links that letters to an address bring, the oldest first; read from the outbox before it is sent. */
export async function readTokens(recipient: string, path: string): Promise<string[]> {
	const letters = await OutgoingMail.findAll({ where: { recipient }, order: [['id', 'ASC']] });
	return letters.flatMap(({ textBody }) => new RegExp(`${path}/([\\w-]{22})`).exec(textBody)?.[1] ?? []);
}
