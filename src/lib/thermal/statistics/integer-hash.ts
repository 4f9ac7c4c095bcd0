/**
 * Mixes the bits of a 32-bit integer so that each bit of the answer depends on each bit of the input.
 *
 *     x ← (x ⊕ x≫16) × 0x85ebca6b,  x ← (x ⊕ x≫13) × 0xc2b2ae35,  x ⊕ x≫16      (all modulo 2³²)
 *
 * @param word any integer; its lower 32 bits count
 * @returns an integer within 0 to 2³² − 1; one to one, so that two different words never mix to the same
 * Validity: every integer that a double holds exactly. Only integer operations: the same digits on every machine.
 * Source: A. Appleby, MurmurHash3 (2011, public domain), finaliser of the 32-bit variant; constants from memory.
 * @example
 * mixBits(1); // 1364076727
 */
export function mixBits(word: number): number {
	let bits = Math.imul(word ^ (word >>> 16), 0x85ebca6b);
	bits = Math.imul(bits ^ (bits >>> 13), 0xc2b2ae35);
	return (bits ^ (bits >>> 16)) >>> 0;
}

/**
 * One 32-bit word that depends on each of several integers and on their order.
 *
 *     h ← mix(h × 31 + wordₖ)      (from h = 0x9e3779b9, modulo 2³²)
 *
 * @param words integers; of each the lower 32 bits count
 * @returns an integer within 0 to 2³² − 1
 * Validity: for choosing random numbers by address, not for keeping secrets.
 * Source: the usual polynomial chaining of hashes (Knuth, The Art of Computer Programming, vol. 3, 2nd ed., section 6.4).
 * @example
 * hashWords(7, 0) === hashWords(0, 7); // false
 */
export function hashWords(...words: readonly number[]): number {
	let hash = 0x9e3779b9;
	for (const word of words) hash = mixBits(Math.imul(hash, 31) + word);
	return hash;
}
