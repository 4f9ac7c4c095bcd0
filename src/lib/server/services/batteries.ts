import type { BatteryInput, BatteryView } from '$lib/schemas/batteries';
import type { SignedInPerson } from '$lib/schemas/people';
import { BatteryRecord } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { presentBattery } from '../presenters/batteries';
import { recordBy } from './audit';
import { orNameTaken, saveVersioned } from './records';

export async function listBatteries(person: SignedInPerson): Promise<BatteryView[]> {
	allow(person, 'batteries.read');
	const batteries = await BatteryRecord.findAll({
		where: { workshopId: person.workshopId },
		order: [
			['maker', 'ASC'],
			['model', 'ASC'],
			['id', 'ASC']
		]
	});
	return batteries.map(presentBattery);
}

export async function getBattery(person: SignedInPerson, batteryId: number): Promise<BatteryView> {
	allow(person, 'batteries.read');
	const battery = await BatteryRecord.findOne({ where: { id: batteryId, workshopId: person.workshopId } });
	if (!battery) throw notFound('battery');
	return presentBattery(battery);
}

export async function createBattery(person: SignedInPerson, input: BatteryInput): Promise<BatteryView> {
	allow(person, 'batteries.write');
	return orNameTaken('battery', 'model', () =>
		inTransaction(async (transaction) => {
			const battery = await BatteryRecord.create(
				{ ...input, workshopId: person.workshopId },
				{ transaction }
			);
			const subject = { type: 'battery', id: battery.id };
			await recordBy(person, 'battery.created', subject, transaction, { ...input });
			return presentBattery(battery);
		})
	);
}

export async function updateBattery(
	person: SignedInPerson,
	batteryId: number,
	{ version, ...input }: BatteryInput & { version: number }
): Promise<BatteryView> {
	allow(person, 'batteries.write');
	return orNameTaken('battery', 'model', () =>
		inTransaction(async (transaction) => {
			const where = { id: batteryId, workshopId: person.workshopId };
			const battery = await BatteryRecord.findOne({ where, transaction });
			if (!battery) throw notFound('battery');
			await saveVersioned(battery, 'battery', version, input, transaction);
			const subject = { type: 'battery', id: battery.id };
			await recordBy(person, 'battery.changed', subject, transaction, { ...input });
			return presentBattery(battery);
		})
	);
}
