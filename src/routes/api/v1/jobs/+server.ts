import { endpoint } from '$lib/server/http/endpoint';
import { jobOperations } from '$lib/server/http/operations/jobs';
import { createJob, listJobs } from '$lib/server/services/jobs';

export const GET = endpoint(jobOperations.list, ({ person, query }) => listJobs(person, query));

export const POST = endpoint(jobOperations.create, ({ person, body }) => createJob(person, body));
