import type { NetworkLink, NetworkSource } from './description';

/** A network without its values: what stands where, and which values change in time. */
export interface NetworkShape {
	stored: readonly string[];
	fixed: readonly string[];
	mixed: readonly { name: string; parts: readonly string[] }[];
	links: readonly LinkShape[];
	sources: readonly SourceShape[];
	/**
	 * What changes in time: fixed nodes (their temperature), mixed nodes (their offset), links (their conductance) and
	 * heats, by name. `bent` ones follow a parabola, `lit` ones are in proportion to one signal.
	 */
	driven: { bent: readonly string[]; lit: readonly string[] };
}

export interface LinkShape {
	name: string;
	kind: NetworkLink['kind'];
	from: string;
	to: string;
	/** Where a gate carries a share of its heat. */
	carryTo?: string;
}

export interface SourceShape {
	name: string;
	kind: NetworkSource['kind'];
	node: string;
}

/** What else is read at each instant: the signal of the lit values, and the current of all joule sources. */
export const SIGNAL = 'signal';
export const CURRENT = 'current';
