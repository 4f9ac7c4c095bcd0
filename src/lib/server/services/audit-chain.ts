import { canonicalJson, sha256 } from '../hash';

/** What the first entry follows. */
export const GENESIS = '0'.repeat(64);

/** What the hash of an entry is made from: all that it says, and the hash of the one before. */
export interface Chained {
	workshopId: number;
	sequence: number;
	at: Date;
	personId: number | null;
	action: string;
	subjectType: string;
	subjectId: number;
	detail: Record<string, unknown>;
	previousHash: string;
}

export function chainHash(entry: Chained): string {
	return sha256(canonicalJson({ ...entry, at: entry.at.toISOString() }));
}
