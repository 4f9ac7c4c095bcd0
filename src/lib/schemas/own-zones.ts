import { z } from 'zod';
import { writeNumber } from '../format/numbers';
import { estimateMonths } from '../thermal/weather';
import { editedSchema, idSchema, versionSchema, wholeNumber, words } from './fields';

export const ZONE_RULES = ['hottest-month', 'latitude', 'places'] as const;
export type ZoneRule = (typeof ZONE_RULES)[number];

export const ZONE_RULE_LABELS: Readonly<Record<ZoneRule, string>> = {
	'hottest-month': 'by the mean of the hottest month, °C',
	latitude: 'by latitude, ° (south is below zero)',
	places: 'by a list of places'
};

type RangeRule = Exclude<ZoneRule, 'places'>;
type Limits = readonly [least: number, most: number];
export const RANGE_LIMITS: Readonly<Record<RangeRule, Limits>> = {
	'hottest-month': [-60, 50],
	latitude: [-90, 90]
};
export const isRangeRule = (rule: unknown): rule is RangeRule =>
	typeof rule === 'string' && Object.hasOwn(RANGE_LIMITS, rule);

const sayLimits = (label: string, [least, most]: Limits): string =>
	`${label} must be a number from ${writeNumber(least)} to ${writeNumber(most)}.`;

/** One end of a range; it may stay open. */
function rangeEnd(label: string, limits: Limits) {
	const error = sayLimits(label, limits);
	const [least, most] = limits;
	const end = z.number({ error }).min(least, { error }).max(most, { error });
	return end.nullable().default(null).meta({ label });
}

export const rangeEnds = (limits: Limits) => ({
	fromValue: rangeEnd('From', limits),
	toValue: rangeEnd('To below', limits)
});

export const ownZoneFields = {
	name: words('Name of the zone', 60),
	position: wholeNumber('Place in the order', 1, 999),
	rule: z.enum(ZONE_RULES, { error: 'Choose how the zone takes its places.' }),
	...rangeEnds(RANGE_LIMITS.latitude)
};

interface Bounds {
	rule: ZoneRule;
	fromValue: number | null;
	toValue: number | null;
}
type Issues = { addIssue: (issue: { code: 'custom'; path: string[]; message: string }) => void };

/** A range has at least one end, and its ends in order. */
export function refuseOddRange({ rule, fromValue, toValue }: Bounds, { addIssue }: Issues): void {
	if (!isRangeRule(rule)) return;
	const refuse = (path: string, message: string): void => addIssue({ code: 'custom', path: [path], message });
	if (fromValue === null && toValue === null)
		refuse('fromValue', 'Give where the range begins, or where it ends.');
	if (fromValue !== null && toValue !== null && fromValue >= toValue)
		refuse('toValue', 'To below must be above from.');
}

/** The ends are within what the rule goes by. */
function refuseBeyondLimits({ rule, fromValue, toValue }: Bounds, { addIssue }: Issues): void {
	if (!isRangeRule(rule)) return;
	const limits = RANGE_LIMITS[rule];
	for (const [path, label, value] of [
		['fromValue', 'From', fromValue],
		['toValue', 'To below', toValue]
	] as const) {
		if (value !== null && (value < limits[0] || value > limits[1]))
			addIssue({ code: 'custom', path: [path], message: sayLimits(label, limits) });
	}
}

export const ownZoneInputSchema = z
	.object({ ...ownZoneFields, placeIds: z.array(idSchema).max(1_000).default([]) })
	.superRefine(refuseOddRange)
	.superRefine(refuseBeyondLimits);
export type OwnZoneInput = z.infer<typeof ownZoneInputSchema>;

export const ownZoneChangeSchema = z
	.object({ ...ownZoneFields, placeIds: z.array(idSchema).max(1_000).default([]), version: versionSchema })
	.superRefine(refuseOddRange)
	.superRefine(refuseBeyondLimits);
export type OwnZoneChange = z.infer<typeof ownZoneChangeSchema>;

export const ownZoneSchema = editedSchema.extend({
	...ownZoneFields,
	placeIds: z.array(z.number().int()),
	places: z.array(z.object({ id: z.number().int(), name: z.string() })).meta({
		description: 'The places that fall into it now'
	})
});
export type OwnZoneView = z.infer<typeof ownZoneSchema>;

/** What a rule asks of a place. */
export interface ZonedPlace {
	id: number;
	latitudeDeg: number;
	hotDayMaxC: number;
	dailyRangeK: number;
	monthlyMeanC: readonly number[] | null;
	monthlyMaxC: readonly number[] | null;
}

export type ZoneDefinition = Bounds & { id: number; placeIds: readonly number[] };

/** Mean of the hottest month: as given; else the highest of its days less half the range of the hot day. */
export function hottestMonthC(place: ZonedPlace): number {
	if (place.monthlyMeanC) return Math.max(...place.monthlyMeanC);
	const highestC = place.monthlyMaxC ?? estimateMonths(place).map(({ meanMaxC }) => meanMaxC);
	return Math.max(...highestC) - place.dailyRangeK / 2;
}

const isWithin = (value: number, { fromValue, toValue }: Bounds): boolean =>
	(fromValue === null || value >= fromValue) && (toValue === null || value < toValue);

function takes(zone: ZoneDefinition, place: ZonedPlace): boolean {
	if (zone.rule === 'places') return zone.placeIds.includes(place.id);
	return isWithin(zone.rule === 'latitude' ? place.latitudeDeg : hottestMonthC(place), zone);
}

/** The one zone that a place falls into: the first in order whose rule takes it; 0 where none does. */
export function findOwnZone(place: ZonedPlace, inOrder: readonly ZoneDefinition[]): number {
	return inOrder.find((zone) => takes(zone, place))?.id ?? 0;
}
