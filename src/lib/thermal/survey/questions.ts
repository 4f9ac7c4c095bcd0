import { POSITION_KINDS, type PositionKind, type SurveyAnswers, type SurveyKey } from './types';

/** One page of the survey: one matter, a few answers. */
export interface SurveyQuestion {
	id: string;
	title: string;
	/** Why we ask, in one or two sentences. */
	why: string;
	kinds: readonly PositionKind[];
	fields: readonly SurveyKey[];
	/** What "I do not know" takes, in words. */
	ifUnknown: string;
}

const INSIDE: readonly PositionKind[] = ['cabin', 'cargo-area', 'canopy-box'];
const IN_THE_OPEN: readonly PositionKind[] = ['under-bonnet', 'chassis-rail'];
const BONNET_ONLY: readonly PositionKind[] = ['under-bonnet'];

/**
 * The survey, in the order in which it is asked: seven questions under the bonnet, fewer elsewhere.
 *
 * @example
 * SURVEY_QUESTIONS.filter((question) => question.kinds.includes('under-bonnet')).length // 7
 */
export const SURVEY_QUESTIONS: readonly SurveyQuestion[] = [
	{
		id: 'place',
		title: 'How far back in the bay would it sit?',
		why: 'Air warms as it passes from the radiator to the firewall. A front corner also gets some outside air.',
		kinds: BONNET_ONLY,
		fields: ['bayPlace'],
		ifUnknown: 'By the firewall on the exhaust side, the hottest air in the bay.'
	},
	{
		id: 'exhaust',
		title: 'What does it see of the exhaust?',
		why: 'Hot pipe, manifold or turbo heats by radiation across the gap: closer, larger and squarer is hotter.',
		kinds: IN_THE_OPEN,
		fields: [
			'exhaustFacing',
			'exhaustGapMm',
			'exhaustSeenWidthMm',
			'exhaustSeenHeightMm',
			'exhaustBatterySide'
		],
		ifUnknown: 'A patch of 300 × 150 mm, square on, 150 mm away, facing a long side.'
	},
	{
		id: 'engine',
		title: 'What does it see of the engine?',
		why: 'The block stays near 95 °C for hours, and for a long time after the stop.',
		kinds: BONNET_ONLY,
		fields: ['engineFacing', 'engineGapMm', 'engineSeenWidthMm', 'engineSeenHeightMm', 'engineBatterySide'],
		ifUnknown: 'A patch of 500 × 300 mm, square on, 100 mm away, facing a long side.'
	},
	{
		id: 'bonnet',
		title: 'What is above it?',
		why: 'Sun on the bonnet comes through as heat from above when the vehicle stands.',
		kinds: BONNET_ONLY,
		fields: ['bonnetGapMm', 'bonnetLining'],
		ifUnknown: 'Bare metal, 40 mm above the battery.'
	},
	{
		id: 'cooling',
		title: 'Does air conditioning reach it?',
		why: 'A cooled space takes the worst off the drive, but not off the camp.',
		kinds: ['cabin', 'cargo-area'],
		fields: ['enclosureCooling'],
		ifUnknown: 'No cooling.'
	},
	{
		id: 'sun',
		title: 'How much sun does the space get?',
		why: 'A closed space in the sun runs well above the outside air.',
		kinds: INSIDE,
		fields: ['enclosureSun'],
		ifUnknown: 'Full sun most of the day.'
	},
	{
		id: 'box-air',
		title: 'How does air get in and out of the box?',
		why: 'Vents let the heat of the sun and of charging out again.',
		kinds: ['canopy-box'],
		fields: ['enclosureAir'],
		ifUnknown: 'Sealed against dust.'
	},
	{
		id: 'air',
		title: 'How does air move around it?',
		why: 'Moving air carries heat to and from the case. A closed corner holds what it has.',
		kinds: IN_THE_OPEN,
		fields: ['airPath'],
		ifUnknown: 'A closed corner where the air stands still.'
	},
	{
		id: 'road',
		title: 'What is below it?',
		why: 'A road in the sun is hotter than the air above it, and dark bitumen is hottest.',
		kinds: ['chassis-rail'],
		fields: ['roadHeat'],
		ifUnknown: 'Open, mostly over bitumen.'
	},
	{
		id: 'tray',
		title: 'What does it stand on?',
		why: 'Heat also comes and goes through the tray: metal lets it through, a mat holds it back.',
		kinds: ['under-bonnet', 'canopy-box', 'chassis-rail'],
		fields: ['trayMaterial', 'trayThicknessMm', 'trayLengthMm', 'trayWidthMm', 'trayMat', 'trayUnderside'],
		ifUnknown:
			'Straight on a 3 mm steel tray a little larger than the battery; under the bonnet, with bay air beneath.'
	},
	{
		id: 'shield',
		title: 'Is there a heat shield?',
		why: 'A bright surface between hot metal and the case turns most of the radiation back.',
		kinds: IN_THE_OPEN,
		fields: ['shieldKind', 'shieldPlace', 'shieldFinish', 'shieldStandOffMm'],
		ifUnknown: 'No shield; where there is one, dull and on the cool side.'
	}
];

/**
 * The questions that a position gets, in order.
 *
 * @param kind of position
 * @returns questions, each with its reason and its fields
 * Validity: every kind of position.
 * Source: our own.
 * @example
 * questionsFor('cabin').length; // 2
 */
export function questionsFor(kind: PositionKind): SurveyQuestion[] {
	return SURVEY_QUESTIONS.filter((question) => question.kinds.includes(kind));
}

/** Under the tray of a box or a rail there is no engine bay to speak of. */
const UNDERSIDE_KINDS: readonly PositionKind[] = ['under-bonnet'];

type Condition = (answers: SurveyAnswers) => boolean;
const exhaustInView: Condition = ({ exhaustFacing }) => exhaustFacing !== 'hidden';
const engineInView: Condition = ({ engineFacing }) => engineFacing !== 'hidden';
const shielded: Condition = ({ shieldKind }) =>
	shieldKind === 'reflective-wrap' || shieldKind === 'stand-off-plate';

/** Fields that only make sense after another answer. */
const CONDITIONS: Partial<Record<SurveyKey, Condition>> = {
	exhaustGapMm: exhaustInView,
	exhaustSeenWidthMm: exhaustInView,
	exhaustSeenHeightMm: exhaustInView,
	exhaustBatterySide: exhaustInView,
	engineGapMm: engineInView,
	engineSeenWidthMm: engineInView,
	engineSeenHeightMm: engineInView,
	engineBatterySide: engineInView,
	trayUnderside: ({ positionKind }) => UNDERSIDE_KINDS.includes(positionKind),
	shieldPlace: shielded,
	shieldFinish: shielded,
	shieldStandOffMm: ({ shieldKind }) => shieldKind === 'stand-off-plate'
};

const fieldsByKind = new Map<PositionKind, ReadonlySet<SurveyKey>>(
	POSITION_KINDS.map((kind) => [kind, new Set(questionsFor(kind).flatMap(({ fields }) => fields))])
);

/**
 * Whether this position, with these answers, is asked for the field at all.
 *
 * @param key of a field of the survey
 * @param answers so far
 * @returns false where the position has no such question, or another answer makes it needless
 * Validity: every field.
 * Source: our own.
 * @example
 * isAsked('exhaustGapMm', { positionKind: 'under-bonnet', exhaustFacing: 'hidden' }); // false
 */
export function isAsked(key: SurveyKey, answers: SurveyAnswers): boolean {
	const asked = fieldsByKind.get(answers.positionKind)?.has(key) ?? false;
	return asked && (CONDITIONS[key]?.(answers) ?? true);
}
