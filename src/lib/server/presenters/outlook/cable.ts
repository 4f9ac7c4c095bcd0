import { formatAmps, formatNumber, formatTemperature, formatWithUnit } from '$lib/format/numbers';
import type { CableInput } from '$lib/schemas/cables';
import type { Outlook } from '$lib/schemas/outlooks';
import type { CableFindingReport, CableReport } from '$lib/schemas/outlook-reports';
import { WIRING_SOURCES, type CableCheck, type CableFinding } from '$lib/thermal/wiring';
import { joinWords } from '$lib/format/join-words';

type Source = keyof typeof WIRING_SOURCES;

/** What each check is called, when it holds and when it does not, its rule, and what that rests on. */
const CHECKS: Record<CableCheck, { label: string; rule: string; sources: Source[] }> = {
	'cable carries the current': {
		label: 'The cable carries the current',
		rule: 'Current ≤ what the table allows at 30 °C × √((insulation − air) ÷ (insulation − 30 °C)).',
		sources: ['tableAmpacityA', 'ambientFactor']
	},
	'voltage drop is accepted': {
		label: 'Little voltage is lost',
		rule: 'Current × resistance of the warm copper, there and back ≤ 4 % of 12.8 V, common practice.',
		sources: ['cableResistanceOhm']
	},
	'fuse rating is within the cable': {
		label: 'The fuse is not larger than the cable',
		rule: 'Rating of the fuse, in the cold or there ≤ what the cable may carry.',
		sources: ['overload']
	},
	'fuse opens before the cable is hurt': {
		label: 'The fuse opens before the cable is hurt',
		rule: '1.35 × rating of the fuse there ≤ 1.45 × what the cable may carry.',
		sources: ['fuseSurelyOpensA', 'overload']
	},
	'fuse holds the current': {
		label: 'The fuse holds the current for years',
		rule: 'Current ≤ 0.8 × rating of the fuse there.',
		sources: ['fuseContinuousA', 'fuseRatingAtA']
	}
};

const formatLimit = (value: number, unit: 'A' | 'V'): string =>
	formatWithUnit(value, unit, unit === 'V' ? 2 : value < 100 ? 1 : 0);

function presentFinding({ check, holds, value, limit, unit }: CableFinding): CableFindingReport {
	const { label, rule, sources } = CHECKS[check];
	const told = sources.map((key) => `${WIRING_SOURCES[key].source} (${WIRING_SOURCES[key].standing})`);
	return {
		...{ label, holds },
		value: formatLimit(value, unit),
		limit: formatLimit(limit, unit),
		source: `${rule} ${told.join('; ')}.`
	};
}

export function sayProposal({
	areaMm2,
	insulationC,
	laying,
	conductorLengthM,
	fuseRatedA
}: CableInput): string {
	return `${formatNumber(areaMm2, areaMm2 % 1 === 0 ? 0 : 1)} mm² copper with insulation for ${formatTemperature(insulationC)}, ${laying}, ${formatWithUnit(conductorLengthM, 'm', 1)} there and back, fuse ${formatAmps(fuseRatedA)}`;
}

function sayOutcome({ findings, protectsCable, opensWithoutFault }: NonNullable<Outlook['cable']>): string {
	const wrong = findings.filter(({ holds }) => !holds).map(({ check }) => CHECKS[check].label);
	if (wrong.length === 0) return 'By these figures cable and fuse suit the place.';
	const why = [
		...(protectsCable ? [] : ['this fuse does not protect this cable there']),
		...(opensWithoutFault ? ['the fuse may open although nothing is wrong'] : [])
	];
	const consequence = why.length > 0 ? `: ${joinWords(why)}` : '';
	return `${wrong.length} of ${findings.length} checks do not hold${consequence}.`;
}

const DEFERENCE =
	'The makers’ own curves for cable and fuse, local wiring rules and whoever is licensed for the work come first.';

/** The air is hotter than the formulas are for: that is the answer. */
const presentProblem = (proposal: CableInput, problem: string): CableReport => ({
	proposal: sayProposal(proposal),
	sentence:
		'Cable and fuse do not belong there: the air around the battery gets hotter than the formulas are for.',
	air: problem,
	conductor: '',
	findings: [],
	deference: DEFERENCE
});

/** A proposed cable and fuse at the hottest air around the battery. */
export function presentCable(
	{ cable, cableProblem }: Pick<Outlook, 'cable' | 'cableProblem'>,
	proposal: CableInput | undefined
): CableReport | null {
	if (!proposal) return null;
	if (cable === null) return cableProblem ? presentProblem(proposal, cableProblem) : null;
	const conductor =
		cable.conductorC === null
			? 'The air alone is warmer than the insulation may be.'
			: `With the current in it the conductor is at ${formatTemperature(cable.conductorC)}; the fuse is worth ${formatWithUnit(cable.fuseRatingThereA, 'A', 0)} there.`;
	return {
		proposal: sayProposal(proposal),
		sentence: sayOutcome(cable),
		air: `Held against ${formatTemperature(cable.airC)}, the hottest air around the battery on the planned day.`,
		conductor,
		findings: cable.findings.map(presentFinding),
		deference: DEFERENCE
	};
}
