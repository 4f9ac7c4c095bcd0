import { randomUUID } from 'node:crypto';
import { col, Op, type Transaction } from 'sequelize';
import { ERASED } from '$lib/schemas/erasures';
import type { LetterKind } from '$lib/schemas/letters';
import { OutgoingMail, Workshop } from '../db/models';
import { inTransaction, outsideTransaction } from '../db/transaction';
import { logger } from '../logger';
import { withLetterhead } from './letterhead';
import { isFinalRefusal, isRefusal, sayMailError } from './mail-error';
import { deliver, type Letter } from './transport';

const LOOK_EVERY_MS = 5_000;
const BATCH = 20;
const FIRST_PAUSE_MS = 5_000;
const LONGEST_PAUSE_MS = 60 * 60_000;
/** Over three days: a mail server that is down over a weekend costs no letter. */
const MOST_ATTEMPTS = 80;
/** While one process is busy with a letter, others leave it alone for this long. */
const CLAIM_MS = 120_000;
const UNSURE = 'The mail server was given all of it and did not answer: ask its reader whether it is there.';

export type NewLetter = Omit<Letter, 'messageId'> & {
	kind: LetterKind;
	workshopId: number;
	/** The job in whose sending log it stands. */
	jobId?: number;
	sheetId?: number;
	erasureId?: number;
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

/** A letter whose matter is over is not sent any more, nor again: of one that may be out only its words go. */
export async function dropMails(ids: number[], reason: string): Promise<void> {
	await OutgoingMail.update(
		{ state: 'failed', lastError: reason, ...FORGOTTEN },
		{ where: { id: ids, state: ['waiting', 'failed'], handedOverAt: null } }
	);
	await OutgoingMail.update(
		{ state: 'unsure', lastError: UNSURE, ...FORGOTTEN },
		{ where: { id: ids, state: ['waiting', 'unsure'], handedOverAt: { [Op.ne]: null } } }
	);
}

/** The same for the letters of these sheets. */
export async function dropLetters(
	sheetIds: number[],
	reason: string,
	transaction: Transaction
): Promise<void> {
	const where = { sheetId: sheetIds, state: ['waiting', 'unsure'] };
	const letters = await OutgoingMail.findAll({ where, attributes: ['id'], transaction });
	await dropMails(
		letters.map(({ id }) => id),
		reason
	);
}

/** Gives a letter that stopped its tries again; says whether it is one. What was dropped has no words left. */
export async function tryMailAgain(id: number, transaction: Transaction): Promise<boolean> {
	const [changed] = await OutgoingMail.update(
		{ state: 'waiting', attempts: 0, nextAttemptAt: new Date(), handedOverAt: null },
		{ where: { id, state: ['failed', 'unsure'], textBody: { [Op.ne]: '' } }, transaction }
	);
	transaction.afterCommit(() => outsideTransaction(nudge));
	return changed > 0;
}

/** The same for the letter that brings a sheet. */
export async function tryLetterAgain(sheetId: number, transaction: Transaction): Promise<boolean> {
	const letter = await OutgoingMail.findOne({ where: { sheetId }, attributes: ['id'], transaction });
	return letter !== null && tryMailAgain(letter.id, transaction);
}

/** A person found out that a letter of which this was not known did arrive; says whether it is such a letter. */
export async function noteArrived(id: number, transaction: Transaction): Promise<boolean> {
	const [changed] = await OutgoingMail.update(
		{ state: 'sent', sentAt: col('handed_over_at'), lastError: '', ...FORGOTTEN },
		{ where: { id, state: 'unsure' }, transaction }
	);
	return changed > 0;
}

/** Whose data was deleted is not kept as the reader of the letter that says so either. */
const withoutReader = ({ kind }: OutgoingMail): Partial<OutgoingMail> =>
	kind === 'erasure-granted' ? { recipient: ERASED, lastError: '', ...FORGOTTEN } : {};

/** Notes something of a letter, again where two changes met; says whether it was still as it is taken to be. */
async function note(
	{ id }: OutgoingMail,
	values: Parameters<typeof OutgoingMail.update>[0],
	still: Partial<Pick<OutgoingMail, 'state' | 'attempts' | 'nextAttemptAt' | 'handedOverAt'>> = {}
): Promise<boolean> {
	const [changed] = await inTransaction(() => OutgoingMail.update(values, { where: { ...still, id } }));
	return changed === 1;
}

/** Takes a letter for a while; gives until when, or null where another process was faster. */
async function claim(mail: OutgoingMail): Promise<Date | null> {
	const until = new Date(Date.now() + CLAIM_MS);
	const { attempts } = mail;
	const isTaken = await note(
		mail,
		{ nextAttemptAt: until, attempts: attempts + 1 },
		{ state: 'waiting', attempts, handedOverAt: null }
	);
	return isTaken ? until : null;
}

/**
 * Written before the server can have the letter: whatever happens from here to its answer, the letter is not sent by
 * itself a second time. A process that was held up for longer than its claim finds it gone and lets go of the letter.
 */
async function noteHandedOver(mail: OutgoingMail, claimedUntil: Date): Promise<void> {
	const isStillClaimed = await note(
		mail,
		{ handedOverAt: new Date(), nextAttemptAt: new Date(claimedUntil.getTime() + CLAIM_MS) },
		{ state: 'waiting', nextAttemptAt: claimedUntil }
	);
	if (!isStillClaimed) throw new Error('It was dropped, or another process took it over.');
}

/** The server has it: a hiccup of the database must not send it again. */
async function noteSent(mail: OutgoingMail): Promise<void> {
	const sent = {
		state: 'sent',
		sentAt: new Date(),
		handedOverAt: null,
		lastError: '',
		...FORGOTTEN,
		...withoutReader(mail)
	} as const;
	const noteIt = () => note(mail, sent);
	await noteIt().catch(noteIt).catch(noteIt);
}

async function noteRefused(mail: OutgoingMail, attempts: number, error: unknown): Promise<void> {
	const lastError = sayMailError(error);
	const givenUp = attempts >= MOST_ATTEMPTS || isFinalRefusal(error);
	const pauseMs = Math.min(FIRST_PAUSE_MS * 2 ** attempts, LONGEST_PAUSE_MS);
	const nextAttemptAt = new Date(Date.now() + pauseMs);
	await note(
		mail,
		{
			...{ state: givenUp ? 'failed' : 'waiting', nextAttemptAt, lastError, handedOverAt: null },
			...(givenUp ? withoutReader(mail) : {})
		},
		// Whoever dropped it meanwhile meant it: it is not put back.
		{ state: 'waiting' }
	);
	logger.warn({ mailId: mail.id, attempts, givenUp, lastError }, 'mail not sent');
}

/** The line broke, or the process died, between a letter's end and the answer: a person decides whether to send it again. */
async function noteUnsure(mail: OutgoingMail): Promise<void> {
	await note(mail, { state: 'unsure', lastError: UNSURE, ...withoutReader(mail) }, { state: 'waiting' });
	logger.warn({ mailId: mail.id }, 'mail may have arrived');
}

async function sendOne(mail: OutgoingMail): Promise<void> {
	if (mail.handedOverAt !== null) return noteUnsure(mail);
	const claimedUntil = await claim(mail);
	if (!claimedUntil) return;
	let isHandedOver = false;
	const handOver = async () => {
		await noteHandedOver(mail, claimedUntil);
		isHandedOver = true;
	};
	const shop = await Workshop.findByPk(mail.workshopId, { attributes: ['name'] });
	await deliver(mail, shop?.name ?? '', handOver).then(
		() => noteSent(mail),
		(error: unknown) =>
			isHandedOver && !isRefusal(error) ? noteUnsure(mail) : noteRefused(mail, mail.attempts + 1, error)
	);
}

/**
 * Sends what is due. What the server may have already is not sent again, but set aside for a person to decide. A letter
 * that fails waits longer each time, up to an hour, and is given up after three days, or at once when the server refuses
 * it for good.
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
}
