import type { BookState } from '../schemas/books';

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
