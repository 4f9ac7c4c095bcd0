import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { generateVehicleSteps } from '../lib/thermal/vehicle/generate-vehicle-steps';

const target = new URL('../lib/thermal/vehicle/generated/vehicle-steps.ts', import.meta.url);
writeFileSync(target, generateVehicleSteps());
console.log(`Wrote ${fileURLToPath(target)}`);
