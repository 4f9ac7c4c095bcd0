import { CURRENT, type LinkShape } from '../shape';
import { toIdentifier, writeSum } from './names';
import { keyOf } from './slots';
import type { HeatWriter } from './write-heats';

type Term = { sign: 1 | -1; text: string };

/** Writes the derivatives of the heats at the start of a step: along the temperatures, and in time. */
export class SlopeWriter {
	private readonly stored: ReadonlySet<string>;

	constructor(private readonly heats: HeatWriter) {
		this.stored = new Set(heats.shape.stored);
	}

	/** The slopes of each link along its ends, `a…` and `b…`, and of each joule source along its node, `a…`. */
	writeSlopes(): string[] {
		const { links, sources } = this.heats.shape;
		return [
			...links.flatMap((link) => this.writeLink(link)),
			...sources.flatMap(({ name, kind, node }) => (kind === 'joule' ? [this.writeJoule(name, node)] : []))
		];
	}

	private writeLink({ name, kind, from, to }: LinkShape): string[] {
		const id = toIdentifier(name);
		const size = this.heats.size(name, '0');
		const fromC = this.heats.temp(from, '0');
		const toC = this.heats.temp(to, '0');
		if (kind === 'radiation') {
			return [
				`const a_${id} = 4 * ${size} * s0_${toIdentifier(from)} * (${fromC} + KELVIN);`,
				`const b_${id} = -4 * ${size} * s0_${toIdentifier(to)} * (${toC} + KELVIN);`
			];
		}
		if (kind === 'gate') {
			const opening = `o0_${id}`;
			const moving = `(${fromC} - ${toC}) * ${this.heats.constant(keyOf.perWidth(name))}`;
			return [
				`const a_${id} = ${size} * (${opening} + (${opening} > 0 && ${opening} < 1 ? ${moving} : 0));`,
				`const b_${id} = -${size} * ${opening};`
			];
		}
		if (kind === 'excess') {
			return [`const a_${id} = ${fromC} > ${toC} ? ${size} : 0;`, `const b_${id} = -a_${id};`];
		}
		return [`const a_${id} = ${size};`, `const b_${id} = -${size};`];
	}

	private writeJoule(name: string, node: string): string {
		const kelvin = `(${this.heats.temp(node, '0')} + KELVIN)`;
		const activation = this.heats.constant(keyOf.activation(name));
		return `const a_${toIdentifier(name)} = (-${this.heats.heat(name, '0')} * ${activation}) / (${kelvin} * ${kelvin});`;
	}

	/** The stored nodes on which a temperature depends, with their weights (none for one). */
	private expand(node: string): { column: string; weight: string | null }[] {
		if (this.stored.has(node)) return [{ column: node, weight: null }];
		const mix = this.heats.shape.mixed.find(({ name }) => name === node);
		if (!mix) return [];
		return mix.parts
			.filter((part) => this.stored.has(part))
			.map((part) => ({ column: part, weight: this.heats.constant(keyOf.weight(node, part)) }));
	}

	/** Every entry of the Jacobian that can be other than zero, row by row, as the sum that it is. */
	listJacobian(): { row: string; column: string; sum: string }[] {
		const entries = new Map<string, { row: string; column: string; terms: Term[] }>();
		const add = (row: string, along: string, sign: 1 | -1, slope: string): void => {
			if (!this.stored.has(row)) return;
			for (const { column, weight } of this.expand(along)) {
				const key = `${row}|${column}`;
				const entry = entries.get(key) ?? { row, column, terms: [] };
				entry.terms.push({ sign, text: weight === null ? slope : `${weight} * ${slope}` });
				entries.set(key, entry);
			}
		};
		const { links, sources } = this.heats.shape;
		for (const { name, kind, from, to, carryTo } of links) {
			const id = toIdentifier(name);
			for (const [along, slope] of [
				[from, `a_${id}`],
				[to, `b_${id}`]
			] as const) {
				if (kind !== 'flow') add(from, along, -1, slope);
				add(to, along, 1, slope);
				if (carryTo !== undefined)
					add(carryTo, along, 1, `${this.heats.constant(keyOf.share(name))} * ${slope}`);
			}
		}
		for (const { name, kind, node } of sources)
			if (kind === 'joule') add(node, node, 1, `a_${toIdentifier(name)}`);
		return [...entries.values()].map(({ row, column, terms }) => ({ row, column, sum: writeSum(terms) }));
	}

	/** ∂H/∂t: what each heat changes by because what is prescribed does; `dT` is the row of the driven values' slopes. */
	writeTimeSlopes(): string[] {
		const { shape } = this.heats;
		const moved = new Set<string>();
		const lines: string[] = [];
		for (const { name, parts } of shape.mixed) {
			const terms = [
				...(this.heats.isDriven(name) ? [this.heats.drivenAt(name, 'T')] : []),
				...parts
					.filter((part) => this.isMovingEnd(part))
					.map(
						(part) => `${this.heats.constant(keyOf.weight(name, part))} * ${this.heats.drivenAt(part, 'T')}`
					)
			];
			if (terms.length > 0) lines.push(`const v_${toIdentifier(name)} = ${terms.join(' + ')};`);
		}
		for (const link of shape.links) {
			const terms = this.timeTermsOf(link);
			if (terms.length === 0) continue;
			moved.add(link.name);
			lines.push(`const w_${toIdentifier(link.name)} = ${terms.join(' + ')};`);
		}
		for (const { name, kind } of shape.sources) {
			if (kind === 'joule') {
				const current = this.heats.drivenAt(CURRENT, '0');
				const slope = `2 * ${this.heats.heat(name, '0')} * ${this.heats.drivenAt(CURRENT, 'T')}`;
				lines.push(`const w_${toIdentifier(name)} = ${current} === 0 ? 0 : (${slope}) / ${current};`);
			} else if (this.heats.isDriven(name)) {
				lines.push(`const w_${toIdentifier(name)} = ${this.heats.drivenAt(name, 'T')};`);
			} else continue;
			moved.add(name);
		}
		for (const node of shape.stored) {
			const terms = this.heats.balanceOf(node, (name) =>
				moved.has(name) ? `w_${toIdentifier(name)}` : null
			);
			lines.push(`const g_${toIdentifier(node)} = ${writeSum(terms)};`);
		}
		return lines;
	}

	private isMovingEnd(node: string): boolean {
		return this.heats.shape.fixed.includes(node) && this.heats.isDriven(node);
	}

	/** How fast the temperature of an end moves by itself; null when it stands still or is solved for. */
	private endSlope(node: string): string | null {
		if (this.isMovingEnd(node)) return this.heats.drivenAt(node, 'T');
		const mix = this.heats.shape.mixed.find(({ name }) => name === node);
		const moves = mix && (this.heats.isDriven(node) || mix.parts.some((part) => this.isMovingEnd(part)));
		return moves ? `v_${toIdentifier(node)}` : null;
	}

	private timeTermsOf({ name, from, to }: LinkShape): string[] {
		const id = toIdentifier(name);
		const terms: string[] = [];
		if (this.heats.isDriven(name)) {
			const difference = `(${this.heats.temp(from, '0')} - ${this.heats.temp(to, '0')})`;
			terms.push(`${this.heats.drivenAt(name, 'T')} * ${difference}`);
		}
		const fromSlope = this.endSlope(from);
		const toSlope = this.endSlope(to);
		if (fromSlope !== null) terms.push(`a_${id} * ${fromSlope}`);
		if (toSlope !== null) terms.push(`b_${id} * ${toSlope}`);
		return terms;
	}
}
