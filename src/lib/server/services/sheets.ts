import type { Transaction } from 'sequelize';
import { CAUTION_TEXT_VERSION } from '$lib/format/cautions';
import { saySent } from '$lib/format/sheets';
import type { SignedInPerson } from '$lib/schemas/people';
import type { SendSheet, SheetStatus } from '$lib/schemas/sheets';
import { Acknowledgement, Job, OutgoingMail, Person, Sheet } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { AppError, notFound } from '../errors';
import { canonicalJson, newToken, sha256, tokenHash } from '../hash';
import { dropLetters, postLetter, tryLetterAgain } from '../mail/outbox';
import { writeSheetLetter } from '../mail/sheet-letter';
import { allow } from '../policies';
import { SHEET_WORDS_VERSION, writeSheetContent } from '../presenters/sheet-content';
import { presentSheetStatus } from '../presenters/sheets';
import { recordBy } from './audit';
import { refreshReview } from './review/keep-review';
import { readSheetSource } from './sheet-source';

/** Both parts of what is read: the sheet's own words and the cautions. */
const TEXT_VERSION = `${SHEET_WORDS_VERSION}.${CAUTION_TEXT_VERSION}`;
const ACKNOWLEDGEMENT = { model: Acknowledgement, as: 'acknowledgement' };

async function presentAll(sheets: Sheet[]): Promise<SheetStatus[]> {
	const letters = await OutgoingMail.findAll({ where: { sheetId: sheets.map((sheet) => sheet.id) } });
	const senders = await Person.findAll({
		where: { id: sheets.map((sheet) => sheet.createdBy) },
		attributes: ['id', 'name']
	});
	const letterOf = new Map(letters.map((letter) => [letter.sheetId, letter]));
	const nameOf = new Map(senders.map((sender) => [sender.id, sender.name]));
	return sheets.flatMap((sheet) => {
		const letter = letterOf.get(sheet.id);
		return letter ? [presentSheetStatus(sheet, letter, nameOf.get(sheet.createdBy) ?? '')] : [];
	});
}

async function presentOne(sheetId: number): Promise<SheetStatus> {
	const sheet = await Sheet.findByPk(sheetId, { include: ACKNOWLEDGEMENT });
	const [status] = sheet ? await presentAll([sheet]) : [];
	if (!status) throw notFound('sheet');
	return status;
}

/** Of two who send at once the second waits here, and then sees the sheet of the first. */
async function lockJob(workshopId: number, jobId: number, transaction: Transaction): Promise<void> {
	const where = { id: jobId, workshopId };
	const job = await Job.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
	if (!job) throw notFound('job');
}

async function withdrawAll(
	person: SignedInPerson,
	sheets: Sheet[],
	reason: string,
	transaction: Transaction
): Promise<void> {
	const ids = sheets.map((sheet) => sheet.id);
	await Sheet.update(
		{ withdrawnAt: new Date(), withdrawnBy: person.id },
		{ where: { id: ids, withdrawnAt: null }, transaction }
	);
	await dropLetters(ids, 'Not sent: the sheet was withdrawn first.', transaction);
	for (const id of ids)
		await recordBy(person, 'sheet.withdrawn', { type: 'sheet', id }, transaction, { reason });
}

/** Sheets of the job that are open and that nobody has acknowledged. */
async function findUnanswered(jobId: number, transaction: Transaction): Promise<Sheet[]> {
	const where = { jobId, withdrawnAt: null };
	const lock = transaction.LOCK.UPDATE;
	const open = await Sheet.findAll({ where, include: ACKNOWLEDGEMENT, transaction, lock });
	return open.filter((sheet) => !sheet.acknowledgement);
}

/** A page that was sent after somebody opened the form is dead as soon as theirs goes out: they decide, knowing of it. */
async function refuseUnknown(person: SignedInPerson, jobId: number, newestId: number): Promise<void> {
	const [newest] = await listSheets(person, jobId);
	if (!newest || newest.id === newestId || newest.withdrawnAt !== null) return;
	const stops = newest.acknowledgedAt ? '' : ' The one that is out then stops working.';
	throw new AppError('changed_meanwhile', `${saySent(newest)} Send a new link all the same?${stops}`);
}

/**
 * Writes the customer's page from a recommendation and posts its link. The link is in the letter alone: to send it
 * again makes a new one, and the one before it stops working unless it was acknowledged. With the newest sheet that
 * somebody knew of, a later one is not made dead unseen.
 */
