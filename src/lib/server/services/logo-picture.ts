import { fileTypeFromBuffer } from 'file-type';
import sharp from 'sharp';
import { AppError } from '../errors';

const TAKEN = new Set(['image/png', 'image/jpeg']);
const WIDEST_PX = 600;
const HIGHEST_PX = 200;
/** Less is no picture on paper: a tracking pixel, or a line. */
const LEAST_PX = 24;
/** More would be a picture that is small as a file and huge in memory. */
const MOST_PIXELS = 40_000_000;

function notALogo(message: string): AppError {
	return new AppError('invalid_input', message, [{ path: 'file', message }]);
}

export interface MadeLogo {
	png: Buffer;
	widthPx: number;
	heightPx: number;
}

async function drawLogo(bytes: Uint8Array): Promise<MadeLogo> {
	try {
		const { data, info } = await sharp(bytes, { limitInputPixels: MOST_PIXELS })
			.rotate()
			.resize({ width: WIDEST_PX, height: HIGHEST_PX, fit: 'inside', withoutEnlargement: true })
			.png({ compressionLevel: 9 })
			.toBuffer({ resolveWithObject: true });
		return { png: data, widthPx: info.width, heightPx: info.height };
	} catch {
		throw notALogo('The picture cannot be read: it is broken, or has more than 40 million pixels.');
	}
}

/** Makes a logo anew from what was sent, at most 600 × 200 px, with nothing in it but the picture. */
export async function makeLogo(bytes: Uint8Array): Promise<MadeLogo> {
	const type = await fileTypeFromBuffer(bytes);
	if (!type || !TAKEN.has(type.mime))
		throw notALogo('The logo must be a PNG or JPEG picture of at most 5 MB.');
	const made = await drawLogo(bytes);
	const { widthPx, heightPx } = made;
	if (Math.min(widthPx, heightPx) < LEAST_PX)
		throw notALogo(
			`The logo must be at least ${LEAST_PX} px wide and ${LEAST_PX} px high: this one would be ${widthPx} × ${heightPx} px.`
		);
	return made;
}
