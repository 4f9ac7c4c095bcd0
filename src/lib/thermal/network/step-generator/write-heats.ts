import { CURRENT, type LinkShape, type NetworkShape } from '../shape';
import { toIdentifier, writeSum } from './names';
import { keyOf, type SlotPlan } from './slots';

type Term = { sign: 1 | -1; text: string };

/** Writes expressions for one network; constants are locals named by `local`, driven values by `drivenAt`. */
export class HeatWriter {
	constructor(
		readonly shape: NetworkShape,
		private readonly slots: SlotPlan
	) {}

	/** The local that holds a value of the leg. */
	constant(key: string): string {
		const place = this.slots.constants.get(key);
		if (place === undefined) throw new RangeError(`no value is called "${key}"`);
		return `k${place}`;
	}

	/** The local that holds a driven value at one instant. */
	drivenAt(name: string, instant: string): string {
		return `d${instant}_${toIdentifier(name)}`;
	}

	isDriven(name: string): boolean {
		const { bent, lit } = this.slots.driven;
		return bent.has(name) || lit.has(name);
	}

	private valueOf(name: string, key: string, instant: string): string {
		return this.isDriven(name) ? this.drivenAt(name, instant) : this.constant(key);
	}

	/** Temperature of any node at a stage. */
	temp(node: string, stage: string): string {
		if (this.shape.fixed.includes(node)) return this.valueOf(node, keyOf.temp(node), stage);
		return `t${stage}_${toIdentifier(node)}`;
	}

	private power(node: string, stage: string): string {
		return `p${stage}_${toIdentifier(node)}`;
	}

	heat(name: string, stage: string): string {
		return `q${stage}_${toIdentifier(name)}`;
	}

	size(link: string, instant: string): string {
		return this.valueOf(link, keyOf.size(link), instant);
	}

	private hasSlot(name: string): boolean {
		const { shape } = this;
		return shape.links.some(({ kind, from, to }) => kind === 'radiation' && (from === name || to === name));
	}

	/** Mixed temperatures, fourth powers, each heat and each node's sum at one stage. */
	writeStage(stage: string): string[] {
		const { shape } = this;
		const radiating = [...shape.stored, ...shape.fixed, ...shape.mixed.map(({ name }) => name)].filter(
			(name) => this.hasSlot(name)
		);
		return [
			...shape.mixed.map(
				({ name, parts }) => `const ${this.temp(name, stage)} = ${this.mixOf(name, parts, stage)};`
			),
			...radiating.flatMap((node) => [
				`const s${stage}_${toIdentifier(node)} = (${this.temp(node, stage)} + KELVIN) * (${this.temp(node, stage)} + KELVIN);`,
				`const ${this.power(node, stage)} = s${stage}_${toIdentifier(node)} * s${stage}_${toIdentifier(node)};`
			]),
			...shape.links.flatMap((link) => this.writeLink(link, stage)),
			...shape.sources.flatMap(({ name, kind, node }) =>
				kind === 'joule' ? this.writeJoule(name, node, stage) : []
			),
			...shape.stored.map((node) => `const h${stage}_${toIdentifier(node)} = ${this.sumOf(node, stage)};`)
		];
	}

	private mixOf(name: string, parts: readonly string[], stage: string): string {
		const offset = this.valueOf(name, keyOf.offset(name), stage);
		const terms = parts.map(
			(part) => `${this.constant(keyOf.weight(name, part))} * ${this.temp(part, stage)}`
		);
		return [offset, ...terms].join(' + ');
	}

	private writeLink(link: LinkShape, stage: string): string[] {
		const { name, kind, from, to } = link;
		const difference = `(${this.temp(from, stage)} - ${this.temp(to, stage)})`;
		const q = `const ${this.heat(name, stage)}`;
		const size = this.size(name, stage);
		if (kind === 'radiation') {
			return [`${q} = ${size} * (${this.power(from, stage)} - ${this.power(to, stage)});`];
		}
		if (kind === 'gate') {
			const opening = `o${stage}_${toIdentifier(name)}`;
			const share = `(${this.temp(from, stage)} - ${this.constant(keyOf.open(name))}) * ${this.constant(keyOf.perWidth(name))}`;
			return [`const ${opening} = clampToUnit(${share});`, `${q} = ${size} * ${opening} * ${difference};`];
		}
		if (kind === 'excess') return [`${q} = ${size} * Math.max(${difference}, 0);`];
		return [`${q} = ${size} * ${difference};`];
	}

	/** Later stages take the resistance from where the step starts, which a series near there has without a call. */
	private writeJoule(name: string, node: string, stage: string): string[] {
		const id = toIdentifier(name);
		const current = this.drivenAt(CURRENT, stage);
		const activation = this.constant(keyOf.activation(name));
		const perKelvin = `1 / (${this.temp(node, stage)} + KELVIN)`;
		const moved = `${activation} * (${perKelvin} - y_${id})`;
		const start = [
			`const r_${id} = ${this.constant(keyOf.r25(name))} * resistanceFactor(${activation}, ${this.temp(node, stage)});`,
			`const y_${id} = ${perKelvin};`
		];
		const heat = `${current} * ${current} * r_${id}`;
		return stage === '0'
			? [...start, `const ${this.heat(name, stage)} = ${heat};`]
			: [`const ${this.heat(name, stage)} = ${heat} * growNear(${moved});`];
	}

	/** Every term of a node's balance; `write` says how a heat is written, null leaves it out. */
	balanceOf(node: string, write: (name: string) => string | null): Term[] {
		const terms: Term[] = [];
		const add = (sign: 1 | -1, name: string, share = ''): void => {
			const text = write(name);
			if (text !== null) terms.push({ sign, text: share + text });
		};
		for (const { name, kind, from, to, carryTo } of this.shape.links) {
			if (to === node) add(1, name);
			if (from === node && kind !== 'flow') add(-1, name);
			if (carryTo === node) add(1, name, `${this.constant(keyOf.share(name))} * `);
		}
		for (const source of this.shape.sources) if (source.node === node) add(1, source.name);
		return terms;
	}

	/** A heat as it stands in a sum: the local that holds it, or a prescribed one itself. */
	private heatTerm(name: string, stage: string): string {
		const isPrescribed = this.shape.sources.some((source) => source.name === name && source.kind === 'heat');
		return isPrescribed ? this.valueOf(name, keyOf.heat(name), stage) : this.heat(name, stage);
	}

	private sumOf(node: string, stage: string): string {
		return writeSum(this.balanceOf(node, (name) => this.heatTerm(name, stage)));
	}

	/** The sum of the sizes of all heats of a node at a stage. */
	throughputOf(node: string, stage: string): string {
		const terms = this.balanceOf(node, (name) => `Math.abs(${this.heatTerm(name, stage)})`);
		return terms.map(({ text }) => text).join(' + ');
	}
}
