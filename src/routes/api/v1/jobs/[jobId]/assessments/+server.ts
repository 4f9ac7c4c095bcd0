import { endpoint } from '$lib/server/http/endpoint';
import { assessmentOperations } from '$lib/server/http/operations/assessments';
import { assessJob, listAssessments } from '$lib/server/services/assessments';

export const GET = endpoint(assessmentOperations.listOfJob, async ({ person, params }) => ({
	rows: await listAssessments(person, params.jobId)
}));

export const POST = endpoint(assessmentOperations.assessJob, async ({ person, params }) => ({
	rows: await assessJob(person, params.jobId)
}));
