import {
	AIR_PATHS,
	BATTERY_SIDES,
	BAY_PLACES,
	BONNET_LININGS,
	COOLINGS,
	ENCLOSURE_AIRS,
	FACINGS,
	ROAD_HEATS,
	SHIELD_FINISHES,
	SHIELD_KINDS,
	SHIELD_PLACES,
	SUN_LOADS,
	TRAY_MATERIALS,
	TRAY_MATS,
	TRAY_UNDERSIDES,
	type SurveyKey
} from './types';

export interface SurveyChoice<T extends string = string> {
	value: T;
	label: string;
}

export interface ChoiceField<T extends string = string> {
	kind: 'choice';
	label: string;
	choices: readonly SurveyChoice<T>[];
	/** What "I do not know" takes: the cautious one. */
	assumed: T;
}

export interface LengthField {
	kind: 'length';
	label: string;
	/** What a tape measure can sensibly read there. */
	minMm: number;
	maxMm: number;
	/** What one press of the stepper adds. */
	stepMm: number;
	/** What "I do not know" takes; null: worked out from the battery. */
	assumedMm: number | null;
	/** Said where `assumedMm` is null. */
	assumedWords?: string;
}
export type SurveyField = ChoiceField | LengthField;

function choice<T extends string>(
	label: string,
	values: readonly T[],
	words: Record<T, string>,
	assumed: T
): ChoiceField<T> {
	return { kind: 'choice', label, choices: values.map((value) => ({ value, label: words[value] })), assumed };
}

function length(label: string, minMm: number, maxMm: number, stepMm: number, assumedMm: number): LengthField {
	return { kind: 'length', label, minMm, maxMm, stepMm, assumedMm };
}

const FACING_WORDS = {
	'square-on': 'Square on to the battery',
	'at-an-angle': 'At an angle',
	hidden: 'Hidden behind something'
};
const SIDE_WORDS = { 'long-side': 'A long side', end: 'An end', top: 'The top', base: 'The base' };

const WITH_TRAY_MARGIN = 'The battery with 20 mm to spare on each side.';

const CHOICES = {
	bayPlace: choice(
		'Place in the bay',
		BAY_PLACES,
		{
			'front-corner': 'Front corner, beside the radiator',
			middle: 'Half way back, along a guard',
			firewall: 'By the firewall, away from the exhaust',
			'firewall-exhaust': 'By the firewall, on the exhaust side'
		},
		'firewall-exhaust'
	),
	exhaustFacing: choice('How the exhaust faces it', FACINGS, FACING_WORDS, 'square-on'),
	exhaustBatterySide: choice('Side towards the exhaust', BATTERY_SIDES, SIDE_WORDS, 'long-side'),
	engineFacing: choice('How the engine faces it', FACINGS, FACING_WORDS, 'square-on'),
	engineBatterySide: choice('Side towards the engine', BATTERY_SIDES, SIDE_WORDS, 'long-side'),
	bonnetLining: choice(
		'Underside of the bonnet',
		BONNET_LININGS,
		{ bare: 'Bare metal', lined: 'Insulating lining' },
		'bare'
	),
	airPath: choice(
		'Air around the battery',
		AIR_PATHS,
		{
			'closed-corner': 'Closed corner, air stands still',
			'some-through-flow': 'Some air passes through',
			'in-the-airstream': 'Open to the airstream'
		},
		'closed-corner'
	),
	trayMaterial: choice(
		'Tray',
		TRAY_MATERIALS,
		{ steel: 'Steel', aluminium: 'Aluminium', plastic: 'Plastic' },
		'steel'
	),
	trayMat: choice(
		'Between battery and tray',
		TRAY_MATS,
		{ none: 'Nothing', rubber: 'Rubber mat', foam: 'Foam pad' },
		'none'
	),
	trayUnderside: choice(
		'Under the tray',
		TRAY_UNDERSIDES,
		{
			'open-air': 'Open to the outside',
			'inner-guard': 'Inner guard panel',
			'bay-air': 'Air of the engine bay'
		},
		'bay-air'
	),
	shieldKind: choice(
		'Heat shield',
		SHIELD_KINDS,
		{
			none: 'None',
			'reflective-wrap': 'Reflective wrap on the case',
			'stand-off-plate': 'Plate with a gap behind it'
		},
		'none'
	),
	shieldPlace: choice(
		'What it covers',
		SHIELD_PLACES,
		{
			'exhaust-side': 'The side towards the exhaust',
			'engine-side': 'The side towards the engine',
			'both-hot-sides': 'Both of those sides',
			'all-round': 'All four sides',
			'cool-side': 'A side that faces nothing hot'
		},
		'cool-side'
	),
	shieldFinish: choice(
		'Finish',
		SHIELD_FINISHES,
		{ bright: 'Bright, clean foil or metal', dull: 'Dull, dusty or oxidised' },
		'dull'
	),
	enclosureCooling: choice(
		'Air conditioning',
		COOLINGS,
		{ cooled: 'Runs while driving', 'not-cooled': 'None reaches it' },
		'not-cooled'
	),
	enclosureSun: choice(
		'Sun on it',
		SUN_LOADS,
		{
			shaded: 'Shaded, tinted or covered',
			'through-windows': 'Some, through windows or one side',
			'full-sun': 'Full sun most of the day'
		},
		'full-sun'
	),
	enclosureAir: choice(
		'Air exchange',
		ENCLOSURE_AIRS,
		{ sealed: 'Sealed against dust', vented: 'Vents or a fan', open: 'Open side or mesh' },
		'sealed'
	),
	roadHeat: choice(
		'What is below it',
		ROAD_HEATS,
		{
			shielded: 'A guard plate',
			'open-to-track': 'Open, mostly over dirt',
			'open-to-bitumen': 'Open, mostly over bitumen'
		},
		'open-to-bitumen'
	)
} satisfies Partial<Record<SurveyKey, ChoiceField>>;

const LENGTHS = {
	exhaustGapMm: length('Gap to the exhaust', 10, 2000, 10, 150),
	exhaustSeenWidthMm: length('Width of hot pipe in view', 10, 1500, 10, 300),
	exhaustSeenHeightMm: length('Height of hot pipe in view', 10, 1000, 10, 150),
	engineGapMm: length('Gap to the engine', 10, 2000, 10, 100),
	engineSeenWidthMm: length('Width of engine in view', 10, 1500, 10, 500),
	engineSeenHeightMm: length('Height of engine in view', 10, 1000, 10, 300),
	bonnetGapMm: length('Gap up to the bonnet', 5, 1000, 5, 40),
	trayLengthMm: {
		...length('Length of the tray', 50, 2000, 10, 0),
		assumedMm: null,
		assumedWords: WITH_TRAY_MARGIN
	},
	trayWidthMm: {
		...length('Width of the tray', 50, 1500, 10, 0),
		assumedMm: null,
		assumedWords: WITH_TRAY_MARGIN
	},
	trayThicknessMm: length('Thickness of the tray', 0.5, 30, 0.5, 3),
	shieldStandOffMm: length('Gap behind the plate', 1, 200, 1, 5)
} satisfies Partial<Record<SurveyKey, LengthField>>;

/**
 * Every field of the survey: its words, its choices or limits, and what "I do not know" takes.
 *
 * @example
 * SURVEY_FIELDS.exhaustGapMm.assumedMm // 150
 */
export const SURVEY_FIELDS = { ...CHOICES, ...LENGTHS } satisfies Record<SurveyKey, SurveyField>;
export type ChoiceKey = keyof typeof CHOICES;
export type LengthKey = keyof typeof LENGTHS;
