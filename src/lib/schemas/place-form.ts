import { z } from 'zod';
import { optionalWords, versionSchema } from './fields';
import { findEmptyBoxes, fromMonthBoxes, monthFields, toMonthBoxes, type MonthBox } from './months';
import { MONTH_ROWS, monthlyMaxField, monthlySpreadField, placeSiteSchema, type PlaceInput } from './places';

const fields = {
	...placeSiteSchema.shape,
	...monthFields('monthlyMaxC', monthlyMaxField),
	...monthFields('monthlySpreadK', monthlySpreadField),
	monthsSource: optionalWords(MONTH_ROWS.monthsSource, 300)
};

type MonthRow = 'monthlyMaxC' | 'monthlySpreadK';
const ROWS: readonly MonthRow[] = ['monthlyMaxC', 'monthlySpreadK'];
type Boxes = Record<MonthBox<MonthRow>, number | null> & { monthsSource: string };

function isBegun(boxes: Boxes): boolean {
	const entries = Object.entries(boxes) as [string, unknown][];
	const isMonth = (name: string): boolean => ROWS.some((row) => name.startsWith(row));
	return boxes.monthsSource !== '' || entries.some(([name, value]) => isMonth(name) && value !== null);
}

/** A row that is begun must be whole; with one row the other and the source are needed, too. */
function refuseHalfRows(
	boxes: Boxes,
	{ addIssue }: { addIssue: (issue: { code: 'custom'; path: string[]; message: string }) => void }
): void {
	if (!isBegun(boxes)) return;
	for (const row of ROWS) {
		const problem = findEmptyBoxes(row, MONTH_ROWS[row], boxes, true);
		if (problem) addIssue({ code: 'custom', ...problem });
	}
	if (boxes.monthsSource === '') {
		const message = `${MONTH_ROWS.monthsSource} is missing.`;
		addIssue({ code: 'custom', path: ['monthsSource'], message });
	}
}

/** A place as its form has it: a box for each month. */
export const placeFormSchema = z.object(fields).superRefine(refuseHalfRows);
export const placeChangeFormSchema = z
	.object({ ...fields, version: versionSchema })
	.superRefine(refuseHalfRows);
export type PlaceForm = z.infer<typeof placeFormSchema>;

export function toPlaceForm<P extends PlaceInput>({ monthlyMaxC, monthlySpreadK, monthsSource, ...site }: P) {
	return {
		...site,
		...toMonthBoxes('monthlyMaxC', monthlyMaxC),
		...toMonthBoxes('monthlySpreadK', monthlySpreadK),
		monthsSource: monthsSource ?? ''
	};
}

export function fromPlaceForm(form: PlaceForm): PlaceInput {
	return {
		...placeSiteSchema.parse(form),
		monthlyMaxC: fromMonthBoxes('monthlyMaxC', form),
		monthlySpreadK: fromMonthBoxes('monthlySpreadK', form),
		monthsSource: form.monthsSource === '' ? null : form.monthsSource
	};
}
