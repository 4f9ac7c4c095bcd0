import { RODAS, STAGES } from '../../solve/rodas';
import { CURRENT, SIGNAL, type NetworkShape } from '../shape';
import { findHeatWeights } from './heat-weights';
import { toIdentifier, writeNumber } from './names';
import { INSTANTS, keyOf, planSlots, SLOPE } from './slots';
import { EliminationWriter } from './write-elimination';
import { HeatWriter } from './write-heats';
import { SlopeWriter } from './write-slopes';

/** Rows of the state: temperatures before and after, the inner coefficients, the error, and the heat gained and passed. */
export const STATE_ROWS = ['from', 'to', 'inner2', 'inner3', 'error', 'gained', 'passed'] as const;

function instantOf(stage: number): number {
	return INSTANTS.indexOf(RODAS.times[stage]!);
}

/** Writes the source of one step of a network, in straight lines: see `generateStep`. */
class StepWriter {
	private readonly slots;
	private readonly heats: HeatWriter;
	private readonly slopes: SlopeWriter;
	private readonly jacobian;
	private readonly elimination: EliminationWriter;

	constructor(private readonly shape: NetworkShape) {
		this.slots = planSlots(shape);
		this.heats = new HeatWriter(shape, this.slots);
		this.slopes = new SlopeWriter(this.heats);
		this.jacobian = this.slopes.listJacobian();
		this.elimination = new EliminationWriter(shape.stored, this.jacobian);
	}

	write(name: string): string {
		const body = [
			...this.loadConstants(),
			...this.loadDriven(),
			...this.writeInstant(0),
			...this.writeTimeSlopes(),
			...this.eachNode((id, at) => `const t0_${id} = s[${this.place('from', at)}]!;`),
			'// The heats where the step starts, and their derivatives.',
			...this.heats.writeStage('0'),
			...this.slopes.writeSlopes(),
			...this.slopes.writeTimeSlopes(),
			'// C/(γh) − ∂H/∂T, factorised.',
			...this.writeMatrix(),
			...this.elimination.writeFactorisation(this.matrixEntries()),
			...Array.from({ length: STAGES }, (_, stage) => this.writeStage(stage)).flat(),
			...this.writeResult(),
			'if (!account) return;',
			...this.writeAccount()
		];
		return [
			`export function ${name}(k: Float64Array, d: Float64Array, s: Float64Array, account: boolean): void {`,
			...body.map((line) => `\t${line}`),
			'}'
		].join('\n');
	}

	private eachNode(write: (id: string, at: number, node: string) => string): string[] {
		return this.shape.stored.map((node, at) => write(toIdentifier(node), at, node));
	}

	private place(row: (typeof STATE_ROWS)[number], at: number): number {
		return STATE_ROWS.indexOf(row) * this.shape.stored.length + at;
	}

	private loadConstants(): string[] {
		return [...this.slots.constants].map(([key, at]) => `const k${at} = k[${at}]!; // ${key}`);
	}

	private loadDriven(): string[] {
		const { elapsed, length, bent, lit } = this.slots.driven;
		return [
			`const x0 = d[${elapsed}]!;`,
			`const lengthS = d[${length}]!;`,
			...[...bent].flatMap(([name, at]) =>
				[0, 1, 2].map((power) => `const ${this.coefficient(name, power)} = d[${at + power}]!;`)
			),
			...[...lit].map(([name, at]) => `const ${this.coefficient(name, 0)} = d[${at}]!;`)
		];
	}

	private coefficient(name: string, power: number): string {
		return `c${power}_${toIdentifier(name)}`;
	}

	/** Driven values where a stage looks; a stage that looks where the one before did takes those over. */
	private writeInstant(stage: number): string[] {
		const { bent, lit, signal, current } = this.slots.driven;
		const at = instantOf(stage);
		const name = (driven: string) => this.heats.drivenAt(driven, String(stage));
		if (stage > 0 && instantOf(stage - 1) === at) {
			const names = [...bent.keys(), ...lit.keys(), CURRENT];
			return names.map((each) => `const ${name(each)} = ${this.heats.drivenAt(each, String(stage - 1))};`);
		}
		const x = `x${stage}`;
		return [
			...(stage > 0 ? [`const ${x} = x0 + ${RODAS.times[stage]!} * lengthS;`] : []),
			...[...bent.keys()].map((each) => {
				const [c0, c1, c2] = [0, 1, 2].map((power) => this.coefficient(each, power));
				return `const ${name(each)} = ${c0} + ${x} * (${c1} + ${x} * ${c2});`;
			}),
			`const ${name(SIGNAL)} = d[${signal + at}]!;`,
			...[...lit.keys()].map(
				(each) => `const ${name(each)} = ${this.coefficient(each, 0)} * ${name(SIGNAL)};`
			),
			`const ${name(CURRENT)} = d[${current + at}]!;`
		];
	}

