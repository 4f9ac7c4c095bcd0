import { pressureAtAltitude } from '../correlations/air';
import type { ScenarioInput } from '../types';
import { AnswerReader, listAssumptions } from './answers';
import { measureBattery } from './battery-shape';
import { deriveBattery } from './derive-battery';
import { derivePosition } from './derive-position';
import { ScenarioDraft, show } from './draft';
import type { BuiltScenario, PlannedDay, SurveyedVehicle, SurveyInputs } from './types';

function planLegs(dayPlan: PlannedDay, vehicle: SurveyedVehicle): ScenarioInput['legs'] {
	return dayPlan.legs.map((leg) => ({
		minutes: leg.minutes,
		engineOn: leg.engineOn,
		speedKmh: leg.speedKmh,
		surface: leg.surface,
		gradePercent: leg.gradePercent,
		towMassKg: leg.towing ? vehicle.towMassKg : 0,
		towDragAreaM2: leg.towing ? vehicle.towDragAreaM2 : 0,
		bonnetOpen: leg.bonnetOpen,
		loadA: leg.loadA
	}));
}

function deriveVehicle(draft: ScenarioDraft, { massKg, dragAreaM2 }: SurveyedVehicle): void {
	draft.deriveAll('vehicle', { massKg, dragAreaM2 }, 'As entered for the vehicle.');
}

function deriveDay(draft: ScenarioDraft, { battery, dayPlan }: SurveyInputs): void {
	const { chargerMaxA, startHour, startSoc } = dayPlan;
	const maxA = Math.min(chargerMaxA, battery.maxChargeA);
	draft.derive('charger', 'maxA', maxA, "The day plan's charger, not above what the battery takes.");
	if (maxA < chargerMaxA) {
		draft.assume(
			`The charger gives up to ${show(chargerMaxA)} A; the data sheet allows ${show(maxA)} A, and that is what was run.`
		);
	}
	draft.deriveAll('start', { hour: startHour, soc: startSoc }, 'The day plan.');
}

function deriveClimate(draft: ScenarioDraft, { hotDay, altitudeM }: SurveyInputs): void {
	const { hotDayMaxC: tMax, dailyRangeK: dailyRange, sunPeakWPerM2: sunPeak } = hotDay;
	draft.deriveAll('climate', { tMax, dailyRange, sunPeak }, 'The hot day that was planned for.');
	draft.derive(
		'climate',
		'pressurePa',
		pressureAtAltitude(altitudeM),
		`Standard atmosphere at ${show(altitudeM)} m (ISO 2533).`
	);
}

/** What nobody measured in any survey, said once. */
const STANDING_ASSUMPTIONS = [
	'All parts start the day at the temperature of the outside air.',
	'The vehicle, engine and bay are those of the coefficient book; only mass, drag and trailer are this one’s.'
];

/**
 * A scenario for the engine from what people know: the vehicle, the data sheet, a tape measure, the day and the place.
 *
 * The coefficient book lies under, the derived values on top; each one says how it came to be, and each answer that is
 * missing or not known takes a cautious value and says so.
 *
 * @param inputs see SurveyInputs; altitude in m, coefficients by group and key as in the table of scenario fields
 * @returns the scenario, one derivation for each derived value, and the assumptions in plain sentences
 * @throws EngineInputError where a dimension is not above zero or the altitude is outside −500…11000 m
 * Validity: as the correlations that each derivation names.
 * Source: as each derivation says; judgement where nothing is measured.
 * @example
 * const vehicle = { massKg: 2900, dragAreaM2: 1.35, towMassKg: 0, towDragAreaM2: 0 };
 * const size = { lengthMm: 330, widthMm: 172, heightMm: 215, massKg: 12.6 };
 * const limits = { sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75, dischargeResetC: 62 };
 * const more = { capacityAh: 100, internalResistanceMohm: 12, maxChargeA: 40, cutDelayS: 0, autoReset: true };
 * const battery = { chemistry: 'lithium-iron-phosphate', ...size, ...limits, ...more };
 * const hotDay = { hotDayMaxC: 42, dailyRangeK: 15, sunPeakWPerM2: 1000 };
 * const dayPlan = DAY_PLAN_TEMPLATES[0].plan;
 * const survey = { positionKind: 'cabin' };
 * const built = buildScenario({ vehicle, battery, survey, dayPlan, hotDay, altitudeM: 0, coefficients: {} });
 * built.scenario.position.bayAirFraction; // 0
 */
export function buildScenario(inputs: SurveyInputs): BuiltScenario {
	const draft = new ScenarioDraft(inputs.coefficients);
	const answers = new AnswerReader(inputs.survey);
	const shape = measureBattery(inputs.battery);
	deriveVehicle(draft, inputs.vehicle);
	deriveBattery(draft, inputs.battery, shape);
	derivePosition(draft, answers, shape);
	deriveDay(draft, inputs);
	deriveClimate(draft, inputs);
	for (const sentence of [...listAssumptions(inputs.survey), ...STANDING_ASSUMPTIONS]) draft.assume(sentence);
	const scenario = draft.build(planLegs(inputs.dayPlan, inputs.vehicle));
	return { scenario, derivations: draft.derivations, assumptions: draft.assumptions };
}
