import { formatKelvin, formatTemperature } from '$lib/format/numbers';
import { formatHours } from '$lib/format/time';
import type { EnvelopeReport } from '$lib/schemas/outlook-reports';
import type { EnvelopePoint, SafeEnvelope } from '$lib/thermal/outlook';

type Limit = Pick<EnvelopePoint, 'lowC' | 'middleC' | 'highC'>;

const between = (a: number | null, b: number | null, part: number): number | null =>
	a === null || b === null ? null : a + (b - a) * part;

/** The limit for so much driving: by a straight line between the lengths that were tried, held at both ends. */
export function limitAt(points: readonly EnvelopePoint[], driveHours: number): Limit | null {
	const after = points.findIndex((point) => point.driveHours >= driveHours);
	const b = points.at(after);
	const a = after > 0 ? points[after - 1] : b;
	if (!a || !b) return null;
	const run = b.driveHours - a.driveHours;
	const part = after <= 0 || run === 0 ? 1 : (driveHours - a.driveHours) / run;
	return {
		lowC: between(a.lowC, b.lowC, part),
		middleC: between(a.middleC, b.middleC, part),
		highC: between(a.highC, b.highC, part)
	};
}

function sayLimit(limitC: number | null, [coolestC, hottestC]: SafeEnvelope['triedC']): string {
	if (limitC === null) return `below ${formatTemperature(coolestC)}`;
	return limitC >= hottestC ? `${formatTemperature(hottestC)} or more` : `about ${formatTemperature(limitC)}`;
}

function sayRange({ lowC, highC }: Limit, [coolestC, hottestC]: SafeEnvelope['triedC']): string {
	const low = lowC === null ? `below ${formatTemperature(coolestC)}` : formatTemperature(lowC);
	if (highC === null) return low;
	const high = highC >= hottestC ? `${formatTemperature(hottestC)} or more` : formatTemperature(highC);
	return low === high ? low : `${low} to ${high}`;
}

function sayPlanned({ points, plannedHours, plannedMaxC, triedC }: SafeEnvelope): string {
	const limit = limitAt(points, plannedHours);
	if (limit === null) return 'The plan has no driving, so there is no length of drive to try.';
	const { middleC } = limit;
	const driving = formatHours(plannedHours);
	const planned = `The planned day has ${formatTemperature(plannedMaxC)}`;
	if (middleC === null) {
		return `With ${driving} of driving even a day of ${formatTemperature(triedC[0])}, the coolest that was tried, is too hot to ride out. ${planned}.`;
	}
	const apartK = plannedMaxC - middleC;
	const where =
		middleC >= triedC[1] ? '' : `, ${formatKelvin(Math.abs(apartK), 0)} ${apartK > 0 ? 'above' : 'below'} it`;
	return `With ${driving} of driving it rides out, not even close and charging as it should, days of up to ${sayLimit(middleC, triedC)} (${sayRange(limit, triedC)}). ${planned}${where}.`;
}

/** How hot a day and how long a drive the mount bears. */
export function presentEnvelope(envelope: SafeEnvelope): EnvelopeReport {
	const { points, triedC, plannedHours, plannedMaxC, samples, seed } = envelope;
	return {
		sentence: sayPlanned(envelope),
		rows: points.map((point) => ({
			drive: formatHours(point.driveHours),
			limit: sayLimit(point.middleC, triedC),
			range: sayRange(point, triedC)
		})),
		picture:
			points.length === 0
				? null
				: { triedC, points, planned: { driveHours: plannedHours, maxC: plannedMaxC } },
		method: `The planned day with its driving made shorter or longer, its stops as they are. The band holds eight of ten mounts, from ${samples} drawn with the seed ${seed} for each length. Days from ${formatTemperature(triedC[0])} to ${formatTemperature(triedC[1])} were tried.`
	};
}
