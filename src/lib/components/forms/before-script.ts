let isOver = false;

/** From here on the page's script has every field in hand. */
export function endBeforeScript(): void {
	isOver = true;
}

/**
 * What was chosen among radio buttons while the page's script was still on its way. Svelte takes up such a choice by
 * itself, but forgets it again when another field of the same form was filled in that time, too.
 */
export function chosenBeforeScript(name: string): string | undefined {
	if (isOver || typeof document === 'undefined') return undefined;
	const chips = document.querySelectorAll<HTMLInputElement>('input[type="radio"]:checked');
	return [...chips].find((chip) => chip.name === name)?.value;
}
