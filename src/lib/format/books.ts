import type { BookScope, BookState, Origin } from '../schemas/books';
import { POSITION_LABELS } from '../schemas/survey-step';
import { writeNumber } from './numbers';

export const BOOK_STATE_WORDS: Record<BookState, string> = {
	draft: 'draft',
	'on-trial': 'on trial',
	'in-force': 'in force',
	withdrawn: 'withdrawn'
};

export const BOOK_LAYOUT_WORDS: Record<BookScope['engineLayout'], string> = {
	any: 'Any engine',
	inline: 'Engines in line',
	vee: 'Vee engines',
	flat: 'Flat engines'
};

export const BOOK_POSITION_WORDS: Record<BookScope['positionKind'], string> = {
	any: 'Any position',
	...POSITION_LABELS
};

/** What a book is for: "Vee engines, under the bonnet". */
export function sayScope({ engineLayout, positionKind }: BookScope): string {
	const engine = BOOK_LAYOUT_WORDS[engineLayout];
	const position = BOOK_POSITION_WORDS[positionKind];
	if (engineLayout === 'any') return positionKind === 'any' ? 'Every vehicle and position' : position;
	return positionKind === 'any'
		? engine
		: `${engine}, ${position.charAt(0).toLowerCase()}${position.slice(1)}`;
}

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
