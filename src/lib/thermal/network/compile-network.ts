import { KELVIN_AT_ZERO_C, STEFAN_BOLTZMANN } from '../correlations/radiation';
import type { HeatSystem } from '../solve/heat-system';
import { checkNetwork } from './check-network';
import type { NetworkDescription, NetworkLink, NetworkSource } from './description';
import { readOpening, readResistanceFactor } from './element-laws';
import { countKinds, planMixes, planScatter, sortByKind, type Mix } from './lay-out';

type LinkKind = NetworkLink['kind'];
type LinkOf<K extends LinkKind> = Extract<NetworkLink, { kind: K }>;

/** Where the heat of one link or source goes, as indices into the table of nodes. */
interface Ends {
	from: Int32Array;
	to: Int32Array;
}

/**
 * A network laid out in flat arrays, so that its heats and their derivatives are summed without looking up a name.
 *
 * What changes in time is set from outside through `set…`, by the name of the node, link or source.
 */
export class CompiledNetwork implements HeatSystem {
	readonly size: number;
	readonly capacityJPerK: Float64Array;
	readonly pattern: readonly (readonly [number, number])[];
	readonly storedNames: readonly string[];
	/** Called by the integrator whenever time moves. */
	drive: (timeS: number) => void = () => {};

	private readonly index: Map<string, number>;
	private readonly places = new Map<string, number>();
	/** Temperatures of all nodes: stored ones first, then fixed, then mixed. */
	private readonly temps: Float64Array;
	private readonly fourthPowers: Float64Array;
	private readonly gains: Float64Array;
	private readonly mixes: Mix[];
	/** Links in the order conductance, flow, radiation, gate, excess; then sources heat, joule. */
	private readonly ends: Ends;
	private readonly coefficients: Float64Array;
	private readonly heats: Float64Array;
	/** Ends of the runs of links of one kind. */
	private readonly stops: Record<LinkKind | NetworkSource['kind'], number>;
	private readonly gates: LinkOf<'gate'>[];
	private readonly carryTo: Int32Array;
	private readonly joules: Extract<NetworkSource, { kind: 'joule' }>[];
	private readonly currents: Float64Array;
	/** dQ/dTfrom and dQ/dTto of each link. */
	private readonly slopes: Float64Array;
	private readonly scatterPlace: Int32Array;
	private readonly scatterSlope: Int32Array;
	private readonly scatterWeight: Float64Array;

	constructor(description: NetworkDescription) {
		const { nodes } = description;
		checkNetwork(description);
		const ofKind = (kind: string) => nodes.filter((node) => node.kind === kind).map(({ name }) => name);
		this.storedNames = ofKind('stored');
		this.size = this.storedNames.length;
		const ordered = [...this.storedNames, ...ofKind('fixed'), ...ofKind('mixed')];
		this.index = new Map(ordered.map((name, at) => [name, at]));
		this.capacityJPerK = new Float64Array(this.size);
		this.temps = new Float64Array(ordered.length);
		this.fourthPowers = new Float64Array(ordered.length);
		this.gains = new Float64Array(ordered.length);

		const links = sortByKind(description.links, ['conductance', 'flow', 'radiation', 'gate', 'excess']);
		const sources = sortByKind(description.sources, ['heat', 'joule']);
		const count = links.length + sources.length;
		[...links, ...sources].forEach(({ name }, at) => this.places.set(name, at));
		this.ends = {
			from: Int32Array.from([...links.map(({ from }) => this.indexOf(from)), ...sources.map(() => 0)]),
			to: Int32Array.from([...links.map(({ to }) => to), ...sources.map(({ node }) => node)], (name) =>
				this.indexOf(name)
			)
		};
		this.coefficients = new Float64Array(count);
		this.heats = new Float64Array(count);
		this.slopes = new Float64Array(2 * count);
		this.stops = countKinds(links, sources);
		this.mixes = planMixes(nodes, (node) => this.indexOf(node));
		this.gates = links.filter((link) => link.kind === 'gate');
		this.carryTo = Int32Array.from(this.gates, (gate) => this.indexOf(gate.carryTo));
		this.joules = sources.filter((source) => source.kind === 'joule');
		this.currents = new Float64Array(this.joules.length);
		this.fill(description);

		const scatter = planScatter(links, sources, {
			size: this.size,
			indexOf: (node) => this.indexOf(node),
			mixes: this.mixes
		});
		this.pattern = scatter.map(({ row, column }) => [row, column] as const);
		this.scatterPlace = Int32Array.from(scatter, ({ row, column }) => row * this.size + column);
		this.scatterSlope = Int32Array.from(scatter, ({ slope }) => slope);
		this.scatterWeight = Float64Array.from(scatter, ({ weight }) => weight);
	}
	/**
	 * Takes the values of a description of the same shape: its names and ends, what is mixed and what gates carry are
	 * those that the network was laid out for.
	 */
	take(description: NetworkDescription): void {
		checkNetwork(description);
		this.fill(description);
	}

