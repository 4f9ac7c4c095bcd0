import { Op, QueryTypes, type Model, type Transaction } from 'sequelize';
import { ERASED } from '$lib/schemas/erasures';
import { connection } from '../../db/connection';
import {
	Acknowledgement,
	Assessment,
	CustomerMessage,
	DayPlan,
	Erasure,
	FieldNote,
	FieldNoteStrike,
	Installation,
	Mount,
	OutgoingMail,
	PreDrillCheck,
	Recommendation,
	Session,
	SignInLink,
	StoredFile,
	Trace
} from '../../db/models';
import { outsideTransaction } from '../../db/transaction';
import { canonicalJson, newToken, sha256, tokenHash } from '../../hash';
import { logger } from '../../logger';
import { clearErasedLetters } from './erased-letters';
import type { Persona } from './find-persona';

type Step = (persona: Persona, transaction: Transaction) => Promise<unknown>;

/** Writes a row only where something of it changes: most rows name nobody. */
async function rewrite<M extends Model>(
	rows: readonly M[],
	change: (row: M) => Partial<M['_attributes']>,
	transaction: Transaction
): Promise<void> {
	for (const row of rows) {
		const changes = change(row);
		const now = Object.fromEntries(Object.keys(changes).map((key) => [key, row.get(key) as unknown]));
		if (canonicalJson(now) !== canonicalJson(changes)) await row.update(changes as never, { transaction });
	}
}

/** Whoever they were to sign in as, they are no more. */
const eraseSignIn: Step = async ({ people, ids }, transaction) => {
	const where = { personId: ids.people };
	await Session.destroy({ where, transaction });
	await SignInLink.destroy({ where, transaction });
	const changeOf = (id: number) => ({
		...{ name: ERASED, email: `erased-${id}@soakline.invalid`, passwordHash: null, active: false }
	});
	await rewrite(people, ({ id }) => changeOf(id), transaction);
};

const eraseContact: Step = async ({ customer, vehicles, jobs }, transaction) => {
	const remindersStoppedAt = customer.remindersStoppedAt ?? new Date();
	await customer.update({ name: ERASED, email: '', phone: '', remindersStoppedAt }, { transaction });
	await rewrite(vehicles, () => ({ registration: '' }), transaction);
	await rewrite(jobs, () => ({ note: '' }), transaction);
};

/** Positions, day plans and assessments carry names that people gave; the numbers stay. */
const eraseFromPlans: Step = async ({ ids, scrub }, transaction) => {
	const where = { jobId: ids.jobs };
	const mounts = await Mount.findAll({ where, transaction });
	await rewrite(
		mounts,
		({ name, survey }) => ({ name: scrub.text(name), survey: scrub.json(survey) }),
		transaction
	);
	await rewrite(
		await DayPlan.findAll({ where, transaction }),
		({ name }) => ({ name: scrub.text(name) }),
		transaction
	);
	const changeAssessment = ({ inputs: given }: Assessment) => {
		const { scenario, vehicle, ...named } = given;
		const erased = { ...scrub.json({ ...named, vehicle }), scenario, customerName: ERASED };
		const inputs = { ...erased, vehicle: { ...erased.vehicle, registration: '' } };
		return { inputs, inputsSha256: sha256(canonicalJson(inputs)) };
	};
	await rewrite(await Assessment.findAll({ where, transaction }), changeAssessment, transaction);
};

const eraseFromPapers: Step = async ({ ids, scrub }, transaction) => {
	const where = { jobId: ids.jobs };
	await rewrite(
		await Recommendation.findAll({ where, transaction }),
		({ decidedBy, reason, madeOutTo, preDrill }) => ({
			decidedBy: decidedBy === null ? null : scrub.free(decidedBy),
			reason: reason === null ? null : scrub.free(reason),
			madeOutTo: (madeOutTo ?? null) === null ? null : ERASED,
			preDrill: scrub.freeJson(preDrill ?? null)
		}),
		transaction
	);
	await rewrite(
		await PreDrillCheck.findAll({ where: { mountId: ids.mounts }, transaction }),
		({ answers, signedBy }) => ({
			answers: scrub.freeJson(answers),
			signedBy: typeof signedBy === 'string' ? scrub.free(signedBy) : null
		}),
		transaction
	);
};

/** The links stop working; what was on the pages stays without the name. */
const eraseFromSheets: Step = async ({ sheets, ids, scrub }, transaction) => {
	const changeSheet = (sheet: Persona['sheets'][number]) => ({
		content: {
			...{ ...scrub.json(sheet.content), customerName: ERASED },
			override: scrub.freeJson(sheet.content.override)
		},
		...{ sentTo: '', tokenHash: tokenHash(newToken()), withdrawnAt: sheet.withdrawnAt ?? new Date() }
	});
	await rewrite(sheets, changeSheet, transaction);
	const acknowledgements = await Acknowledgement.findAll({ where: { sheetId: ids.sheets }, transaction });
	await rewrite(acknowledgements, () => ({ name: ERASED }), transaction);
};

