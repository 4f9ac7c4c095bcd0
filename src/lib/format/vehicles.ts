import type { EngineLayout, VehicleInput } from '../schemas/vehicles';
import { formatMass } from './numbers';

export const ENGINE_LAYOUT_WORDS: Record<EngineLayout, string> = {
	inline: 'In line',
	vee: 'Vee',
	flat: 'Flat',
	unknown: 'I do not know'
};

type Named = Pick<VehicleInput, 'make' | 'model' | 'modelYear'>;

/** "Farrow Drover 2019". */
export const formatVehicle = ({ make, model, modelYear }: Named): string => `${make} ${model} ${modelYear}`;

/** "3.0 t loaded, 1.5 t behind it"; nothing is said of a trailer that is not there. */
export function sayLoad({ massKg, towMassKg }: Pick<VehicleInput, 'massKg' | 'towMassKg'>): string {
	const loaded = `${formatMass(massKg)} loaded`;
	return towMassKg > 0 ? `${loaded}, ${formatMass(towMassKg)} behind it` : loaded;
}
