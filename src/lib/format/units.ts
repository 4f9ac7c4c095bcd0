/*
 * Apart from the other formats, so that only who converts carries the unit library.
 */
import { create, unitDependencies } from 'mathjs';
import { parseDecimal } from './parse';

const math = create({ unitDependencies });

/** What people write, against the unit library's own name. */
const UNIT_NAMES = {
	'°C': 'degC',
	'°F': 'degF',
	mm: 'mm',
	cm: 'cm',
	m: 'm',
	in: 'inch',
	ft: 'foot',
	kg: 'kg',
	lb: 'lb',
	t: 'tonne',
	'km/h': 'km/h',
	mph: 'mile/h'
} as const;
export type PeopleUnit = keyof typeof UNIT_NAMES;

const SPELLINGS: Record<string, PeopleUnit> = {
	c: '°C',
	'°c': '°C',
	degc: '°C',
	f: '°F',
	'°f': '°F',
	degf: '°F',
	mm: 'mm',
	cm: 'cm',
	m: 'm',
	in: 'in',
	'"': 'in',
	'″': 'in',
	inch: 'in',
	inches: 'in',
	ft: 'ft',
	kg: 'kg',
	lb: 'lb',
	lbs: 'lb',
	t: 't',
	'km/h': 'km/h',
	kmh: 'km/h',
	mph: 'mph'
};

/** Converts between two units of one kind; throws when they are not of one kind. */
export function convertUnit(value: number, from: PeopleUnit, to: PeopleUnit): number {
	if (from === to) return value;
	return math.unit(value, UNIT_NAMES[from]).toNumber(UNIT_NAMES[to]);
}

/** "180", "180 mm" and "7 in" all answer in `unit`; null when it is no number or a unit of another kind. */
export function parseMeasure(text: string, unit: PeopleUnit): number | null {
	const match = /^(.*?\d[.,]?)\s*([^\d\s.,][^\d]*)?$/.exec(text.trim());
	const value = parseDecimal(match?.[1] ?? '');
	if (value === null) return null;
	const written = match?.[2]?.trim().toLowerCase();
	if (!written) return value;
	const from = SPELLINGS[written];
	if (!from || !areOfOneKind(from, unit)) return null;
	return convertUnit(value, from, unit);
}

function areOfOneKind(a: PeopleUnit, b: PeopleUnit): boolean {
	return math.unit(1, UNIT_NAMES[a]).equalBase(math.unit(1, UNIT_NAMES[b]));
}
