import { Op, UniqueConstraintError, type Includeable, type Transaction, type WhereOptions } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { Acknowledge, AcknowledgementView, MySheet, SheetView } from '$lib/schemas/sheets';
import { Acknowledgement, Assessment, Job, Sheet } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { canonicalJson, sha256, tokenHash } from '../hash';
import { logger } from '../logger';
import { allow } from '../policies';
import { presentAcknowledgement, presentMySheet, presentSheet } from '../presenters/sheets';
import { record } from './audit';
import { listLessons } from './field-lessons';
import { readThread } from './question-threads';
import { findLogo } from './shop';
import { refreshReview } from './review/keep-review';

const ACKNOWLEDGEMENT = { model: Acknowledgement, as: 'acknowledgement' };

/** Who reads: null is whoever holds the link. */
type Reader = SignedInPerson | null;

const byLink = (token: string): Find => ({ where: { tokenHash: tokenHash(token) } });

/** A customer's own sheets and nobody else's: through the job that is theirs. */
function ofCustomer(person: SignedInPerson) {
	const { workshopId, customerId } = allow(person, 'documents.read-own');
	return { model: Job, as: 'job', attributes: ['id'], required: true, where: { workshopId, customerId } };
}

const ofOwn = (person: SignedInPerson, sheetId: number): Find => ({
	where: { id: sheetId },
	include: [ofCustomer(person)]
});

function refuseWithdrawn({ withdrawnAt, content: { workshop } }: Sheet): void {
	if (withdrawnAt === null) return;
	const phone = workshop.phone === '' ? '' : `, ${workshop.phone},`;
	throw new AppError(
		'gone',
		`${workshop.name} has withdrawn this page, perhaps because there is a newer one. Ask them${phone} for the one that counts.`
	);
}

/** The page is worth nothing if its words are not the ones that were sent. */
function requireUnchanged({ id, content, contentSha256 }: Sheet): void {
	if (sha256(canonicalJson(content)) === contentSha256) return;
	logger.error({ sheetId: id }, 'the stored words of a sheet are not the ones that were sent');
	throw new AppError(
		'conflict',
		'The words of this page are not the ones that were sent, so it is not shown. Ask the shop to send it again.'
	);
}

interface Find {
	where: WhereOptions;
	include?: Includeable[];
}

/** With a lock when something follows from it: then nobody withdraws it in between. */
async function readSheet({ where, include = [] }: Find, transaction?: Transaction): Promise<Sheet> {
	const locked = transaction ? { transaction, lock: transaction.LOCK.UPDATE } : {};
	const sheet = await Sheet.findOne({ where, include: [ACKNOWLEDGEMENT, ...include], ...locked });
	if (!sheet) throw notFound('page');
	refuseWithdrawn(sheet);
	requireUnchanged(sheet);
	return sheet;
}

/** The page behind a link, for what is done through it. */
export const findLinkedSheet = (token: string): Promise<Sheet> => readSheet(byLink(token));

/** A page of a signed-in customer, for what is done with it. */
export const findMySheet = async (person: SignedInPerson, sheetId: number): Promise<Sheet> =>
	readSheet(ofOwn(person, sheetId));

/** The page that the shop sent after this one, if that still stands. */
async function findNewer({ id, jobId }: Sheet): Promise<Sheet | null> {
	const where = { jobId, withdrawnAt: null, id: { [Op.gt]: id } };
	return Sheet.findOne({ where, order: [['id', 'DESC']] });
}

/** The page with what belongs beside it: a newer one, questions, and what the field has taught about this position. */
async function show(sheet: Sheet): Promise<SheetView> {
	const { workshopId, jobId, content } = sheet;
	const [newer, questions, lessons, assessment, logo] = await Promise.all([
		findNewer(sheet),
		readThread(jobId),
		listLessons([jobId]),
		Assessment.findByPk(content.assessmentId, { attributes: ['mountId'] }),
		findLogo(workshopId, content.workshop.logoSha256)
	]);
	const ofMount = lessons.filter(({ mountId }) => mountId === assessment?.mountId);
	return presentSheet(sheet, newer, { questions, lessons: ofMount, logo });
}