	private fill({ nodes, links, sources }: NetworkDescription): void {
		const { capacityJPerK, temps, coefficients, gates, joules, currents, stops } = this;
		for (const node of nodes) {
			const at = this.indexOf(node.name);
			if (node.kind === 'stored') capacityJPerK[at] = node.heatCapacityJPerK;
			else if (node.kind === 'fixed') temps[at] = node.tempC;
			else this.setMixOffset(this.mixOf(node.name), node.offsetK);
		}
		for (const link of links) {
			const at = this.placeOf(link.name);
			coefficients[at] =
				link.kind === 'radiation' ? STEFAN_BOLTZMANN * link.exchangeAreaM2 : link.conductanceWPerK;
			if (link.kind === 'gate') gates[at - stops.radiation] = link;
		}
		for (const source of sources) {
			const at = this.placeOf(source.name);
			coefficients[at] = source.kind === 'heat' ? source.heatW : source.r25Ohm;
			if (source.kind !== 'joule') continue;
			joules[at - stops.heat] = source;
			currents[at - stops.heat] = source.currentA;
		}
	}

	indexOf(node: string): number {
		const at = this.index.get(node);
		if (at === undefined) throw new RangeError(`no node is called "${node}"`);
		return at;
	}

	placeOf(part: string): number {
		const at = this.places.get(part);
		if (at === undefined) throw new RangeError(`no link or source is called "${part}"`);
		return at;
	}

	/** Index of a mixed node for setMixOffset. */
	mixOf(node: string): number {
		const at = this.indexOf(node);
		return this.mixes.findIndex((mix) => mix.node === at);
	}

	setFixedTemp(node: number, tempC: number): void {
		this.temps[node] = tempC;
	}

	/** Conductance W/K, heat W or resistance Ω of a link or source. */
	setCoefficient(place: number, value: number): void {
		this.coefficients[place] = value;
	}

	setMixOffset(mix: number, offsetK: number): void {
		this.mixes[mix]!.offsetK = offsetK;
	}

	/** The current through all joule sources, A. */
	setCurrent(currentA: number): void {
		for (let k = 0; k < this.currents.length; k++) this.currents[k] = currentA;
	}

	setTime(timeS: number): void {
		this.drive(timeS);
	}

	sumHeats(temps: Float64Array, heats: Float64Array): void {
		this.spread(temps);
		const { temps: all, fourthPowers, gains, ends, coefficients, heats: flows, stops } = this;
		const { from, to } = ends;
		for (let i = 0; i < gains.length; i++) gains[i] = 0;
		let at = 0;
		for (; at < stops.conductance; at++) {
			const a = from[at]!;
			const b = to[at]!;
			const q = coefficients[at]! * (all[a]! - all[b]!);
			flows[at] = q;
			gains[a] = gains[a]! - q;
			gains[b] = gains[b]! + q;
		}
		for (; at < stops.flow; at++) {
			const b = to[at]!;
			const q = coefficients[at]! * (all[from[at]!]! - all[b]!);
			flows[at] = q;
			gains[b] = gains[b]! + q;
		}
		for (; at < stops.radiation; at++) {
			const a = from[at]!;
			const b = to[at]!;
			const q = coefficients[at]! * (fourthPowers[a]! - fourthPowers[b]!);
			flows[at] = q;
			gains[a] = gains[a]! - q;
			gains[b] = gains[b]! + q;
		}
		this.sumGates();
		for (at = stops.gate; at < stops.excess; at++) {
			const a = from[at]!;
			const b = to[at]!;
			const q = coefficients[at]! * Math.max(all[a]! - all[b]!, 0);
			flows[at] = q;
			gains[a] = gains[a]! - q;
			gains[b] = gains[b]! + q;
		}
		for (; at < stops.heat; at++) {
			const b = to[at]!;
			flows[at] = coefficients[at]!;
			gains[b] = gains[b]! + coefficients[at]!;
		}
		this.sumJoules();
		for (let i = 0; i < this.size; i++) heats[i] = gains[i]!;
	}

