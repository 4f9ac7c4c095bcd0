import { endpoint } from '$lib/server/http/endpoint';
import { jobOperations } from '$lib/server/http/operations/jobs';
import { setJobBattery } from '$lib/server/services/jobs';

export const PUT = endpoint(jobOperations.setBattery, ({ person, params, body }) =>
	setJobBattery(person, params.jobId, body)
);
