/** Tells the page around a form whether something in it is wrong, for the title of the tab; nothing once the form is gone. */
export function tellErrors(isWrong: () => boolean, tell: (hasErrors: boolean) => void): void {
	$effect.pre(() => {
		tell(isWrong());
		return () => tell(false);
	});
}
