import type { LetterKind } from '$lib/schemas/letters';
import type { LetterRow, LetterView } from '$lib/schemas/mailbox';
import type { SignedInPerson } from '$lib/schemas/people';
import { OutgoingMail } from '../db/models';
import { env } from '../env';
import { notFound } from '../errors';
import { listKeptLetters, readKeptLetter } from '../mail/mailbox-folder';
import { allow, mayDo, type Action } from '../policies';
import { presentLetterLines, presentLetterRow, shortMessageId } from '../presenters/letters';
import { withoutErased } from './erasing/erased-letters';

/** Older letters stay in the folder and are not listed. */
const MOST_LISTED = 200;

/** Only a demonstration keeps its letters here; anywhere else there is no such page. */
function requireMailbox(): string {
	const { SOAKLINE_DEMO, MAILBOX_DIR } = env();
	if (SOAKLINE_DEMO !== '1' || !MAILBOX_DIR) throw notFound('page');
	return MAILBOX_DIR;
}

/** Who else than its reader may see a letter of no job; a link that signs somebody in is for that person alone. */
const OF_NO_JOB: Partial<Record<LetterKind, Action>> = {
	invitation: 'people.write',
	'second-factor': 'people.write',
	'erasure-asked': 'erasures.decide',
	'erasure-withdrawn': 'erasures.decide',
	'erasure-refused': 'erasures.decide',
	'erasure-granted': 'erasures.decide'
};

/** What belongs to a job is the shop's matter. */
function mayRead(person: SignedInPerson, { sheetId, jobId, kind, recipient }: OutgoingMail): boolean {
	if (sheetId !== null || jobId !== null || recipient === person.email) return true;
	const action = OF_NO_JOB[kind];
	return action !== undefined && mayDo(person, action);
}

/** The letters in the folder that this workshop sent: a file alone proves nothing, its message id must be on record. */
async function findOwn(person: SignedInPerson) {
	const kept = await listKeptLetters(requireMailbox(), MOST_LISTED);
	const rows = await OutgoingMail.findAll({
		where: { workshopId: person.workshopId, messageId: kept.map((letter) => letter.messageId) }
	});
	const rowOf = new Map((await withoutErased(rows)).map((row) => [row.messageId, row]));
	return kept.flatMap(({ file, messageId }) => {
		const row = rowOf.get(messageId);
		// What somebody sent again lies here twice under one id: the newest is listed, as most mail programs do.
		rowOf.delete(messageId);
		return row && mayRead(person, row) ? [{ file, row }] : [];
	});
}

export async function listLetters(person: SignedInPerson): Promise<LetterRow[]> {
	allow(person, 'mailbox.read');
	return (await findOwn(person)).map(({ row }) => presentLetterRow(row));
}

export async function getLetter(person: SignedInPerson, messageId: string): Promise<LetterView> {
	allow(person, 'mailbox.read');
	const found = (await findOwn(person)).find(({ row }) => shortMessageId(row.messageId) === messageId);
	if (!found) throw notFound('letter');
	const mail = await readKeptLetter(found.file);
	return {
		...presentLetterRow(found.row),
		subject: mail.subject ?? found.row.subject,
		sender: mail.from?.text ?? '',
		lines: presentLetterLines(mail.text ?? '', env().ORIGIN)
	};
}
