import { z } from 'zod';
import { optionalWords } from './fields';
import {
	isRangeRule,
	ownZoneFields,
	RANGE_LIMITS,
	rangeEnds,
	refuseOddRange,
	type OwnZoneInput,
	type OwnZoneView
} from './own-zones';

/** A zone as its form has it: its places as one name a line. */
export const ownZoneFormSchema = z.object({
	...ownZoneFields,
	places: optionalWords('Places, one a line', 8_000),
	version: z.string().default('')
});
export type OwnZoneForm = z.infer<typeof ownZoneFormSchema>;

/** A box that the chosen rule does not use: whatever stands in it is nothing. */
const unusedEnd = z.string().transform(() => null) as unknown as (typeof ownZoneFields)['fromValue'];
const UNUSED_ENDS = { fromValue: unusedEnd, toValue: unusedEnd };

/** The form under the rule that was chosen in it: only the boxes of that rule are looked at, within its limits. */
export const ownZoneFormOf = (rule: unknown): typeof ownZoneFormSchema =>
	ownZoneFormSchema
		.extend(isRangeRule(rule) ? rangeEnds(RANGE_LIMITS[rule]) : UNUSED_ENDS)
		.superRefine(refuseOddRange);

export interface NamedPlace {
	id: number;
	name: string;
}

export function toOwnZoneForm(zone: OwnZoneView, places: readonly NamedPlace[]): OwnZoneForm {
	const { name, position, rule, fromValue, toValue, placeIds, version } = zone;
	const names = places.filter(({ id }) => placeIds.includes(id)).map((place) => place.name);
	return { name, position, rule, fromValue, toValue, places: names.join('\n'), version: String(version) };
}

const sameName = (a: string, b: string): boolean => a.toLowerCase() === b.toLowerCase();

/** What the form means, or the names that no place has. */
export function fromOwnZoneForm(
	{ places: lines, version: _version, ...zone }: OwnZoneForm,
	places: readonly NamedPlace[]
): { zone: OwnZoneInput } | { unknown: string[] } {
	const names = lines
		.split('\n')
		.map((line) => line.trim())
		.filter((line) => line !== '');
	const unknown = names.filter((name) => !places.some((place) => sameName(place.name, name)));
	if (zone.rule === 'places' && unknown.length > 0) return { unknown };
	const placeIds = places
		.filter((place) => names.some((name) => sameName(place.name, name)))
		.map(({ id }) => id);
	return { zone: { ...zone, placeIds } };
}
