import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';

/**
 * Runs every `@example` of the engine. Each line may end in `// value`: the line must give that value, a number to
 * the digits shown. An example may use whatever its own file, the engine's index or another file of the engine exports.
 */

const FOLDER = fileURLToPath(new URL('.', import.meta.url));
const modules = import.meta.glob<Record<string, unknown>>(['./**/*.ts', '!./**/*.test.ts'], { eager: true });

interface Example {
	file: string;
	code: string;
}

function findExamples(file: string): Example[] {
	const source = readFileSync(join(FOLDER, file), 'utf8');
	const blocks = source.match(/\/\*\*[\s\S]*?\*\//g) ?? [];
	return blocks
		.filter((block) => block.includes('@example'))
		.map((block) => {
			const body = block.slice(block.indexOf('@example') + '@example'.length, -2);
			const lines = body.split('\n').map((line) => line.replace(/^\s*\* ?/, ''));
			// A value on a line of its own belongs to the line above.
			const code = lines.join('\n').replace(/\n\s*\/\/ /g, ' // ');
			return { file, code: code.trim() };
		});
}

const files = readdirSync(FOLDER, { recursive: true, encoding: 'utf8' })
	.filter((file) => file.endsWith('.ts') && !file.endsWith('.test.ts'))
	.map((file) => relative('.', file))
	.sort();
const examples = files.flatMap(findExamples);

function collectNames(file: string): Record<string, unknown> {
	const others = Object.entries(modules).map(([, names]) => names);
	return Object.assign({}, ...others, modules['./index.ts'], modules[`./${file}`]) as Record<string, unknown>;
}

/** Half of the last digit shown, and a little for rounding. */
function findTolerance(shown: string): number {
	const [mantissa = '', exponent = '0'] = shown.toLowerCase().split('e');
	const decimals = mantissa.split('.')[1]?.length ?? 0;
	return 0.501 * 10 ** (Number(exponent) - decimals);
}

/** Turns the lines that say a value into checks and leaves the rest as it is. */
function instrument(code: string): string {
	return code
		.split('\n')
		.map((line) => {
			const [, statement, value] = /^(.*?);?\s*\/\/ (.+)$/.exec(line) ?? [];
			if (statement === undefined || value === undefined) return line;
			return `check((${statement}), ${JSON.stringify(value.trim())});`;
		})
		.join('\n');
}

function check(actual: unknown, shown: string): void {
	if (typeof actual === 'number' && Number.isFinite(Number(shown))) {
		expect(Math.abs(actual - Number(shown))).toBeLessThanOrEqual(findTolerance(shown));
		return;
	}
	expect(actual).toEqual(new Function(`return (${shown});`)());
}

describe('examples in the docstrings of the engine', () => {
	it('are many', () => {
		expect(examples.length).toBeGreaterThan(20);
	});

	it.each(examples)('$file: $code', ({ file, code }) => {
		const names = collectNames(file);
		const script = ts.transpile(instrument(code), { target: ts.ScriptTarget.ES2022 });
		const run = new Function('check', ...Object.keys(names), script);
		expect.hasAssertions();
		run(check, ...Object.values(names));
	});
});
