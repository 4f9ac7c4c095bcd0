/*
 * Apart from the other formats, so that only who converts carries the unit library.
 */
import { create, unitDependencies } from 'mathjs';
import type { MeasureUnit } from '../schemas/fields';
import { parseDecimal } from './parse';

const math = create({ ...unitDependencies });

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
	mph: 'mile/h',
	s: 's',
	min: 'minute',
	h: 'hour'
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
	mph: 'mph',
	s: 's',
	min: 'min',
	h: 'h',
	hr: 'h',
	hour: 'h',
	hours: 'h'
};

/** Converts between two units of one kind; throws when they are not of one kind. */
export function convertUnit(value: number, from: PeopleUnit, to: PeopleUnit): number {
	if (from === to) return value;
	return math.unit(value, UNIT_NAMES[from]).toNumber(UNIT_NAMES[to]);
}

/** "180", "180 mm" and "7 in" all answer in `unit`; null when it is no number or a unit of another kind. */
export function parseMeasure(text: string, unit: PeopleUnit | MeasureUnit): number | null {
	const match = /^(.*?\d[.,]?)\s*([^\d\s.,][^\d]*)?$/.exec(text.trim());
	const value = parseDecimal(match?.[1] ?? '');
	if (value === null) return null;
	const written = match?.[2]?.trim().toLowerCase();
	if (!written || written === unit.toLowerCase()) return value;
	const from = SPELLINGS[written];
	if (!from || !isConvertible(unit) || !areOfOneKind(from, unit)) return null;
	return Number(convertUnit(value, from, unit).toPrecision(12));
}

/** A kelvin is never converted here: a difference of 10 °F is not a temperature of 10 °F. */
function isConvertible(unit: string): unit is PeopleUnit {
	return unit in UNIT_NAMES;
}

function areOfOneKind(a: PeopleUnit, b: PeopleUnit): boolean {
	return math.unit(1, UNIT_NAMES[a]).equalBase(math.unit(1, UNIT_NAMES[b]));
}
