import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

const PARTS = ['@param', '@returns', 'Validity', 'Source:', '@example'];

interface Described {
	name: string;
	description: string;
}

function readFunctions(text: string): Described[] {
	const found = text.matchAll(/\/\*\*(?<description>(?:(?!\*\/)[\s\S])*)\*\/\nexport function (?<name>\w+)/g);
	return [...found].map(({ groups }) => ({ name: groups!.name!, description: groups!.description! }));
}

/** One test that every function which a folder of the engine hands out is described in full; the examples run elsewhere. */
export function checkDescriptions(folder: string): void {
	const root = new URL(`../../../src/lib/thermal/${folder}/`, import.meta.url);
	const read = (file: string) => readFileSync(new URL(file, root), 'utf8');
	const exported = new Set(read('index.ts').match(/\b[a-z]\w+\b(?=[\s,}])/g));
	const files = readdirSync(root).filter((file) => file.endsWith('.ts') && file !== 'index.ts');
	const text = files.map(read).join('\n');
	const functions = readFunctions(text).filter(({ name }) => exported.has(name));
	const bare = [...text.matchAll(/export function (\w+)/g)].map(([, name]) => name!);

	it(`the functions of ${folder} say what they take and give, where they hold, and whose they are`, () => {
		expect(functions.length).toBeGreaterThan(0);
		expect(functions.map(({ name }) => name).sort()).toEqual(
			bare.filter((name) => exported.has(name)).sort()
		);
		const lacking = functions.flatMap(({ name, description }) =>
			PARTS.filter((part) => !description.includes(part)).map((part) => `${name}: ${part}`)
		);
		expect(lacking).toEqual([]);
	});
}