/** Once: of two at the same moment one changes the row. */
async function noteFirstOpening({ id, workshopId }: Sheet, reader: Reader): Promise<void> {
	await inTransaction(async (transaction) => {
		const where = { id, firstOpenedAt: null };
		const [changed] = await Sheet.update({ firstOpenedAt: new Date() }, { where, transaction });
		if (changed === 0) return;
		const subject = { subjectType: 'sheet', subjectId: id };
		const action = reader ? 'sheet.read' : 'sheet.link-opened';
		await record({ workshopId, personId: reader?.id ?? null, action, ...subject }, transaction);
	});
}

/** The page behind a link. To open it acknowledges nothing: programs that scan mail open links too. */
export async function openSheet(token: string): Promise<SheetView> {
	const sheet = await readSheet(byLink(token));
	if (sheet.firstOpenedAt === null) await noteFirstOpening(sheet, null);
	return show(sheet);
}

export async function listMySheets(person: SignedInPerson): Promise<MySheet[]> {
	const sheets = await Sheet.findAll({
		where: { withdrawnAt: null },
		include: [ACKNOWLEDGEMENT, ofCustomer(person)],
		order: [['id', 'DESC']]
	});
	return sheets.map(presentMySheet);
}

export async function getMySheet(person: SignedInPerson, sheetId: number): Promise<SheetView> {
	const sheet = await readSheet(ofOwn(person, sheetId));
	if (sheet.firstOpenedAt === null) await noteFirstOpening(sheet, person);
	return show(sheet);
}

async function storeAcknowledgement(
	{ id: sheetId, workshopId, jobId, textVersion }: Sheet,
	{ name, contentSha256 }: Acknowledge,
	reader: Reader,
	transaction: Transaction
): Promise<Acknowledgement> {
	const made = await Acknowledgement.create({ sheetId, name, textVersion, contentSha256 }, { transaction });
	await Job.update({ stage: 'acknowledged' }, { where: { id: jobId }, transaction });
	await refreshReview('job', jobId, transaction);
	await record(
		{
			workshopId,
			personId: reader?.id ?? null,
			action: 'sheet.acknowledged',
			...{ subjectType: 'sheet', subjectId: sheetId },
			detail: { name, textVersion, contentSha256 }
		},
		transaction
	);
	return made;
}

/** One sheet has one acknowledgement: whoever comes second, even at the same moment, is shown the first. */
async function acknowledge(find: Find, given: Acknowledge, reader: Reader) {
	const work = (): Promise<AcknowledgementView> =>
		inTransaction(async (transaction) => {
			const sheet = await readSheet(find, transaction);
			if (sheet.acknowledgement) return presentAcknowledgement(sheet.acknowledgement);
			if (sheet.contentSha256 !== given.contentSha256)
				throw new AppError(
					'changed_meanwhile',
					'What you read is not what this page says now. Open it again, read it, then acknowledge it. Nothing was stored.'
				);
			return presentAcknowledgement(await storeAcknowledgement(sheet, given, reader, transaction));
		});
	return work().catch((error: unknown) => {
		if (error instanceof UniqueConstraintError) return work();
		throw error;
	});
}

/** The holder of the link says by name that they have read exactly these words. */
export async function acknowledgeSheet(token: string, given: Acknowledge): Promise<AcknowledgementView> {
	return acknowledge(byLink(token), given, null);
}

/** The same by a customer who is signed in. */
export async function acknowledgeMySheet(
	person: SignedInPerson,
	sheetId: number,
	given: Acknowledge
): Promise<AcknowledgementView> {
	return acknowledge(ofOwn(person, sheetId), given, person);
}
