/**
 * The version of the equations, the solver and the defaults. It changes whenever the same scenario could give other
 * digits, so that a stored assessment can be made again by the engine that made it.
 */
export const ENGINE_VERSION = '1.3.0';
