/**
 * A lumped thermal network in words and numbers.
 *
 * Sign convention: the heat of a link, in W, is positive from `from` to `to`; a stored node warms by what comes in:
 * C dT/dt = Σ heat in − Σ heat out + sources.
 */
export type NetworkNode =
	/** Stores heat: its temperature is solved for. */
	| { name: string; kind: 'stored'; heatCapacityJPerK: number }
	/** A boundary whose temperature is prescribed. */
	| { name: string; kind: 'fixed'; tempC: number }
	/** Air mixed from others: T = offset + Σ weight·T. Heat given to it is carried away by the flow. */
	| { name: string; kind: 'mixed'; offsetK: number; parts: readonly MixPart[] };

/** What one stored or fixed node contributes to a mixed one. */
export interface MixPart {
	node: string;
	weight: number;
}

export type NetworkLink =
	/** Q = G (Tfrom − Tto). */
	| { name: string; kind: 'conductance'; from: string; to: string; conductanceWPerK: number }
	/** Q = σ A (T̃from⁴ − T̃to⁴), A the exchange area with emissivity and view in it. */
	| { name: string; kind: 'radiation'; from: string; to: string; exchangeAreaM2: number }
	/** Air that arrives at the temperature of `from`: `to` gains Q = G (Tfrom − Tto), `from` gives nothing. */
	| { name: string; kind: 'flow'; from: string; to: string; conductanceWPerK: number }
	/** A thermostat: Q = G o (Tfrom − Tto), o = clamp((Tfrom − open)/(full − open), 0, 1); a share of Q arrives at `carryTo`. */
	| {
			name: string;
			kind: 'gate';
			from: string;
			to: string;
			conductanceWPerK: number;
			openC: number;
			fullC: number;
			carryTo: string;
			carryShare: number;
	  }
	/** Only above a setting: Q = G max(Tfrom − Tto, 0). */
	| { name: string; kind: 'excess'; from: string; to: string; conductanceWPerK: number };

export type NetworkSource =
	| { name: string; kind: 'heat'; node: string; heatW: number }
	/** Q = i²R, R = r25 exp(a (1/T̃ − 1/298.15)). */
	| { name: string; kind: 'joule'; node: string; currentA: number; r25Ohm: number; activationK: number };

export interface NetworkDescription {
	nodes: readonly NetworkNode[];
	links: readonly NetworkLink[];
	sources: readonly NetworkSource[];
}
