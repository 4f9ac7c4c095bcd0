import type { FileView } from '$lib/schemas/files';
import type { PaperPhoto } from '$lib/schemas/papers';
import { preDrillLabelOf } from '$lib/schemas/pre-drill-questions';
import type { StoredFile } from '../db/models';

export function presentFile(file: StoredFile, uploadedBy: string): FileView {
	const { id, mountId, kind, caption, name, bytes, sha256, version } = file;
	return {
		...{ id, mountId, kind, caption, name, bytes, sha256, version, uploadedBy },
		questionKey: file.questionKey ?? null,
		fieldNoteId: file.fieldNoteId ?? null,
		widthPx: file.widthPx ?? null,
		heightPx: file.heightPx ?? null,
		uploadedAt: file.createdAt.toISOString(),
		isMountPicture: file.pictureOf !== null && file.pictureOf !== undefined
	};
}

/** A photo as a paper shows it: what it belongs to, then what is said of it. */
export function presentPaperPhoto(file: FileView): PaperPhoto {
	const { id, caption, isMountPicture, questionKey, fieldNoteId } = file;
	const label = preDrillLabelOf(questionKey);
	const place = [
		isMountPicture ? 'The mount' : '',
		label ? `Before drilling, ${label.toLowerCase()}` : '',
		fieldNoteId === null ? '' : 'Of a field note'
	];
	return { fileId: id, caption: [...place, caption].filter(Boolean).join(': ') };
}
