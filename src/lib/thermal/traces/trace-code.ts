import {
	BIN_STEPS_S,
	channelsOf,
	emptyBins,
	MINUTE_S,
	MOST_BINS,
	type BinnedTrace,
	type ChannelBins
} from './binned-trace';
import { TRACE_CHANNELS, type TraceChannel } from './channels';
import { checksumOf } from './checksum';
import { TIME_BASES } from './time-reader';
import { faultOfWhole } from './trace-error';

/**
 * The bytes of a kept trace, little-endian:
 *
 *     "SOAK" · version (16) · length of the head (16) · checksum of all that follows (32) · head as JSON in UTF-8 · channels
 *     channel: values per bin (16 each) · then for each bin with values the mean (float 32), and with more than one min and max
 */
const MARK = 'SOAK';
const VERSION = 1;
const PREFIX_BYTES = 12;
const COUNT_BYTES = 2;
const NUMBER_BYTES = 4;
const MOST_IN_A_BIN = 65_535;

interface Head {
	timeBase: BinnedTrace['timeBase'];
	timeZone: string | null;
	startS: number;
	stepS: number;
	binCount: number;
	channels: TraceChannel[];
}

const refuse = (value: string, limit: string): never => {
	throw faultOfWhole('wrong_code', value, limit);
};

const numbersOf = (count: number): number => (count === 0 ? 0 : count === 1 ? 1 : 3);

function bytesOf({ count }: ChannelBins): number {
	return count.reduce((sum, values) => sum + NUMBER_BYTES * numbersOf(values), count.length * COUNT_BYTES);
}

function writeBins(view: DataView, from: number, bins: ChannelBins): number {
	let at = from;
	const put = (value: number) => {
		view.setFloat32(at, value, true);
		at += NUMBER_BYTES;
	};
	for (const values of bins.count) {
		view.setUint16(at, Math.min(values, MOST_IN_A_BIN), true);
		at += COUNT_BYTES;
	}
	bins.count.forEach((values, bin) => {
		if (values > 0) put(bins.mean[bin]!);
		if (values > 1) [bins.min[bin]!, bins.max[bin]!].forEach(put);
	});
	return at;
}

/**
 * A kept trace as bytes, for keeping as one content.
 *
 * @param trace as TraceReader gives it
 * @returns its bytes; decodeTrace makes the same trace of them, to the last bit
 * Validity: up to 65,535 values a bin count in full, more count as that; about 6 bytes a bin with one value, 14 with more.
 * Source: layout of this engine, version 1.
 * @example
 * const channels = { cellC: { count: [1], mean: [20], min: [20], max: [20] } };
 * const trace = { timeBase: 'elapsed', timeZone: null, startS: 0, stepS: 60, binCount: 1, channels };
 * decodeTrace(encodeTrace(trace)).channels.cellC.mean[0]; // 20
 */
export function encodeTrace(trace: BinnedTrace): ArrayBuffer {
	const { timeBase, timeZone, startS, stepS, binCount } = trace;
	const channels = channelsOf(trace);
	const head: Head = { timeBase, timeZone, startS, stepS, binCount, channels };
	const headBytes = new TextEncoder().encode(JSON.stringify(head));
	const size = channels.reduce((sum, channel) => sum + bytesOf(trace.channels[channel]!), 0);
	const bytes = new Uint8Array(PREFIX_BYTES + headBytes.length + size);
	const view = new DataView(bytes.buffer);
	bytes.set(new TextEncoder().encode(MARK));
	view.setUint16(4, VERSION, true);
	view.setUint16(6, headBytes.length, true);
	bytes.set(headBytes, PREFIX_BYTES);
	let at = PREFIX_BYTES + headBytes.length;
	for (const channel of channels) at = writeBins(view, at, trace.channels[channel]!);
	view.setUint32(8, checksumOf(bytes.subarray(PREFIX_BYTES)), true);
	return bytes.buffer;
}

