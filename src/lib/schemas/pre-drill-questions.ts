import { chemistryOf, findGasNeeds, type ChemistryKey } from '../thermal/chemistries';
import { listSurveyLines } from '../format/survey-lines';
import { questionsFor } from '../thermal/survey';
import type { PositionKind, SurveyAnswers } from '../thermal/survey/types';
import type { UnderBonnetWord } from './batteries';

/** What the questions before drilling depend on. */
export interface PreDrillCase {
	positionKind: PositionKind;
	chemistry: ChemistryKey;
	capacityAh: number;
	underBonnet: UnderBonnetWord;
	underBonnetWords: string;
	survey: SurveyAnswers;
}

export interface PreDrillQuestion {
	key: string;
	/** The matter in a word or two, for lists and prints. */
	label: string;
	question: string;
	/** Why it is asked, and where it is from. */
	reason: string;
	/** A photo says more than the answer here. */
	photo: boolean;
	/** Words of the maker that it is about: an answer holds for these and no others. */
	quote: string | null;
	/** What the survey says that bears on it. */
	beside: { label: string; value: string }[];
}

interface QuestionRow {
	key: string;
	label: string;
	question: string | ((of: PreDrillCase) => string);
	reason: string | ((of: PreDrillCase) => string);
	photo: boolean;
	quote?: (of: PreDrillCase) => string;
	/** The questions of the survey that bear on it. */
	surveyed?: readonly string[];
	/** Where it is not asked everywhere. */
	isAsked?: (of: PreDrillCase) => boolean;
}

/** What gets at a battery in each position, as a code of IEC 60529: dust 5, water 5 to 7. Judgement, no source. */
const PROTECTION: Readonly<Record<PositionKind, { code: string; because: string }>> = {
	'under-bonnet': { code: 'IP65', because: 'dust from the road, and a hose when the bay is washed' },
	'chassis-rail': { code: 'IP67', because: 'water of a crossing, stones and mud' },
	'canopy-box': { code: 'IP54', because: 'dust that the seals let in, and splashes' },
	'cargo-area': { code: 'IP20', because: 'things that fall on the terminals' },
	cabin: { code: 'IP20', because: 'hands, feet and things that fall on the terminals' }
};

const isInside = ({ positionKind }: PreDrillCase): boolean =>
	positionKind === 'cabin' || positionKind === 'cargo-area';
const gasOf = ({ chemistry, capacityAh }: PreDrillCase) => findGasNeeds(chemistry, capacityAh);
const isLithium = ({ chemistry }: PreDrillCase): boolean => chemistryOf(chemistry).family === 'lithium';

const hasCondition = ({ positionKind, underBonnet, underBonnetWords }: PreDrillCase): boolean =>
	positionKind === 'under-bonnet' && underBonnet === 'conditional' && underBonnetWords !== '';

function askForAir(of: PreDrillCase): string {
	const { openingCm2 = 0, sparkFreeMm = 0 } = gasOf(of) ?? {};
	const round = (value: number): number => Math.ceil(value);
	return `Are there two openings to outside air, one low and one high, each of ${round(openingCm2)} cm² or more, and does nothing spark or glow within ${round(sparkFreeMm)} mm of the vents?`;
}

function explainAir(of: PreDrillCase): string {
	const { freshAirM3PerH = 0 } = gasOf(of) ?? {};
	return `Charging sets hydrogen free; ${freshAirM3PerH.toFixed(2)} m³/h of fresh air keep it below its limit. IEC 62485-2:2010, 7.2: Q = 0.05 n I C/1000, opening 28 Q.`;
}

/**
 * What is asked before a hole is drilled, in the order in which one would look. Reasons without a source are common
 * practice.
 */
