import type { FitRow, FitView } from '$lib/schemas/fits';
import { SCENARIO_FIELDS } from '$lib/thermal/vehicle/scenario-fields';
import type { Fit, Trace } from '../db/models';
import type { NameOf } from './books';

export function presentFitRow(fit: Fit, nameOf: NameOf): FitRow {
	const { id, name, state, isSynthetic, inputs, madeBy, createdAt, finishedAt, engineVersion } = fit;
	return {
		...{ id, name, state, engineVersion },
		isSynthetic: Boolean(isSynthetic),
		traceCount: inputs.traces.length,
		coefficientCount: inputs.coefficients.length,
		madeBy: nameOf(madeBy),
		createdAt: createdAt.toISOString(),
		finishedAt: finishedAt?.toISOString() ?? null
	};
}

/** A fit with what its traces are called now and what its coefficients mean. */
export function presentFit(fit: Fit, traces: readonly Trace[], nameOf: NameOf): FitView {
	const { inputs, bookId, failure, result } = fit;
	const { loss, leaveOut, bookNumber } = inputs;
	return {
		...presentFitRow(fit, nameOf),
		...{ loss, leaveOut, bookId, bookNumber },
		traces: inputs.traces.map(({ traceId, heldOutLegs }) => {
			const trace = traces.find(({ id }) => id === traceId);
			return {
				...{ id: traceId, heldOutLegs, name: trace?.name ?? '' },
				isSynthetic: Boolean(trace?.isSynthetic)
			};
		}),
		coefficients: inputs.coefficients.map((coefficient) => {
			const { group, key } = coefficient;
			const field = SCENARIO_FIELDS.find((each) => each.group === group && each.key === key);
			const unit = field?.kind === 'number' ? field.unit : '-';
			return { ...coefficient, meaning: (field?.meaning ?? key).replace(/\.$/, ''), unit };
		}),
		failure: failure ?? '',
		result: result ?? null
	};
}
