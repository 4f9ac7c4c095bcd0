import type { Content, ContentTable, CustomTableLayout, TableCell } from 'pdfmake/interfaces';
import type { ReportLine } from '$lib/schemas/reports';
import type { LogoView, WorkshopHead } from '$lib/schemas/shop';

export const MUTED = '#333333';
export const RULE = '#b3b3b3';
const THICK = '#000000';

/** Millimetres in points, the library's unit. */
export const mm = (value: number): number => (value * 72) / 25.4;

export type Parts = Content[];

export const words = (text: string, style: Record<string, unknown> = {}): Content => ({ text, ...style });
export const bold = (text: string): { text: string; bold: true } => ({ text, bold: true });

/** A heading; `size` in points. */
export const heading = (text: string, size: number): Content => ({
	...{ text, bold: true, fontSize: size, margin: [0, 0, 0, mm(0.8)] },
	headlineLevel: 1
});

const HAIRLINES: CustomTableLayout = {
	hLineWidth: (row, { table }) => (row === 0 || row > table.body.length ? 0 : 0.3),
	hLineColor: () => RULE,
	vLineWidth: () => 0,
	paddingLeft: (column) => (column === 0 ? 0 : mm(3)),
	paddingRight: () => 0,
	paddingTop: () => mm(0.35),
	paddingBottom: () => mm(0.35)
};

const BETWEEN_RULES: CustomTableLayout = {
	...HAIRLINES,
	hLineWidth: () => 0.7,
	hLineColor: () => THICK,
	paddingTop: () => mm(1.2),
	paddingBottom: () => mm(1.2)
};

const table = (body: TableCell[][], widths: (string | number)[], layout = HAIRLINES): ContentTable => ({
	table: { body, widths, dontBreakRows: true },
	layout
});

/** Longer than a column is wide: a hash, which may break anywhere. */
const LONG_WORD = /\S{36,}/;

/** Words under a label each, ruled off: "Fuse: 60 A". */
export function labelled(lines: readonly ReportLine[]): Content {
	const body = lines.map(({ label, value, note }) => [
		{
			text: [{ text: `${label}: `, color: MUTED }, { text: note ? `${value} (${note})` : value }],
			...(LONG_WORD.test(value) ? { wordBreak: 'break-all' as const } : {})
		}
	]);
	return body.length === 0 ? { text: '' } : table(body, ['*']);
}

/** Figures at the right edge, what there is to say of them below. */
export function figures(lines: readonly ReportLine[], fontSize: number): Content {
	const body = lines.map(({ label, value, note }): TableCell[] => [
		{
			stack: [{ text: label }, ...(note ? [{ text: note, fontSize: fontSize * 0.85, color: MUTED }] : [])]
		},
		{ text: value, bold: true, alignment: 'right', noWrap: true }
	]);
	return body.length === 0 ? { text: '' } : table(body, ['*', 'auto']);
}

/** A table with a head; the columns named stand at the right. */
export function ruled(
	heads: string[],
	rows: string[][],
	right: readonly number[] = [],
	widths: (string | number)[] = heads.map((_, column) => (right.includes(column) ? 'auto' : '*'))
): Content {
	const side = (column: number) =>
		right.includes(column) ? { alignment: 'right' as const, noWrap: true } : {};
	const head = heads.map((text, column): TableCell => ({ text, color: MUTED, ...side(column) }));
	const body = rows.map((cells) => cells.map((text, column): TableCell => ({ text, ...side(column) })));
	const made = table([head, ...body], widths);
	return { ...made, table: { ...made.table, headerRows: 1 } };
}

/** What nobody may overlook: between two strong rules. */
export const between = (content: Content[]): Content => table([[{ stack: content }]], ['*'], BETWEEN_RULES);

/** Lines as sentences, the label strong: "How sure. On about 3 of 20 days …". */
export const toldLines = (lines: readonly ReportLine[]): Content[] =>
	lines.map(({ label, value }) => ({
		text: [{ text: `${label}. `, bold: true }, { text: value }],
		margin: [0, 0, 0, mm(0.6)]
	}));

export interface Weighed {
	content: Content;
	/** About how high it is, in lines of its column. */
	weight: number;
}

/** About how many lines a text takes in a column that holds so many characters. */
export const linesIn = (text: string, charactersALine: number): number =>
	Math.max(1, Math.ceil(text.length / charactersALine));

/** Content side by side in columns of about the same height, in its order. */
export function inColumns(items: readonly Weighed[], count: number, gap = mm(6)): Content {
	const whole = items.reduce((sum, { weight }) => sum + weight, 0);
	const stacks = Array.from({ length: count }, (): Content[] => []);
	let before = 0;
	for (const { content, weight } of items) {
		const column = Math.min(count - 1, Math.floor(((before + weight / 2) * count) / (whole || 1) - 1e-9));
		stacks[column]!.push(content);
		before += weight;
	}
	return { columns: stacks.map((stack) => ({ stack, width: '*' })), columnGap: gap };
}

/** Lines to sign and date on, two people beside each other; by `id` the last of them can be found. */
export function signatures(who: readonly string[], id?: string): Content {
	const line = (text: string, width: number) => ({
		...{ text, width },
		margin: [0, mm(1), 0, 0] as [number, number, number, number]
	});
	const gap = mm(5);
	const columns = who.flatMap((role, index) => [
		line(role, mm(56)),
		{ ...line('Date', mm(26)), ...(index === who.length - 1 ? { id } : {}) }
	]);
	const rules = who.flatMap(() => [mm(56), mm(26)]);
	let x = 0;
	const canvas = rules.map((width) => {
		const rule = { type: 'line' as const, x1: x, y1: 0, x2: x + width, y2: 0, lineWidth: 0.7 };
		x += width + gap;
		return rule;
	});
	return {
		stack: [
			{ canvas, margin: [0, mm(10), 0, 0] },
			{ columns, columnGap: gap }
		],
		unbreakable: true
	};
}

export interface HeadWords {
	shop: WorkshopHead;
	logo: LogoView | null;
	title: string;
	under: string;
}

const HEAD_NAME = { bold: true, fontSize: 11 };

/** Whose paper it is, and what. */
export function paperHead({ shop, logo, title, under }: HeadWords): Content {
	const { address, phone, email, web, businessNumber } = shop;
	const reach = [address, phone, email, web, businessNumber].filter(Boolean).join(' · ');
	const who = { stack: [{ text: shop.name, ...HEAD_NAME }, { text: reach }] };
	return {
		table: {
			widths: [...(logo ? ['auto'] : []), '*', 'auto'],
			body: [
				[
					...(logo ? [{ image: logo.dataUri, fit: [mm(36), mm(14)] as [number, number] }] : []),
					who,
					{ stack: [{ text: title, ...HEAD_NAME }, { text: under }], alignment: 'right' }
				]
			]
		},
		layout: {
			...HAIRLINES,
			hLineWidth: (row) => (row === 1 ? 1.4 : 0),
			hLineColor: () => THICK,
			paddingBottom: () => mm(2)
		}
	};
}
