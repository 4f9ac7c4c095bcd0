import type { BatteryShape } from './battery-shape';
import { show, type ScenarioDraft } from './draft';
import { JUDGEMENT, PACK_SPECIFIC_HEAT_J_PER_KG_K } from './judgement';
import type { SurveyedBattery } from './types';

const DATA_SHEET = "The battery's data sheet.";
/** A measured resistance below that of the board alone still leaves the cells some. */
const LEAST_CELL_OHM = 1e-4;

/** Battery and BMS from the data sheet: sizes become surfaces, mass becomes heat capacity. */
export function deriveBattery(draft: ScenarioDraft, battery: SurveyedBattery, shape: BatteryShape): void {
	const { lengthM, widthM, heightM, caseAreaM2 } = shape;
	draft.derive('battery', 'capacityAh', battery.capacityAh, DATA_SHEET);
	draft.derive(
		'battery',
		'caseArea',
		caseAreaM2,
		`L·W + 2·H·(L + W) = ${show(lengthM)}·${show(widthM)} + 2·${show(heightM)}·${show(lengthM + widthM)} m²: ` +
			'four sides and the top; the base exchanges heat through the tray.'
	);
	draft.derive('battery', 'topArea', shape.baseAreaM2, `L·W = ${show(lengthM)}·${show(widthM)} m².`);
	deriveHeatCapacities(draft, battery.massKg);
	deriveConductances(draft, caseAreaM2);
	const boardOhm = draft.coefficient('battery', 'boardR');
	draft.derive(
		'battery',
		'r25',
		Math.max(battery.internalResistanceMohm / 1000 - boardOhm, LEAST_CELL_OHM),
		`Internal resistance of the data sheet, ${show(battery.internalResistanceMohm)} mΩ, less ` +
			`${show(boardOhm * 1000)} mΩ of the BMS board.`
	);
	deriveBms(draft, battery);
}

function deriveHeatCapacities(draft: ScenarioDraft, massKg: number): void {
	const board = draft.coefficient('battery', 'boardHeatCapacity');
	const bookCase = draft.coefficient('battery', 'caseHeatCapacity');
	const bookCells = draft.coefficient('battery', 'cellHeatCapacity');
	const whole = massKg * PACK_SPECIFIC_HEAT_J_PER_KG_K;
	// A pack lighter than its own board makes no sense; a tenth keeps the run possible.
	const shared = Math.max(whole - board, whole / 10);
	const basis =
		`${show(massKg)} kg at ${PACK_SPECIFIC_HEAT_J_PER_KG_K} J/kgK (cells measured at 1040 to 1106 J/kgK: Lin, Chu, ` +
		`Howey et al., arXiv 2112.09768) less ${show(board)} J/K of the board, shared between case and cells as in the ` +
		`coefficient book, ${show(bookCase)} to ${show(bookCells)}.`;
	const perBook = shared / (bookCase + bookCells);
	draft.deriveAll(
		'battery',
		{ caseHeatCapacity: bookCase * perBook, cellHeatCapacity: bookCells * perBook },
		basis
	);
}

/** A larger case touches its cells over more area. */
function deriveConductances(draft: ScenarioDraft, caseAreaM2: number): void {
	const bookArea = draft.coefficient('battery', 'caseArea');
	const book = draft.coefficient('battery', 'caseCellConductance');
	draft.derive(
		'battery',
		'caseCellConductance',
		(book * caseAreaM2) / bookArea,
		`The book's ${show(book)} W/K for ${show(bookArea)} m², in proportion to the case area; ${JUDGEMENT}.`
	);
}

function deriveBms(draft: ScenarioDraft, battery: SurveyedBattery): void {
	const { sensor, cutDelayS, autoReset } = battery;
	draft.deriveAll('bms', { sensor, cutDelayS, autoReset }, DATA_SHEET);
	draft.deriveAll('bms.charge', { cut: battery.chargeCutC, reset: battery.chargeResetC }, DATA_SHEET);
	draft.deriveAll(
		'bms.discharge',
		{ cut: battery.dischargeCutC, reset: battery.dischargeResetC },
		DATA_SHEET
	);
}
