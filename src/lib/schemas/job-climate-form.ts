import { z } from 'zod';
import { DAYS_ON_ROAD, daysOnRoadField, jobClimateSchema, type JobClimate } from './jobs';
import { findEmptyBoxes, fromMonthBoxes, monthFields, toMonthBoxes } from './months';

const { daysOnRoad: _list, ...fields } = jobClimateSchema.shape;

/** The place and the hot day of a job as its form has them: a box for the days on the road in each month. */
export const jobClimateFormSchema = z
	.object({ ...fields, ...monthFields('daysOnRoad', daysOnRoadField) })
	.superRefine((boxes, { addIssue }) => {
		const problem = findEmptyBoxes('daysOnRoad', DAYS_ON_ROAD, boxes, false);
		if (problem) addIssue({ code: 'custom', ...problem });
	});
type JobClimateForm = z.infer<typeof jobClimateFormSchema>;

export const toDaysOnRoadBoxes = (daysOnRoad: JobClimate['daysOnRoad']) =>
	toMonthBoxes('daysOnRoad', daysOnRoad);

export function fromJobClimateForm(form: JobClimateForm): JobClimate {
	const { placeId, hotDayMaxC, dailyRangeK, sunPeakWPerM2, version } = form;
	const daysOnRoad = fromMonthBoxes('daysOnRoad', form);
	return { placeId, hotDayMaxC, dailyRangeK, sunPeakWPerM2, daysOnRoad, version };
}
