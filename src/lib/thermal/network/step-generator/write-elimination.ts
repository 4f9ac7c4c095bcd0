import { planSparseLu, type SparseLu } from '../../solve/sparse-lu';
import { toIdentifier } from './names';

/** Writes the elimination of one matrix pattern, each operation a line, in the order of least fill. */
export class EliminationWriter {
	private readonly plan: SparseLu;

	constructor(
		private readonly stored: readonly string[],
		entries: readonly { row: string; column: string }[]
	) {
		const at = (name: string) => stored.indexOf(name);
		this.plan = planSparseLu(
			stored.length,
			entries.map(({ row, column }) => [at(row), at(column)] as const)
		);
	}

	/** The local that holds an entry of the matrix. */
	entry(row: string, column: string): string {
		return `m_${toIdentifier(row)}_${toIdentifier(column)}`;
	}

	private entryAt(place: number): string {
		const size = this.stored.length;
		return this.entry(this.stored[Math.floor(place / size)]!, this.stored[place % size]!);
	}

	private inverse(node: number): string {
		return `i_${toIdentifier(this.stored[node]!)}`;
	}

	/** Factorises the matrix in its own locals; `known` are the entries that exist before. */
	writeFactorisation(known: ReadonlySet<string>): string[] {
		const { eliminations, order, size } = this.plan;
		const declared = new Set(known);
		const lines: string[] = [];
		let at = 0;
		for (const pivot of order) {
			lines.push(`const ${this.inverse(pivot)} = 1 / ${this.entryAt(pivot * size + pivot)};`);
			while (at < eliminations.length && eliminations[at + 1] === pivot) {
				const factor = this.entryAt(eliminations[at]!);
				const count = eliminations[at + 2]!;
				at += 3;
				lines.push(`${factor} *= ${this.inverse(pivot)};`);
				for (const stop = at + 2 * count; at < stop; at += 2) {
					const target = this.entryAt(eliminations[at]!);
					const product = `${factor} * ${this.entryAt(eliminations[at + 1]!)}`;
					lines.push(declared.has(target) ? `${target} -= ${product};` : `let ${target} = -${product};`);
					declared.add(target);
				}
			}
		}
		return lines;
	}

	/** Solves for the locals `name(node)`, which hold the right-hand side before and the solution after. */
	writeSolution(name: (node: string) => string): string[] {
		const { forward, backward, order } = this.plan;
		const at = (node: number) => name(this.stored[node]!);
		const lines: string[] = [];
		for (let k = 0; k < forward.length; k += 3) {
			lines.push(`${at(forward[k]!)} -= ${this.entryAt(forward[k + 1]!)} * ${at(forward[k + 2]!)};`);
		}
		let k = 0;
		for (const node of [...order].reverse()) {
			for (; k < backward.length && backward[k] === node; k += 3) {
				lines.push(`${at(node)} -= ${this.entryAt(backward[k + 1]!)} * ${at(backward[k + 2]!)};`);
			}
			lines.push(`${at(node)} *= ${this.inverse(node)};`);
		}
		return lines;
	}
}
