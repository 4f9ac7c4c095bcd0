import { DAY_PLAN_TEMPLATES, type SurveyAnswers, type SurveyInputs } from '../../src/lib/thermal/survey';

export const battery: SurveyInputs['battery'] = {
	chemistry: 'lithium-iron-phosphate',
	capacityAh: 100,
	lengthMm: 330,
	widthMm: 172,
	heightMm: 215,
	massKg: 12.6,
	internalResistanceMohm: 13,
	maxChargeA: 50,
	sensor: 'cells',
	chargeCutC: 65,
	chargeResetC: 55,
	dischargeCutC: 75,
	dischargeResetC: 62,
	cutDelayS: 0,
	autoReset: true
};

/** By the firewall, square on to the exhaust: where nobody should put it. */
export const hotSide: SurveyAnswers = {
	positionKind: 'under-bonnet',
	bayPlace: 'firewall-exhaust',
	exhaustFacing: 'square-on',
	exhaustGapMm: 120,
	exhaustSeenWidthMm: 350,
	exhaustSeenHeightMm: 180,
	exhaustBatterySide: 'long-side',
	engineFacing: 'at-an-angle',
	engineGapMm: 100,
	engineSeenWidthMm: 400,
	engineSeenHeightMm: 300,
	engineBatterySide: 'end',
	bonnetGapMm: 60,
	bonnetLining: 'bare',
	airPath: 'closed-corner',
	trayMaterial: 'steel',
	trayThicknessMm: 3,
	trayLengthMm: 370,
	trayWidthMm: 210,
	trayMat: 'rubber',
	trayUnderside: 'inner-guard',
	shieldKind: 'none'
};

export const cargoArea: SurveyAnswers = {
	positionKind: 'cargo-area',
	enclosureCooling: 'not-cooled',
	enclosureSun: 'through-windows'
};

/** A long hot day with a trailer; everything invented. */
export function inputsFor(survey: SurveyAnswers, changes: Partial<SurveyInputs> = {}): SurveyInputs {
	return {
		vehicle: { massKg: 2900, dragAreaM2: 1.35, towMassKg: 1800, towDragAreaM2: 0.6 },
		battery,
		survey,
		dayPlan: DAY_PLAN_TEMPLATES[0]!.plan,
		hotDay: { hotDayMaxC: 42, dailyRangeK: 15, sunPeakWPerM2: 1000 },
		altitudeM: 300,
		coefficients: {},
		...changes
	};
}
