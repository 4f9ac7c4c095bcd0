import type { FitInput, FitInputs } from '$lib/schemas/fits';
import type { SignedInPerson } from '$lib/schemas/people';
import type { CoefficientFitInput, FitBook, TraceToFit } from '$lib/thermal/fit';
import { Assessment, type Trace } from '../db/models';
import { EngineInputError } from '$lib/thermal/correlations/require';
import { AppError } from '../errors';
import { startHourOf } from '../presenters/traces';
import { asInputError } from './input-error';
import { traceToFit } from './trace-scenario';
import { findTrace } from './traces';

/** Why a trace cannot be fitted to, in words; empty where it can. */
export function sayUnfit(trace: Trace, assessment: Assessment | null): string {
	if (trace.state !== 'read') return 'it has not been read yet';
	if (startHourOf(trace) === null) return 'nobody said at which time of day it begins';
	return assessment ? '' : 'its mount has not been assessed yet';
}

/** What the engine refuses, as the input error that it is; anything else is a fault of ours. */
export function asFitError(error: unknown): unknown {
	if (!(error instanceof EngineInputError)) return asInputError(error);
	const { message, input: path, limit } = error;
	return new AppError('invalid_input', message, [{ path, message, limit }]);
}

/** The newest assessment of each mount. */
export async function newestAssessments(mountIds: readonly number[]): Promise<Map<number, Assessment>> {
	const found = await Assessment.findAll({
		where: { mountId: [...new Set(mountIds)] },
		attributes: ['id', 'mountId', 'inputs'],
		order: [['id', 'ASC']]
	});
	return new Map(found.map((assessment) => [assessment.mountId, assessment]));
}

function requireLegs({ legs, name }: Trace, heldOut: readonly number[], path: string): void {
	const beyond = heldOut.find((leg) => leg > legs.length);
	const message =
		beyond !== undefined
			? `“${name}” has no leg ${beyond}: it has ${legs.length}.`
			: new Set(heldOut).size === legs.length
				? `Of “${name}” every leg is kept back, so that nothing is left to fit to.`
				: '';
	if (message) throw new AppError('invalid_input', message, [{ path, message }]);
}

export interface GatheredFit {
	engineInput: CoefficientFitInput;
	traces: FitInputs['traces'];
	isSynthetic: boolean;
}

/** All that a fit takes, read anew: the traces with their legs, the newest assessments of their mounts. */
export async function gatherFit(
	person: SignedInPerson,
	{ traces: wanted, coefficients, loss, leaveOut }: Omit<FitInput, 'name'>,
	book: FitBook
): Promise<GatheredFit> {
	const rows: Trace[] = [];
	for (const { traceId } of wanted) rows.push(await findTrace(person, traceId));
	const assessments = await newestAssessments(rows.map(({ mountId }) => mountId));
	const traces: TraceToFit[] = [];
	for (const [at, row] of rows.entries()) {
		const assessment = assessments.get(row.mountId) ?? null;
		const why = sayUnfit(row, assessment);
		const path = `traces[${at}]`;
		const message = `“${row.name}” cannot be fitted to: ${why}.`;
		if (why) throw new AppError('conflict', message, [{ path, message }]);
		requireLegs(row, wanted[at]!.heldOutLegs, `${path}.heldOutLegs`);
		traces.push(await traceToFit(row, assessment!, wanted[at]!.heldOutLegs));
	}
	return {
		engineInput: { traces, coefficients, book, options: { loss, leaveOut } },
		traces: wanted.map((each, at) => ({
			...each,
			assessmentId: assessments.get(rows[at]!.mountId)!.id,
			sha256: rows[at]!.sha256
		})),
		isSynthetic: rows.some(({ isSynthetic }) => isSynthetic)
	};
}
