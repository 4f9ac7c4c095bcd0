import { randomUUID } from 'node:crypto';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	MOST_FILE_BYTES,
	MOST_FILES_AT_ONCE,
	readPlace,
	writePlace,
	type FilePlace
} from '$lib/schemas/files';
import { AppError } from '$lib/server/errors';
import { sha256 } from '$lib/server/hash';
import { withSentFiles, type IncomingUpload, type SentForm } from '$lib/server/http/sent-files';
import { keepOnce } from '$lib/server/http/idempotency';
import { keepFile, prepareFile } from '$lib/server/services/files';

const LIMITS = {
	mostFileBytes: MOST_FILE_BYTES,
	mostFiles: MOST_FILES_AT_ONCE,
	mostBytes: MOST_FILE_BYTES * MOST_FILES_AT_ONCE
};

/** What became of the files of one form. */
export interface Taken {
	kept: number;
	/** Why the others were not, a sentence for each. */
	refused: string[];
	place: string;
	/** A caption that was refused. */
	typed: { fileId: number; caption: string } | null;
}

async function keepOne(
	person: SignedInPerson,
	mountId: number,
	file: IncomingUpload,
	{ place, once }: { place: FilePlace; once: string }
): Promise<void> {
	const key = `photo-${sha256(JSON.stringify([mountId, place, once, file.name, file.sha256]))}`;
	await keepOnce(
		{ personId: person.id, key, request: key },
		() => prepareFile(file),
		async (prepared) => {
			const { id } = await keepFile(person, mountId, prepared, place);
			return { status: 201, body: String(id) };
		}
	);
}

/** Keeps each file by itself: one that is refused takes none of the others along. */
async function keepEach(
	person: SignedInPerson,
	mountId: number,
	{ fields, files }: SentForm
): Promise<Taken> {
	const place = readPlace(fields.get('place') ?? '');
	const once = fields.get('onceKey') ?? randomUUID();
	const taken: Taken = { kept: 0, refused: [], place: writePlace(place), typed: null };
	if (files.length === 0) taken.refused.push('No file was chosen: choose one or more.');
	for (const file of files) {
		try {
			await keepOne(person, mountId, file, { place, once });
			taken.kept += 1;
		} catch (error) {
			if (!(error instanceof AppError)) throw error;
			taken.refused.push(error.message);
		}
	}
	return taken;
}

/** Reads the files of a form, and keeps of them what can be kept. */
export const takeFiles = (person: SignedInPerson, mountId: number, request: Request): Promise<Taken> =>
	withSentFiles(request, LIMITS, (form) => keepEach(person, mountId, form));
