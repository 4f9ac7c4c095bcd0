import type { SignedInPerson } from '../../src/lib/schemas/people';
import { StoredFile } from '../../src/lib/server/db/models';
import { createJob } from '../../src/lib/server/services/jobs';
import { addMount } from '../../src/lib/server/services/mounts';
import { storage } from '../../src/lib/server/storage';
import { newJob } from './records';

/** A mount of a job of its own. */
export async function makeMount(person: SignedInPerson) {
	const job = await createJob(person, newJob());
	return addMount(person, job.id, { name: 'Exhaust corner', positionKind: 'under-bonnet' });
}

/** What the storage holds. */
export async function listKept(): Promise<string[]> {
	const kept: string[] = [];
	for await (const { key } of storage().list()) kept.push(key);
	return kept.sort();
}

export const contentIdOf = async (fileId: number): Promise<string> =>
	(await StoredFile.findByPk(fileId))!.contentId;
