/** "A, B and C"; with another word before the last, "A, B or C". */
export function joinWords(words: readonly string[], last = 'and'): string {
	if (words.length < 2) return words.join('');
	return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1)}`;
}
