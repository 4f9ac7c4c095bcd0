import { z } from 'zod';
import {
	INSULATION_CLASSES_C,
	LARGEST_AREA_MM2,
	SMALLEST_AREA_MM2,
	type CableAndFuse
} from '../thermal/wiring';
import { measure, versionSchema } from './fields';

export const LAYINGS = ['in a tube', 'in free air'] as const satisfies readonly CableAndFuse['laying'][];

/** The cable and fuse that are proposed for a mount; what air they are in, the run finds. */
export const cableInputSchema = z.object({
	areaMm2: measure('Cross-section of the copper', 'mm²', SMALLEST_AREA_MM2, LARGEST_AREA_MM2),
	insulationC: z
		.literal(INSULATION_CLASSES_C, { error: 'Choose what the insulation is made for.' })
		.meta({ label: 'Insulation made for (°C)' }),
	laying: z.enum(LAYINGS, { error: 'Choose how the cable lies.' }).meta({ label: 'How the cable lies' }),
	conductorLengthM: measure('Length of cable, there and back', 'm', 0.1, 50),
	fuseRatedA: measure('Rating of the fuse', 'A', 1, 500)
});
export type CableInput = z.infer<typeof cableInputSchema>;

/** Sets the proposal, or takes it back with null. */
export const cableChangeSchema = z.object({ cable: cableInputSchema.nullable(), version: versionSchema });
export type CableChange = z.infer<typeof cableChangeSchema>;
