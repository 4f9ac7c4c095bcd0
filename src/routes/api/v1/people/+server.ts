import { endpoint } from '$lib/server/http/endpoint';
import { peopleOperations } from '$lib/server/http/operations/people';
import { listPeople } from '$lib/server/services/people';

export const GET = endpoint(peopleOperations.list, ({ person }) => listPeople(person));
