const POLYNOMIAL = 0xedb88320;
const TABLE = Uint32Array.from({ length: 256 }, (_, byte) => {
	let word = byte;
	for (let bit = 0; bit < 8; bit++) word = word & 1 ? (word >>> 1) ^ POLYNOMIAL : word >>> 1;
	return word >>> 0;
});

/**
 * The cyclic redundancy check of some bytes, by which a damaged copy is found.
 *
 * @param bytes any number of bytes
 * @returns an integer within 0 to 2³² − 1
 * Validity: finds every single run of up to 32 wrong bits; no protection against intent.
 * Source: CRC-32 of ISO 3309, as given with its table in RFC 1952 (1996), section 8.
 * @example
 * checksumOf(new TextEncoder().encode('123456789')); // 3421780262
 */
export function checksumOf(bytes: Uint8Array): number {
	let word = 0xffffffff;
	for (const byte of bytes) word = TABLE[(word ^ byte) & 0xff]! ^ (word >>> 8);
	return (word ^ 0xffffffff) >>> 0;
}
