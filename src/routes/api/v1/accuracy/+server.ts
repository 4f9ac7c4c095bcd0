import { endpoint } from '$lib/server/http/endpoint';
import { accuracyOperations } from '$lib/server/http/operations/accuracy';
import { readAccuracy } from '$lib/server/services/accuracy/read-accuracy';

export const GET = endpoint(accuracyOperations.read, ({ person }) => readAccuracy(person));
