import { endpoint } from '$lib/server/http/endpoint';
import { assessmentOperations } from '$lib/server/http/operations/assessments';
import { getOutlook } from '$lib/server/services/outlooks';

export const GET = endpoint(assessmentOperations.outlook, ({ person, params }) =>
	getOutlook(person, params.assessmentId)
);
