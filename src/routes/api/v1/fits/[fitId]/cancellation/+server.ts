import { endpoint } from '$lib/server/http/endpoint';
import { fitOperations } from '$lib/server/http/operations/fits';
import { cancelFit } from '$lib/server/services/fits';

export const POST = endpoint(fitOperations.cancel, ({ person, params }) => cancelFit(person, params.fitId));
