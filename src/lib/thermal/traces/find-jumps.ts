import { MINUTE_S, minuteBins, type BinnedTrace, type ChannelBins } from './binned-trace';
import { CHANNEL_LAWS, type TraceChannel } from './channels';
import { inChannelOrder } from './findings';

/** A stretch in which a thermometer cannot have measured what it was put to: pulled off, or heated by itself. */
export interface TraceJump {
	channel: TraceChannel;
	fromS: number;
	toS: number;
	/** Furthest from the value before it, K. */
	offK: number;
	/** It never came back near to where it was: only the step is marked then. */
	stays: boolean;
}

/** So many are told; all are counted. */
export const JUMPS_TOLD = 10;
/** What comes back within this is one stretch, s; engineering judgement. */
const LONGEST_JUMP_S = 30 * MINUTE_S;
/** Over a longer silence anything may have happened, s. */
const LONGEST_SILENCE_S = 5 * MINUTE_S;

interface Minutes {
	startS: number;
	bins: ChannelBins;
	/** The fastest that the channel changes, K in a minute. */
	mostK: number;
}

/** The next minute with a value; the end where there is none. */
function nextTold({ count }: ChannelBins, from: number): number {
	let at = from;
	while (at < count.length && count[at] === 0) at++;
	return at;
}

/** The first minute from `at` on in which the channel is back near `level`; the end where it does not come back in time. */
function findReturn({ bins, mostK }: Minutes, at: number, level: number): number {
	const last = Math.min(bins.count.length, at + LONGEST_JUMP_S / MINUTE_S + 1);
	for (let next = at; next < last; next = nextTold(bins, next + 1)) {
		if (Math.abs(bins.mean[next]! - level) <= mostK / 2) return next;
	}
	return bins.count.length;
}

function furthestOff({ mean, count }: ChannelBins, from: number, to: number, level: number): number {
	let off = 0;
	for (let at = from; at < to; at++) {
		if (count[at]! > 0) off = Math.max(off, Math.abs(mean[at]! - level));
	}
	return off;
}

function findInChannel(channel: TraceChannel, minutes: Minutes): TraceJump[] {
	const { bins, startS, mostK } = minutes;
	const end = bins.count.length;
	const jumps: TraceJump[] = [];
	let before = nextTold(bins, 0);
	for (let at = nextTold(bins, before + 1); at < end; at = nextTold(bins, before + 1)) {
		const level = bins.mean[before]!;
		const apart = at - before;
		const isJump = Math.abs(bins.mean[at]! - level) > mostK * apart && apart * MINUTE_S <= LONGEST_SILENCE_S;
		if (!isJump) {
			before = at;
			continue;
		}
		const back = findReturn(minutes, at, level);
		const stays = back === end;
		const to = stays ? at + 1 : back;
		const span = { fromS: startS + at * MINUTE_S, toS: startS + to * MINUTE_S };
		jumps.push({ channel, ...span, offK: furthestOff(bins, at, to, level), stays });
		before = stays ? at : back;
	}
	return jumps;
}

/**
 * Stretches of a temperature that begin faster than the measured thing can change.
 *
 *     |T(t) − T(t − Δt)| > r Δt,   r = spikeOver/spikeWithinS of the channel, Δt whole minutes
 *
 * A stretch ends where the temperature is back to within half of a minute's limit of where it was, at most half an hour later. The
 * values stay: the mark is for somebody to look at.
 *
 * @param trace as it is kept; looked at in means of a minute
 * @returns in the order of channels and times
 * Validity: thermometers; what begins slowly is not seen.
 * Source: step test, after Zahumenský, Guidelines on Quality Control Procedures for Data from Automatic Weather Stations, WMO
 *   (2004), from memory; the limits of CHANNEL_LAWS are engineering judgement.
 */
export function findJumps(trace: BinnedTrace): TraceJump[] {
	const { startS, channels } = minuteBins(trace);
	const names = inChannelOrder(Object.keys(channels) as TraceChannel[]);
	return names.flatMap((channel) => {
		const { quantity, spikeOver, spikeWithinS } = CHANNEL_LAWS[channel];
		if (quantity !== 'temperature') return [];
		const mostK = (spikeOver * MINUTE_S) / spikeWithinS;
		return findInChannel(channel, { startS, bins: channels[channel]!, mostK });
	});
}
