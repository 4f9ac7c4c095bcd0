import { sayWrongLegs } from '$lib/format/fits';
import type { FitInput, FitInputs } from '$lib/schemas/fits';
import type { SignedInPerson } from '$lib/schemas/people';
import type { CoefficientFitInput, FitBook, TraceToFit } from '$lib/thermal/fit';
import { Assessment, type Trace } from '../db/models';
import { EngineInputError } from '$lib/thermal/correlations/require';
import { findPriorFaults } from '$lib/thermal/fit/coefficients';
import { AppError, type FieldProblem } from '../errors';
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

function requireFit(row: Trace, assessment: Assessment | null, at: number): asserts assessment is Assessment {
	const why = sayUnfit(row, assessment);
	const message = `“${row.name}” cannot be fitted to: ${why}.`;
	if (why) throw new AppError('conflict', message, [{ path: `traces[${at}]`, message }]);
}

/** Legs that cannot be kept back, and priors that the engine does not take: everything that is wrong, at once. */
function requireRight(rows: readonly Trace[], { traces, coefficients }: Omit<FitInput, 'name'>): void {
	const ofLegs = rows.flatMap(({ name, legs }, at): FieldProblem[] => {
		const message = sayWrongLegs(name, legs.length, traces[at]!.heldOutLegs);
		return message ? [{ path: `traces[${at}].heldOutLegs`, message }] : [];
	});
	const ofPriors = findPriorFaults(coefficients).map(({ input: path, message, limit }): FieldProblem => ({
		path,
		message,
		limit
	}));
	const problems = [...ofPriors, ...ofLegs];
	if (problems[0]) throw new AppError('invalid_input', problems[0].message, problems);
}

export interface GatheredFit {
	engineInput: CoefficientFitInput;
	traces: FitInputs['traces'];
	isSynthetic: boolean;
}

/** The traces with their legs and the assessments of their mounts, as the engine takes them. */
async function gather(
	rows: readonly Trace[],
	assessments: ReadonlyMap<number, Assessment>,
	{ traces: wanted, coefficients, loss, leaveOut }: Omit<FitInput, 'name'>,
	book: FitBook
): Promise<CoefficientFitInput> {
	const traces: TraceToFit[] = [];
	for (const [at, row] of rows.entries()) {
		const assessment = assessments.get(row.mountId) ?? null;
		requireFit(row, assessment, at);
		traces.push(await traceToFit(row, assessment, wanted[at]!.heldOutLegs));
	}
	return { traces, coefficients, book, options: { loss, leaveOut } };
}

async function findTraces(person: SignedInPerson, wanted: readonly { traceId: number }[]): Promise<Trace[]> {
	const rows: Trace[] = [];
	for (const { traceId } of wanted) rows.push(await findTrace(person, traceId));
	return rows;
}

/** All that a fit takes as it is now: with the newest assessments of the mounts. */
export async function gatherFit(
	person: SignedInPerson,
	input: Omit<FitInput, 'name'>,
	book: FitBook
): Promise<GatheredFit> {
	const rows = await findTraces(person, input.traces);
	const assessments = await newestAssessments(rows.map(({ mountId }) => mountId));
	rows.forEach((row, at) => requireFit(row, assessments.get(row.mountId) ?? null, at));
	requireRight(rows, input);
	return {
		engineInput: await gather(rows, assessments, input, book),
		traces: input.traces.map((each, at) => ({
			...each,
			assessmentId: assessments.get(rows[at]!.mountId)!.id,
			sha256: rows[at]!.sha256,
			version: rows[at]!.version
		})),
		isSynthetic: rows.some(({ isSynthetic }) => isSynthetic)
	};
}

function requireUnchanged({ name, version }: Trace, asked: FitInputs['traces'][number]): void {
	if (version === asked.version) return;
	throw new AppError(
		'conflict',
		`“${name}” was changed after this fit was asked for, its legs or what its columns mean: begin another fit.`
	);
}

/** All that a fit takes as it was when it was asked for; a trace that is another by now is refused. */
export async function gatherAgain(
	person: SignedInPerson,
	inputs: FitInputs,
	book: FitBook
): Promise<CoefficientFitInput> {
	const rows = await findTraces(person, inputs.traces);
	for (const [at, row] of rows.entries()) requireUnchanged(row, inputs.traces[at]!);
	const then = await Assessment.findAll({
		where: { id: inputs.traces.map(({ assessmentId }) => assessmentId) },
		attributes: ['id', 'mountId', 'inputs']
	});
	return gather(rows, new Map(then.map((each) => [each.mountId, each])), inputs, book);
}
