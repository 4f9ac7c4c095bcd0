import type { Transaction } from 'sequelize';
import { Workshop, WorkshopLogo } from '../db/models';

/** So tall in a letter, whatever the picture's own size. */
const HIGHEST_PX = 64;
const MENTION = /cid:logo-(\d+)-([0-9a-f]{64})/;
/** Where the words of a letter begin. */
const BEGIN = /<body[^>]*>(?:<div[^>]*>)?/;

/** Puts the shop's logo above the words of a letter, where it has one; its name stands there in words. */
export async function withLetterhead(
	workshopId: number,
	htmlBody: string,
	transaction: Transaction
): Promise<string> {
	const workshop = await Workshop.findByPk(workshopId, { transaction });
	if (!workshop?.logoSha256) return htmlBody;
	const src = `cid:logo-${workshopId}-${workshop.logoSha256}`;
	return htmlBody.replace(
		BEGIN,
		(begin) => `${begin}\n<p><img src="${src}" height="${HIGHEST_PX}" alt=""></p>`
	);
}

/** The picture goes along with the letter: none is fetched from anywhere when it is read. */
export async function listPictures(htmlBody: string) {
	const [, workshopId, sha256] = MENTION.exec(htmlBody) ?? [];
	if (!workshopId || !sha256) return [];
	const logo = await WorkshopLogo.findOne({ where: { workshopId: Number(workshopId), sha256 } });
	if (!logo) return [];
	return [
		{
			...{ filename: 'logo.png', contentType: 'image/png', content: logo.png },
			...{ cid: `logo-${workshopId}-${sha256}`, contentDisposition: 'inline' as const }
		}
	];
}
