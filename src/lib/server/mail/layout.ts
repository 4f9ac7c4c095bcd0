const ENTITIES: Record<string, string> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};
const escape = (text: string): string => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);

const LONGEST_SUBJECT = 200;

export interface LetterLink {
	href: string;
	words: string;
}

/** A paragraph, an address that is opened, or what somebody else wrote. */
export type LetterPart = string | LetterLink | { quote: string };

export interface LetterWords {
	subject: string;
	/** Whose letter it is: stands at its head. */
	from: string;
	parts: readonly LetterPart[];
	/** Small, at the end: why it came, and how to stop more of them. */
	foot?: readonly LetterPart[];
}

/** What the outbox takes. */
export interface LaidOutLetter {
	subject: string;
	textBody: string;
	htmlBody: string;
}

function partText(part: LetterPart): string {
	if (typeof part === 'string') return part;
	if ('href' in part) return `${part.words}:\n${part.href}`;
	return part.quote.replace(/^/gm, '> ');
}

const INK = '#1F1B16';
const MUTED = '#6A6253';
const PAPER = '#F6F2E9';
const ACTION = '#0F4C4A';
const STYLES = {
	page: `margin:0;padding:24px;background:${PAPER};color:${INK};font-family:'Roboto Flex',Roboto,Helvetica,Arial,sans-serif;font-size:16px;line-height:1.5`,
	sheet: 'max-width:36em;margin:0 auto',
	head: `margin:0 0 20px;padding-bottom:8px;border-bottom:2px solid ${INK};font-size:18px;font-weight:bold`,
	quote: `margin:16px 0;padding:0 0 0 16px;border-left:2px solid ${INK}`,
	foot: `margin-top:28px;padding-top:4px;border-top:1px solid ${MUTED};color:${MUTED};font-size:14px`,
	link: `color:${ACTION}`
} as const;

const lines = (text: string): string => escape(text).replace(/\r?\n/g, '<br>');

function partHtml(part: LetterPart): string {
	if (typeof part === 'string') return `<p>${lines(part)}</p>`;
	if ('href' in part)
		return `<p><a style="${STYLES.link}" href="${escape(part.href)}">${escape(part.words)}</a></p>`;
	return `<blockquote style="${STYLES.quote}">${lines(part.quote)}</blockquote>`;
}

/**
 * Every letter has this one form, as plain text and as HTML of the same words. Mail programs know no style sheets, so
 * that here, and here alone, the styles stand at the elements.
 */
export function layOutLetter({ subject, from, parts, foot = [] }: LetterWords): LaidOutLetter {
	const title = subject.slice(0, LONGEST_SUBJECT);
	const footHtml = foot.length === 0 ? [] : [`<div style="${STYLES.foot}">`, ...foot.map(partHtml), '</div>'];
	const html = [
		'<!doctype html>',
		`<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escape(title)}</title></head>`,
		`<body style="${STYLES.page}"><div style="${STYLES.sheet}">`,
		`<p style="${STYLES.head}">${escape(from)}</p>`,
		...parts.map(partHtml),
		...footHtml,
		'</div></body></html>'
	];
	return {
		subject: title,
		textBody: [...parts, ...foot].map(partText).join('\n\n') + '\n',
		htmlBody: html.join('\n') + '\n'
	};
}

/** How a shop can be reached, in a few words; empty when it has said neither. */
export const sayReach = ({ phone, email }: { phone: string; email: string }): string =>
	[phone, email].filter((way) => way !== '').join(' or ');
