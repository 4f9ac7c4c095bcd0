import { QueryTypes, type Sequelize } from 'sequelize';

const WAIT_S = 60;

/**
 * Does work that only one process may do at a time; the others wait for it. The lock belongs to one connection, so a
 * transaction pins that, and the work's own queries join it.
 */
export async function withNamedLock<T>(
	sequelize: Sequelize,
	name: string,
	work: () => Promise<T>
): Promise<T> {
	return sequelize.transaction(async (transaction) => {
		const [lock] = await sequelize.query<{ got: number | null }>('SELECT GET_LOCK(:name, :wait) AS got', {
			replacements: { name, wait: WAIT_S },
			type: QueryTypes.SELECT,
			transaction
		});
		if (lock?.got !== 1) {
			throw new Error(
				`Another process has been at work on the ${name} for ${WAIT_S} s: wait for it, then start again.`
			);
		}
		try {
			return await work();
		} finally {
			await sequelize.query('DO RELEASE_LOCK(:name)', { replacements: { name }, transaction });
		}
	});
}
