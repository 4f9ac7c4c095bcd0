import sharp, { type Metadata } from 'sharp';
import { MOST_PIXELS, PHOTO_EDGE_PX, THUMB_EDGE_PX } from '$lib/schemas/files';
import { refuseFile } from './file-refusals';

/** One picture at a time on one thread, and none kept: what photos ask for in memory stays the same. */
sharp.cache(false);
sharp.concurrency(1);

/** Whether this machine's sharp was built with what HEIC needs; the usual one was not. */
export const canReadHeic = (sharp.format.heif.input.fileSuffix ?? []).includes('.heic');

const QUALITY = 82;
const THUMB_QUALITY = 74;
const PAPER = '#ffffff';

export interface Picture {
	widthPx: number;
	heightPx: number;
	/** JPEG, upright, with nothing in it but the picture. */
	full: Buffer;
	thumb: Buffer;
}

/** Only the header: a picture that is far too large must not be unpacked to learn that. */
async function readHeader(name: string, path: string): Promise<Metadata> {
	return sharp(path, { limitInputPixels: false })
		.metadata()
		.catch(() => {
			throw refuseFile(name, 'broken');
		});
}

async function shrink(input: string | Buffer, edgePx: number, quality: number) {
	return sharp(input, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
		.autoOrient()
		.resize({ width: edgePx, height: edgePx, fit: 'inside', withoutEnlargement: true })
		.flatten({ background: PAPER })
		.jpeg({ quality })
		.toBuffer({ resolveWithObject: true });
}

async function makeAnew(name: string, path: string): Promise<Picture> {
	const { width = 0, height = 0 } = await readHeader(name, path);
	if (width * height > MOST_PIXELS) throw refuseFile(name, 'pixels', width, height);
	try {
		const full = await shrink(path, PHOTO_EDGE_PX, QUALITY);
		const thumb = await shrink(full.data, THUMB_EDGE_PX, THUMB_QUALITY);
		return {
			widthPx: full.info.width,
			heightPx: full.info.height,
			full: full.data,
			thumb: thumb.data
		};
	} catch {
		throw refuseFile(name, 'broken');
	}
}

let last: Promise<unknown> = Promise.resolve();

/**
 * Makes a photo anew, upright, as JPEG: neither the place where it was taken nor anything that was hidden in it or
 * behind it goes along. One after the other, so that twenty at once need no more memory than one.
 */
export function remakePicture(name: string, path: string): Promise<Picture> {
	const mine = last.then(() => makeAnew(name, path));
	last = mine.catch(() => undefined);
	return mine;
}
