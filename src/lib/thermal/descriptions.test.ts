import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';

const FOLDER = fileURLToPath(new URL('.', import.meta.url));
const EVERY_PART = ['@returns', 'Validity', 'Source', '@example'];

const read = (file: string): string => readFileSync(join(FOLDER, file), 'utf8');
const files = readdirSync(FOLDER, { recursive: true, encoding: 'utf8' }).filter(
	(file) => file.endsWith('.ts') && !file.endsWith('.test.ts') && !file.includes('generated')
);

/** What the folders of the engine hand out. */
function listPublic(): Set<string> {
	const lists = files
		.filter((file) => file.endsWith('index.ts'))
		.flatMap((file) => [...read(file).matchAll(/export \{([^}]*)\}/g)]);
	return new Set(lists.flatMap(([, names]) => names!.split(',').map((name) => name.trim())));
}

interface Described {
	name: string;
	file: string;
	description: string;
	takesSomething: boolean;
	returnsNothing: boolean;
}

function describeFunctions(file: string): Described[] {
	const text = read(file);
	const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
	return source.statements.filter(ts.isFunctionDeclaration).flatMap((found) => {
		const isExported = found.modifiers?.some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);
		if (!isExported || !found.name) return [];
		const before = text.slice(found.getFullStart(), found.getStart(source));
		return {
			...{ name: found.name.text, file },
			description: before.match(/\/\*\*[\s\S]*?\*\//g)?.at(-1) ?? '',
			takesSomething: found.parameters.length > 0,
			returnsNothing: found.type?.getText(source) === 'void'
		};
	});
}

describe('every function that the engine hands out', () => {
	const handedOut = listPublic();
	const functions = files.flatMap(describeFunctions).filter(({ name }) => handedOut.has(name));

	it('is found', () => {
		expect(functions.length).toBeGreaterThan(100);
	});

	it.each(functions)(
		'says what it takes and gives, where it holds and whose it is: $name of $file',
		({ description, takesSomething, returnsNothing }) => {
			const parts = [...EVERY_PART, ...(takesSomething ? ['@param'] : [])];
			const wanted = parts.filter((part) => part !== '@returns' || !returnsNothing);
			expect(wanted.filter((part) => !description.includes(part))).toEqual([]);
		}
	);
});
