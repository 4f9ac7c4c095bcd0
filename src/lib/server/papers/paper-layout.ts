import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces';
import type { Paper, PaperBlock, PaperPhoto } from '$lib/schemas/papers';
import { makePdf, TEXT_FAMILY } from './make-pdf';
import {
	figures,
	heading,
	inColumns,
	labelled,
	linesIn,
	mm,
	MUTED,
	paperHead,
	ruled,
	signatures,
	toldLines,
	type Weighed
} from './parts';

/** Of the columns of a table: what, when or agreed, and room for words. */
const WIDTHS = ['22%', '30%', '*'];
const SIZE = 9;
const HEADING = 11.5;

/** The content of a photo, as JPEG. */
export type ReadPhoto = (fileId: number) => Promise<Buffer>;

/** Photos in two columns, each with its caption. */
export async function layPhotos(photos: readonly PaperPhoto[], read: ReadPhoto): Promise<Content> {
	const shown = await Promise.all(
		photos.map(async ({ fileId, caption }): Promise<Content> => {
			const image = `data:image/jpeg;base64,${(await read(fileId)).toString('base64')}`;
			return {
				stack: [
					{ image, fit: [mm(86), mm(80)] },
					{ text: caption, color: MUTED }
				],
				...{ unbreakable: true, margin: [0, 0, 0, mm(4)] as [number, number, number, number] }
			};
		})
	);
	return inColumns(
		shown.map((content) => ({ content, weight: 1 })),
		2
	);
}

const weighed = (content: Content, text: string, charactersALine: number): Weighed => ({
	content,
	weight: linesIn(text, charactersALine)
});

type Of<Kind extends PaperBlock['kind']> = Extract<PaperBlock, { kind: Kind }>;
type LayOut = {
	[Kind in PaperBlock['kind']]: (block: Of<Kind>, read: ReadPhoto) => Content[] | Promise<Content[]>;
};

/** How each kind of part is set. */
const LAY_OUT: LayOut = {
	words: ({ strong, sentences }) =>
		sentences.map((text, index) => ({
			text: [...(strong && index === 0 ? [{ text: `${strong} `, bold: true }] : []), { text }],
			margin: [0, 0, 0, mm(1)]
		})),
	lines: ({ lines }) => [
		inColumns(
			lines.map((line) => weighed(labelled([line]), `${line.label}: ${line.value}`, 60)),
			2
		)
	],
	figures: ({ lines }) => [figures(lines, SIZE)],
	table: ({ heads, rows, empty }) => [
		rows.length === 0 ? { text: empty, color: MUTED } : ruled(heads, rows, [], WIDTHS)
	],
	picture: ({ svg, caption }) => [
		{ svg, width: mm(170) },
		{ text: caption, margin: [0, mm(1.5), 0, 0] }
	],
	photos: async ({ photos }, read) => [await layPhotos(photos, read)],
	cautions: ({ cautions }) => [
		inColumns(
			cautions.map(({ title, text }) =>
				weighed(toldLines([{ label: title, value: text }])[0]!, title + text, 62)
			),
			2
		)
	],
	signatures: ({ who }) => [signatures(who)]
};

const TITLE_OF_CAUTIONS = 'Before anyone acts on this';

const titleOf = (block: PaperBlock): string =>
	block.kind === 'cautions' ? TITLE_OF_CAUTIONS : 'title' in block ? (block.title ?? '') : '';

async function layBlock(block: PaperBlock, read: ReadPhoto): Promise<Content> {
	const lay = LAY_OUT[block.kind] as (block: PaperBlock, read: ReadPhoto) => Promise<Content[]>;
	const title = titleOf(block);
	const content = await lay(block, read);
	return {
		stack: [...(title ? [heading(title, HEADING)] : []), ...content],
		unbreakable: block.kind === 'words' || block.kind === 'picture',
		margin: [0, mm(title ? 4 : 1), 0, 0]
	};
}

/** A heading does not stand alone at the foot of a page. */
const keepWithNext: TDocumentDefinitions['pageBreakBefore'] = (
	{ headlineLevel },
	{ getFollowingNodesOnPage }
) => headlineLevel === 1 && getFollowingNodesOnPage().length === 0;

/** "Job 12, fitted 3 May" in the middle of a sentence. */
const lowerFirst = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);

/** A paper as a PDF document. */
export async function writePaper(paper: Paper, readPhoto: ReadPhoto): Promise<Buffer> {
	const { title, under, shop, logo, madeAt, blocks } = paper;
	const content: Content[] = [];
	for (const block of blocks) content.push(await layBlock(block, readPhoto));
	return makePdf(
		{
			pageSize: 'A4',
			pageMargins: [mm(16), mm(12), mm(16), mm(14)],
			defaultStyle: { font: TEXT_FAMILY, fontSize: SIZE, lineHeight: 1.15 },
			pageBreakBefore: keepWithNext,
			footer: (page, count) => ({
				text: `${shop.name}: ${title.toLowerCase()}, ${lowerFirst(under)}, page ${page} of ${count}`,
				alignment: 'right',
				fontSize: 7,
				margin: [0, mm(4), mm(16), 0]
			}),
			content: [paperHead({ shop, logo, title, under }), ...content]
		},
		{ title: `${title}, ${lowerFirst(under)}`, author: shop.name, madeAt: new Date(madeAt) }
	);
}