	fillJacobian(temps: Float64Array, jacobian: Float64Array): void {
		this.spread(temps);
		const { temps: all, ends, coefficients, slopes, stops } = this;
		const { from, to } = ends;
		let at = 0;
		for (; at < stops.flow; at++) {
			slopes[2 * at] = coefficients[at]!;
			slopes[2 * at + 1] = -coefficients[at]!;
		}
		for (; at < stops.radiation; at++) {
			const a = all[from[at]!]! + KELVIN_AT_ZERO_C;
			const b = all[to[at]!]! + KELVIN_AT_ZERO_C;
			slopes[2 * at] = 4 * coefficients[at]! * a * a * a;
			slopes[2 * at + 1] = -4 * coefficients[at]! * b * b * b;
		}
		this.slopeGates();
		for (at = stops.gate; at < stops.excess; at++) {
			const slope = all[from[at]!]! > all[to[at]!]! ? coefficients[at]! : 0;
			slopes[2 * at] = slope;
			slopes[2 * at + 1] = -slope;
		}
		this.slopeJoules();
		jacobian.fill(0);
		const { scatterPlace, scatterSlope, scatterWeight } = this;
		for (let k = 0; k < scatterPlace.length; k++) {
			const place = scatterPlace[k]!;
			jacobian[place] = jacobian[place]! + scatterWeight[k]! * slopes[scatterSlope[k]!]!;
		}
	}

	sumThroughput(throughput: Float64Array): void {
		const { ends, heats, size, stops } = this;
		throughput.fill(0);
		for (let at = 0; at < heats.length; at++) {
			const amount = Math.abs(heats[at]!);
			const from = ends.from[at]!;
			const to = ends.to[at]!;
			const givesHeat = at < stops.excess && !(at >= stops.conductance && at < stops.flow);
			if (givesHeat && from < size) throughput[from] = throughput[from]! + amount;
			if (to < size) throughput[to] = throughput[to]! + amount;
		}
		for (let k = 0; k < this.gates.length; k++) {
			const to = this.carryTo[k]!;
			const amount = this.gates[k]!.carryShare * Math.abs(heats[stops.radiation + k]!);
			if (to < size) throughput[to] = throughput[to]! + amount;
		}
	}

	/** Copies the stored temperatures and works out the mixed ones and the fourth powers. */
	private spread(temps: Float64Array): void {
		const { temps: all, fourthPowers, mixes, size } = this;
		for (let i = 0; i < size; i++) all[i] = temps[i]!;
		for (let m = 0; m < mixes.length; m++) {
			const { node, offsetK, parts, weights } = mixes[m]!;
			let temp = offsetK;
			for (let k = 0; k < parts.length; k++) temp += weights[k]! * all[parts[k]!]!;
			all[node] = temp;
		}
		for (let i = 0; i < all.length; i++) {
			const kelvin = all[i]! + KELVIN_AT_ZERO_C;
			const square = kelvin * kelvin;
			fourthPowers[i] = square * square;
		}
	}

	private sumGates(): void {
		const { gates, temps: all, gains, ends, coefficients, carryTo, stops } = this;
		for (let k = 0; k < gates.length; k++) {
			const at = stops.radiation + k;
			const a = ends.from[at]!;
			const b = ends.to[at]!;
			const gate = gates[k]!;
			const q = coefficients[at]! * readOpening(gate, all[a]!) * (all[a]! - all[b]!);
			this.heats[at] = q;
			gains[a] = gains[a]! - q;
			gains[b] = gains[b]! + q;
			const c = carryTo[k]!;
			gains[c] = gains[c]! + gate.carryShare * q;
		}
	}

	private slopeGates(): void {
		const { gates, temps: all, ends, coefficients, slopes, stops } = this;
		for (let k = 0; k < gates.length; k++) {
			const at = stops.radiation + k;
			const { openC, fullC } = gates[k]!;
			const temp = all[ends.from[at]!]!;
			const opening = readOpening(gates[k]!, temp);
			const moving = opening > 0 && opening < 1 ? (temp - all[ends.to[at]!]!) / (fullC - openC) : 0;
			slopes[2 * at] = coefficients[at]! * (opening + moving);
			slopes[2 * at + 1] = -coefficients[at]! * opening;
		}
	}

	private sumJoules(): void {
		const { joules, temps: all, gains, ends, coefficients, currents, stops, heats } = this;
		for (let k = 0; k < joules.length; k++) {
			const at = stops.heat + k;
			const node = ends.to[at]!;
			const current = currents[k]!;
			const factor = readResistanceFactor(joules[k]!.activationK, all[node]!);
			const q = current === 0 ? 0 : current * current * coefficients[at]! * factor;
			heats[at] = q;
			gains[node] = gains[node]! + q;
		}
	}

	private slopeJoules(): void {
		const { joules, temps: all, ends, coefficients, currents, slopes, stops } = this;
		for (let k = 0; k < joules.length; k++) {
			const at = stops.heat + k;
			const { activationK } = joules[k]!;
			const temp = all[ends.to[at]!]!;
			const kelvin = temp + KELVIN_AT_ZERO_C;
			const current = currents[k]!;
			const q = current * current * coefficients[at]! * readResistanceFactor(activationK, temp);
			slopes[2 * at] = current === 0 ? 0 : (-q * activationK) / (kelvin * kelvin);
		}
	}
}
