import { formatTemperature } from '$lib/format/numbers';
import { hasBms } from '$lib/schemas/batteries';
import type { SheetDots } from '$lib/schemas/sheets';
import type { DaySpread } from '$lib/thermal/outlook';
import { sampleQuantile } from '$lib/thermal/statistics';

function sayBeyond(beyond: number, total: number, happens: string): string {
	if (beyond === 0) return `On none of these ${total} ${happens}; that is seldom, not never.`;
	const which = beyond === total ? `all ${total}` : `${beyond} of ${total}`;
	return `On ${which} ${happens}: the filled dots.`;
}

/** Fifty equally likely days against the limit; nothing where an estimate from before has none. */
export function writeSheetDots({ hottest }: Pick<DaySpread, 'hottest'>, chemistry: string): SheetDots | null {
	if (!hottest) return null;
	const { daysC, limitC } = hottest;
	const isSwitchedOff = hasBms(chemistry);
	const happens = isSwitchedOff
		? 'the battery gets hot enough to switch itself off'
		: 'the battery gets hotter than its maker allows';
	const beyond = daysC.filter((tempC) => tempC >= limitC).length;
	const at = (share: number): string => formatTemperature(sampleQuantile(daysC, share));
	return {
		...{ daysC, limitC },
		limitWords: isSwitchedOff ? 'switches itself off' : 'more than its maker allows',
		sentence: `Nobody knows each thing exactly. Each dot is one of ${daysC.length} days like this, as likely as any other. ${sayBeyond(beyond, daysC.length, happens)}`,
		figures: [
			{ label: 'One day in ten stays below', value: at(0.1) },
			{ label: 'Half of the days stay below', value: at(0.5) },
			{ label: 'One day in ten gets above', value: at(0.9) }
		]
	};
}