const ROWS: readonly QuestionRow[] = [
	{
		key: 'makerCondition',
		label: 'The maker’s condition',
		question: ({ underBonnetWords }) => `Is the maker’s condition kept here: “${underBonnetWords}”?`,
		reason:
			'The battery’s maker allows it under the bonnet on this condition alone. Hold it against what you see; what the survey says of the heat stands below.',
		photo: true,
		quote: ({ underBonnetWords }) => underBonnetWords,
		surveyed: ['exhaust', 'engine', 'air', 'shield'],
		isAsked: hasCondition
	},
	{
		key: 'behindPanel',
		label: 'What lies behind',
		question: 'Have you looked or felt behind every place that will be drilled, and is nothing there?',
		reason:
			'Wiring, brake and fuel lines, air-bag modules and their looms run where holes are drilled. Common practice, no source.',
		photo: true
	},
	{
		key: 'clearance',
		label: 'Clearances',
		question: 'With the bonnet or lid shut and the engine rocked, are all gaps still what the survey says?',
		reason:
			'The estimate holds for the gaps that were measured; engines move on their mounts. Common practice, no source.',
		photo: true,
		isAsked: (of) => !isInside(of)
	},
	{
		key: 'holdDown',
		label: 'Hold-down',
		question:
			'Is the battery held on all sides and from above, by its case and not by its terminals, to metal and not to sheet alone?',
		reason:
			'In a crash a battery of 25 kg pulls with many times its weight. Common practice, no source; the maker’s drawing comes first.',
		photo: true
	},
	{
		key: 'vibration',
		label: 'Vibration',
		question:
			'Does the maker allow the battery this way up and on a vehicle, and is nothing of it mounted on the engine?',
		reason:
			'Cells and boards for standing use break on corrugated roads; the way up is in the data sheet. Common practice, no source.',
		photo: false
	},
	{
		key: 'water',
		label: 'Water and dust',
		question: ({ positionKind }) =>
			`Is the battery, or the box around it, protected to ${PROTECTION[positionKind].code} or better?`,
		reason: ({ positionKind }) =>
			`What gets there: ${PROTECTION[positionKind].because}. Codes as in IEC 60529; which one is asked for is engineering judgement.`,
		photo: false
	},
	{
		key: 'cableRun',
		label: 'Cable run',
		question:
			'Is the way of the cable clear of exhaust, edges, steering and moving parts, with a grommet at each panel, and its size the one proposed?',
		reason:
			'A cable that chafes through is short-circuited before any fuse at the other end. Common practice, no source.',
		photo: true
	},
	{
		key: 'fuse',
		label: 'Fuse',
		question:
			'Is there a fuse at each end that can feed the cable, next to the battery it protects from, out of the spray and reachable?',
		reason:
			'Both batteries feed a short circuit between them. Fuse at the source; common practice, no source; wiring rules for recreational vehicles come first.',
		photo: true
	},
	{
		key: 'torque',
		label: 'Terminals',
		question: 'Do you have the maker’s torque for the terminals, a wrench for it, and covers for both poles?',
		reason: 'A loose joint grows hot and looks like a battery that cuts out. The value is in the data sheet.',
		photo: false
	},
	{
		key: 'air',
		label: 'Air against gas',
		question: askForAir,
		reason: explainAir,
		photo: true,
		isAsked: (of) => gasOf(of) !== null
	},
	{
		key: 'failingCell',
		label: 'A failing cell',
		question:
			'If a cell fails, can its gas get out without passing people, and can the battery be reached to be cut off?',
		reason:
			'A failing lithium cell gives off gas that is toxic and burns. Common practice, no source; the maker’s instructions come first.',
		photo: false,
		isAsked: (of) => isLithium(of) && isInside(of)
	},
	{
		key: 'cutOff',
		label: 'Made dead',
		question: 'Is the starting battery disconnected, negative first, and is nothing charging while you work?',
		reason: 'A spanner across a battery welds. Disconnect before work.',
		photo: false
	},
	{
		key: 'label',
		label: 'Peak label',
		question: 'Will a label that turns at a temperature be stuck on the case, where it can be read later?',
		reason: 'One reading after the first hot trip narrows the estimate for this very mount.',
		photo: false
	}
];

export const PRE_DRILL_KEYS = ROWS.map(({ key }) => key);

/** The matter of a question, in a word or two; nothing for one that is no longer asked. */
export const preDrillLabelOf = (key: string | null): string =>
	ROWS.find((row) => row.key === key)?.label ?? '';

const listBeside = ({ surveyed = [] }: QuestionRow, { positionKind, survey }: PreDrillCase) =>
	questionsFor(positionKind)
		.filter(({ id }) => surveyed.includes(id))
		.flatMap((question) => listSurveyLines(question, survey));

/** The questions for a position and a battery, in order. */
export function preDrillQuestionsFor(of: PreDrillCase): PreDrillQuestion[] {
	const say = (words: QuestionRow['question']): string => (typeof words === 'string' ? words : words(of));
	return ROWS.filter(({ isAsked }) => isAsked?.(of) ?? true).map((row) => ({
		...{ key: row.key, label: row.label, photo: row.photo },
		question: say(row.question),
		reason: say(row.reason),
		quote: row.quote?.(of) ?? null,
		beside: listBeside(row, of)
	}));
}
