import { z } from 'zod';
import { optionalWords, versionSchema } from './fields';
import { findEmptyBoxes, fromMonthBoxes, monthFields, toMonthBoxes, type MonthBox } from './months';
import {
	CLASS_ROWS,
	MONTH_ROWS,
	monthlyMaxField,
	monthlyMeanField,
	monthlyRainField,
	monthlySpreadField,
	placeSiteSchema,
	type PlaceInput
} from './places';

const fields = {
	...placeSiteSchema.shape,
	...monthFields('monthlyMaxC', monthlyMaxField),
	...monthFields('monthlySpreadK', monthlySpreadField),
	monthsSource: optionalWords(MONTH_ROWS.monthsSource, 300),
	...monthFields('monthlyMeanC', monthlyMeanField),
	...monthFields('monthlyRainMm', monthlyRainField),
	classSource: optionalWords(CLASS_ROWS.classSource, 300)
};

type MonthRow = 'monthlyMaxC' | 'monthlySpreadK' | 'monthlyMeanC' | 'monthlyRainMm';
type SourceField = 'monthsSource' | 'classSource';
type Boxes = Record<MonthBox<MonthRow>, number | null> & Record<SourceField, string>;

/** Rows that are given together or not at all, with one source. */
const TOGETHER: readonly {
	rows: readonly MonthRow[];
	source: SourceField;
	labels: Record<string, string>;
}[] = [
	{ rows: ['monthlyMaxC', 'monthlySpreadK'], source: 'monthsSource', labels: MONTH_ROWS },
	{ rows: ['monthlyMeanC', 'monthlyRainMm'], source: 'classSource', labels: CLASS_ROWS }
];

function isBegun(boxes: Boxes, rows: readonly MonthRow[], source: SourceField): boolean {
	const entries = Object.entries(boxes) as [string, unknown][];
	const isMonth = (name: string): boolean => rows.some((row) => name.startsWith(row));
	return boxes[source] !== '' || entries.some(([name, value]) => isMonth(name) && value !== null);
}

/** A row that is begun must be whole; with one row the other and the source are needed, too. */
function refuseHalfRows(
	boxes: Boxes,
	{ addIssue }: { addIssue: (issue: { code: 'custom'; path: string[]; message: string }) => void }
): void {
	for (const { rows, source, labels } of TOGETHER) {
		if (!isBegun(boxes, rows, source)) continue;
		for (const row of rows) {
			const problem = findEmptyBoxes(row, labels[row]!, boxes, true);
			if (problem) addIssue({ code: 'custom', ...problem });
		}
		if (boxes[source] === '') {
			const message = `${labels[source]} is missing.`;
			addIssue({ code: 'custom', path: [source], message });
		}
	}
}

/** A place as its form has it: a box for each month. */
export const placeFormSchema = z.object(fields).superRefine(refuseHalfRows);
export const placeChangeFormSchema = z
	.object({ ...fields, version: versionSchema })
	.superRefine(refuseHalfRows);
export type PlaceForm = z.infer<typeof placeFormSchema>;

export function toPlaceForm<P extends PlaceInput>({
	monthlyMaxC,
	monthlySpreadK,
	monthsSource,
	monthlyMeanC,
	monthlyRainMm,
	classSource,
	...site
}: P) {
	return {
		...site,
		...toMonthBoxes('monthlyMaxC', monthlyMaxC),
		...toMonthBoxes('monthlySpreadK', monthlySpreadK),
		monthsSource: monthsSource ?? '',
		...toMonthBoxes('monthlyMeanC', monthlyMeanC),
		...toMonthBoxes('monthlyRainMm', monthlyRainMm),
		classSource: classSource ?? ''
	};
}

export function fromPlaceForm(form: PlaceForm): PlaceInput {
	return {
		...placeSiteSchema.parse(form),
		monthlyMaxC: fromMonthBoxes('monthlyMaxC', form),
		monthlySpreadK: fromMonthBoxes('monthlySpreadK', form),
		monthsSource: form.monthsSource === '' ? null : form.monthsSource,
		monthlyMeanC: fromMonthBoxes('monthlyMeanC', form),
		monthlyRainMm: fromMonthBoxes('monthlyRainMm', form),
		classSource: form.classSource === '' ? null : form.classSource
	};
}
