import { z } from 'zod';
import { idSchema, versionSchema } from './fields';
import { PRE_DRILL_KEYS } from './pre-drill-questions';

export const FILE_KINDS = ['photo', 'document'] as const;
export type FileKind = (typeof FILE_KINDS)[number];

export const FILE_SIZES = ['full', 'thumb'] as const;
export type FileSize = (typeof FILE_SIZES)[number];

/** A picture of a telephone is 3 MB to 20 MB. */
export const MOST_FILE_BYTES = 20 * 1024 * 1024;
/** Of one form without a script. */
export const MOST_FILES_AT_ONCE = 20;
export const MOST_FILES_OF_MOUNT = 100;
/** What is kept of a photo, longest edge. */
export const PHOTO_EDGE_PX = 2560;
export const THUMB_EDGE_PX = 400;
/** More than the largest sensors of telephones and cameras give, which is 108 million. */
export const MOST_PIXELS = 120_000_000;

/**
 * What a chooser of files offers; what a file really is, is looked at when it is there. Without HEIC, a telephone that
 * takes such photos hands them over as JPEG.
 */
const PHOTO_TYPES = 'image/jpeg,image/png,image/webp';
export const FILE_TYPES = `${PHOTO_TYPES},application/pdf,.pdf`;

const CAPTION_CHARS = 200;
/** Without a default: what is not sent is not changed. */
const caption = z
	.string()
	.trim()
	.max(CAPTION_CHARS, { error: `Caption must be ${CAPTION_CHARS} characters or fewer.` })
	.meta({ label: 'Caption' });

/** Where a file belongs beside its mount; with neither, to the mount itself. */
export const filePlaceSchema = z.object({
	questionKey: z.enum(PRE_DRILL_KEYS, { error: 'There is no such question before drilling.' }).optional(),
	fieldNoteId: idSchema.optional()
});
export type FilePlace = z.infer<typeof filePlaceSchema>;

/** Where files belong, as one word of a form or an address: "question:fuse", "note:7", or nothing for the mount. */
export function readPlace(text: string): FilePlace {
	const [kind, of] = text.split(':');
	const named = kind === 'question' ? { questionKey: of } : kind === 'note' ? { fieldNoteId: of } : {};
	return filePlaceSchema.safeParse(named).data ?? {};
}

export function writePlace({ questionKey, fieldNoteId }: FilePlace): string {
	if (questionKey !== undefined) return `question:${questionKey}`;
	return fieldNoteId === undefined ? '' : `note:${fieldNoteId}`;
}

export const fileSchema = z.object({
	id: z.number().int(),
	mountId: z.number().int(),
	kind: z.enum(FILE_KINDS),
	questionKey: z.string().nullable(),
	fieldNoteId: z.number().int().nullable(),
	caption: z.string(),
	name: z.string(),
	widthPx: z.number().int().nullable(),
	heightPx: z.number().int().nullable(),
	bytes: z.number().int(),
	sha256: z.string().meta({ description: 'Of what is kept' }),
	uploadedBy: z.string(),
	uploadedAt: z.iso.datetime(),
	isMountPicture: z.boolean(),
	version: versionSchema
});
export type FileView = z.infer<typeof fileSchema>;

export const fileChangeSchema = z.object({
	caption: caption.optional(),
	isMountPicture: z.boolean().optional(),
	version: versionSchema
});
export type FileChange = z.infer<typeof fileChangeSchema>;

/** Where the content of a file is, for whoever may see it. */
export const contentPath = (fileId: number, size: FileSize): string =>
	`/api/v1/files/${fileId}/content?size=${size}`;
