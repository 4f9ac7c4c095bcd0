import { LEAD_ACID_CHEMISTRIES } from './lead-acid';
import { LITHIUM_CHEMISTRIES } from './lithium';
import type { Chemistry, ChemistryKey } from './types';

/** What is known of each kind of battery, one row a kind; each number says where it comes from. */
export const CHEMISTRIES: readonly Chemistry[] = [...LITHIUM_CHEMISTRIES, ...LEAD_ACID_CHEMISTRIES];

const byKey: ReadonlyMap<string, Chemistry> = new Map(CHEMISTRIES.map((row) => [row.key, row]));

/**
 * The row of one chemistry.
 *
 * @param key its name in records and in the interface
 * @returns the row
 * Validity: batteries of the 12 V class.
 * Source: each value names its own.
 * @example
 * chemistryOf('lead-acid-agm').hasBms; // false
 */
export function chemistryOf(key: ChemistryKey): Chemistry {
	const row = byKey.get(key);
	if (!row) throw new Error(`There is no chemistry "${key}" in the table.`);
	return row;
}

/** The row of that name, or null: for a name that comes from outside. */
export const findChemistry = (key: string): Chemistry | null => byKey.get(key) ?? null;
