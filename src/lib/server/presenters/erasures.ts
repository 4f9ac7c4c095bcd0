import type { ErasureState, ErasureView, MyErasure } from '$lib/schemas/erasures';
import type { Customer, Erasure, Job } from '../db/models';

const stateOf = ({ state }: Erasure): ErasureState => (state === 'running' ? 'asked' : state);

export function presentErasure(
	erasure: Erasure,
	customer: Customer | null,
	jobs: readonly Job[],
	vehicles: number
): ErasureView {
	const { id, customerId, reason, version, createdAt, decidedAt } = erasure;
	return {
		...{ id, customerId, reason, version, vehicles },
		customerName: customer?.name ?? '',
		state: stateOf(erasure),
		askedAt: createdAt.toISOString(),
		decidedAt: decidedAt?.toISOString() ?? null,
		jobs: jobs.map(({ number }) => number)
	};
}

export const presentMyErasure = (erasure: Erasure): MyErasure => ({
	state: stateOf(erasure),
	askedAt: erasure.createdAt.toISOString(),
	reason: erasure.reason
});
