import { Op, type Transaction } from 'sequelize';
import type { SentLetter } from '$lib/schemas/letters';
import type { SignedInPerson } from '$lib/schemas/people';
import { Job, OutgoingMail, Sheet } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { noteArrived, tryMailAgain } from '../mail/outbox';
import { allow } from '../policies';
import { presentSentLetter } from '../presenters/sent-letters';
import { recordBy } from './audit';

/** Every letter of a job, the newest first: to whom, and what became of it. */
export async function listSentLetters(person: SignedInPerson, jobId: number): Promise<SentLetter[]> {
	allow(person, 'jobs.read');
	const where = { id: jobId, workshopId: person.workshopId };
	if (!(await Job.findOne({ where, attributes: ['id'] }))) throw notFound('job');
	const letters = await OutgoingMail.findAll({
		where: { jobId, workshopId: person.workshopId },
		order: [['id', 'DESC']]
	});
	return letters.map(presentSentLetter);
}

const MOST_LISTED = 100;

/** Letters that were given up, or may have arrived, and belong to no job, where nobody would look for them. */
export async function listFailedLetters(person: SignedInPerson): Promise<SentLetter[]> {
	const { workshopId } = allow(person, 'shop.write');
	const letters = await OutgoingMail.findAll({
		// A link to sign in is dead by then: whoever needs one asks for another.
		where: { workshopId, jobId: null, state: ['failed', 'unsure'], kind: { [Op.ne]: 'sign-in' } },
		order: [['id', 'DESC']],
		limit: MOST_LISTED
	});
	return letters.map(presentSentLetter);
}

async function refuseWithdrawn({ sheetId }: OutgoingMail): Promise<void> {
	const sheet = (sheetId ?? null) === null ? null : await Sheet.findByPk(sheetId!);
	if (sheet?.withdrawnAt) throw new AppError('conflict', 'This sheet was withdrawn: send a new one instead.');
}

type Decision = (letter: OutgoingMail, transaction: Transaction) => Promise<void>;

/** What a person decides about a letter that is at rest, written down. */
async function decide(
	person: SignedInPerson,
	letterId: number,
	action: 'job.letter-tried-again' | 'job.letter-arrived',
	settle: Decision
): Promise<SentLetter> {
	allow(person, 'sheets.write');
	return inTransaction(async (transaction) => {
		const where = { id: letterId, workshopId: person.workshopId };
		const letter = await OutgoingMail.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
		if (!letter) throw notFound('letter');
		if (letter.jobId === null) allow(person, 'shop.write');
		await settle(letter, transaction);
		const subject =
			letter.jobId === null ? { type: 'letter', id: letterId } : { type: 'job', id: letter.jobId };
		await recordBy(person, action, subject, transaction, { letterId });
		await letter.reload({ transaction });
		return presentSentLetter(letter);
	});
}

/** Gives a letter that was given up, or may have arrived, another row of tries. */
export const sendLetterAgain = (person: SignedInPerson, letterId: number): Promise<SentLetter> =>
	decide(person, letterId, 'job.letter-tried-again', async (letter, transaction) => {
		await refuseWithdrawn(letter);
		if (!(await tryMailAgain(letter.id, transaction)))
			throw new AppError('conflict', 'This letter is sent, is being tried already, or was dropped.');
	});

/** Somebody asked its reader: a letter that may have arrived did. */
export const noteLetterArrived = (person: SignedInPerson, letterId: number): Promise<SentLetter> =>
	decide(person, letterId, 'job.letter-arrived', async (letter, transaction) => {
		if (!(await noteArrived(letter.id, transaction)))
			throw new AppError('conflict', 'Nobody is in doubt about this letter any more: look at it again.');
	});
