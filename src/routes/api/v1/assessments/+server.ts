import { endpoint } from '$lib/server/http/endpoint';
import { assessmentOperations } from '$lib/server/http/operations/assessments';
import { assessMount } from '$lib/server/services/assessments';

export const POST = endpoint(assessmentOperations.create, ({ person, body }) => assessMount(person, body));
