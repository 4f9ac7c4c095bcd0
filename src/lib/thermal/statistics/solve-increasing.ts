/**
 * Where a function that never falls reaches a value, by halving the interval until no number lies between its ends.
 *
 * @param rise the function; it must not fall between the two ends
 * @param level the value to be reached
 * @param low an end where the function is not above the level
 * @param high an end where it is not below
 * @returns the place, to the resolution of a double (at most some 1100 evaluations, usually about 60)
 * Validity: finite ends, low ≤ high.
 * Source: bisection (Press et al., Numerical Recipes, 3rd ed., section 9.1).
 * @example
 * solveIncreasing((x) => x * x, 2, 0, 2); // 1.41421356
 */
export function solveIncreasing(
	rise: (x: number) => number,
	level: number,
	low: number,
	high: number
): number {
	let [below, above] = [low, high];
	for (;;) {
		const middle = below + (above - below) / 2;
		if (middle <= below || middle >= above) return middle;
		if (rise(middle) < level) below = middle;
		else above = middle;
	}
}
