import { z } from 'zod';
import { INSULATION_CLASSES_C } from '../thermal/wiring';
import { cableInputSchema, type CableInput } from './cables';
import { versionSchema } from './fields';

/** A choice of a form is text, whatever it stands for. */
const insulationC = z
	.enum(INSULATION_CLASSES_C.map(String), { error: 'Choose what the insulation is made for.' })
	.meta({ label: 'Insulation made for' });

/** A proposed cable and fuse as its form has it. */
export const cableFormSchema = z.object({ ...cableInputSchema.shape, insulationC, version: versionSchema });
export type CableForm = z.infer<typeof cableFormSchema>;

export const toCableForm = (cable: CableInput | null): Partial<CableForm> =>
	cable ? { ...cable, insulationC: String(cable.insulationC) } : {};

export function fromCableForm({ version: _, insulationC, ...cable }: CableForm): CableInput {
	return cableInputSchema.parse({ ...cable, insulationC: Number(insulationC) });
}
