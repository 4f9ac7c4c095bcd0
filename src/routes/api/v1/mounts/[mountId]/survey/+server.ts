import { endpoint } from '$lib/server/http/endpoint';
import { mountOperations } from '$lib/server/http/operations/mounts';
import { saveSurvey } from '$lib/server/services/mounts';

export const PUT = endpoint(mountOperations.survey, ({ person, params, body }) =>
	saveSurvey(person, params.mountId, body)
);
