import { UniqueConstraintError, type Transaction } from 'sequelize';
import type { FieldNotesView, FieldNoteStrikeChange } from '$lib/schemas/field-notes';
import type { SignedInPerson } from '$lib/schemas/people';
import { FieldNote, FieldNoteStrike, Installation } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { settleLabels } from './accuracy/label-checks';
import { recordBy } from './audit';
import { listFieldNotes } from './field-notes';
import { findStandingMount } from './mounts';
import { refreshReview } from './review/keep-review';

async function findNote(
	person: SignedInPerson,
	mountId: number,
	noteId: number,
	transaction: Transaction
): Promise<FieldNote> {
	const { id, workshopId } = await findStandingMount(person, mountId, transaction);
	const lock = transaction.LOCK.UPDATE;
	// Held as for a note that is kept: what is weighed meanwhile is then weighed again.
	const installation = await Installation.findOne({ where: { mountId: id, workshopId }, transaction, lock });
	const where = { id: noteId, installationId: installation?.id ?? 0 };
	const note = await FieldNote.findOne({ where, transaction });
	if (!note) throw notFound('note');
	return note;
}

async function writeStrike(
	{ id: createdBy, workshopId }: SignedInPerson,
	{ id: fieldNoteId }: FieldNote,
	reason: string,
	transaction: Transaction
): Promise<void> {
	try {
		await FieldNoteStrike.create({ workshopId, fieldNoteId, reason, createdBy }, { transaction });
	} catch (error) {
		if (!(error instanceof UniqueConstraintError)) throw error;
		throw new AppError('conflict', 'This note is struck out already: a note can be struck out once.');
	}
}

/** Strikes a note out: it stays on record with the reason, and counts nowhere from now on. */
export async function strikeFieldNote(
	person: SignedInPerson,
	mountId: number,
	noteId: number,
	{ reason }: FieldNoteStrikeChange
): Promise<FieldNotesView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const note = await findNote(person, mountId, noteId, transaction);
		await writeStrike(person, note, reason, transaction);
		await settleLabels(note.installationId, transaction);
		await refreshReview('installation', note.installationId, transaction);
		const subject = { type: 'mount', id: mountId };
		await recordBy(person, 'mount.field-note-struck', subject, transaction, { noteId, reason });
		return listFieldNotes(person, mountId);
	});
}
