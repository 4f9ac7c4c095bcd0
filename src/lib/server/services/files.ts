import { readFile } from 'node:fs/promises';
import type { Transaction } from 'sequelize';
import {
	MOST_FILES_OF_MOUNT,
	type FileChange,
	type FileKind,
	type FilePlace,
	type FileSize,
	type FileView
} from '$lib/schemas/files';
import type { SignedInPerson } from '$lib/schemas/people';
import { FieldNote, Installation, Mount, Person, StoredFile } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { sha256 } from '../hash';
import { allow } from '../policies';
import { presentFile } from '../presenters/files';
import { newContentId, storage } from '../storage';
import { recordBy, type AuditAction } from './audit';
import { lookAtFile } from './file-looks';
import { cleanFileName } from './file-names';
import { refuseFile } from './file-refusals';
import { findStandingMount } from './mounts';
import { remakePicture } from './pictures';
import { notThere, saveVersioned } from './records';

/** A file as it came, on the disk. */
export interface IncomingFile {
	name: string;
	path: string;
	/** It was read past, and is not on the disk. */
	isTooLarge?: boolean;
}

/** What will be kept of it, and what it is. */
export interface PreparedFile {
	name: string;
	kind: FileKind;
	widthPx: number | null;
	heightPx: number | null;
	full: Buffer;
	thumb: Buffer | null;
}

const NAMELESS = 'file';
const keyOf = (contentId: string, size: FileSize): string => `${contentId}.${size}`;

async function present(files: readonly StoredFile[]): Promise<FileView[]> {
	const ids = [...new Set(files.map(({ uploadedBy }) => uploadedBy))];
	const people = await Person.findAll({ where: { id: ids }, attributes: ['id', 'name'] });
	const nameOf = new Map(people.map(({ id, name }) => [id, name]));
	return files.map((file) => presentFile(file, nameOf.get(file.uploadedBy) ?? ''));
}

async function presentOne(file: StoredFile): Promise<FileView> {
	const [view] = await present([file]);
	return view!;
}

/** Looks at a file and makes of it what is kept: slow, and therefore before any transaction. */
export async function prepareFile(incoming: IncomingFile): Promise<PreparedFile> {
	const { path, isTooLarge = false } = incoming;
	const name = cleanFileName(incoming.name, NAMELESS);
	if (isTooLarge) throw refuseFile(name, 'large');
	const kind = await lookAtFile(name, path);
	if (kind === 'document') {
		return { name, kind, widthPx: null, heightPx: null, full: await readFile(path), thumb: null };
	}
	return { name, kind, ...(await remakePicture(name, path)) };
}

async function requirePlace({ id: mountId }: Mount, { fieldNoteId }: FilePlace): Promise<void> {
	if (fieldNoteId === undefined) return;
	const installation = await Installation.findOne({ where: { mountId }, attributes: ['id'] });
	const where = { id: fieldNoteId, installationId: installation?.id ?? 0 };
	if (!(await FieldNote.findOne({ where, attributes: ['id'] }))) throw notThere('note', 'fieldNoteId');
}

/** Holds the mount, so that its files are counted and its picture is chosen by one at a time. */
async function holdMount(person: SignedInPerson, mountId: number, transaction: Transaction): Promise<Mount> {
	const where = { id: mountId, workshopId: person.workshopId, removedAt: null };
	const mount = await Mount.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
	if (!mount) throw notFound('mount');
	return mount;
}

async function refuseTooMany(mountId: number, transaction: Transaction): Promise<void> {
	const count = await StoredFile.count({ where: { mountId, removedAt: null }, transaction });
	if (count < MOST_FILES_OF_MOUNT) return;
	throw new AppError(
		'conflict',
		`This mount has ${MOST_FILES_OF_MOUNT} files, the most that it may have: remove one first.`
	);
}

