import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import * as correlations from '../../src/lib/thermal/correlations';

const folder = new URL('../../src/lib/thermal/correlations/', import.meta.url);
const functions: Record<string, unknown> = { ...correlations };

interface Example {
	file: string;
	expression: string;
	printed: string;
}

function readExamples(file: string): Example[] {
	const source = readFileSync(new URL(file, folder), 'utf8');
	const lines = [...source.matchAll(/@example\n \* (?<expression>.+?); \/\/ (?<printed>\S+)/g)];
	return lines.map(({ groups }) => ({ file, expression: groups!.expression!, printed: groups!.printed! }));
}

const files = readdirSync(folder).filter(
	(file) => file.endsWith('.ts') && !['require.ts', 'index.ts'].includes(file)
);
const examples = files.flatMap(readExamples);

function evaluate(expression: string): unknown {
	const names = Object.keys(functions);
	const run = new Function(...names, `return ${expression};`) as (...values: unknown[]) => unknown;
	return run(...Object.values(functions));
}

/** Half a unit of the last printed digit. */
function resolutionOf(printed: string): number {
	const [mantissa = '', exponent = '0'] = printed.split('e');
	const decimals = mantissa.split('.')[1]?.length ?? 0;
	return 0.5 * 10 ** (Number(exponent) - decimals) * (1 + 1e-9);
}

describe('examples in the descriptions of the correlations', () => {
	it.each(examples.map(({ expression, printed, file }) => [expression, printed, file]))(
		'%s gives %s (%s)',
		(expression, printed) => {
			const value = evaluate(expression);
			if (printed.startsWith("'")) {
				expect(`'${String(value)}'`).toBe(printed);
				return;
			}
			expect(Math.abs(Number(value) - Number(printed))).toBeLessThanOrEqual(resolutionOf(printed));
		}
	);

	it('stand beside every exported function', () => {
		const described = new Set(examples.map(({ expression }) => expression.split('(')[0]));
		const exported = Object.keys(functions).filter(
			(name) => typeof functions[name] === 'function' && name !== 'EngineInputError'
		);
		expect(exported.filter((name) => !described.has(name))).toEqual([]);
	});
});
