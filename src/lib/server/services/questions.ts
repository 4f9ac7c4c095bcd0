import { UniqueConstraintError, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { Ask, Question } from '$lib/schemas/questions';
import { spend } from '../auth/rate-limit';
import { CustomerMessage, Job, Person, Sheet, Workshop } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { AppError, notFound } from '../errors';
import { postLetter } from '../mail/outbox';
import { writeAnswerLetter, writeQuestionLetter } from '../mail/question-letters';
import { allow } from '../policies';
import { record, recordBy } from './audit';
import { isCustomerErased, readThread } from './question-threads';
import { findLinkedSheet, findMySheet } from './sheet-readers';

/** Enough for any conversation, too few to fill anybody's mailbox. */
const QUESTIONS_AN_HOUR = 10;

/** Who asks, and with which form: the same form sent again asks nothing more. */
interface Asking {
	person: SignedInPerson | null;
	onceKey: string | null;
}

/** To the shop's own address; without one, to whoever sent the page. */
async function findShopAddress({ workshopId, createdBy }: Sheet): Promise<string> {
	const workshop = await Workshop.findByPk(workshopId);
	if (workshop?.email) return workshop.email;
	const sender = await Person.findOne({ where: { id: createdBy, workshopId, active: true } });
	return sender?.email ?? '';
}

async function tellShop(sheet: Sheet, { askedBy, question }: Ask, transaction: Transaction): Promise<void> {
	const { workshopId, jobId, content } = sheet;
	const recipient = await findShopAddress(sheet);
	if (recipient === '') return;
	const letter = writeQuestionLetter(
		{ content, askedBy, question },
		`${env().ORIGIN}/jobs/${jobId}#questions`
	);
	await postLetter({ ...letter, kind: 'question', workshopId, jobId, recipient }, transaction);
}

async function keepQuestion(sheet: Sheet, asked: Ask, { person, onceKey }: Asking): Promise<void> {
	const { id: sheetId, workshopId, jobId } = sheet;
	await inTransaction(async (transaction) => {
		const row = { workshopId, jobId, sheetId, personId: person?.id ?? null, onceKey };
		const { id } = await CustomerMessage.create(
			{ ...row, authorName: asked.askedBy, body: asked.question },
			{ transaction }
		);
		await tellShop(sheet, asked, transaction);
		await record(
			{
				...{ workshopId, personId: person?.id ?? null, action: 'sheet.question' },
				...{ subjectType: 'sheet', subjectId: sheetId, detail: { questionId: id } }
			},
			transaction
		);
	});
}

async function ask(sheet: Sheet, asked: Ask, asking: Asking): Promise<Question[]> {
	await spend({ name: 'question', key: `job ${sheet.jobId}`, points: QUESTIONS_AN_HOUR, windowS: 3_600 });
	await keepQuestion(sheet, asked, asking).catch((error: unknown) => {
		if (!(error instanceof UniqueConstraintError)) throw error;
	});
	return readThread(sheet.jobId);
}

/** Whoever holds the link asks the shop, which gets a letter. */
export async function askByLink(token: string, asked: Ask, onceKey: string | null): Promise<Question[]> {
	return ask(await findLinkedSheet(token), asked, { person: null, onceKey });
}

/** The same by a customer who is signed in. */
export async function askOnMySheet(
	person: SignedInPerson,
	sheetId: number,
	asked: Ask,
	onceKey: string | null = null
): Promise<Question[]> {
	allow(person, 'questions.ask');
	return ask(await findMySheet(person, sheetId), asked, { person, onceKey });
}

/** The questions of a customer's own job, and what the shop answered. */
export async function listMyQuestions(person: SignedInPerson, sheetId: number): Promise<Question[]> {
	allow(person, 'documents.read-own');
	return readThread((await findMySheet(person, sheetId)).jobId);
}

/** What was asked about a job of the shop, and what was answered. */
export async function listQuestions(person: SignedInPerson, jobId: number): Promise<Question[]> {
	allow(person, 'jobs.read');
	const where = { id: jobId, workshopId: person.workshopId };
	if (!(await Job.findOne({ where, attributes: ['id'] }))) throw notFound('job');
	return readThread(jobId);
}

/** Where the answer goes: to whoever was signed in, or to whom the page was sent. */
async function findAsker({ personId }: CustomerMessage, sheet: Sheet): Promise<string> {
	const asker = personId ? await Person.findOne({ where: { id: personId, active: true } }) : null;
	return asker?.email ?? sheet.sentTo;
}

const NOBODY_THERE = 'This customer’s data was deleted as they asked: nobody is there to be answered.';

/** Answers a question for good: by e-mail, and on the customer's page. */
export async function answerQuestion(
	person: SignedInPerson,
	questionId: number,
	answer: string
): Promise<Question[]> {
	allow(person, 'questions.answer');
	return inTransaction(async (transaction) => {
		const where = { id: questionId, workshopId: person.workshopId, questionId: null };
		const question = await CustomerMessage.findOne({ where, transaction });
		const sheet = question?.sheetId ? await Sheet.findByPk(question.sheetId, { transaction }) : null;
		if (!question || !sheet) throw notFound('question');
		const { workshopId, jobId, authorName: askedBy, body } = question;
		if (await isCustomerErased(jobId)) throw new AppError('conflict', NOBODY_THERE);
		const { id } = await CustomerMessage.create(
			{ workshopId, jobId, questionId, personId: person.id, authorName: person.name, body: answer },
			{ transaction }
		);
		const recipient = await findAsker(question, sheet);
		const said = { content: sheet.content, askedBy, question: body, answer, answeredBy: person.name };
		if (recipient !== '') {
			const replyTo = sheet.content.workshop.email;
			const about = { kind: 'answer', workshopId, jobId, recipient, replyTo } as const;
			await postLetter({ ...writeAnswerLetter(said), ...about }, transaction);
		}
		await recordBy(person, 'job.answer', { type: 'job', id: jobId }, transaction, {
			questionId,
			answerId: id
		});
		return readThread(jobId);
	});
}
