import type { Origin } from '$lib/schemas/books';
import { SCENARIO_FIELDS, type FieldGroup, type NumberField } from '$lib/thermal/vehicle/scenario-fields';

/** Groups whose every number is a coefficient, and the single ones out of groups that are otherwise surveyed. */
const WHOLE_GROUPS: readonly FieldGroup[] = [
	'engine',
	'exhaust',
	'bay',
	'bonnet',
	'enclosure',
	'shield',
	'tray'
];
const SINGLE_FIELDS: ReadonlySet<string> = new Set([
	'vehicle.driveline',
	'vehicle.accessoryPowerW',
	'vehicle.idleFuelPowerW',
	'vehicle.brakeEfficiency',
	'vehicle.ratedFuelPowerW',
	'vehicle.coolantShare',
	'battery.caseArea',
	'battery.caseHeatCapacity',
	'battery.caseEmissivity',
	'battery.filmStill',
	'battery.filmPerSqrtSpeed',
	'battery.caseCellConductance',
	'battery.cellHeatCapacity',
	'battery.activationK',
	'battery.boardHeatCapacity',
	'battery.boardR',
	'battery.boardCellConductance',
	'battery.boardCaseConductance',
	'charger.taperSoc',
	'climate.skyDropK'
]);

const JUDGEMENT = 'Engineering judgement (thermal model, section 7).';
const EMISSIVITY_TABLES = "emissivity tables of instrument makers after Bramson, 'Infrared Radiation' (1968)";

/** Values that a published range stands behind; all others are judgement until they are calibrated. */
const PUBLISHED: Record<string, string> = {
	'exhaust.emissivity': `Oxidised steel, 0.74 to 0.82 at 125 to 525 °C: ${EMISSIVITY_TABLES}.`,
	'bonnet.emissivity': `Paints and lacquers, 0.87 to 0.97: ${EMISSIVITY_TABLES}.`,
	'shield.emissivityOut': `Commercial aluminium sheet, 0.09: ${EMISSIVITY_TABLES}.`,
	'shield.emissivityIn': `Commercial aluminium sheet, 0.09: ${EMISSIVITY_TABLES}.`,
	'bonnet.absorptivity':
		'Engineering judgement between silver paint (0.4 to 0.5) and dark paint (0.9); those from memory.',
	'battery.caseEmissivity': 'Black plastics, 0.90 to 0.95; from memory.'
};

const pathOf = ({ group, key }: NumberField): string => `${group}.${key}`;

function isCoefficient(field: (typeof SCENARIO_FIELDS)[number]): field is NumberField & { default: number } {
	if (field.kind !== 'number' || field.default === null) return false;
	return WHOLE_GROUPS.includes(field.group) || SINGLE_FIELDS.has(pathOf(field));
}

/** The numbers that a coefficient book holds: what nobody surveys, enters or plans. */
export const COEFFICIENT_FIELDS = SCENARIO_FIELDS.filter(isCoefficient);

const fieldAt = new Map(COEFFICIENT_FIELDS.map((field) => [pathOf(field), field]));

export function coefficientField(group: string, key: string): NumberField | undefined {
	return fieldAt.get(`${group}.${key}`);
}

/** What stands behind the thermal model's own value of a coefficient. */
export function sourceOf(field: NumberField): string {
	return PUBLISHED[pathOf(field)] ?? JUDGEMENT;
}

/** Judgement, where the source says so or is a memory; published otherwise. */
export const originOf = (field: NumberField): Origin =>
	/judgement|from memory/i.test(sourceOf(field)) ? 'judgement' : 'published';
