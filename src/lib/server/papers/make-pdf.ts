import pdfmake from 'pdfmake';
import type { Content, DynamicContent, TDocumentDefinitions, TFontDictionary } from 'pdfmake/interfaces';
import { RIBBON_FONT } from '$lib/components/charts/day-ribbon/marks-series';
import { cutFont, isCut, type Cut } from './fonts';
import { mm } from './parts';
import { MISSING_LETTER, spellOut, splitByScript, type Script } from './scripts';

// A document is made of what is given, never of what an address or a path inside it leads to.
pdfmake.setUrlAccessPolicy(() => false);
pdfmake.setLocalAccessPolicy(isCut);

export const TEXT_FAMILY = 'latin';
export const HEAD_FAMILY = 'head';
/** Pictures name the family as the page does. */
const PICTURE_FAMILY = RIBBON_FONT.split(',')[0]!;

async function family(normal: Cut, bold: Cut, script: Script) {
	return { normal: await cutFont(normal, script), bold: await cutFont(bold, script) };
}

async function provideFonts(scripts: ReadonlySet<Script>): Promise<TFontDictionary> {
	const fonts: TFontDictionary = {
		[HEAD_FAMILY]: await family('head', 'head', 'latin'),
		[PICTURE_FAMILY]: await family('picture', 'picture-strong', 'latin')
	};
	for (const script of scripts) fonts[script] = await family('text', 'strong', script);
	return fonts;
}

/** What the texts of a document take of the typeface, and whether it has no shape for a letter of them. */
interface Taken {
	scripts: Set<Script>;
	lacks: boolean;
}

/** Says of every text in which part of the typeface its characters are, and notes what it takes. */
function dress(node: unknown, taken: Taken): unknown {
	if (Array.isArray(node)) return node.map((each) => dress(each, taken));
	if (typeof node !== 'object' || node === null) return node;
	return Object.fromEntries(
		Object.entries(node).map(([key, value]) => [
			key,
			key === 'text' && typeof value === 'string' ? dressText(value, taken) : dress(value, taken)
		])
	);
}

function dressText(given: string, taken: Taken) {
	const { runs, lacks } = splitByScript(spellOut(given));
	taken.lacks ||= lacks;
	if (runs.every(({ script }) => script === TEXT_FAMILY)) return runs.map(({ text }) => text).join('');
	return runs.map(({ text, script }) => {
		taken.scripts.add(script);
		return script === TEXT_FAMILY ? { text } : { text, font: script };
	});
}

const LACKS: Content = {
	text: `“${MISSING_LETTER}” in a name stands for a letter that this paper’s typeface does not have. The screen shows it.`,
	fontSize: 7,
	margin: [mm(14), mm(3), 0, 0]
};

/** The foot of each page, and beside it what the paper has to say of itself. */
function dressFoot({ footer }: TDocumentDefinitions, taken: Taken): DynamicContent {
	return (page, count, size) => {
		const given = typeof footer === 'function' ? footer(page, count, size) : footer;
		const foot = dress(given ?? '', taken) as Content;
		return taken.lacks ? { columns: [LACKS, foot] } : foot;
	};
}

export interface PaperMeta {
	title: string;
	author: string;
	/** When what it says was made: the same document has the same bytes. */
	madeAt: Date;
}

/**
 * A PDF document from its definition: in the typeface of the application, with its meaning kept beside its look
 * (title, language), and without anything from elsewhere.
 */
export async function makePdf(definition: TDocumentDefinitions, meta: PaperMeta): Promise<Buffer> {
	const taken: Taken = { scripts: new Set([TEXT_FAMILY]), lacks: false };
	const content = dress(definition.content, taken) as TDocumentDefinitions['content'];
	const footer = dressFoot(definition, taken);
	// Once before, for the fonts that it takes.
	footer(1, 1, { width: 0, height: 0, orientation: 'portrait' });
	const fonts = await provideFonts(taken.scripts);
	// The library takes the fonts over and changes them: each document has its own.
	pdfmake.setFonts(fonts);
	const document = pdfmake.createPdf({
		...definition,
		content,
		footer,
		info: { title: meta.title, author: meta.author, creator: 'Soakline', creationDate: meta.madeAt },
		...{ language: 'en-GB', displayTitle: true, compress: true }
	} as TDocumentDefinitions);
	return document.getBuffer();
}
