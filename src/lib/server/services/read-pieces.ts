import { TraceReader, type TraceMapping, type TraceReading } from '$lib/thermal/traces';
import { makePace } from './slices';

export interface PiecesOptions {
	/** As the proposal says. */
	firstRowLine?: number;
	/** Hears, once a slice, how many bytes are read. */
	tell?: (bytes: number) => void;
}

/** So much of a piece is read at once: a few milliseconds' work. */
const MOUTHFUL_BYTES = 64 * 1024;

/** Reads a logger's file as it comes, in memory that does not grow with it, and lets others go first between the pieces. */
export async function readTracePieces(
	pieces: AsyncIterable<Uint8Array>,
	mapping: TraceMapping,
	{ firstRowLine, tell = () => {} }: PiecesOptions = {}
): Promise<TraceReading> {
	const reader = new TraceReader(mapping, firstRowLine === undefined ? {} : { firstRowLine });
	const breathe = makePace();
	let bytes = 0;
	for await (const piece of pieces) {
		for (let from = 0; from < piece.byteLength; from += MOUTHFUL_BYTES) {
			const mouthful = piece.subarray(from, from + MOUTHFUL_BYTES);
			reader.push(mouthful);
			bytes += mouthful.byteLength;
			tell(bytes);
			await breathe();
		}
	}
	return reader.finish();
}
