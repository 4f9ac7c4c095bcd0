const LONGEST_NAME = 120;

/** The last part of a path, without what does not show, short enough to be kept. */
export function cleanFileName(name: string, nameless: string): string {
	const last = name.split(/[\\/]/).at(-1) ?? '';
	const shown = last.replace(/\p{C}/gu, '').trim();
	return [...shown].slice(0, LONGEST_NAME).join('').trim() || nameless;
}
