/*
 * The page's content security policy forbids style attributes and style elements. The chart library writes
 * both; what they say is said here by presentation attributes.
 */
const STYLE_ELEMENT = /<style\b[^>]*>[\s\S]*?<\/style>/g;
const NOISE =
	/\s(?:class|pointer-events|ecmeta_[a-z_]+|xml:space|xmlns:xlink|version|baseProfile|stroke-miterlimit)="[^"]*"/g;
const STYLE_ATTRIBUTE = /\sstyle="([^"]*)"/g;
/** The only properties that a picture of ours needs to keep. */
const KEPT = new Set(['font-size', 'font-family', 'font-weight', 'font-style']);

export interface PictureRoot {
	width: number;
	height: number;
	/** What the picture shows, in words. */
	label: string;
	/** Starts every id inside, so that two pictures can share a page. */
	idPrefix: string;
}

/** An SVG of the chart library made fit for a page with a strict policy: it scales, speaks and styles nothing inline. */
export function cleanSvg(svg: string, root: PictureRoot): string {
	const body = svg
		.replace(/^[\s\S]*?<svg\b[^>]*>/, '')
		.replace(STYLE_ELEMENT, '')
		.replace(NOISE, '')
		.replace(STYLE_ATTRIBUTE, (_, declarations: string) => presentationAttributes(declarations))
		.replace(/\bzr\d+-/g, `${root.idPrefix}-`)
		.replace(/\n+/g, '');
	return (
		`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${root.width} ${root.height}" role="img" ` +
		`aria-label="${escapeAttribute(root.label)}" font-stretch="92%">${body}`
	);
}

function presentationAttributes(declarations: string): string {
	return declarations
		.split(';')
		.map((declaration) => declaration.split(':').map((part) => part.trim()))
		.filter(([name, value]) => name && value && KEPT.has(name))
		.map(([name, value]) => ` ${name}="${(value as string).replace(/px$/, '')}"`)
		.join('');
}

const escapeAttribute = (text: string): string =>
	text.replace(/&/g, '&amp;').replace(/"/g, '&quot;').replace(/</g, '&lt;').replace(/>/g, '&gt;');
