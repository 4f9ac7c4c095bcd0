import type { Operation } from '../operation';
import { dayPlanOperations } from './day-plans';
import { mountOperations } from './mounts';
import { placeOperations } from './places';

/** Everything that the API does. A route without an entry here, or an entry without a route, fails a test. */
export const OPERATIONS: readonly Operation[] = [placeOperations, mountOperations, dayPlanOperations].flatMap(
	(group) => Object.values(group) as unknown as Operation[]
);
