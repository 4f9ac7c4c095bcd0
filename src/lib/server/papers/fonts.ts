import { rmSync } from 'node:fs';
import { mkdtemp, readFile, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import subsetFont from 'subset-font';
import { charactersOf, type Script } from './scripts';

/** A cut of the typeface, by its weight and width. */
const CUTS = {
	text: { wght: 400, wdth: 100 },
	strong: { wght: 660, wdth: 100 },
	head: { wght: 720, wdth: 62 },
	picture: { wght: 400, wdth: 92 },
	'picture-strong': { wght: 660, wdth: 92 }
} as const;
export type Cut = keyof typeof CUTS;

/** The other axes where the screen has them; a document carries no variable font. */
const OTHER_AXES = {
	...{ opsz: 14, GRAD: 0, slnt: 0, XOPQ: 96, YOPQ: 79, XTRA: 468 },
	...{ YTUC: 712, YTLC: 514, YTAS: 750, YTDE: -203, YTFI: 738 }
};

const require = createRequire(import.meta.url);
const cuts = new Map<string, Promise<string>>();
let folder: Promise<string> | null = null;

/** Where this process keeps its cuts: whoever sets pictures opens fonts by their path only. */
function openFolder(): Promise<string> {
	folder ??= mkdtemp(join(tmpdir(), 'soakline-fonts-')).then((made) => {
		process.once('exit', () => rmSync(made, { recursive: true, force: true }));
		return made;
	});
	return folder;
}

async function makeCut(cut: Cut, script: Script): Promise<string> {
	const file = `@fontsource-variable/roboto-flex/files/roboto-flex-${script}-full-normal.woff2`;
	const font = await subsetFont(await readFile(require.resolve(file)), charactersOf(script), {
		targetFormat: 'sfnt',
		variationAxes: { ...OTHER_AXES, ...CUTS[cut] }
	});
	const path = join(await openFolder(), `${cut}-${script}.ttf`);
	await writeFile(path, font);
	return path;
}

/** The path of one still cut of the typeface as TrueType; made once, at its first use. */
export function cutFont(cut: Cut, script: Script): Promise<string> {
	const key = `${cut}-${script}`;
	let made = cuts.get(key);
	if (!made) {
		made = makeCut(cut, script);
		cuts.set(key, made);
		made.catch(() => cuts.delete(key));
	}
	return made;
}

/** Only what was cut here may be opened by the one who sets a document. */
export const isCut = (path: string): boolean => /[/\\]soakline-fonts-[^/\\]+[/\\][a-z-]+\.ttf$/.test(path);