	/** How fast the driven values move where the step starts. */
	private writeTimeSlopes(): string[] {
		const { bent, lit, signal, current } = this.slots.driven;
		const name = (driven: string) => this.heats.drivenAt(driven, 'T');
		return [
			...[...bent.keys()].map(
				(each) =>
					`const ${name(each)} = ${this.coefficient(each, 1)} + 2 * x0 * ${this.coefficient(each, 2)};`
			),
			`const ${name(SIGNAL)} = d[${signal + SLOPE}]!;`,
			...[...lit.keys()].map(
				(each) => `const ${name(each)} = ${this.coefficient(each, 0)} * ${name(SIGNAL)};`
			),
			`const ${name(CURRENT)} = d[${current + SLOPE}]!;`
		];
	}

	private matrixEntries(): Set<string> {
		const entries = this.jacobian.map(({ row, column }) => this.elimination.entry(row, column));
		return new Set([...entries, ...this.shape.stored.map((node) => this.elimination.entry(node, node))]);
	}

	private writeMatrix(): string[] {
		const j = (row: string, column: string) => `j_${toIdentifier(row)}_${toIdentifier(column)}`;
		const diagonal = (node: string) =>
			this.jacobian.some(({ row, column }) => row === node && column === node) ? ` - ${j(node, node)}` : '';
		return [
			...this.jacobian.map(({ row, column, sum }) => `const ${j(row, column)} = ${sum};`),
			...this.eachNode(
				(id, _, node) => `const e_${id} = ${this.heats.constant(keyOf.capacity(node))} / lengthS;`
			),
			...this.eachNode(
				(id, _, node) =>
					`let ${this.elimination.entry(node, node)} = ${1 / RODAS.gamma} * e_${id}${diagonal(node)};`
			),
			...this.jacobian
				.filter(({ row, column }) => row !== column)
				.map(({ row, column }) => `let ${this.elimination.entry(row, column)} = -${j(row, column)};`)
		];
	}

	/** Where the stage looks, its heats, its right-hand side and its solution. */
	private writeStage(stage: number): string[] {
		const u = (id: string, of: number) => `u${of}_${id}`;
		const weigh = (weights: readonly number[], id: string) =>
			weights.map((weight, of) => `${writeNumber(weight)} * ${u(id, of)}`).join(' + ');
		const coupling = (id: string) => (stage === 0 ? '' : ` + e_${id} * (${weigh(RODAS.c[stage]!, id)})`);
		const slope = RODAS.timeDerivative[stage]!;
		const inTime = (id: string) => (slope === 0 ? '' : ` + timed${stage} * g_${id}`);
		const lines = [`// Stage ${stage + 1}.`];
		if (stage > 0) {
			const instant = String(stage);
			lines.push(...this.writeInstant(stage));
			lines.push(
				...this.eachNode((id) => {
					const before = `t${stage - 1}_${id} + u${stage - 1}_${id}`;
					const looks = stage === STAGES - 1 ? before : `t0_${id} + ${weigh(RODAS.a[stage]!, id)}`;
					return `const t${stage}_${id} = ${looks};`;
				}),
				...this.heats.writeStage(instant)
			);
		}
		if (slope !== 0) lines.push(`const timed${stage} = ${writeNumber(slope)} * lengthS;`);
		lines.push(
			...this.eachNode((id) => `let u${stage}_${id} = h${stage}_${id}${inTime(id)}${coupling(id)};`)
		);
		lines.push(...this.elimination.writeSolution((node) => u(toIdentifier(node), stage)));
		return lines;
	}

