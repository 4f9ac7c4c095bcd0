import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';

export const PROJECT = resolve(import.meta.dirname, '../..');

export interface SourceFile {
	/** From the project's top, with forward slashes: src/lib/thermal/index.ts. */
	path: string;
	text: string;
	imports: Import[];
}

export interface Import {
	/** As it is written. */
	from: string;
	/** The file of ours that it means, or null for a package or Node's own module. */
	target: string | null;
	typeOnly: boolean;
}

const ENDINGS = ['', '.ts', '.js', '.svelte', '.mjs', '.svelte.ts', '/index.ts'];
const STATEMENT = /(?:^|[\n;>])\s*(import|export)\s+(type\s+)?(?:[^'"`;]*?\sfrom\s+)?['"]([^'"]+)['"]/g;
const DYNAMIC = /\bimport\(\s*(?:\/\*.*?\*\/\s*)?['"]([^'"]+)['"]\s*\)/g;

function resolveImport(fromFile: string, written: string): string | null {
	const clean = written.replace(/\?.*$/, '');
	const base = clean.startsWith('$lib')
		? join(PROJECT, 'src/lib', clean.slice('$lib'.length))
		: clean.startsWith('.')
			? resolve(dirname(fromFile), clean)
			: null;
	if (base === null) return null;
	const found = ENDINGS.map((ending) => base + ending).find(
		(file) => existsSync(file) && statSync(file).isFile()
	);
	return found ? relative(PROJECT, found) : null;
}

function listImports(file: string, text: string): Import[] {
	const statements = [...text.matchAll(STATEMENT)].map((match) => ({
		from: match[3] ?? '',
		typeOnly: match[2] !== undefined
	}));
	const dynamic = [...text.matchAll(DYNAMIC)].map((match) => ({ from: match[1] ?? '', typeOnly: false }));
	return [...statements, ...dynamic].map((each) => ({ ...each, target: resolveImport(file, each.from) }));
}

function walk(folder: string): string[] {
	return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
		const path = join(folder, entry.name);
		return entry.isDirectory() ? walk(path) : [path];
	});
}

/** Every source file under src with what it imports. */
export function readSourceFiles(folder = 'src'): SourceFile[] {
	return walk(join(PROJECT, folder))
		.filter((file) => /\.(ts|mjs|svelte)$/.test(file))
		.map((file) => {
			const text = readFileSync(file, 'utf8');
			return { path: relative(PROJECT, file), text, imports: listImports(file, text) };
		});
}

/** The first circle among files that need each other when they run; types alone make none. */
export function findCircle(files: readonly SourceFile[]): string[] | null {
	const byPath = new Map(files.map((file) => [file.path, file]));
	const done = new Set<string>();
	const visit = (path: string, trail: string[]): string[] | null => {
		if (trail.includes(path)) return [...trail.slice(trail.indexOf(path)), path];
		if (done.has(path)) return null;
		for (const { target, typeOnly } of byPath.get(path)?.imports ?? []) {
			if (target === null || typeOnly) continue;
			const circle = visit(target, [...trail, path]);
			if (circle) return circle;
		}
		done.add(path);
		return null;
	};
	for (const { path } of files) {
		const circle = visit(path, []);
		if (circle) return circle;
	}
	return null;
}
