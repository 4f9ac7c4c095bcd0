import { refuseLarge, sayRefused, type FileRefusal } from '$lib/format/files';
import { MOST_FILE_BYTES, MOST_PIXELS } from '$lib/schemas/files';
import { AppError } from '../errors';

const TAKEN = 'Taken are photos as JPEG, PNG or WebP, and PDF documents.';
const grouped = (count: number): string => count.toLocaleString('en-GB');

/** Why a file is not taken: what it is, and what is taken instead. */
const SAYINGS = {
	empty: () => ({ is: 'has nothing in it', instead: 'Choose it again.' }),
	large: () => refuseLarge(MOST_FILE_BYTES),
	svg: () => ({ is: 'is a drawing in SVG, which can hold programs', instead: TAKEN }),
	heic: () => ({
		is: 'is a photo in HEIC, which cannot be read here',
		instead: 'Set the camera to JPEG (“most compatible”), or send it as JPEG.'
	}),
	text: () => ({ is: 'is text, whatever its name says', instead: TAKEN }),
	unknown: () => ({ is: 'is neither a photo nor a PDF document', instead: TAKEN }),
	'other-kind': (kind: string) => ({ is: `is a file of the kind ${kind.toUpperCase()}`, instead: TAKEN }),
	broken: () => ({
		is: 'breaks off or is damaged: its picture cannot be read to the end',
		instead: 'Take it again, or send it again.'
	}),
	pixels: (width: number, height: number) => ({
		is: `has ${grouped(width)} × ${grouped(height)} pixels`,
		instead: `At most ${grouped(MOST_PIXELS / 1e6)} million are taken: send it smaller.`
	}),
	'pdf-end': () => ({
		is: 'begins as a PDF document, but does not end as one',
		instead: 'Save it as PDF again, and send that.'
	})
} as const;

export type RefusalReason = keyof typeof SAYINGS;

/** The refusal of a file in words, with the file's name in them. */
export function refuseFile<R extends RefusalReason>(
	name: string,
	reason: R,
	...detail: Parameters<(typeof SAYINGS)[R]>
): AppError {
	const say = SAYINGS[reason] as (...detail: unknown[]) => FileRefusal;
	const message = sayRefused(name, say(...detail));
	const limit = reason === 'large' ? `${MOST_FILE_BYTES} bytes` : undefined;
	const code = reason === 'large' ? 'too_large' : 'invalid_input';
	return new AppError(code, message, [{ path: 'file', code: reason, message, ...(limit ? { limit } : {}) }]);
}
