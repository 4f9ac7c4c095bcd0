import { guardOf, NEVER_CUT_C, type CutOffs } from '../chemistries/guard';
import { chemistryOf } from '../chemistries/table';
import type { Chemistry, Sourced } from '../chemistries/types';
import type { FieldGroup } from '../vehicle/scenario-fields';
import type { BatteryShape } from './battery-shape';
import { deriveFilms } from './derive-films';
import { show, type ScenarioDraft } from './draft';
import { JUDGEMENT } from './judgement';
import type { SurveyedBattery } from './types';

const DATA_SHEET = "The battery's data sheet.";
/** A measured resistance below that of the board alone still leaves the cells some. */
const LEAST_CELL_OHM = 1e-4;
const NO_BMS = 'This battery has no BMS.';

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
	deriveFilms(draft, shape);
	const chemistry = chemistryOf(battery.chemistry);
	deriveHeatCapacities(draft, battery.massKg, chemistry);
	deriveConductances(draft, caseAreaM2, chemistry);
	deriveResistance(draft, battery.internalResistanceMohm, chemistry);
	deriveGuard(draft, battery);
}

function deriveHeatCapacities(draft: ScenarioDraft, massKg: number, chemistry: Chemistry): void {
	const { value: specificHeat, source } = chemistry.packSpecificHeatJPerKgK;
	const board = draft.coefficient('battery', 'boardHeatCapacity');
	const bookCase = draft.coefficient('battery', 'caseHeatCapacity');
	const bookCells = draft.coefficient('battery', 'cellHeatCapacity');
	const whole = massKg * specificHeat;
	// A pack lighter than its own board makes no sense; a tenth keeps the run possible.
	const shared = Math.max(whole - board, whole / 10);
	const part = chemistry.hasBms ? 'of the board' : 'that the model keeps for a board';
	const basis =
		`${show(massKg)} kg at ${specificHeat} J/kgK (${source}) less ${show(board)} J/K ${part}, shared between case ` +
		`and cells as in the coefficient book, ${show(bookCase)} to ${show(bookCells)}.`;
	const perBook = shared / (bookCase + bookCells);
	draft.deriveAll(
		'battery',
		{ caseHeatCapacity: bookCase * perBook, cellHeatCapacity: bookCells * perBook },
		basis
	);
}

/** A larger case touches its cells over more area, and a wet cell touches it better. */
function deriveConductances(draft: ScenarioDraft, caseAreaM2: number, chemistry: Chemistry): void {
	const { value: ratio, source } = chemistry.caseContactRatio;
	const bookArea = draft.coefficient('battery', 'caseArea');
	const book = draft.coefficient('battery', 'caseCellConductance');
	const better = ratio === 1 ? '' : `, times ${show(ratio)}: ${source}`;
	draft.derive(
		'battery',
		'caseCellConductance',
		((book * caseAreaM2) / bookArea) * ratio,
		`The book's ${show(book)} W/K for ${show(bookArea)} m², in proportion to the case area${better}; ${JUDGEMENT}.`
	);
}

/** A value of the chemistry stands in the scenario where it is not the model's own default. */
function deriveOwn(draft: ScenarioDraft, group: FieldGroup, key: string, own: Sourced, label: string): void {
	if (own.value === draft.coefficient(group, key)) return;
	draft.derive(group, key, own.value, `${label}: ${own.source} (${own.standing}).`);
}

function deriveResistance(draft: ScenarioDraft, internalMohm: number, chemistry: Chemistry): void {
	const { hasBms, label, activationK, taperSoc } = chemistry;
	const boardOhm = hasBms ? draft.coefficient('battery', 'boardR') : 0;
	const less = hasBms
		? `, less ${show(boardOhm * 1000)} mΩ of the BMS board.`
		: ': no board carries the current.';
	if (!hasBms) draft.derive('battery', 'boardR', boardOhm, NO_BMS);
	draft.derive(
		'battery',
		'r25',
		Math.max(internalMohm / 1000 - boardOhm, LEAST_CELL_OHM),
		`Internal resistance of the data sheet, ${show(internalMohm)} mΩ${less}`
	);
	deriveOwn(draft, 'battery', 'activationK', activationK, label);
	deriveOwn(draft, 'charger', 'taperSoc', taperSoc, label);
}

function deriveGuard(draft: ScenarioDraft, battery: SurveyedBattery): void {
	const guard = guardOf(battery);
	if (guard.kind === 'cut-offs') deriveCutOffs(draft, guard);
	else deriveOpenGuard(draft);
}

function deriveCutOffs(draft: ScenarioDraft, cutOffs: CutOffs): void {
	const { sensor, cutDelayS, autoReset } = cutOffs;
	draft.deriveAll('bms', { sensor, cutDelayS, autoReset }, DATA_SHEET);
	draft.deriveAll('bms.charge', { cut: cutOffs.chargeCutC, reset: cutOffs.chargeResetC }, DATA_SHEET);
	draft.deriveAll(
		'bms.discharge',
		{ cut: cutOffs.dischargeCutC, reset: cutOffs.dischargeResetC },
		DATA_SHEET
	);
}

/** No latch may open on a battery that has none. */
function deriveOpenGuard(draft: ScenarioDraft): void {
	const basis = `${NO_BMS} ${NEVER_CUT_C} °C is the most that this field takes, so that nothing is ever cut off; the limits of its maker are held against the run afterwards.`;
	draft.deriveAll('bms', { sensor: 'cells', cutDelayS: 0, autoReset: true }, NO_BMS);
	for (const group of ['bms.charge', 'bms.discharge'] as const) {
		draft.deriveAll(group, { cut: NEVER_CUT_C, reset: NEVER_CUT_C - 1 }, basis);
	}
}
