import type { FileView } from '$lib/schemas/files';
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
