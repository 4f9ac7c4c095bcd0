import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Transaction } from 'sequelize';
import { legsChangeSchema } from '$lib/schemas/traces';
import demo from '../../../../../seeds/demo-traces.json';
import { Customer, Job, Mount } from '../../db/models';
import { sha256 } from '../../hash';
import { newIncomingPath } from '../../storage';
import { readAtOnce } from '../trace-reading';
import { saveLegs } from '../trace-views';
import { addTrace, confirmMapping, getTrace } from '../traces';
import type { Crew } from './seed-people';

/** The application runs in the project's folder, where its reference data lie. */
const FOLDER = join('reference-data', 'demo-traces');

const MINUTE_S = 60;

/** As they were driven; the logger told no speeds. */
const toLeg = ({ endMinute, ...leg }: (typeof demo.days)[number]['legs'][number]) => ({
	...leg,
	endS: endMinute * MINUTE_S
});

async function findMount(workshopId: number, transaction: Transaction): Promise<Mount> {
	const ofUs = { workshopId };
	const customer = await Customer.findOne({ where: { ...ofUs, name: demo.customer }, transaction });
	const job = await Job.findOne({ where: { ...ofUs, customerId: customer?.id ?? 0 }, transaction });
	const mount = await Mount.findOne({
		where: { ...ofUs, jobId: job?.id ?? 0, letter: demo.mount },
		transaction
	});
	if (!mount) throw new Error('The demo has no mount for its traces.');
	return mount;
}

/** Three days that were made up, and say so, at the mount that they were made for. */
export async function seedTraces({ key, workshopId, staff }: Crew, transaction: Transaction): Promise<void> {
	if (key !== demo.workshop) return;
	const engineer = staff.find(({ role }) => role === 'engineer');
	if (!engineer) throw new Error('The demo has nobody who may send traces.');
	const { id: mountId } = await findMount(workshopId, transaction);
	for (const { file, startHour, legs } of demo.days) {
		const path = await newIncomingPath();
		const content = await readFile(join(FOLDER, file));
		await writeFile(path, content);
		const sent = { name: file, path, bytes: content.byteLength, sha256: sha256(content) };
		const { id, mapping, version } = await addTrace(engineer, mountId, sent);
		await confirmMapping(engineer, id, { mapping, isSynthetic: true, startHour, version });
		await readAtOnce(engineer, id);
		const change = { legs: legs.map(toLeg), version: (await getTrace(engineer, id)).version };
		await saveLegs(engineer, id, legsChangeSchema.parse(change));
	}
}
