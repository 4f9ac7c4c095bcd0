import type { WaitingErasure, WaitingErasures } from '$lib/schemas/erasures';
import type { SignedInPerson } from '$lib/schemas/people';
import { Erasure } from '../db/models';
import { allow, mayDo } from '../policies';

const WAITS = { state: 'asked' } as const;

/** How many requests for deletion wait for a decision, and since when: for those who may decide. */
export async function countWaitingErasures(person: SignedInPerson): Promise<WaitingErasures> {
	const { workshopId } = allow(person, 'erasures.decide');
	const where = { workshopId, ...WAITS };
	const oldest = await Erasure.min<Date | null, Erasure>('createdAt', { where });
	return { count: await Erasure.count({ where }), oldestAt: oldest && new Date(oldest).toISOString() };
}

/** The request of one customer that waits; none for those who do not decide. */
export async function findWaitingErasure(
	person: SignedInPerson,
	customerId: number
): Promise<WaitingErasure | null> {
	if (!mayDo(person, 'erasures.decide')) return null;
	const erasure = await Erasure.findOne({ where: { workshopId: person.workshopId, customerId, ...WAITS } });
	return (
		erasure && {
			...{ id: erasure.id, askedAt: erasure.createdAt.toISOString() },
			isByRule: (erasure.askedBy ?? null) === null
		}
	);
}
