import { endpoint } from '$lib/server/http/endpoint';
import { batteryOperations } from '$lib/server/http/operations/batteries';
import { createBattery, listBatteries } from '$lib/server/services/batteries';

export const GET = endpoint(batteryOperations.list, async ({ person }) => ({
	rows: await listBatteries(person)
}));

export const POST = endpoint(batteryOperations.create, ({ person, body }) => createBattery(person, body));
