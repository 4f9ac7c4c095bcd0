import { readCoefficientPath } from '$lib/schemas/books';

/** A coefficient by its group and key, such as "bay.share". */
export const match = (path: string): boolean => readCoefficientPath(path) !== null;
