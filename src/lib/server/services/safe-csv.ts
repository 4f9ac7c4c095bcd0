/**
 * Text for a cell of a table: a table program would run what begins like this as a formula, and an apostrophe in front
 * keeps it text. Numbers go into their cells as numbers and need none.
 */
export const safeText = (text: string): string => (/^[=+\-@\t\r]/.test(text) ? `'${text}` : text);
