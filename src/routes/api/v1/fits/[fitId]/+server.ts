import { endpoint } from '$lib/server/http/endpoint';
import { fitOperations } from '$lib/server/http/operations/fits';
import { logger } from '$lib/server/logger';
import { getFit } from '$lib/server/services/fits';

/** A fit that waits for its work begins when somebody asks. */
export const GET = endpoint(fitOperations.get, ({ person, params: { fitId } }) =>
	getFit(person, fitId, (error) => logger.error({ fitId, err: error }, 'fit failed'))
);
