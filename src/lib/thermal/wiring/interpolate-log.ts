import { requireWithin } from '../correlations/require';

/** A value between the rows of a table, straight in the logarithms of both; the argument names itself when it is refused. */
export function interpolateLog(
	table: readonly (readonly [at: number, value: number])[],
	argument: Readonly<Record<string, number>>
): number {
	requireWithin(table[0]![0], table.at(-1)![0], argument);
	const [at] = Object.values(argument) as [number];
	const above = Math.max(
		1,
		table.findIndex(([row]) => row >= at)
	);
	const [low, lowValue] = table[above - 1]!;
	const [high, highValue] = table[above]!;
	if (at === low) return lowValue;
	if (at === high) return highValue;
	return lowValue * (highValue / lowValue) ** (Math.log(at / low) / Math.log(high / low));
}
