import type { ErasureState, ErasureView, MyErasure } from '$lib/schemas/erasures';
import type { Customer, Erasure, Job, OutgoingMail } from '../db/models';
import { presentSentLetter } from './sent-letters';

const stateOf = ({ state }: Erasure): ErasureState => (state === 'running' ? 'asked' : state);

export function presentErasure(
	erasure: Erasure,
	about: { customer: Customer | null; jobs: readonly Job[]; vehicles: number; letter: OutgoingMail | null }
): ErasureView {
	const { id, customerId, reason, version, createdAt, decidedAt } = erasure;
	const { customer, jobs, vehicles, letter } = about;
	return {
		...{ id, customerId, reason, version, vehicles },
		customerName: customer?.name ?? '',
		state: stateOf(erasure),
		askedAt: createdAt.toISOString(),
		decidedAt: decidedAt?.toISOString() ?? null,
		jobs: jobs.map(({ number }) => number),
		letter: letter && presentSentLetter(letter)
	};
}

export const presentMyErasure = (erasure: Erasure): MyErasure => ({
	state: stateOf(erasure),
	askedAt: erasure.createdAt.toISOString(),
	reason: erasure.reason,
	canWithdraw: erasure.state === 'asked' && (erasure.askedBy ?? null) !== null
});
