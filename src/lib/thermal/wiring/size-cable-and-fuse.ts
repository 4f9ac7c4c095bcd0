import { requireNotBelow, requirePositive } from '../correlations/require';
import { ampacityA, conductorTempC, type InsulationC, type Laying } from './ampacity';
import { cableResistanceOhm } from './copper';
import { fuseContinuousA, fuseRatingAtA, fuseSurelyOpensA } from './fuse';

/** How much more than it may carry for years a cable bears for the time that its fuse takes. */
const OVERLOAD_SHARE = 1.45;

export interface CableAndFuse {
	areaMm2: number;
	insulationC: InsulationC;
	laying: Laying;
	/** Length of all conductor in the loop: there and back where both are cable, m. */
	conductorLengthM: number;
	/** Current that flows for hours, A. */
	continuousA: number;
	/** Hottest air around the cable, °C. */
	cableAirC: number;
	/** Air around the fuse, °C. */
	fuseAirC: number;
	fuseRatedA: number;
	nominalV: number;
	/** Largest drop that is accepted, share of the nominal voltage. */
	acceptedDrop: number;
}

export type CableCheck =
	| 'cable carries the current'
	| 'voltage drop is accepted'
	| 'fuse rating is within the cable'
	| 'fuse opens before the cable is hurt'
	| 'fuse holds the current';

/** One of the questions, what was found, and what it was held against. */
export interface CableFinding {
	check: CableCheck;
	holds: boolean;
	value: number;
	/** The most that the value may be, in the same unit. */
	limit: number;
	unit: 'A' | 'V';
}

export interface CableSizing {
	/** What the cable may carry for years at that air, A. */
	allowedA: number;
	/** Temperature of the conductor with the current in it, °C; null where the air alone is too warm. */
	conductorC: number | null;
	voltageDropV: number;
	/** What the fuse is worth at its air, A. */
	fuseRatingThereA: number;
	protectsCable: boolean;
	opensWithoutFault: boolean;
	findings: CableFinding[];
}

function requireProposal({ conductorLengthM, continuousA, nominalV, acceptedDrop }: CableAndFuse): void {
	requireNotBelow(0, { conductorLengthM, continuousA });
	requirePositive({ nominalV, acceptedDrop });
}

/** The temperature for the voltage drop: an overloaded conductor is taken as warm as its insulation may be. */
function findConductorC(proposal: CableAndFuse, allowedA: number): number | null {
	const { continuousA, insulationC, cableAirC } = proposal;
	if (allowedA === 0) return null;
	return conductorTempC(continuousA, allowedA, insulationC, cableAirC);
}

function listFindings(proposal: CableAndFuse, allowedA: number, voltageDropV: number): CableFinding[] {
	const { continuousA, fuseRatedA, fuseAirC, nominalV, acceptedDrop } = proposal;
	const there = fuseRatingAtA(fuseRatedA, fuseAirC);
	const finding = (check: CableCheck, value: number, limit: number, unit: 'A' | 'V'): CableFinding => ({
		check,
		holds: value <= limit,
		value,
		limit,
		unit
	});
	return [
		finding('cable carries the current', continuousA, allowedA, 'A'),
		finding('voltage drop is accepted', voltageDropV, acceptedDrop * nominalV, 'V'),
		finding('fuse rating is within the cable', Math.max(there, fuseRatedA), allowedA, 'A'),
		finding(
			'fuse opens before the cable is hurt',
			fuseSurelyOpensA(fuseRatedA, fuseAirC),
			OVERLOAD_SHARE * allowedA,
			'A'
		),
		finding('fuse holds the current', continuousA, fuseContinuousA(fuseRatedA, fuseAirC), 'A')
	];
}

/**
 * Whether a cable and a fuse that somebody proposes suit a current in warm air, and why.
 *
 *     current ≤ Iz;  I R ≤ drop;  In ≤ Iz;  1.35 In(T) ≤ 1.45 Iz;  current ≤ 0.8 In(T)
 *
 * The fuse's rating is held against the cable as printed or as it is at its air, whichever is greater: a fuse in the cold lets
 * more through than its number says.
 *
 * @param proposal section, insulation, laying, length, current, air at cable and fuse, fuse, voltage, accepted drop
 * @returns allowed current, temperature, drop, the fuse's worth there, and each finding with its value and limit
 * @throws EngineInputError when a figure is outside what it can be (see the functions used)
 * Validity: as ampacityA, cableResistanceOhm and the functions of fuses; a loop of two conductors, steady current.
 * Source: IEC 60364-4-43, 433.1 (In ≤ Iz, I2 ≤ 1.45 Iz); the others as in the functions used.
 * @example
 * const proposal = { areaMm2: 16, insulationC: 90, laying: 'in a tube', conductorLengthM: 8, continuousA: 40,
 *   cableAirC: 60, fuseAirC: 50, fuseRatedA: 60, nominalV: 12.8, acceptedDrop: 0.04 };
 * sizeCableAndFuse(proposal).allowedA; // 70.71
 */
export function sizeCableAndFuse(proposal: CableAndFuse): CableSizing {
	requireProposal(proposal);
	const { areaMm2, insulationC, laying, cableAirC, conductorLengthM, continuousA } = proposal;
	const allowedA = ampacityA(areaMm2, insulationC, laying, cableAirC);
	const conductorC = findConductorC(proposal, allowedA);
	const dropC = Math.min(conductorC ?? insulationC, insulationC);
	const voltageDropV = continuousA * cableResistanceOhm(areaMm2, conductorLengthM, dropC);
	const findings = listFindings(proposal, allowedA, voltageDropV);
	const holds = (check: CableCheck): boolean => findings.some((one) => one.check === check && one.holds);
	return {
		allowedA,
		conductorC,
		voltageDropV,
		fuseRatingThereA: fuseRatingAtA(proposal.fuseRatedA, proposal.fuseAirC),
		protectsCable: holds('fuse rating is within the cable') && holds('fuse opens before the cable is hurt'),
		opensWithoutFault: !holds('fuse holds the current'),
		findings
	};
}