	private writeResult(): string[] {
		const last = STAGES - 1;
		const [second, third] = RODAS.dense;
		const dense = (weights: readonly number[], id: string) =>
			weights.map((weight, of) => `${writeNumber(weight)} * u${of}_${id}`).join(' + ');
		return [
			'// The end of the step, the cubic inside it, and the difference to the solution of order 3.',
			...this.eachNode((id, at) => `s[${this.place('to', at)}] = t${last}_${id} + u${last}_${id};`),
			...this.eachNode((id, at) => `s[${this.place('inner2', at)}] = ${dense(second, id)};`),
			...this.eachNode((id, at) => `s[${this.place('inner3', at)}] = ${dense(third, id)};`),
			...this.eachNode((id, at) => `s[${this.place('error', at)}] = u${last}_${id};`)
		];
	}

	private writeAccount(): string[] {
		const { stages, timeDerivative } = findHeatWeights();
		const weigh = (letter: string, id: string) =>
			stages.map((weight, of) => `${writeNumber(weight)} * ${letter}${of}_${id}`).join(' + ');
		return [
			'// What the method itself sums: the heats of its stages and what it takes them to change by.',
			...this.eachNode((id) => `const x_${id} = ${weigh('u', id)};`),
			`const timed = ${writeNumber(timeDerivative)} * lengthS;`,
			...this.eachNode((id, at, node) => {
				const products = this.jacobian
					.filter(({ row }) => row === node)
					.map(({ column }) => ` + j_${id}_${toIdentifier(column)} * x_${toIdentifier(column)}`);
				return `s[${this.place('gained', at)}] = lengthS * (${weigh('h', id)} + timed * g_${id}${products.join('')});`;
			}),
			...this.eachNode(
				(_, at, node) =>
					`s[${this.place('passed', at)}] = 0.5 * lengthS * (${this.heats.throughputOf(node, '0')});`
			)
		];
	}
}

const HEAD = `// Generated from the shape of the network by \`npm run generate\`; a test holds it to its generator, another to the
// general network core. Locals: t temperature, s and p its square and fourth power in kelvin, q heat, h sum of a node's
// heats, d driven value, c its coefficients, x time, a and b slopes of a heat along its ends, v and w slopes in time, g sum of those, j Jacobian, m matrix,
// r resistance and y inverse kelvin where the step starts, i inverse pivot, u solution of a stage, e capacity over length; the digit is the stage, T the slopes in time.
`;

/**
 * Writes one step of RODAS for a network of a given shape as straight-line code: no loop, no look-up, no allocation.
 *
 *     (C/(γh) − J) uᵢ = H(Tᵢ) + (C/h) Σ cᵢⱼuⱼ + dᵢ h ∂H/∂t
 *
 * The function that it writes takes the values of the leg `k` and the driven values `d` in the places of planSlots, the state `s` (rows as STATE_ROWS, one value a stored
 * node), and whether to keep the account of the heats.
 *
 * @param name of the function
 * @param shape of the network
 * @returns the source of the function, in TypeScript
 * @throws RangeError when a driven link radiates, which no network here does
 * Validity: shapes whose driven links are conductances or flows.
 * Source: Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., section VI.4.
 * @example
 * generateStep('stepPan', { stored: ['pan'], fixed: ['room'], mixed: [], links: [{ name: 'film', kind: 'conductance', from: 'pan', to: 'room' }], sources: [], driven: { bent: [], lit: [] } }).includes('export function stepPan'); // true
 */
export function generateStep(name: string, shape: NetworkShape): string {
	const driven = new Set([...shape.driven.bent, ...shape.driven.lit]);
	const wrong = shape.links.find(
		({ kind, name: link }) => driven.has(link) && kind !== 'conductance' && kind !== 'flow'
	);
	if (wrong) throw new RangeError(`the ${wrong.kind} link "${wrong.name}" cannot be driven`);
	return new StepWriter(shape).write(name);
}

/** A whole module with the step functions of several shapes. */
export function generateModule(shapes: Readonly<Record<string, NetworkShape>>): string {
	const steps = Object.entries(shapes).map(([name, shape]) => generateStep(name, shape));
	const imports = [
		`import { KELVIN_AT_ZERO_C as KELVIN } from '../../correlations/radiation';`,
		`import { clampToUnit, growNear, readResistanceFactor as resistanceFactor } from '../../network/element-laws';`
	];
	return [HEAD + imports.join('\n'), ...steps].join('\n\n') + '\n';
}
