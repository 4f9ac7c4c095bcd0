import { norm, solveLower, triangularise, type Columns } from './householder';

/** A diagonal smaller than this, against a column of length 1, says that a parameter is not to be told from the others. */
const SMALLEST_DIAGONAL = 1e-12;

/**
 * Covariance of fitted parameters from the Jacobian of the residuals.
 *
 *     C = s² (JᵀJ)⁻¹ = s² R⁻¹ R⁻ᵀ      (columns of J brought to length 1 first)
 *
 * @param jacobian one column for each parameter that is free
 * @param scale s²: variance of one residual
 * @returns rows of the matrix, or null where the data do not tell the parameters apart
 * Validity: residuals that are nearly straight over the errors themselves.
 * Source: Seber and Wild, Nonlinear Regression (1989), section 2.1.2.
 * @example
 * findCovariance([Float64Array.of(3, 4)], 50)[0][0]; // 2.000000
 */
export function findCovariance(jacobian: Columns, scale: number): number[][] | null {
	const lengths = jacobian.map(norm);
	if (lengths.some((length) => !(length > 0 && Number.isFinite(length)))) return null;
	const unit = jacobian.map((column, j) => column.map((value) => value / lengths[j]!));
	const { r } = triangularise(unit, new Float64Array(unit[0]?.length ?? 0));
	if (r.some((column, j) => Math.abs(column[j]!) < SMALLEST_DIAGONAL)) return null;
	// Row j of the inverse of R, turned: what solves Rᵀ x = the j-th unit vector.
	const inverse = r.map((_, j) =>
		solveLower(
			r,
			Float64Array.from(r, (_column, k) => (k === j ? 1 : 0))
		)
	);
	return inverseProduct(inverse, lengths, scale);
}

/** s² R⁻¹ R⁻ᵀ, each row and column brought back to the unit of its parameter. */
function inverseProduct(columns: Float64Array[], lengths: readonly number[], scale: number): number[][] {
	const count = columns.length;
	return lengths.map((rowLength, row) =>
		lengths.map((columnLength, column) => {
			let sum = 0;
			for (let k = 0; k < count; k++) sum += columns[row]![k]! * columns[column]![k]!;
			return (scale * sum) / (rowLength * columnLength);
		})
	);
}
