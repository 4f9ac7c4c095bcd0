import { formatWithUnit } from './numbers';

const MEGABYTE = 1024 * 1024;

/** "2 files were kept." */
export const sayKept = (count: number): string =>
	count === 1 ? 'One file was kept.' : `${count} files were kept.`;

/** Why a file is not taken, in two parts. */
export interface FileRefusal {
	is: string;
	instead: string;
}

export const sayRefused = (name: string, { is, instead }: FileRefusal): string =>
	`“${name}” ${is}. ${instead}`;

export const sayMegabytes = (bytes: number): string => formatWithUnit(bytes / MEGABYTE, 'MB');

export const refuseLarge = (mostBytes: number): FileRefusal => ({
	is: `is larger than ${sayMegabytes(mostBytes)}`,
	instead: 'That is the most that is taken: send a smaller one.'
});
