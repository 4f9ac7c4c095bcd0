import { generateModule } from '../network/step-generator/generate-step';
import { shapeVehicle } from './vehicle-shape';

/** The source of `generated/vehicle-steps.ts`. */
export function generateVehicleSteps(): string {
	return generateModule({ stepBare: shapeVehicle(false), stepShielded: shapeVehicle(true) });
}
