import type { BookState, Origin } from '../schemas/books';
import { writeNumber } from './numbers';

export const BOOK_STATE_WORDS: Record<BookState, string> = {
	draft: 'draft',
	'on-trial': 'on trial',
	'in-force': 'in force',
	withdrawn: 'withdrawn'
};

/** The parts of the vehicle that a book's coefficients belong to, in their order. */
const GROUP_WORDS: Record<string, string> = {
	vehicle: 'Vehicle and engine power',
	engine: 'Engine and radiator',
	exhaust: 'Exhaust',
	bay: 'Engine bay',
	bonnet: 'Bonnet',
	enclosure: 'Cabin, canopy or box',
	shield: 'Heat shield',
	tray: 'Tray',
	battery: 'Battery',
	charger: 'Charger',
	climate: 'Sky'
};

export const formatGroup = (group: string): string => GROUP_WORDS[group] ?? group;

export const ORIGIN_WORDS: Record<Origin, string> = {
	published: 'published',
	judgement: 'judgement',
	fitted: 'fitted from traces'
};

/** A value with its unit; a plain number has none. */
export const formatCoefficient = (value: number, unit: string): string =>
	unit === '-' ? writeNumber(value) : `${writeNumber(value)} ${unit}`;