/** Puts the contents away; what was put before something failed is taken out again. */
async function putContents(contentId: string, { full, thumb }: PreparedFile): Promise<void> {
	try {
		if (thumb) await storage().put(keyOf(contentId, 'thumb'), thumb);
		await storage().put(keyOf(contentId, 'full'), full);
	} catch (error) {
		await removeContents(contentId);
		throw error;
	}
}

export async function removeContents(contentId: string): Promise<void> {
	await storage().remove(keyOf(contentId, 'full'));
	await storage().remove(keyOf(contentId, 'thumb'));
}

/**
 * Keeps a file that was prepared: its content first, then its row, so that no row is ever without its content. A content
 * whose row did not come to be, because the application was ended in between, is cleared away later.
 */
export async function keepFile(
	person: SignedInPerson,
	mountId: number,
	prepared: PreparedFile,
	place: FilePlace = {}
): Promise<FileView> {
	allow(person, 'mounts.write');
	const contentId = newContentId();
	const { name, kind, widthPx, heightPx, full } = prepared;
	return inTransaction(async (transaction) => {
		const mount = await holdMount(person, mountId, transaction);
		await requirePlace(mount, place);
		await refuseTooMany(mountId, transaction);
		await putContents(contentId, prepared);
		const { workshopId, jobId } = mount;
		const { questionKey = null, fieldNoteId = null } = place;
		const told = { name, kind, bytes: full.byteLength, sha256: sha256(full), questionKey, fieldNoteId };
		const row = { workshopId, jobId, mountId, widthPx, heightPx, contentId, uploadedBy: person.id };
		const file = await StoredFile.create({ ...row, ...told }, { transaction });
		const subject = { type: 'mount', id: mountId };
		await recordBy(person, 'mount.file-added', subject, transaction, { fileId: file.id, ...told });
		return presentOne(file);
	}).catch(async (error: unknown) => {
		await removeContents(contentId);
		throw error;
	});
}

/** Prepares and keeps. */
export async function addFile(
	person: SignedInPerson,
	mountId: number,
	incoming: IncomingFile,
	place: FilePlace = {}
): Promise<FileView> {
	allow(person, 'mounts.write');
	await findStandingMount(person, mountId);
	return keepFile(person, mountId, await prepareFile(incoming), place);
}

/** The files of a mount as they came, without those that were removed; of one place, where one is asked for. */
export async function listMountFiles(
	person: SignedInPerson,
	mountId: number,
	place: FilePlace = {}
): Promise<FileView[]> {
	allow(person, 'jobs.read');
	const { id } = await findStandingMount(person, mountId);
	const where = { mountId: id, removedAt: null, ...place };
	return present(await StoredFile.findAll({ where, order: [['id', 'ASC']] }));
}

/** The pictures of several mounts of a job, by mount. */
export async function listMountPictures(person: SignedInPerson, jobId: number): Promise<FileView[]> {
	allow(person, 'jobs.read');
	const mounts = await Mount.findAll({
		where: { jobId, workshopId: person.workshopId, removedAt: null },
		attributes: ['id']
	});
	const where = { pictureOf: mounts.map(({ id }) => id), removedAt: null };
	return present(await StoredFile.findAll({ where }));
}

/** A file of a mount that stands; one that was removed is there only for who puts it back. */
async function findFile(
	person: SignedInPerson,
	fileId: number,
	{ removed = false, transaction }: { removed?: boolean; transaction?: Transaction } = {}
): Promise<StoredFile> {
	const where = { id: fileId, workshopId: person.workshopId };
	const file = await StoredFile.findOne({ where, ...(transaction ? { transaction } : {}) });
	if (!file || (!removed && (file.removedAt ?? null) !== null)) throw notFound('file');
	await findStandingMount(person, file.mountId, transaction).catch(() => {
		throw notFound('file');
	});
	return file;
}

export async function getFile(person: SignedInPerson, fileId: number): Promise<FileView> {
	allow(person, 'jobs.read');
	return presentOne(await findFile(person, fileId));
}

