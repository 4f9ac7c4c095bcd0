/** A coefficient by its group and key, such as "bay.share". */
export const match = (path: string): boolean => /^[a-zA-Z0-9]+\.[a-zA-Z0-9]+$/.test(path);
