import { readFileSync } from 'node:fs';

const root = new URL('../../../reference-data/', import.meta.url);

export function readText(path: string): string {
	return readFileSync(new URL(path, root), 'utf8');
}

/** A comma that no quotes enclose. */
const BETWEEN_CELLS = /,(?=(?:[^"]*"[^"]*")*[^"]*$)/;

function splitLine(line: string): string[] {
	return line.split(BETWEEN_CELLS).map((cell) => cell.replace(/^"|"$/g, ''));
}

/** The rows of one of our own tables, by the names of its columns; cells hold neither quotes nor line ends. */
export function readTable(path: string): Record<string, string>[] {
	const [head = '', ...lines] = readText(path).trim().split('\n');
	const names = splitLine(head);
	return lines.map((line) => {
		const cells = splitLine(line);
		if (cells.length !== names.length) throw new Error(`${path} has ${cells.length} cells in: ${line}`);
		return Object.fromEntries(names.map((name, at) => [name, cells[at]!]));
	});
}
