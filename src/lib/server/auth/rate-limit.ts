import { QueryTypes } from 'sequelize';
import { connection } from '../db/connection';
import { AppError } from '../errors';
import { sha256 } from '../hash';

export interface Limit {
	/** What is counted, and for whom. */
	name: string;
	key: string;
	points: number;
	windowS: number;
}

const bucketOf = ({ name, key }: Pick<Limit, 'name' | 'key'>): string => `${name}:${sha256(key)}`;

/** Counts one try and throws when there were too many in the window. Survives a restart and counts for every process. */
export async function spend({ points, windowS, ...what }: Limit): Promise<void> {
	const bucket = bucketOf(what);
	await connection().query(
		`INSERT INTO rate_limits (bucket, points, window_ends_at)
		 VALUES (:bucket, 1, DATE_ADD(UTC_TIMESTAMP(3), INTERVAL :windowS SECOND))
		 ON DUPLICATE KEY UPDATE
			points = IF(window_ends_at < UTC_TIMESTAMP(3), 1, points + 1),
			window_ends_at = IF(window_ends_at < UTC_TIMESTAMP(3), VALUES(window_ends_at), window_ends_at)`,
		{ replacements: { bucket, windowS } }
	);
	const [row] = await connection().query<{ points: number; waitS: number }>(
		`SELECT points, GREATEST(1, TIMESTAMPDIFF(SECOND, UTC_TIMESTAMP(3), window_ends_at)) AS waitS
		 FROM rate_limits WHERE bucket = :bucket`,
		{ replacements: { bucket }, type: QueryTypes.SELECT }
	);
	if (row && row.points > points) {
		const minutes = Math.ceil(row.waitS / 60);
		throw new AppError(
			'too_many_requests',
			`Too many tries. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, then try again.`
		);
	}
}

/** Gives one try back: it was a good one. */
export async function giveBack(limit: Limit): Promise<void> {
	await connection().query(
		'UPDATE rate_limits SET points = points - 1 WHERE bucket = :bucket AND points > 0',
		{
			replacements: { bucket: bucketOf(limit) }
		}
	);
}
