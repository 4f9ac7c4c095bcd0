import { RODAS } from '../../solve/rodas';
import type { NetworkShape } from '../shape';

/** Where each value of a network lies in the two arrays that a generated step reads. */
export interface SlotPlan {
	/** Values that hold for a leg: place by key. */
	constants: ReadonlyMap<string, number>;
	/** Values that change in time. */
	driven: DrivenPlan;
}

/** Places in the array of driven values. */
export interface DrivenPlan {
	/** Time at the start of the step in the parabolas' own count, s. */
	elapsed: number;
	/** Length of the step, s: handed over here, for a number that is an argument is put into a box. */
	length: number;
	/** First of the three coefficients of each parabola. */
	bent: ReadonlyMap<string, number>;
	/** Peak of each lit value. */
	lit: ReadonlyMap<string, number>;
	/** First of one value an instant, then the slope at the start of the step. */
	signal: number;
	current: number;
	size: number;
}

/** Shares of a step at which its stages look, each once. */
export const INSTANTS = [...new Set<number>(RODAS.times)];
/** Where the slope stands after the values of the instants. */
export const SLOPE = INSTANTS.length;

/** The keys of the values that hold for a leg; `sizeOf` a radiation is σ times its exchange area. */
export const keyOf = {
	capacity: (node: string) => `capacity of ${node}`,
	temp: (node: string) => `temperature of ${node}`,
	offset: (node: string) => `offset of ${node}`,
	weight: (node: string, part: string) => `weight of ${part} in ${node}`,
	size: (link: string) => `size of ${link}`,
	open: (gate: string) => `opening temperature of ${gate}`,
	perWidth: (gate: string) => `inverse width of ${gate}`,
	share: (gate: string) => `share carried by ${gate}`,
	heat: (source: string) => `heat of ${source}`,
	r25: (joule: string) => `resistance of ${joule}`,
	activation: (joule: string) => `activation of ${joule}`
};

function listConstants({ stored, fixed, mixed, links, sources, driven }: NetworkShape): string[] {
	const moving = new Set([...driven.bent, ...driven.lit]);
	const isStill = ({ name }: { name: string }) => !moving.has(name);
	return [
		...stored.map(keyOf.capacity),
		...fixed.filter((name) => isStill({ name })).map(keyOf.temp),
		...mixed.filter(isStill).map(({ name }) => keyOf.offset(name)),
		...mixed.flatMap(({ name, parts }) => parts.map((part) => keyOf.weight(name, part))),
		...links.filter(isStill).map(({ name }) => keyOf.size(name)),
		...links
			.filter(({ kind }) => kind === 'gate')
			.flatMap(({ name }) => [keyOf.open(name), keyOf.perWidth(name), keyOf.share(name)]),
		...sources.flatMap(({ kind, name }) => {
			if (kind === 'joule') return [keyOf.r25(name), keyOf.activation(name)];
			return isStill({ name }) ? [keyOf.heat(name)] : [];
		})
	];
}

function numberEach(keys: readonly string[]): Map<string, number> {
	return new Map(keys.map((key, place) => [key, place]));
}

function planDriven({ driven }: NetworkShape): DrivenPlan {
	const { bent, lit } = driven;
	const firstLit = 2 + 3 * bent.length;
	const signal = firstLit + lit.length;
	const current = signal + SLOPE + 1;
	return {
		elapsed: 0,
		length: 1,
		bent: new Map(bent.map((name, k) => [name, 2 + 3 * k])),
		lit: new Map(lit.map((name, k) => [name, firstLit + k])),
		signal,
		current,
		size: current + SLOPE + 1
	};
}

/** Gives each value of a network its place. */
export function planSlots(shape: NetworkShape): SlotPlan {
	return { constants: numberEach(listConstants(shape)), driven: planDriven(shape) };
}
