import { describe, expect, it } from 'vitest';
import { findCircle, readSourceFiles, type SourceFile } from './support/source-files';

const files = readSourceFiles();
const isTest = ({ path }: SourceFile): boolean => /\.test\.ts$/.test(path);
const own = files.filter((file) => !isTest(file));

/** Who may import what of ours: the first rule whose folder fits counts. Types may also come from `types`. */
const RULES: { folder: RegExp; may: RegExp; types?: RegExp }[] = [
	{ folder: /^src\/lib\/thermal\//, may: /^src\/lib\/thermal\// },
	{ folder: /^src\/lib\/(schemas|format)\//, may: /^src\/lib\/(thermal|schemas|format)\// },
	{ folder: /^src\/lib\/simulation\//, may: /^src\/lib\/(thermal|schemas|simulation)\// },
	{
		folder: /^src\/lib\/components\//,
		may: /^src\/lib\/(components|format|schemas|simulation)\//,
		types: /^src\/lib\/thermal\//
	},
	{
		folder: /^src\/lib\/server\/db\//,
		may: /^src\/lib\/(server\/(db\/|[a-z-]+\.ts$)|schemas\/|format\/|thermal\/)/
	},
	{
		folder: /^src\/lib\/server\/(policies|presenters)\//,
		may: /^src\/lib\/(server\/(policies|presenters)\/|server\/errors\.ts$|schemas\/|format\/|thermal\/)/,
		types: /^src\/lib\/server\/db\/models\//
	},
	{ folder: /^src\/lib\/server\/storage\//, may: /^src\/lib\/server\/(storage\/|[a-z-]+\.ts$)/ },
	{
		folder: /^src\/lib\/server\/papers\//,
		may: /^src\/lib\/(server\/(papers|presenters)\/|schemas\/|format\/|thermal\/|components\/(charts|report\/print)\/.*\.ts$)/
	},
	{
		folder: /^src\/lib\/server\/services\//,
		may: /^src\/lib\/(server\/(services|papers|db|policies|presenters|mail|storage|jobs|auth)\/|server\/[a-z-]+\.ts$|schemas\/|format\/|thermal\/)|^seeds\//
	},
	{
		folder: /^src\/(routes\/.*\.ts|hooks\.server\.ts)$/,
		may: /^src\/lib\/(server\/(auth|services|policies|presenters|http)\/|server\/[a-z-]+\.ts$|schemas\/|format\/|thermal\/|components\/)|^src\/routes\//
	},
	{
		folder: /^src\/routes\/.*\.svelte$/,
		may: /^src\/(lib\/(components|format|schemas|simulation)\/|routes\/|app\.css$)/,
		types: /^src\/lib\/thermal\//
	}
];

function listWrongImports(file: SourceFile): string[] {
	const rule = RULES.find(({ folder }) => folder.test(file.path));
	if (!rule) return [];
	return file.imports
		.filter(({ target, typeOnly }) => {
			if (target === null) return false;
			return !rule.may.test(target) && !(typeOnly && rule.types?.test(target));
		})
		.map(({ target }) => `${file.path} imports ${target}`);
}

describe('the house', () => {
	it('has many rooms, all of them looked into', () => {
		expect(own.length).toBeGreaterThan(100);
	});

	it('lets every folder import only what it may', () => {
		expect(own.flatMap(listWrongImports)).toEqual([]);
	});

	it('would notice a wrong import', () => {
		const from = '../server/db/models';
		const imports = [{ from, target: 'src/lib/server/db/models/index.ts', typeOnly: false }];
		const wrong = { path: 'src/lib/components/ui/Button.svelte', text: '', imports };
		expect(listWrongImports(wrong)).toHaveLength(1);
	});

	it('has no circles', () => {
		expect(findCircle(own)).toBeNull();
	});

	it('would notice a circle', () => {
		const link = (path: string, target: string): SourceFile => ({
			path,
			text: '',
			imports: [{ from: target, target, typeOnly: false }]
		});
		expect(findCircle([link('a', 'b'), link('b', 'c'), link('c', 'a')])).toEqual(['a', 'b', 'c', 'a']);
	});
});

describe('the engine', () => {
	const engine = own.filter(({ path }) => path.startsWith('src/lib/thermal/'));

	it('needs no package, no Node module and no framework', () => {
		const foreign = engine.flatMap(({ path, imports }) =>
			imports.filter(({ from }) => !from.startsWith('.')).map(({ from }) => `${path}: ${from}`)
		);
		expect(engine.length).toBeGreaterThan(10);
		expect(foreign).toEqual([]);
	});

	it('knows no clock, no chance, no screen and no log', () => {
		const FORBIDDEN =
			/\b(Date\b(?!\w)|Math\.random|performance\.|console\.|document\.|window\.|process\.|globalThis)/;
		const withoutComments = (text: string) => text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');
		const guilty = engine.filter(({ text }) => FORBIDDEN.test(withoutComments(text))).map(({ path }) => path);
		expect(guilty).toEqual([]);
	});
});

describe('pages', () => {
	it('write no style into attributes, which the content policy would refuse', () => {
		const STYLE_ATTRIBUTE = /<[a-zA-Z][^>]*\sstyle(=|:)/;
		const markup = ({ text }: SourceFile) =>
			text.replace(/<script[\s\S]*?<\/script>/g, '').replace(/<style[\s\S]*?<\/style>/g, '');
		const guilty = own.filter((file) => file.path.endsWith('.svelte') && STYLE_ATTRIBUTE.test(markup(file)));
		expect(guilty.map(({ path }) => path)).toEqual([]);
	});

	it('are named as SvelteKit and this project name files', () => {
		const NAMES =
			/^(\+[a-z.]+|[A-Z][A-Za-z0-9]*\.(svelte|component\.test\.ts)|[a-z0-9]+(-[a-z0-9]+)*(\.[a-z]+)*\.(ts|mjs))$/;
		const odd = files.map(({ path }) => path.split('/').at(-1) ?? '').filter((name) => !NAMES.test(name));
		expect(odd.filter((name) => !name.startsWith('+'))).toEqual([]);
	});
});