function isHead(head: Partial<Head> | null): head is Head {
	if (head === null || typeof head !== 'object') return false;
	const { timeBase, timeZone, startS, stepS, binCount, channels } = head;
	const knowsTime = TIME_BASES.some((base) => base === timeBase) && Number.isInteger(startS! / MINUTE_S);
	const knowsBins = BIN_STEPS_S.some((step) => step === stepS) && Number.isInteger(binCount);
	const inRange = binCount! >= 1 && binCount! <= MOST_BINS;
	const knowsZone = timeZone === null || typeof timeZone === 'string';
	return knowsTime && knowsBins && inRange && knowsZone && knowsChannels(channels);
}

function knowsChannels(channels: unknown): boolean {
	if (!Array.isArray(channels) || channels.length === 0) return false;
	return channels.every(
		(channel, at) => TRACE_CHANNELS.includes(channel) && channels.indexOf(channel) === at
	);
}

function readHead(bytes: Uint8Array, view: DataView): { head: Head; end: number } {
	if (bytes.length < PREFIX_BYTES) refuse(`${bytes.length} bytes`, `at least ${PREFIX_BYTES} bytes`);
	const mark = String.fromCharCode(...bytes.subarray(0, MARK.length));
	if (mark !== MARK) refuse(mark, `${MARK} at the beginning`);
	const version = view.getUint16(4, true);
	if (version !== VERSION) refuse(`version ${version}`, `version ${VERSION}`);
	const end = PREFIX_BYTES + view.getUint16(6, true);
	const isWhole = end <= bytes.length && checksumOf(bytes.subarray(PREFIX_BYTES)) === view.getUint32(8, true);
	if (!isWhole) refuse('a damaged copy', 'bytes whose checksum is right');
	return { head: parseHead(bytes.subarray(PREFIX_BYTES, end)), end };
}

function parseHead(bytes: Uint8Array): Head {
	let head: Partial<Head> | null = null;
	try {
		head = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)) as Partial<Head>;
	} catch {
		refuse('a head that cannot be read', 'a head as JSON');
	}
	return isHead(head) ? head : refuse('a head that cannot be', 'time, bins and channels of a trace');
}

function readBins(view: DataView, from: number, binCount: number): { bins: ChannelBins; end: number } {
	const bins = emptyBins(binCount);
	let at = from + binCount * COUNT_BYTES;
	if (at > view.byteLength) refuse('too few bytes', 'all bins of each channel');
	const take = (): number => {
		if (at + NUMBER_BYTES > view.byteLength) refuse('too few bytes', 'all bins of each channel');
		at += NUMBER_BYTES;
		return view.getFloat32(at - NUMBER_BYTES, true);
	};
	for (let bin = 0; bin < binCount; bin++) {
		const count = view.getUint16(from + bin * COUNT_BYTES, true);
		bins.count[bin] = count;
		if (count === 0) continue;
		bins.mean[bin] = take();
		bins.min[bin] = count === 1 ? bins.mean[bin]! : take();
		bins.max[bin] = count === 1 ? bins.mean[bin]! : take();
	}
	return { bins, end: at };
}

/**
 * The trace that encodeTrace made bytes of.
 *
 * @param code its bytes
 * @returns the same trace, to the last bit
 * @throws TraceError wrong_code for bytes of something else, of another version, cut short or damaged
 * Validity: version 1.
 * Source: layout of this engine, version 1.
 * @example
 * const channels = { cellC: { count: [2], mean: [20], min: [19], max: [21] } };
 * const trace = { timeBase: 'elapsed', timeZone: null, startS: 0, stepS: 60, binCount: 1, channels };
 * decodeTrace(encodeTrace(trace)).channels.cellC.max[0]; // 21
 */
export function decodeTrace(code: ArrayBuffer): BinnedTrace {
	const bytes = new Uint8Array(code);
	const view = new DataView(code);
	const { head, end } = readHead(bytes, view);
	const { channels, ...rest } = head;
	let at = end;
	const read = channels.map((channel) => {
		const { bins, end: next } = readBins(view, at, head.binCount);
		at = next;
		return [channel, bins] as const;
	});
	if (at !== bytes.length) refuse('more bytes', 'nothing behind the last channel');
	return { ...rest, channels: Object.fromEntries(read) };
}
