import type { PlannedLeg, SurveyInputs } from '../../thermal/survey/types';

const leg = (kind: PlannedLeg['kind'], minutes: number, speedKmh: number): PlannedLeg => ({
	kind,
	minutes,
	speedKmh,
	surface: 'gravel',
	gradePercent: 0,
	towing: false,
	engineOn: speedKmh > 0,
	bonnetOpen: false,
	loadA: 4
});

/** An invented vehicle, battery and day; nothing measured beyond where the battery sits. */
export const DEFAULT_SAMPLE: SurveyInputs = {
	vehicle: { massKg: 2400, dragAreaM2: 1.1, towMassKg: 0, towDragAreaM2: 0 },
	battery: {
		chemistry: 'lithium-iron-phosphate',
		capacityAh: 100,
		lengthMm: 330,
		widthMm: 172,
		heightMm: 220,
		massKg: 12,
		internalResistanceMohm: 10,
		maxChargeA: 50,
		sensor: 'cells',
		chargeCutC: 65,
		chargeResetC: 55,
		dischargeCutC: 75,
		dischargeResetC: 60,
		cutDelayS: 5,
		autoReset: true
	},
	survey: { positionKind: 'under-bonnet' },
	dayPlan: {
		name: 'A short day',
		startHour: 9,
		startSoc: 0.8,
		chargerMaxA: 25,
		legs: [leg('drive', 120, 70), leg('stop', 30, 0), leg('camp', 120, 0)]
	},
	hotDay: { hotDayMaxC: 40, dailyRangeK: 14, sunPeakWPerM2: 950 },
	altitudeM: 200,
	coefficients: {}
};
