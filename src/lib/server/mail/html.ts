const ENTITIES: Record<string, string> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};

const escape = (text: string): string => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);

const paragraphsHtml = (paragraphs: readonly string[]): string[] =>
	paragraphs.map((each) => `<p>${escape(each)}</p>`);

/** A letter's plain paragraphs as HTML, with a link, if there is one, on a line of its own before the closing words. */
export function lettersHtml(
	paragraphs: readonly string[],
	link: { href: string; words: string } | null,
	closing: readonly string[] = []
): string {
	const lines = [
		...paragraphsHtml(paragraphs),
		...(link ? [`<p><a href="${escape(link.href)}">${escape(link.words)}</a></p>`] : []),
		...paragraphsHtml(closing)
	];
	return `<!doctype html>\n<html lang="en-GB"><body>\n${lines.join('\n')}\n</body></html>\n`;
}
