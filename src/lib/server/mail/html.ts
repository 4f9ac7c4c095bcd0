const ENTITIES: Record<string, string> = {
	'&': '&amp;',
	'<': '&lt;',
	'>': '&gt;',
	'"': '&quot;',
	"'": '&#39;'
};

const escape = (text: string): string => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);

/** A letter's plain paragraphs as HTML, with one link that stands on a line of its own. */
export function lettersHtml(paragraphs: readonly string[], link: { href: string; words: string }): string {
	const text = paragraphs.map((each) => `<p>${escape(each)}</p>`).join('\n');
	return `<!doctype html>\n<html lang="en-GB"><body>\n${text}\n<p><a href="${escape(link.href)}">${escape(link.words)}</a></p>\n</body></html>\n`;
}
