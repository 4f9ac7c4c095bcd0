import type { KnownVehicle, VehicleView } from '$lib/schemas/vehicles';
import type { Vehicle } from '../db/models';

export function presentVehicle(vehicle: Vehicle): VehicleView {
	const { id, version, customerId, make, model, modelYear, registration, engineLayout } = vehicle;
	const { massKg, dragAreaM2, towMassKg, towDragAreaM2 } = vehicle;
	return {
		...{ id, version, customerId, make, model, modelYear, registration, engineLayout },
		...{ massKg, dragAreaM2, towMassKg, towDragAreaM2 }
	};
}

export function presentKnownVehicle(vehicle: Vehicle, lastJobNumber: number | null): KnownVehicle {
	return { ...presentVehicle(vehicle), customerName: vehicle.customer?.name ?? '', lastJobNumber };
}