export interface FileContent {
	bytes: Buffer;
	media: 'image/jpeg' | 'application/pdf';
	/** What it is called when it is saved. */
	name: string;
	sha256: string;
	/** Never shown in a page: kept as it came. */
	isDownload: boolean;
}

/** The content of a row; for services that know already who may see it. */
export async function readStoredContent(file: StoredFile, size: FileSize): Promise<FileContent> {
	const isPhoto = file.kind === 'photo';
	const asked = isPhoto ? size : 'full';
	const bytes = await storage().read(keyOf(file.contentId, asked));
	if (!bytes) throw notFound('file');
	return {
		bytes,
		media: isPhoto ? 'image/jpeg' : 'application/pdf',
		name: isPhoto ? `photo-${file.id}.jpg` : file.name,
		sha256: sha256(bytes),
		isDownload: !isPhoto
	};
}

/** A photo as JPEG, whole or small; a document as it came, whatever size is asked for. */
export async function readFileContent(
	person: SignedInPerson,
	fileId: number,
	size: FileSize = 'full'
): Promise<FileContent> {
	allow(person, 'jobs.read');
	return readStoredContent(await findFile(person, fileId), size);
}

async function releasePicture(mountId: number, transaction: Transaction): Promise<void> {
	const lock = transaction.LOCK.UPDATE;
	const former = await StoredFile.findOne({ where: { pictureOf: mountId }, transaction, lock });
	await former?.update({ pictureOf: null }, { transaction });
}

function refuseDocument({ kind, name }: StoredFile): void {
	if (kind === 'photo') return;
	throw new AppError('conflict', `“${name}” is a document: only a photo can be the picture of the mount.`);
}

/** Changes what is said of a file, and whether it is the picture of its mount. */
export async function changeFile(
	person: SignedInPerson,
	fileId: number,
	{ version, caption, isMountPicture }: FileChange
): Promise<FileView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const found = await findFile(person, fileId);
		const { mountId } = found;
		await holdMount(person, mountId, transaction);
		const file = await findFile(person, fileId, { transaction });
		const becomes = isMountPicture === true && (file.pictureOf ?? null) === null;
		if (becomes) refuseDocument(file);
		if (becomes && file.version === version) await releasePicture(mountId, transaction);
		const changes = {
			...(caption === undefined ? {} : { caption }),
			...(isMountPicture === undefined ? {} : { pictureOf: isMountPicture ? mountId : null })
		};
		await saveVersioned(file, 'file', version, changes, transaction);
		const subject = { type: 'mount', id: mountId };
		const told = { fileId, caption, isMountPicture };
		await recordBy(person, 'mount.file-changed', subject, transaction, told);
		return presentOne(file);
	});
}

async function setRemoved(
	person: SignedInPerson,
	fileId: number,
	{ removedAt, action }: { removedAt: Date | null; action: AuditAction }
): Promise<FileView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const file = await findFile(person, fileId, { removed: removedAt === null, transaction });
		const { mountId } = file;
		await holdMount(person, mountId, transaction);
		const wasRemoved = (file.removedAt ?? null) !== null;
		if (wasRemoved === (removedAt !== null)) return presentOne(file);
		if (removedAt === null) await refuseTooMany(mountId, transaction);
		await file.update({ removedAt }, { transaction });
		await recordBy(person, action, { type: 'mount', id: mountId }, transaction, { fileId });
		return presentOne(file);
	});
}

/** Takes a file away; for some weeks it can be put back. */
export const removeFile = (person: SignedInPerson, fileId: number): Promise<FileView> =>
	setRemoved(person, fileId, { removedAt: new Date(), action: 'mount.file-removed' });

/** Puts a removed file back, its caption as it was; one that is there is left alone. */
export const restoreFile = (person: SignedInPerson, fileId: number): Promise<FileView> =>
	setRemoved(person, fileId, { removedAt: null, action: 'mount.file-restored' });
