import { endpoint } from '$lib/server/http/endpoint';
import { assessmentOperations } from '$lib/server/http/operations/assessments';
import { getAssessment } from '$lib/server/services/assessments';

export const GET = endpoint(assessmentOperations.get, ({ person, params }) =>
	getAssessment(person, params.assessmentId)
);
