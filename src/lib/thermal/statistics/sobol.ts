import { hashWords, mixBits } from './integer-hash';
import { requireWhole } from './require-whole';
import { JOE_KUO_ROWS } from './sobol-directions';

const BITS = 32;
const TWO_TO_32 = 2 ** BITS;

/** The 32 direction numbers of one dimension from its line of the table, each shifted to the top of 32 bits. */
function readDirections(row: string): Uint32Array {
	const [polynomial = 0, ...odd] = row.split(' ').map(Number);
	const degree = odd.length;
	const directions = new Uint32Array(BITS);
	for (let k = 0; k < BITS; k++) {
		if (k < degree) {
			directions[k] = odd[k]! << (BITS - 1 - k);
			continue;
		}
		const oldest = directions[k - degree]!;
		let direction = oldest ^ (oldest >>> degree);
		for (let back = 1; back < degree; back++) {
			if ((polynomial >>> (degree - 1 - back)) & 1) direction ^= directions[k - back]!;
		}
		directions[k] = direction;
	}
	return directions;
}

/** The first dimension is van der Corput's: its direction numbers are the powers of one half. */
const FIRST_DIMENSION = Uint32Array.from({ length: BITS }, (_, k) => 2 ** (BITS - 1 - k));
const DIRECTIONS = [FIRST_DIMENSION, ...JOE_KUO_ROWS.trim().split('\n').map(readDirections)];

/** As many dimensions as there are direction numbers for. */
export const SOBOL_DIMENSIONS = DIRECTIONS.length;

function requirePlace(index: number, dimension: number): void {
	requireWhole(0, TWO_TO_32 - 1, { index });
	requireWhole(0, SOBOL_DIMENSIONS - 1, { dimension });
}

/** The coordinate as a 32-bit integer: the direction numbers of the Gray code of the index, added without carry. */
function sobolBits(index: number, dimension: number): number {
	const directions = DIRECTIONS[dimension]!;
	let gray = (index ^ (index >>> 1)) >>> 0;
	let bits = 0;
	for (let k = 0; gray !== 0; k++, gray >>>= 1) {
		if (gray & 1) bits ^= directions[k]!;
	}
	return bits >>> 0;
}

/**
 * One coordinate of a point of Sobol's sequence.
 *
 *     x = v₁ g₁ ⊕ v₂ g₂ ⊕ …      (g: binary digits of the Gray code of the index, v: direction numbers)
 *
 * @param index which point, from 0 (whose coordinates are all 0)
 * @param dimension which coordinate, from 0
 * @returns a multiple of 2⁻³², at least 0 and below 1
 * @throws EngineInputError when the index is not a whole number below 2³², or the dimension not one below SOBOL_DIMENSIONS
 * Validity: use whole powers of two of points from the start; part of a power loses the evenness.
 * Source: Joe and Kuo, SIAM J. Sci. Comput. 30 (2008) 2635; order of Antonov and Saleev (1979).
 * @example
 * sobolCoordinate(2, 1); // 0.25
 */
export function sobolCoordinate(index: number, dimension: number): number {
	requirePlace(index, dimension);
	return sobolBits(index, dimension) / TWO_TO_32;
}

/**
 * Turns binary digits over at random, each by a choice that depends on all digits above it.
 *
 *     digitₖ ← digitₖ ⊕ hash(seed, dimension, digits above k)
 *
 * Whatever part of an axis held just one point still does, so that the evenness stays.
 */
function scrambleBits(bits: number, key: number): number {
	let flips = 0;
	for (let k = 0; k < BITS; k++) {
		// The node of the binary tree that leads to this digit: a leading 1, then the digits above.
		const node = k === 0 ? 1 : ((1 << k) | (bits >>> (BITS - k))) >>> 0;
		const flip = mixBits(mixBits(node ^ key) + key) & 1;
		flips |= flip << (BITS - 1 - k);
	}
	return (bits ^ flips) >>> 0;
}

/**
 * One coordinate of a point of Sobol's sequence, scrambled at random as Owen does it.
 *
 *     x = (scrambled digits + ½) · 2⁻³²
 *
 * @param index which point, from 0
 * @param dimension which coordinate, from 0
 * @param seed any whole number below 2³²; another seed gives another, independent scrambling
 * @returns above 0 and below 1, never either of them
 * @throws EngineInputError when an argument is not a whole number within its limit
 * Validity: as sobolCoordinate. Only integer operations and one division by a power of two: the same digits everywhere.
 * Source: Owen, Randomly permuted (t,m,s)-nets and (t,s)-sequences, in Monte Carlo and Quasi-Monte Carlo Methods (1995) 299.
 * @example
 * scrambledSobolCoordinate(0, 0, 1) === scrambledSobolCoordinate(0, 0, 2); // false
 */
export function scrambledSobolCoordinate(index: number, dimension: number, seed: number): number {
	requirePlace(index, dimension);
	requireWhole(0, TWO_TO_32 - 1, { seed });
	return scrambledAt(index, dimension, seed);
}

function scrambledAt(index: number, dimension: number, seed: number): number {
	const bits = scrambleBits(sobolBits(index, dimension), hashWords(seed, dimension));
	return (bits + 0.5) / TWO_TO_32;
}

/**
 * One point of Sobol's sequence.
 *
 * @param index which point, from 0
 * @param dimensions how many coordinates
 * @returns as many coordinates, each at least 0 and below 1
 * @throws EngineInputError when the index is not a whole number below 2³², or there are no direction numbers for so many
 * Validity, Source: as sobolCoordinate.
 * @example
 * sobolPoint(5, 3); // [0.875, 0.875, 0.125]
 */
export function sobolPoint(index: number, dimensions: number): number[] {
	requireWhole(0, SOBOL_DIMENSIONS, { dimensions });
	return Array.from({ length: dimensions }, (_, dimension) => sobolCoordinate(index, dimension));
}

/**
 * One point of Sobol's sequence, scrambled by a seed.
 *
 * @param index which point, from 0
 * @param dimensions how many coordinates
 * @param seed any whole number below 2³²
 * @returns as many coordinates, each above 0 and below 1
 * @throws EngineInputError when an argument is not a whole number within its limit
 * Validity, Source: as scrambledSobolCoordinate.
 * @example
 * scrambledSobolPoint(0, 3, 7).length; // 3
 */
export function scrambledSobolPoint(index: number, dimensions: number, seed: number): number[] {
	requireWhole(0, SOBOL_DIMENSIONS, { dimensions });
	requireWhole(0, TWO_TO_32 - 1, { index, seed });
	return Array.from({ length: dimensions }, (_, dimension) => scrambledAt(index, dimension, seed));
}
