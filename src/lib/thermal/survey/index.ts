export * from './types';
export { LENGTH_LIMITS_MM, type LengthKey } from './length-limits';
