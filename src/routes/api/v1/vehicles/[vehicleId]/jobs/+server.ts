import { endpoint } from '$lib/server/http/endpoint';
import { jobOperations } from '$lib/server/http/operations/jobs';
import { repeatJob } from '$lib/server/services/jobs';

export const POST = endpoint(jobOperations.repeat, ({ person, params, body }) =>
	repeatJob(person, { ...params, ...body })
);
