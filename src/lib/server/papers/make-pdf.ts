import pdfmake from 'pdfmake';
import type { TDocumentDefinitions, TFontDictionary } from 'pdfmake/interfaces';
import { RIBBON_FONT } from '$lib/components/charts/day-ribbon/marks-series';
import { cutFont, isCut, type Cut } from './fonts';
import { splitByScript, widenSpaces, type Script } from './scripts';

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

/** Says of every text in which part of the typeface its characters are, and notes which parts it takes. */
function dress(node: unknown, scripts: Set<Script>): unknown {
	if (Array.isArray(node)) return node.map((each) => dress(each, scripts));
	if (typeof node !== 'object' || node === null) return node;
	return Object.fromEntries(
		Object.entries(node).map(([key, value]) => [
			key,
			key === 'text' && typeof value === 'string' ? dressText(value, scripts) : dress(value, scripts)
		])
	);
}

function dressText(given: string, scripts: Set<Script>) {
	const text = widenSpaces(given);
	const runs = splitByScript(text);
	if (runs.every(({ script }) => script === TEXT_FAMILY)) return text;
	return runs.map(({ text, script }) => {
		scripts.add(script);
		return script === TEXT_FAMILY ? { text } : { text, font: script };
	});
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
	const scripts = new Set<Script>([TEXT_FAMILY]);
	const content = dress(definition.content, scripts) as TDocumentDefinitions['content'];
	const fonts = await provideFonts(scripts);
	// The library takes the fonts over and changes them: each document has its own.
	pdfmake.setFonts(fonts);
	const document = pdfmake.createPdf({
		...definition,
		content,
		info: { title: meta.title, author: meta.author, creator: 'Soakline', creationDate: meta.madeAt },
		...{ language: 'en-GB', displayTitle: true, compress: true }
	} as TDocumentDefinitions);
	return document.getBuffer();
}
