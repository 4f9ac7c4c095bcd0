import { endpoint } from '$lib/server/http/endpoint';
import { remedyOperations } from '$lib/server/http/operations/remedies';
import { getRemedyList, saveRemedyList } from '$lib/server/services/remedy-lists';

export const GET = endpoint(remedyOperations.get, ({ person }) => getRemedyList(person));

export const PUT = endpoint(remedyOperations.update, ({ person, body }) => saveRemedyList(person, body));
