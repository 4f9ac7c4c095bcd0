import type { MountView } from '$lib/schemas/mounts';
import type { Mount } from '../db/models';

export function presentMount(mount: Mount): MountView {
	const { id, jobId, letter, name, positionKind, survey, surveyComplete, cable, version } = mount;
	return { id, jobId, letter, name, positionKind, survey, surveyComplete, cable, version };
}
