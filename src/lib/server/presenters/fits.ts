import type { FitRow, FitView } from '$lib/schemas/fits';
import { SCENARIO_FIELDS } from '$lib/thermal/vehicle/scenario-fields';
import { formatDate } from '$lib/format/dates';
import { formatVehicle } from '$lib/format/vehicles';
import type { Fit, Job, Mount, Trace, Vehicle } from '../db/models';
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

/** A trace with where it was measured. */
export interface FittedTrace {
	trace: Trace;
	mount: Mount;
	job: Job;
	vehicle: Vehicle;
}

/** The day on which a trace begins, by the clock of its zone; empty where the file does not say. */
function dayOf({ span }: Trace): string {
	if (span?.timeBase !== 'utc') return '';
	return formatDate(new Date(span.startS * 1000), span.timeZone ?? 'UTC');
}

function presentTrace(found: FittedTrace | undefined) {
	if (!found) return { name: '', isSynthetic: false, mount: null, day: '' };
	const { trace, mount, job, vehicle } = found;
	const { letter, name } = mount;
	return {
		...{ name: trace.name, isSynthetic: Boolean(trace.isSynthetic), day: dayOf(trace) },
		mount: { letter, name, jobNumber: job.number, vehicle: formatVehicle(vehicle) }
	};
}

/** A fit with what its traces are called now and what its coefficients mean. */
export function presentFit(fit: Fit, traces: readonly FittedTrace[], nameOf: NameOf): FitView {
	const { inputs, bookId, failure, result } = fit;
	const { loss, leaveOut, bookNumber } = inputs;
	return {
		...presentFitRow(fit, nameOf),
		...{ loss, leaveOut, bookId, bookNumber },
		traces: inputs.traces.map(({ traceId, heldOutLegs }) => ({
			...{ id: traceId, heldOutLegs },
			...presentTrace(traces.find(({ trace }) => trace.id === traceId))
		})),
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
