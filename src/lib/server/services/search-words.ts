import { Op, type WhereOptions } from 'sequelize';

const MOST_WORDS = 8;
const MOST_DIGITS = 9;

const escapePattern = (word: string): string => word.replace(/[\\%_]/g, '\\$&');

/** Every word that was written must stand somewhere in the columns, in any order; a number may be the whole number. */
export function matchWords(search: string, columns: readonly string[], numberColumn?: string): WhereOptions {
	const words = search.split(/\s+/).filter(Boolean).slice(0, MOST_WORDS);
	return {
		[Op.and]: words.map((word) => ({
			[Op.or]: [
				...columns.map((column) => ({ [column]: { [Op.like]: `%${escapePattern(word)}%` } })),
				...(numberColumn && /^\d+$/.test(word) && word.length <= MOST_DIGITS
					? [{ [numberColumn]: Number(word) }]
					: [])
			]
		}))
	};
}
