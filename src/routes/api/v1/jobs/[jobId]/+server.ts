import { endpoint } from '$lib/server/http/endpoint';
import { jobOperations } from '$lib/server/http/operations/jobs';
import { getJob } from '$lib/server/services/jobs';

export const GET = endpoint(jobOperations.get, ({ person, params }) => getJob(person, params.jobId));
