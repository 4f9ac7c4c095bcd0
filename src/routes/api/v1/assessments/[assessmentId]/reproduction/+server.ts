import { endpoint } from '$lib/server/http/endpoint';
import { assessmentOperations } from '$lib/server/http/operations/assessments';
import { reproduceAssessment } from '$lib/server/services/assessments';

export const GET = endpoint(assessmentOperations.reproduce, ({ person, params }) =>
	reproduceAssessment(person, params.assessmentId)
);
