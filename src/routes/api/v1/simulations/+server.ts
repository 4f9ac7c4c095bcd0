import { endpoint } from '$lib/server/http/endpoint';
import { simulationOperations } from '$lib/server/http/operations/simulations';
import { simulate } from '$lib/server/services/simulations';

export const POST = endpoint(simulationOperations.run, async ({ person, body }) => simulate(person, body));
