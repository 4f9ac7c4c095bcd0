/** "2 files were kept." */
export const sayKept = (count: number): string =>
	count === 1 ? 'One file was kept.' : `${count} files were kept.`;
