import type { FieldGroup } from '../thermal';

/** What to measure to know a coefficient better: for a whole group, or for one field of it. */
const MEASURES: Readonly<Partial<Record<FieldGroup | `${FieldGroup}.${string}`, string>>> = {
	vehicle: 'The fuel that one touring day takes, and the weight on a scale.',
	engine: 'The coolant temperature through one drive and the two hours after it.',
	exhaust:
		'A thermometer gun on the hot part: idling, after ten minutes of driving, ten minutes after the stop.',
	bay: 'A thermometer in the middle of the bay through one drive and the two hours after it.',
	bonnet: 'A thermometer on the bonnet in full sun, parked and driving.',
	enclosure: 'A thermometer in the space, parked in the sun for two hours.',
	position: 'A thermometer in the air beside the battery and one in the bay, through one drive.',
	'position.exhaustView': 'The gap and the size of the hot part, measured again at the nearest point.',
	'position.engineView': 'The gap to the engine, measured again at the nearest point.',
	'position.bonnetView': 'How much of the top is free under the bonnet, seen from above.',
	shield: 'The size of the shield and the gap behind it with a tape; its finish by eye, once a year.',
	tray: 'Thermometers on tray and case through one drive.',
	battery: 'Thermometers on the case and, where the BMS shows them, in the cells, through one drive.',
	'battery.capacityAh': 'A capacity test: full, then down to the cut-off, counted.',
	'battery.caseArea': 'Length, width and height with a tape.',
	'battery.topArea': 'Length and width with a tape.',
	'battery.filmStill': 'Thermometers on the case and in the air beside it, parked, out of the wind.',
	'battery.filmPerSqrtSpeed': 'Thermometers on the case and in the air beside it, at two speeds.',
	'battery.caseEmissivity': 'The finish of the case by eye: plastic and paint 0.9, bare metal far less.',
	'battery.cellHeatCapacity': 'The mass on a scale, and how fast the cells cool down overnight.',
	'battery.r25': 'The voltage with and without a known load.',
	'battery.boardR': 'The voltage over the BMS at a known current.',
	bms: "The makers' data sheet, and the BMS readout beside a thermometer.",
	'bms.charge': "The makers' data sheet.",
	'bms.discharge': "The makers' data sheet.",
	charger: 'A clamp meter on the charge cable, from empty to full.',
	climate: 'A weather file of the place, or its published monthly figures.',
	'climate.skyDropK': 'A thermometer gun at the clear sky, by day and by night.',
	start: 'The battery monitor in the morning.'
};

/** What measurement would make a coefficient better known; empty where nothing of ours would. */
export function improvedBy(path: string): string {
	const table: Readonly<Record<string, string | undefined>> = MEASURES;
	const group = path.slice(0, path.lastIndexOf('.'));
	return table[path] ?? table[group] ?? '';
}
