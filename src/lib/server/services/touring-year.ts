import type { AssessmentInputs, Touring } from '$lib/schemas/assessments';
import { USUAL_DAYS_ON_ROAD } from '$lib/schemas/jobs';
import { MONTH_NAMES, estimateMonths } from '$lib/thermal/weather';
import type { Job, Place } from '../db/models';

type Months = Pick<Touring, 'months' | 'basis'>;

const ESTIMATED = 'Estimated from latitude and hot day; a weather file would replace it.';
const USUAL_DAYS = MONTH_NAMES.map(() => USUAL_DAYS_ON_ROAD);

function monthsOf(place: Place): Months {
	const { monthlyMaxC, monthlySpreadK, monthsSource, weatherFile, latitudeDeg, hotDayMaxC } = place;
	if (!monthlyMaxC || !monthlySpreadK) {
		return { months: estimateMonths({ latitudeDeg, hotDayMaxC }), basis: ESTIMATED };
	}
	const months = monthlyMaxC.map((meanMaxC, month) => ({ meanMaxC, spreadK: monthlySpreadK[month]! }));
	const basis = weatherFile
		? `From the weather file ${weatherFile.name}.`
		: `Entered for the place: ${monthsSource ?? ''}`;
	return { months, basis };
}

/** The weather of a year at the job's place, and how many days of each month the customer is on the road. */
export function touringYearOf({ job, place }: { job: Job; place: Place }): Touring {
	return { ...monthsOf(place), daysOnRoad: job.daysOnRoad ?? USUAL_DAYS };
}

/** The year that an assessment was made with; for older ones, which kept none, as it would be estimated. */
export function touringOf({ touring, place, hotDay }: AssessmentInputs): Touring {
	const { latitudeDeg } = place;
	return (
		touring ?? {
			months: estimateMonths({ latitudeDeg, hotDayMaxC: hotDay.hotDayMaxC }),
			daysOnRoad: USUAL_DAYS,
			basis: ESTIMATED
		}
	);
}
