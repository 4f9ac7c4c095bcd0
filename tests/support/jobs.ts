import { Customer, Job, Vehicle } from '../../src/lib/server/db/models';
import type { SignedInPerson } from '../../src/lib/schemas/people';

/** A job with nothing in it yet but a customer and a vehicle. */
export async function makeBareJob(person: SignedInPerson): Promise<number> {
	const { workshopId } = person;
	const customer = await Customer.create({ workshopId, name: 'Ilse Tarn' });
	const vehicle = await Vehicle.create({
		...{ workshopId, customerId: customer.id, make: 'Marlow', model: 'Ridge', modelYear: 2019 },
		...{ engineLayout: 'inline' as const, massKg: 3_100, dragAreaM2: 1.35 }
	});
	const number = 1 + (await Job.count({ where: { workshopId } }));
	const job = await Job.create({
		...{ workshopId, number, customerId: customer.id, vehicleId: vehicle.id, createdBy: person.id }
	});
	return job.id;
}