export async function sendSheet(
	person: SignedInPerson,
	{ recommendationId, sendTo, jobId: askedJobId, newestId }: SendSheet & { jobId?: number; newestId?: number }
): Promise<{ sheet: SheetStatus }> {
	allow(person, 'sheets.write');
	// What takes seconds is worked out first: nobody is kept waiting by a lock meanwhile.
	await readSheetSource(person, recommendationId);
	return inTransaction(async (transaction) => {
		const { jobId, ...source } = await readSheetSource(person, recommendationId);
		if (askedJobId !== undefined && askedJobId !== jobId) throw notFound('recommendation');
		await lockJob(person.workshopId, jobId, transaction);
		if (newestId !== undefined) await refuseUnknown(person, jobId, newestId);
		await withdrawAll(person, await findUnanswered(jobId, transaction), 'sent again', transaction);
		const content = writeSheetContent(source);
		const contentSha256 = sha256(canonicalJson(content));
		const token = newToken();
		const sheet = await Sheet.create(
			{
				workshopId: person.workshopId,
				createdBy: person.id,
				tokenHash: tokenHash(token),
				textVersion: TEXT_VERSION,
				...{ jobId, recommendationId, content, contentSha256, sentTo: sendTo }
			},
			{ transaction }
		);
		const letter = writeSheetLetter(content, `${env().ORIGIN}/sheet/${token}`);
		await postLetter(
			{
				...letter,
				...{ kind: 'sheet', workshopId: person.workshopId, jobId, sheetId: sheet.id, recipient: sendTo }
			},
			transaction
		);
		await Job.update({ stage: 'sent' }, { where: { id: jobId }, transaction });
		await refreshReview('job', jobId, transaction);
		const told = { recommendationId, sendTo, contentSha256, textVersion: TEXT_VERSION };
		await recordBy(person, 'sheet.sent', { type: 'sheet', id: sheet.id }, transaction, told);
		return { sheet: await presentOne(sheet.id) };
	});
}

async function findOwn(person: SignedInPerson, sheetId: number, transaction: Transaction): Promise<Sheet> {
	const where = { id: sheetId, workshopId: person.workshopId };
	const sheet = await Sheet.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
	if (!sheet) throw notFound('sheet');
	return sheet;
}

/** Stops a link for good. What was acknowledged stays on record; to withdraw twice changes nothing more. */
export async function withdrawSheet(person: SignedInPerson, sheetId: number): Promise<SheetStatus> {
	allow(person, 'sheets.write');
	return inTransaction(async (transaction) => {
		const sheet = await findOwn(person, sheetId, transaction);
		const { jobId } = sheet;
		if (sheet.withdrawnAt === null) {
			await withdrawAll(person, [sheet], 'by hand', transaction);
			await refreshReview('job', jobId, transaction);
			const open = await Sheet.count({ where: { jobId, withdrawnAt: null }, transaction });
			if (open === 0)
				await Job.update({ stage: 'recommended' }, { where: { id: jobId, stage: 'sent' }, transaction });
		}
		return presentOne(sheetId);
	});
}

/** Gives a letter that was given up another row of tries. */
export async function retrySheetLetter(person: SignedInPerson, sheetId: number): Promise<SheetStatus> {
	allow(person, 'sheets.write');
	return inTransaction(async (transaction) => {
		const sheet = await findOwn(person, sheetId, transaction);
		if (sheet.withdrawnAt !== null)
			throw new AppError('conflict', 'This sheet was withdrawn: send a new one instead.');
		if (!(await tryLetterAgain(sheetId, transaction)))
			throw new AppError('conflict', 'This letter is sent, or is being tried already.');
		await recordBy(person, 'sheet.letter-tried-again', { type: 'sheet', id: sheetId }, transaction);
		return presentOne(sheetId);
	});
}

/** The sheets of a job, newest first, with what became of each. */
export async function listSheets(person: SignedInPerson, jobId: number): Promise<SheetStatus[]> {
	allow(person, 'jobs.read');
	const where = { id: jobId, workshopId: person.workshopId };
	if (!(await Job.findOne({ where, attributes: ['id'] }))) throw notFound('job');
	const sheets = await Sheet.findAll({
		where: { jobId, workshopId: person.workshopId },
		include: ACKNOWLEDGEMENT,
		order: [['id', 'DESC']]
	});
	return presentAll(sheets);
}