/** What a customer asked tells of them; what was answered may repeat it. */
const eraseMessages: Step = async ({ ids }, transaction) => {
	const messages = await CustomerMessage.findAll({ where: { jobId: ids.jobs }, transaction });
	await rewrite(
		messages,
		({ questionId, authorName }) => ({
			body: ERASED,
			authorName: (questionId ?? null) === null ? ERASED : authorName
		}),
		transaction
	);
};

const eraseFromField: Step = async ({ ids, installationIds, scrub }, transaction) => {
	await rewrite(
		await Installation.findAll({ where: { jobId: ids.jobs }, transaction }),
		({ note, differences, agreed }) => ({
			...{ note: scrub.free(note), differences: scrub.freeJson(differences), agreed: scrub.json(agreed) }
		}),
		transaction
	);
	const notes = await FieldNote.findAll({ where: { installationId: installationIds }, transaction });
	await rewrite(notes, ({ data }) => ({ data: scrub.freeJson(data) }), transaction);
	await rewrite(
		await FieldNoteStrike.findAll({ where: { fieldNoteId: notes.map(({ id }) => id) }, transaction }),
		({ reason }) => ({ reason: scrub.free(reason) }),
		transaction
	);
};

/** Photos and documents may show anybody: their rows go, and what nobody owns is cleared away within the hour. */
const eraseFiles: Step = ({ ids }, transaction) =>
	StoredFile.destroy({ where: { mountId: ids.mounts }, transaction });

/** What a logger measured names nobody; what the file was called, and its first rows as they stood, may. */
const eraseFromTraces: Step = async ({ ids, scrub }, transaction) => {
	await rewrite(
		await Trace.findAll({ where: { jobId: ids.jobs }, transaction }),
		({ name, proposal }) => ({
			name: scrub.free(name),
			proposal: { ...scrub.freeJson(proposal), firstRows: [] }
		}),
		transaction
	);
};

const TO_SHOP = new Set(['question', 'erasure-asked', 'erasure-withdrawn']);

/** What the mail server may have already is in doubt for good: its words are gone. */
const fateOfWaiting = ({ handedOverAt }: OutgoingMail): Partial<OutgoingMail> =>
	handedOverAt === null
		? { state: 'failed', lastError: 'Not sent: the customer’s data was deleted first.' }
		: { state: 'unsure', lastError: 'It was being sent when the customer’s data was deleted.' };

/** The sending log keeps that something was sent, and when; what waits is not sent any more. */
const eraseLetters: Step = async ({ workshopId, ids, terms, scrub }, transaction) => {
	const letters = await OutgoingMail.findAll({
		where: {
			workshopId,
			[Op.or]: [{ jobId: ids.jobs }, { sheetId: ids.sheets }, { recipient: terms }]
		},
		transaction
	});
	const changeLetter = (letter: OutgoingMail) => ({
		...{ textBody: '', htmlBody: '', stopUrl: '', subject: scrub.text(letter.subject) },
		recipient: TO_SHOP.has(letter.kind) ? letter.recipient : ERASED,
		...(letter.state === 'waiting' ? fateOfWaiting(letter) : { lastError: scrub.text(letter.lastError) })
	});
	await rewrite(letters, changeLetter, transaction);
	// Where letters are kept to be read here, theirs go once it is certain that the rest does, or with the next clearing.
	transaction.afterCommit(async () => {
		await outsideTransaction(clearErasedLetters).catch((error: unknown) =>
			logger.error({ err: error }, 'letters of an erased person stay in the mailbox for now')
		);
	});
};

/** Answers that are kept for a day in case a question is repeated. */
const eraseKeptAnswers: Step = async ({ workshopId, ids, terms }, transaction) => {
	const people = [0, ...ids.people];
	await connection().query('DELETE FROM idempotency_keys WHERE person_id IN (:people)', {
		...{ replacements: { people }, type: QueryTypes.DELETE, transaction }
	});
	for (const term of terms) {
		await connection().query(
			`DELETE FROM idempotency_keys WHERE LOCATE(:term, response) > 0
			 AND person_id IN (SELECT id FROM people WHERE workshop_id = :workshopId)`,
			{ replacements: { term, workshopId }, type: QueryTypes.DELETE, transaction }
		);
	}
};

const eraseFormerRequests: Step = async ({ customer, scrub }, transaction) => {
	const requests = await Erasure.findAll({ where: { customerId: customer.id }, transaction });
	await rewrite(requests, ({ reason }) => ({ reason: scrub.free(reason) }), transaction);
};

/**
 * Every place that may hold something of a person. Another table of customers' things is one more step here; a test
 * looks through every column of every table for what this leaves.
 */
export const STEPS: readonly Step[] = [
	...[eraseSignIn, eraseFromPlans, eraseFromPapers, eraseFromSheets, eraseMessages, eraseFromField],
	...[eraseFiles, eraseFromTraces, eraseLetters, eraseKeptAnswers, eraseFormerRequests, eraseContact]
];
