// Fills a demo workshop with copies of its own assessments, each on a job and a mount of its own.
import { QueryTypes } from 'sequelize';

/** Numbers of copied jobs begin here, above those of the demo. */
const FIRST_NUMBER = 100_000;

/** Of each mount under no book of its own the newest assessment. */
const TEMPLATES = `
	SELECT MAX(a.id) AS assessmentId, a.mount_id AS mountId, a.job_id AS jobId
	FROM assessments a JOIN jobs j ON j.id = a.job_id JOIN vehicles v ON v.id = j.vehicle_id
	WHERE a.workshop_id = 1 AND v.engine_layout <> 'flat'
	GROUP BY a.mount_id, a.job_id ORDER BY a.mount_id
`;
interface Template {
	assessmentId: number;
	mountId: number;
	jobId: number;
}

const COLUMNS = `
	SELECT column_name AS name FROM information_schema.columns
	WHERE table_schema = DATABASE() AND table_name = :table AND extra = ''
`;

/** Copies so many, in turn, into the database that the environment leads to. */
export async function copyAssessments(env: NodeJS.ProcessEnv, count: number): Promise<void> {
	Object.assign(process.env, env);
	const { closeConnection, connection } = await import('../../lib/server/db/connection');
	const select = <Row extends object>(sql: string, replacements = {}): Promise<Row[]> =>
		connection().query<Row>(sql, { replacements, type: QueryTypes.SELECT });
	const copy = async (table: string, given: Record<string, string>, from: string): Promise<void> => {
		const names = (await select<{ name: string }>(COLUMNS, { table })).map(({ name }) => name);
		const own = names.filter((name) => name !== 'id' && !(name in given));
		const into = [...own, ...Object.keys(given)].join(', ');
		const values = [...own.map((name) => `t.${name}`), ...Object.values(given)].join(', ');
		await connection().query(`INSERT INTO ${table} (${into}) SELECT ${values} FROM ${from}`);
	};
	try {
		const templates = await select<Template>(TEMPLATES);
		const of = (key: keyof Template): string =>
			`ELT(1 + n.seq MOD ${templates.length}, ${templates.map((each) => each[key]).join(', ')})`;
		const numbers = `seq_1_to_${count} n`;
		const job = `jobs j ON j.workshop_id = 1 AND j.number = ${FIRST_NUMBER} + n.seq`;
		await copy(
			'jobs',
			{ number: `${FIRST_NUMBER} + n.seq` },
			`${numbers} JOIN jobs t ON t.id = ${of('jobId')}`
		);
		await copy(
			'mounts',
			{ job_id: 'j.id' },
			`${numbers} JOIN ${job} JOIN mounts t ON t.id = ${of('mountId')}`
		);
		await copy(
			'assessments',
			{ job_id: 'j.id', mount_id: 'm.id' },
			`${numbers} JOIN ${job} JOIN mounts m ON m.job_id = j.id JOIN assessments t ON t.id = ${of('assessmentId')}`
		);
	} finally {
		await closeConnection();
	}
}
