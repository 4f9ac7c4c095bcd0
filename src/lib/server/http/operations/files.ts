import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import {
	FILE_SIZES,
	MOST_FILE_BYTES,
	fileChangeSchema,
	filePlaceSchema,
	fileSchema
} from '$lib/schemas/files';
import { defineContentOperation, defineFileOperation, defineOperation } from '../operation';

const ofMount = z.object({ mountId: idSchema });
const params = z.object({ fileId: idSchema });
const fileName = z.string().max(200).default('').meta({ description: 'Of a file that is sent as the body' });

export const fileOperations = {
	list: defineOperation({
		id: 'listFiles',
		method: 'GET',
		path: '/api/v1/mounts/[mountId]/files',
		action: 'jobs.read',
		summary: 'The photos and documents of a position; of one question or one note, where that is asked for.',
		params: ofMount,
		query: filePlaceSchema,
		answer: z.object({ rows: z.array(fileSchema) }),
		status: 200
	}),
	add: defineFileOperation({
		id: 'addFile',
		method: 'POST',
		path: '/api/v1/mounts/[mountId]/files',
		action: 'mounts.write',
		summary:
			'Takes one photo (JPEG, PNG, WebP), made anew without its metadata, or one PDF document, kept as it is.',
		params: ofMount,
		query: filePlaceSchema.extend({ fileName }),
		mostFileBytes: MOST_FILE_BYTES,
		fileMedia: ['image/jpeg', 'image/png', 'image/webp', 'application/pdf', 'application/octet-stream'],
		answer: fileSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getFile',
		method: 'GET',
		path: '/api/v1/files/[fileId]',
		action: 'jobs.read',
		summary: 'What is known of a file.',
		params,
		answer: fileSchema,
		status: 200
	}),
	content: defineContentOperation({
		id: 'getFileContent',
		method: 'GET',
		path: '/api/v1/files/[fileId]/content',
		action: 'jobs.read',
		summary: 'The photo as JPEG, whole or small, or the document as a download.',
		params,
		query: z.object({ size: z.enum(FILE_SIZES).default('full') }),
		answer: z.string().meta({ description: 'The bytes' }),
		answerMedia: ['image/jpeg', 'application/pdf'],
		status: 200
	}),
	change: defineOperation({
		id: 'changeFile',
		method: 'PATCH',
		path: '/api/v1/files/[fileId]',
		action: 'mounts.write',
		summary: 'Changes the caption, or makes a photo the picture of its position; a position has one.',
		params,
		body: fileChangeSchema,
		answer: fileSchema,
		status: 200
	}),
	remove: defineOperation({
		id: 'removeFile',
		method: 'DELETE',
		path: '/api/v1/files/[fileId]',
		action: 'mounts.write',
		summary: 'Takes a file away; for 30 days it can be put back, then it is gone for good.',
		params,
		answer: fileSchema,
		status: 200
	}),
	restore: defineOperation({
		id: 'restoreFile',
		method: 'POST',
		path: '/api/v1/files/[fileId]/restore',
		action: 'mounts.write',
		summary: 'Puts a removed file back; one that is there is left alone.',
		params,
		answer: fileSchema,
		status: 200
	})
};
