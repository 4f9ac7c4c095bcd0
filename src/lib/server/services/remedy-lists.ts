import type { RemedyListInput, RemedyListView } from '$lib/schemas/remedies';
import type { SignedInPerson } from '$lib/schemas/people';
import { priceRemedies, USUAL_MONEY_PER_HOUR } from '$lib/thermal/outlook';
import { UniqueConstraintError, type Transaction } from 'sequelize';
import { RemedyList } from '../db/models';
import { inTransaction } from '../db/transaction';
import { changedMeanwhile } from '../errors';
import { allow } from '../policies';
import { recordBy } from './audit';
import { saveVersioned } from './records';

function present(list: RemedyList | null): RemedyListView {
	return {
		moneyPerHour: list?.moneyPerHour ?? USUAL_MONEY_PER_HOUR,
		offers: priceRemedies(list?.offers).map(({ key, label, effect, cost, hours, offered }) => ({
			...{ key, label, effect, cost, hours, offered }
		})),
		version: list?.version ?? null
	};
}

/** What a workshop asks for its remedies; the usual figures until it has kept a list of its own. */
export async function remedyListOf(workshopId: number): Promise<RemedyListView> {
	return present(await RemedyList.findOne({ where: { workshopId } }));
}

export async function getRemedyList(person: SignedInPerson): Promise<RemedyListView> {
	allow(person, 'remedies.read');
	return remedyListOf(person.workshopId);
}

async function keepFirst(
	workshopId: number,
	changes: Omit<RemedyListInput, 'version'>,
	transaction: Transaction
): Promise<RemedyList> {
	try {
		return await RemedyList.create({ ...changes, workshopId }, { transaction });
	} catch (error) {
		if (error instanceof UniqueConstraintError) throw changedMeanwhile('list of remedies');
		throw error;
	}
}

export async function saveRemedyList(
	person: SignedInPerson,
	{ version, ...changes }: RemedyListInput
): Promise<RemedyListView> {
	allow(person, 'remedies.write');
	const { workshopId } = person;
	return inTransaction(async (transaction) => {
		let list = await RemedyList.findOne({ where: { workshopId }, transaction });
		if (list === null) list = await keepFirst(workshopId, changes, transaction);
		else await saveVersioned(list, 'list of remedies', version ?? -1, changes, transaction);
		const subject = { type: 'remedy-list', id: list.id };
		await recordBy(person, 'remedies.changed', subject, transaction, { ...changes });
		return present(list);
	});
}
