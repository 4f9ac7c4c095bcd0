import { Op, type Transaction } from 'sequelize';
import type { SignedInPerson } from '$lib/schemas/people';
import type { KnownVehicle, VehicleInput, VehicleView } from '$lib/schemas/vehicles';
import { Job, Vehicle } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { presentKnownVehicle, presentVehicle } from '../presenters/vehicles';
import { recordBy } from './audit';
import { saveVersioned } from './records';
import { matchWords } from './search-words';

const MOST_FOUND = 20;
const SEARCHED = ['registration', '$customer.name$', 'make', 'model'];

async function lastJobNumbers(workshopId: number, vehicleIds: number[]): Promise<Map<number, number>> {
	const jobs = await Job.findAll({
		where: { workshopId, vehicleId: { [Op.in]: vehicleIds } },
		attributes: ['vehicleId', 'number'],
		order: [['number', 'ASC']]
	});
	return new Map(jobs.map((job) => [job.vehicleId, job.number]));
}

/** Vehicles that the shop has had before, the newest first: by registration, customer, make or model. */
export async function findVehicles(person: SignedInPerson, search: string): Promise<KnownVehicle[]> {
	allow(person, 'vehicles.read');
	const { workshopId } = person;
	const vehicles = await Vehicle.findAll({
		where: { [Op.and]: [{ workshopId }, matchWords(search, SEARCHED)] },
		include: ['customer'],
		order: [['id', 'DESC']],
		limit: MOST_FOUND,
		subQuery: false
	});
	const lastJobs = await lastJobNumbers(
		workshopId,
		vehicles.map((vehicle) => vehicle.id)
	);
	return vehicles.map((vehicle) => presentKnownVehicle(vehicle, lastJobs.get(vehicle.id) ?? null));
}

export async function getVehicle(person: SignedInPerson, vehicleId: number): Promise<VehicleView> {
	allow(person, 'vehicles.read');
	const vehicle = await Vehicle.findOne({ where: { id: vehicleId, workshopId: person.workshopId } });
	if (!vehicle) throw notFound('vehicle');
	return presentVehicle(vehicle);
}

export async function addVehicle(
	person: SignedInPerson,
	customerId: number,
	input: VehicleInput,
	transaction: Transaction
): Promise<number> {
	const { workshopId } = person;
	const vehicle = await Vehicle.create({ ...input, workshopId, customerId }, { transaction });
	const subject = { type: 'vehicle', id: vehicle.id };
	await recordBy(person, 'vehicle.created', subject, transaction, { customerId, ...input });
	return vehicle.id;
}

export async function updateVehicle(
	person: SignedInPerson,
	vehicleId: number,
	{ version, ...input }: VehicleInput & { version: number }
): Promise<VehicleView> {
	allow(person, 'vehicles.write');
	return inTransaction(async (transaction) => {
		const where = { id: vehicleId, workshopId: person.workshopId };
		const vehicle = await Vehicle.findOne({ where, transaction });
		if (!vehicle) throw notFound('vehicle');
		await saveVersioned(vehicle, 'vehicle', version, input, transaction);
		const subject = { type: 'vehicle', id: vehicle.id };
		await recordBy(person, 'vehicle.changed', subject, transaction, { ...input });
		return presentVehicle(vehicle);
	});
}
