import { endpoint } from '$lib/server/http/endpoint';
import { jobOperations } from '$lib/server/http/operations/jobs';
import { setJobClimate } from '$lib/server/services/jobs';

export const PUT = endpoint(jobOperations.setClimate, ({ person, params, body }) =>
	setJobClimate(person, params.jobId, body)
);
