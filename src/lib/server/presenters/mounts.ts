import type { MountView } from '$lib/schemas/mounts';
import type { Mount } from '../db/models';

export function presentMount(mount: Mount): MountView {
	const { id, jobId, letter, name, positionKind, survey, surveyComplete, version } = mount;
	// A mount that was made just now has not read its empty column yet.
	const cable = mount.cable ?? null;
	return { id, jobId, letter, name, positionKind, survey, surveyComplete, cable, version };
}
