import { randomUUID } from 'node:crypto';
import { Op, type Transaction } from 'sequelize';
import type { LetterKind } from '$lib/schemas/letters';
import { OutgoingMail } from '../db/models';
import { outsideTransaction } from '../db/transaction';
import { logger } from '../logger';
import { withLetterhead } from './letterhead';
import { isFinalRefusal, sayMailError } from './mail-error';
import { closeTransport, deliver, type Letter } from './transport';

const LOOK_EVERY_MS = 5_000;
const BATCH = 20;
const FIRST_PAUSE_MS = 5_000;
const LONGEST_PAUSE_MS = 60 * 60_000;
/** Over three days: a mail server that is down over a weekend costs no letter. */
const MOST_ATTEMPTS = 80;
/** While one process is busy with a letter, others leave it alone for this long. */
const CLAIM_MS = 60_000;

export type NewLetter = Omit<Letter, 'messageId'> & {
	kind: LetterKind;
	workshopId: number;
	/** The job in whose sending log it stands. */
	jobId?: number;
	sheetId?: number;
};

/** Puts a letter into the same transaction as what it tells of: both are kept, or neither. */
export async function postLetter(letter: NewLetter, transaction: Transaction): Promise<void> {
	const htmlBody = await withLetterhead(letter.workshopId, letter.htmlBody, transaction);
	await OutgoingMail.create(
		{ ...letter, htmlBody, messageId: `<${randomUUID()}@soakline.invalid>`, nextAttemptAt: new Date() },
		{ transaction }
	);
	transaction.afterCommit(() => outsideTransaction(nudge));
}

/** What a letter says holds a link that opens something: it is kept no longer than it takes to send it. */
const FORGOTTEN = { textBody: '', htmlBody: '' };

/** A letter whose matter is over is not sent any more; one that is out already stays as it is. */
export async function dropMails(ids: number[], reason: string): Promise<void> {
	await OutgoingMail.update(
		{ state: 'failed', lastError: reason, ...FORGOTTEN },
		{ where: { id: ids, state: ['waiting', 'failed'] } }
	);
}

/** The same for the letters of these sheets. */
export async function dropLetters(
	sheetIds: number[],
	reason: string,
	transaction: Transaction
): Promise<void> {
	const where = { sheetId: sheetIds, state: 'waiting' };
	const letters = await OutgoingMail.findAll({ where, attributes: ['id'], transaction });
	await dropMails(
		letters.map(({ id }) => id),
		reason
	);
}

/** Gives a letter that was given up its tries again; says whether it is one. What was dropped has no words left. */
export async function tryMailAgain(id: number, transaction: Transaction): Promise<boolean> {
	const [changed] = await OutgoingMail.update(
		{ state: 'waiting', attempts: 0, nextAttemptAt: new Date() },
		{ where: { id, state: 'failed', textBody: { [Op.ne]: '' } }, transaction }
	);
	transaction.afterCommit(() => outsideTransaction(nudge));
	return changed > 0;
}

/** The same for the letter that brings a sheet. */
export async function tryLetterAgain(sheetId: number, transaction: Transaction): Promise<boolean> {
	const letter = await OutgoingMail.findOne({ where: { sheetId }, attributes: ['id'], transaction });
	return letter !== null && tryMailAgain(letter.id, transaction);
}

/** Whose data was deleted is not kept as the reader of the letter that says so either. */
const withoutReader = ({ kind }: OutgoingMail): Partial<OutgoingMail> =>
	kind === 'erasure-granted' ? { recipient: '(erased)', lastError: '', ...FORGOTTEN } : {};

async function claim(mail: OutgoingMail): Promise<boolean> {
	const [changed] = await OutgoingMail.update(
		{ nextAttemptAt: new Date(Date.now() + CLAIM_MS), attempts: mail.attempts + 1 },
		{ where: { id: mail.id, state: 'waiting', attempts: mail.attempts } }
	);
	return changed === 1;
}

/** The server has it: a hiccup of the database must not send it again. */
async function noteSent(mail: OutgoingMail): Promise<void> {
	const sent = {
		state: 'sent',
		sentAt: new Date(),
		lastError: '',
		...FORGOTTEN,
		...withoutReader(mail)
	} as const;
	const note = () => OutgoingMail.update(sent, { where: { id: mail.id } });
	await note().catch(note).catch(note);
}

async function noteRefused(mail: OutgoingMail, attempts: number, error: unknown): Promise<void> {
	const lastError = sayMailError(error);
	const givenUp = attempts >= MOST_ATTEMPTS || isFinalRefusal(error);
	const pauseMs = Math.min(FIRST_PAUSE_MS * 2 ** attempts, LONGEST_PAUSE_MS);
	const nextAttemptAt = new Date(Date.now() + pauseMs);
	await OutgoingMail.update(
		{
			...{ state: givenUp ? 'failed' : 'waiting', nextAttemptAt, lastError },
			...(givenUp ? withoutReader(mail) : {})
		},
		// Whoever dropped it meanwhile meant it: it is not put back.
		{ where: { id: mail.id, state: 'waiting' } }
	);
	logger.warn({ mailId: mail.id, attempts, givenUp, lastError }, 'mail not sent');
}

async function sendOne(mail: OutgoingMail): Promise<void> {
	if (!(await claim(mail))) return;
	const attempts = mail.attempts + 1;
	await deliver(mail).then(
		() => noteSent(mail),
		(error: unknown) => noteRefused(mail, attempts, error)
	);
}

/**
 * Sends what is due. A letter that fails waits longer each time, up to an hour, and is given up after three days, or at
 * once when the server refuses it for good.
 */
export async function sendDue(isOver: () => boolean = () => false): Promise<void> {
	let due: OutgoingMail[];
	do {
		due = await findDue();
		for (const mail of due) {
			if (isOver()) return;
			await sendOne(mail);
		}
	} while (due.length === BATCH);
}

/** A letter that is tried is not due for a while, whatever came of it: each round finds others. */
async function findDue(): Promise<OutgoingMail[]> {
	return OutgoingMail.findAll({
		where: { state: 'waiting', nextAttemptAt: { [Op.lte]: new Date() } },
		order: [
			['nextAttemptAt', 'ASC'],
			['id', 'ASC']
		],
		limit: BATCH
	});
}

let timer: NodeJS.Timeout | undefined;
let running: Promise<void> | null = null;

function nudge(): void {
	if (timer === undefined) return;
	running ??= sendDue(() => timer === undefined)
		.catch((error: unknown) => logger.error({ err: error }, 'outbox failed'))
		.finally(() => {
			running = null;
		});
}

export function startOutbox(): void {
	timer ??= setInterval(nudge, LOOK_EVERY_MS);
	nudge();
}

export async function stopOutbox(): Promise<void> {
	clearInterval(timer);
	timer = undefined;
	await running;
	closeTransport();
}
